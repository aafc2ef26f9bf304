package design

import (
	"bytes"
	"crypto/sha256"
	"fmt"
	"math"
	"strings"
	"testing"

	"github.com/google/go-cmp/cmp"
	"pgregory.net/rapid"
)

func partOf(t *testing.T, d *Design, name string) Part {
	t.Helper()
	for _, p := range d.parts() {
		if p.Name == name {
			return p.Part
		}
	}
	t.Fatalf("no part %s", name)
	return Part{}
}

// What a coil or a capacitor of the test designs loses at 100 MHz.
const omega100 = 2 * math.Pi * 100e6

func TestLumpedParts(t *testing.T) {
	d := goodFile(t, "parts.yaml").Nominal
	for name, want := range map[string]Impedance{
		"coil":              {R: 5 + omega100*2e-6/200, L: 2e-6, Text: "5 ohm, 2 uH with Q 200"},
		"capacitor":         {R: 1 / (omega100 * 30e-12 * 1000), C: 30e-12, Text: "30 pF with Q 1000"},
		"leaky":             {R: 0.2, C: 30e-12, Text: "30 pF with ESR 0.2 ohm"},
		"one":               {R: 5, Text: "5 ohm"},
		"series_short_form": {R: 5, L: 1e-6, Text: "5 ohm, 1 uH"},
	} {
		got := partOf(t, d, name).Impedance
		near(t, name+": R", got.R, want.R)
		if got.Kind != SeriesParts || got.L != want.L || got.C != want.C || got.Text != want.Text {
			t.Errorf("%s: %+v, want %+v", name, got, want)
		}
	}
}

func TestCombinations(t *testing.T) {
	d := goodFile(t, "parts.yaml").Nominal
	for name, want := range map[string]struct {
		tree Node
		text string
	}{
		"nested": {
			Node{Parallel: []Node{{R: 300}, {Series: []Node{{R: omega100 * 2e-6 / 150, L: 2e-6}, {R: 0.1, C: 30e-12}}}}},
			"300 ohm || (2 uH with Q 150, 30 pF with ESR 0.1 ohm)",
		},
		"short_form": {
			Node{Parallel: []Node{{R: 4700}, {R: omega100 * 2e-6 / 150, L: 2e-6}}},
			"4.7 kohm || 2 uH with Q 150",
		},
		"trap": {
			Node{Parallel: []Node{{R: omega100 * 200e-9 / 200, L: 200e-9}, {C: 12e-12}}},
			"200 nH with Q 200 || 12 pF",
		},
		"list": {
			Node{Series: []Node{{R: 5}, {L: 1e-6}, {Parallel: []Node{{R: 1000}, {C: 3e-12}}}}},
			"5 ohm, 1 uH, (1 kohm || 3 pF)",
		},
	} {
		got := partOf(t, d, name).Impedance
		rounding := cmp.Comparer(func(a, b float64) bool { return math.Abs(a-b) <= valueTol*math.Abs(a) })
		if diff := cmp.Diff(want.tree, got.Tree, rounding); diff != "" || got.Kind != Combination {
			t.Errorf("%s: kind %d (-want +got):\n%s", name, got.Kind, diff)
		}
		if got.Text != want.text {
			t.Errorf("%s: text %q, want %q", name, got.Text, want.text)
		}
	}
}

func TestAdmittance(t *testing.T) {
	d := goodFile(t, "parts.yaml").Nominal
	z := partOf(t, d, "admittance").Impedance
	near(t, "R", real(z.Z), 100) // 1/(0.008 - j0.004) = 100 + j50
	near(t, "X", imag(z.Z), 50)
	if z.Kind != Complex || z.Text != "8 - j4 mS" {
		t.Errorf("%+v", z)
	}
	if z := partOf(t, d, "nothing").Impedance; z.Kind != Open {
		t.Errorf("no admittance: %+v", z)
	}
}

