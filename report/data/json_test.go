package data

import (
	"encoding/json"
	"math"
	"strconv"
	"strings"
	"testing"

	"github.com/google/go-cmp/cmp"
	"pgregory.net/rapid"

	"linewitness/sim/record"
)

func TestJSONGolden(t *testing.T) {
	got, err := JSON(sample())
	if err != nil {
		t.Fatal(err)
	}
	golden(t, "sample.json", got)
}

// A reader that knows the format finds each value where the format says.
func TestJSONRead(t *testing.T) {
	text, err := JSON(sample())
	if err != nil {
		t.Fatal(err)
	}
	var doc any
	if err := json.Unmarshal(text, &doc); err != nil {
		t.Fatal(err)
	}
	for _, tt := range []struct {
		path string
		want any
	}{
		{"format", 1.0},
		{"tool/version", "v0.0.0"},
		{"design/number", "X-1"},
		{"design/sha256", "00ff"},
		{"verdict", "not settled"},
		{"cases/nominal/verdict", "requirement missed"},
		{"design/date", "2026-03-31"},
		{"design/date_from", "record"},
		{"design/history/0/by", "R. Aaltonen"},
		{"design/history/1/text", "Longer main"},
		{"cases/nominal/stress/peak_voltage/uncertainty_v", 0.03},
		{"cases/nominal/stress/sections/main/peak_current_uncertainty_a", 0.002},
		{"cases/nominal/space_time/path/0/reversed", true},
		{"cases/nominal/space_time/rows", 3.0},
		{"cases/nominal/space_time/columns", 2.0},
		{"cases/nominal/space_time/until_s", 10e-9},
		{"cases/nominal/bounces/sections/0/kept", 0.999},
		{"cases/nominal/bounces/coefficients/0/from_left", nil},
		{"cases/nominal/bounces/coefficients/0/from_right", -1.0},
		{"cases/nominal/bounces/arrivals/1/step_v", 2.0},
		{"cases/nominal/phasor/source/v/re", 10.0},
		{"cases/nominal/phasor/source/i/im", 0.2},
		{"cases/nominal/phasor/source/available_power_w", nil},
		{"cases/nominal/phasor/sections/main/from/vswr", nil},
		{"cases/nominal/phasor/sections/main/from/reflection/im", -1.0},
		{"cases/nominal/phasor/sections/main/to/impedance", nil},
		{"cases/nominal/phasor/sections/main/to/v/im", -0.333333333333}, // 12 digits of 1/3
		{"cases/nominal/phasor/sections/main/voltage_max/at_m", 0.5},
		{"cases/nominal/phasor/sections/main/loss_w", 0.0},
		{"cases/nominal/fdtd/loads/end/v/re", 12.0012},
		{"cases/nominal/fdtd/junctions/far/v/re", 12.0012},
		{"cases/nominal/settling/settled", true},
		{"cases/nominal/settling/time_s", 600e-9},
		{"cases/nominal/settling/loop_factor", 0.25},
		{"cases/nominal/stress/phase", "worst"},
		{"cases/nominal/stress/peak_voltage/value_v", 21.0},
		{"cases/nominal/stress/peak_voltage/phase_deg", 30.0},
		{"cases/nominal/stress/sections/main/peak_current_a", 0.4},
		{"cases/nominal/agreement/expected", 3e-4},
		{"cases/nominal/agreement/worst/quantity", "current"},
		{"cases/nominal/grid/steps_per_period", 40.0},
		{"cases/nominal/grid/sections/main/cells", 10.0},
		{"cases/nominal/requirements/0/limit", 1.5}, // the limit that margin -0.25 is the distance to
		{"cases/nominal/requirements/0/text", `"low" & < 1.5`},
		{"cases/nominal/requirements/0/verdict", "missed"},
		{"cases/nominal/requirements/0/margin_db", nil},
		{"cases/nominal/requirements/1/value", nil},
		{"cases/nominal/requirements/1/limit", nil},
		{"cases/nominal/warnings/0", "the source is ideal: it has no available power"},
		{"cases/nominal/requirements/0/section", "main"},
		{"cases/nominal/lines/coax/model", "dispersive"},
		{"cases/nominal/lines/coax/series_residual", 4e-4},
		{"cases/nominal/lines/coax/shunt_residual", nil}, // no dielectric form
		{"cases/nominal/lines/coax/pedigree/0/kind", "catalogue"},
		{"cases/nominal/lines/coax/loss_fit/0/fitted_db_per_m", 0.01991},
		{"cases/nominal/lines/wire/field_per_volt_per_m", nil},
		{"cases/nominal/ratings/0/peak_time_s", 7.5e-9},
		{"cases/nominal/ratings/0/rated_text", "20 V rms"},
		{"cases/nominal/ratings/0/advisory", true},
		{"cases/nominal/ratings/0/field_v_per_m", 8064.0},
		{"cases/nominal/ratings/1/uncertainty", nil},
		{"cases/nominal/ratings/1/verdict", "not shown"},
		{"cases/ring, lossless/settling/settled", false},
		{"cases/ring, lossless/settling/to_1_percent_s", nil},
	} {
		got, ok := lookUp(doc, tt.path)
		if !ok || got != tt.want {
			t.Errorf("%s = %v (there: %t), want %v", tt.path, got, ok, tt.want)
		}
	}
}