// An admittance is read in the convention of the file.
func TestAdmittanceForms(t *testing.T) {
	const cut = 1e-16 // what 17 places leave of a size up to 1
	rapid.Check(t, func(t *rapid.T) {
		y := complex(rapid.Float64Range(1e-6, 1).Draw(t, "g"), rapid.Float64Range(-1, 1).Draw(t, "b"))
		for c := Engineering; c <= Physics; c++ {
			sign := "+"
			if math.Signbit(imag(y)) != (c == Physics) {
				sign = "-"
			}
			text := fmt.Sprintf("%g %s %s%.17f S", real(y), sign, c.letter(), math.Abs(imag(y)))
			got, f := parseComplex(text, admittance, c)
			if f != nil {
				t.Fatalf("%s: %s", text, f.message)
			}
			if math.Abs(real(got)-real(y)) > cut || math.Abs(imag(got)-imag(y)) > cut {
				t.Fatalf("%s = %v, want %v", text, got, y)
			}
		}
	})
}

func TestTablesAndFiles(t *testing.T) {
	f := goodFile(t, "parts.yaml")
	for name, want := range map[string]struct {
		z          complex128
		from, text string
	}{
		"table": {33 + 14i, "the table", "33 + j14 ohm, from the table at 100 MHz"},
		"file":  {28 + 18i, "antenna.s1p", "28 + j18 ohm, from antenna.s1p at 100 MHz"},
	} {
		got := partOf(t, f.Nominal, name).Impedance
		near(t, name+": R", real(got.Z), real(want.z))
		near(t, name+": X", imag(got.Z), imag(want.z))
		if got.Kind != Complex || got.From != want.from || got.Text != want.text {
			t.Errorf("%s: %+v", name, got)
		}
	}
	open := partOf(t, f.Nominal, "open_file")
	if open.Impedance.Kind != Open || open.Impedance.Text != "open, from measured/open_end.s1p at 100 MHz" {
		t.Errorf("open file: %+v", open.Impedance)
	}
	if len(open.Warnings) != 1 || !strings.Contains(open.Warnings[0], "1 of 4 points give power") {
		t.Errorf("warnings of the open file: %q", open.Warnings)
	}
	if want := "load open_file: " + open.Warnings[0]; !strings.Contains(strings.Join(f.Nominal.Warnings, "\n"), want) {
		t.Errorf("warnings of the design: %q", f.Nominal.Warnings)
	}
	// A case at another frequency reads them there.
	other := partOf(t, caseOf(t, f, "frequency"), "file").Impedance
	near(t, "R at 105 MHz", real(other.Z), 35)
	near(t, "X at 105 MHz", imag(other.Z), 40)
}

// Each file is kept once, as it is, with its sum.
func TestAttachments(t *testing.T) {
	opened := map[string]int{}
	open := func(path string) ([]byte, error) {
		opened[path]++
		return openIn(filesDir)(path)
	}
	f, err := LoadWith("parts.yaml", readFile(t, "testdata/good/parts.yaml"), open)
	if err != nil {
		t.Fatal(err)
	}
	if diff := cmp.Diff(map[string]int{"antenna.s1p": 1, "measured/open_end.s1p": 1}, opened); diff != "" {
		t.Errorf("opened (-want +got):\n%s", diff)
	}
	var names []string
	for _, a := range f.Attachments {
		names = append(names, a.Name)
		data := readFile(t, filesDir+"/"+a.Name)
		if !bytes.Equal(a.Data, data) || a.SHA256 != fmt.Sprintf("%x", sha256.Sum256(data)) {
			t.Errorf("%s is not kept as it is", a.Name)
		}
	}
	if diff := cmp.Diff([]string{"antenna.s1p", "measured/open_end.s1p"}, names); diff != "" {
		t.Error("attachments:", diff)
	}
	if minimal := goodFile(t, "minimal.yaml"); minimal.Attachments != nil {
		t.Errorf("attachments of a design without: %v", minimal.Attachments)
	}
}

func TestTransformers(t *testing.T) {
	f := goodFile(t, "parts.yaml")
	balun, step := partOf(t, f.Nominal, "balun"), partOf(t, f.Nominal, "step")
	if balun.At != "mast" || balun.To != "far" || balun.Ratio != 4 || balun.RatioText != "1:4" || balun.Impedance.Kind != Transformer {
		t.Errorf("balun %+v", balun)
	}
	if step.Ratio != 1/2.5 || step.Impedance.Text != "ideal transformer 2.5 : 1" {
		t.Errorf("step %+v", step)
	}
	if r := partOf(t, caseOf(t, f, "turns"), "balun").Ratio; r != 9 {
		t.Errorf("a case with 1:9 has %g", r)
	}
	for _, name := range []string{"bridge", "bridge_2"} {
		if p := partOf(t, caseOf(t, f, name), "balun"); p.Ratio != 0 || p.Impedance.Kind != Short || p.To != "far" {
			t.Errorf("%s: %+v", name, p)
		}
	}
}

// A case that gives another form of a part drops the form it inherits.
func TestCasesOfParts(t *testing.T) {
	f := goodFile(t, "parts.yaml")
	for _, tt := range []struct {
		inCase, part string
		kind         ImpedanceKind
		text         string
	}{
		{"to_short", "coil", Short, "short"},
		{"to_short", "nested", Complex, "1 mS"},
		{"to_parts", "nested", SeriesParts, "5 ohm"},
		{"to_parts", "admittance", SeriesParts, "3 pF"},
		{"to_parts", "table", Complex, "28 + j18 ohm, from antenna.s1p at 100 MHz"},
		{"to_parts", "file", Matched, "matched"},
		{"to_list", "coil", Combination, "1 ohm || 3 pF"},
		{"one_member", "short_form", Combination, "4.7 kohm || 3 uH with Q 150"},
		{"losses", "short_form", Combination, "4.7 kohm || 2 uH with ESR 1 ohm"},
		{"losses", "coil", SeriesParts, "5 ohm, 2 uH with ESR 1 ohm"},
	} {
		if got := partOf(t, caseOf(t, f, tt.inCase), tt.part).Impedance; got.Kind != tt.kind || got.Text != tt.text {
			t.Errorf("%s of %s: kind %d, %q, want %d, %q", tt.part, tt.inCase, got.Kind, got.Text, tt.kind, tt.text)
		}
	}
}

// The loss of a Q is that at the design frequency, as the coil has it in a
// case at another frequency too, unless the case gives the Q.
func TestQualityInACaseOfOtherFrequency(t *testing.T) {
	f := goodFile(t, "parts.yaml")
	d := caseOf(t, f, "frequency")
	near(t, "the capacitor", partOf(t, d, "capacitor").Impedance.R, 1/(omega100*30e-12*1000))
	near(t, "the coil, given anew", partOf(t, d, "coil").Impedance.R, 5+1.05*omega100*2e-6/100)
}

// A source may have the measured impedance of an antenna.
func TestAntennaAsSource(t *testing.T) {
	f := goodFile(t, "antenna_source.yaml")
	s := f.Nominal.Source
	if s.Impedance.Kind != Complex || s.Impedance.From != "antenna.s1p" || len(f.Attachments) != 1 {
		t.Errorf("source impedance %+v", s.Impedance)
	}
	near(t, "R", real(s.Impedance.Z), 28)
	near(t, "EMF", s.EMF.SI, math.Sqrt(8*28e-3))
	near(t, "EMF at 105 MHz", caseOf(t, f, "other").Source.EMF.SI, math.Sqrt(8*35e-3))
	if z := caseOf(t, f, "parts").Source.Impedance; z.Kind != SeriesParts || z.R != 50 {
		t.Errorf("parts: %+v", z)
	}
	if z := caseOf(t, f, "typed").Source.Impedance; z.From != "the table" || real(z.Z) < 30 || real(z.Z) > 40 {
		t.Errorf("table: %+v", z)
	}
}