func lookUp(v any, path string) (any, bool) {
	for key := range strings.SplitSeq(path, "/") {
		switch x := v.(type) {
		case map[string]any:
			next, ok := x[key]
			if !ok {
				return nil, false
			}
			v = next
		case []any:
			i, err := strconv.Atoi(key)
			if err != nil || i >= len(x) {
				return nil, false
			}
			v = x[i]
		default:
			return nil, false
		}
	}
	return v, true
}

func TestJSONKeepsOrder(t *testing.T) {
	r := sample()
	r.Cases[0].Name, r.Cases[1].Name = "zulu", "alpha"
	text, err := JSON(r)
	if err != nil {
		t.Fatal(err)
	}
	z, a := strings.Index(string(text), `"zulu"`), strings.Index(string(text), `"alpha"`)
	if z < 0 || a < z {
		t.Errorf("cases at %d and %d: not in the order of the record", z, a)
	}
}

func TestJSONRefusesNames(t *testing.T) {
	for _, tt := range []struct {
		name   string
		mend   func(*record.Record)
		reason string
	}{
		{"two cases", func(r *record.Record) { r.Cases[1].Name = "nominal" }, `kind case have the name "nominal"`},
		{"no name", func(r *record.Record) { r.Cases[1].Name = "" }, "kind case has no name"},
		{"two junctions", func(r *record.Record) { r.Cases[0].FDTD.Junctions[1].Name = "source" }, `"nominal": fdtd: two entries of kind junction`},
		{"two lines", func(r *record.Record) { r.Cases[0].Model.Lines[1].Name = "coax" }, `kind line have the name "coax"`},
		{"two grids", func(r *record.Record) {
			g := &r.Cases[0].Grid
			g.Sections = append(g.Sections, g.Sections[0])
		}, `grid: two entries of kind section`},
	} {
		r := sample()
		tt.mend(r)
		if _, err := JSON(r); err == nil || !strings.Contains(err.Error(), tt.reason) {
			t.Errorf("%s: error %v, want one with %q", tt.name, err, tt.reason)
		}
	}
}

// digitsTolerance is half a unit of the last of jsonDigits digits, relative to
// the smallest leading digit, and as much again for the decimal conversion.
const digitsTolerance = 1e-11

func TestNumberReadsBack(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		x := rapid.Float64().Draw(t, "x")
		var got float64
		if err := json.Unmarshal([]byte(number(x)), &got); err != nil {
			t.Fatalf("number(%g) = %q: %v", x, number(x), err)
		}
		if math.Abs(got-x) > digitsTolerance*math.Abs(x) {
			t.Fatalf("number(%g) reads back as %g", x, got)
		}
	})
}

func TestNumberWithoutValue(t *testing.T) {
	for _, tt := range []struct {
		got, want string
	}{
		{number(math.NaN()), "null"},
		{number(math.Inf(1)), "null"},
		{number(math.Inf(-1)), "null"},
		{number(math.Copysign(0, -1)), "0"},
		{complexNumber(complex(math.NaN(), 1)), "null"},
		{complexNumber(complex(1, math.Inf(-1))), "null"},
		{complexNumber(complex(1, -2e-9)), `{"re": 1, "im": -2e-09}`},
	} {
		if tt.got != tt.want {
			t.Errorf("got %s, want %s", tt.got, tt.want)
		}
	}
}

// Any tree of the printer's kinds is JSON that encoding/json reads back to the
// same values, in lines no longer than they need to be.
func TestRenderReadsBack(t *testing.T) {
	leaf := rapid.OneOf(
		rapid.Just[any](nil),
		rapid.Map(rapid.Bool(), func(b bool) any { return b }),
		rapid.Map(rapid.IntRange(-1e6, 1e6), func(i int) any { return i }),
		rapid.Map(rapid.String(), func(s string) any { return s }),
	)
	tree := rapid.Custom(func(t *rapid.T) any { return drawTree(t, leaf, 3) })
	rapid.Check(t, func(t *rapid.T) {
		v := tree.Draw(t, "tree")
		text := render(v)
		var got any
		if err := json.Unmarshal(text, &got); err != nil {
			t.Fatalf("%s: %v", text, err)
		}
		if diff := cmp.Diff(plain(v), got); diff != "" {
			t.Fatalf("(-want +got)\n%s", diff)
		}
	})
}

func drawTree(t *rapid.T, leaf *rapid.Generator[any], depth int) any {
	n := rapid.IntRange(0, 4).Draw(t, "n")
	switch kind := rapid.IntRange(0, 2).Draw(t, "kind"); {
	case kind == 0 || depth == 0:
		return leaf.Draw(t, "leaf")
	case kind == 1:
		l := list{}
		for range n {
			l = append(l, drawTree(t, leaf, depth-1))
		}
		return l
	default:
		o := object{}
		for i := range n {
			key := rapid.StringN(1, 8, -1).Draw(t, "key") + strconv.Itoa(i)
			o = append(o, member{key, drawTree(t, leaf, depth-1)})
		}
		return o
	}
}

// plain returns v as encoding/json decodes it.
func plain(v any) any {
	switch v := v.(type) {
	case object:
		m := map[string]any{}
		for _, x := range v {
			m[x.key] = plain(x.value)
		}
		return m
	case list:
		l := []any{}
		for _, x := range v {
			l = append(l, plain(x))
		}
		return l
	case int:
		return float64(v)
	}
	return v
}
