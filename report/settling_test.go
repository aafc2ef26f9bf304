package report

import (
	"math"
	"reflect"
	"strings"
	"testing"

	"linewitness/report/figure"
	"linewitness/report/format"
	"linewitness/report/internal/reporttest"
	"linewitness/sim/record"
)

// textOf returns the whole text of a record without spaces, for where a line
// is broken none is left.
func textOf(t *testing.T, r *record.Record) string {
	t.Helper()
	return squeezed(strings.Join(text(t, r, Options{}), "\n"))
}

// The proof of settling is on paper: the rule with its windows, the times of
// every place beside the predicted ones, what the network holds, the figure's
// finding.
func TestSettlingText(t *testing.T) {
	all := textOf(t, reporttest.Feeder())
	for _, s := range []string{
		"Proof of settling", "from 980.9 ns on (rise 101.9 ns, then a round trip)", "at least the longest round trip, 879.0 ns; path 439.5 ns",
		"Loop factor, amplitude a round trip", "0.3501", "0.3500", "837.5 ns", "837.3 ns", "258.1", "258.0",
		"at most 0.0100 %", "Second and third harmonic", "8.694 µs", "11.53 µs, 1130 periods", "within 203.9 µs",
		"2 windows in a row", "passed, 2 in a row",
		"Predicted, slowest mode", "stub_short (load, current)", "antenna (load)", "A dash: not within the run of 3.720 µs.",
		"the network holds 3.997 mJ (time domain 3.998 mJ)", "loaded Q 258.1", "falls by 60 dB within 5.785 µs of a stop",
		"Every junction is within 1 % after 3.075 µs (3 round trips and 43.0 cycles)", "from the junctions named",
	} {
		if !strings.Contains(all, squeezed(s)) {
			t.Errorf("the text lacks %q", s)
		}
	}
	if s := "From the stop"; strings.Contains(all, squeezed(s)) {
		t.Errorf("a source that stays on has %q", s)
	}
	after := squeezed(afterContents(text(t, reporttest.Feeder(), Options{})))
	if n := strings.Count(after, squeezed("Proof of settling")); n != len(reporttest.Feeder().Cases) {
		t.Errorf("%d proofs, want one a case", n)
	}
}

// Where the source stops, the table has how each junction falls.
func TestRingDownText(t *testing.T) {
	r := reporttest.One("Burst", reporttest.Single(4), reporttest.Options{Error: 1e-4, Loop: 0.5, Stop: "at 2 us, fall 0.1 us"})
	all := textOf(t, r)
	for _, s := range []string{"From the stop to", "−40 dB", "−60 dB", "After the stop: until the amplitude stays below"} {
		if !strings.Contains(all, squeezed(s)) {
			t.Errorf("the text lacks %q", s)
		}
	}
}

// A case that did not settle says when it would have, and its tables show what
// there is.
func TestUnsettledText(t *testing.T) {
	r := reporttest.One("Stuck", reporttest.Single(2), reporttest.Options{Error: 0.1, Loop: 0.999, Unsettled: true})
	all := textOf(t, r)
	for _, s := range []string{
		"keeps 0.9993 of its amplitude over the longest round trip; steady state would be shown after 526.4 µs, 52 640 periods.",
		"not passed", "No times to the final phasors are given, for none was reached.", "not judged",
	} {
		if !strings.Contains(all, squeezed(s)) {
			t.Errorf("the text lacks %q", s)
		}
	}
	c := &r.Cases[0]
	c.Settling.Predicted = record.PredictedSettling{LoopFactor: 1, Settled: math.Inf(1)}
	if got, want := readable(predictedEnd(c)), "keeps 1.000 of its amplitude over the longest round trip, so that it never settles."; !strings.HasSuffix(got, want) {
		t.Errorf("%q, want it to end in %q", got, want)
	}
	c.Settling.Predicted.LoopFactor = math.NaN()
	if got := predictedEnd(c); got != "" {
		t.Errorf("%q without a prediction", got)
	}
}

// spoil sets every number in v to x.
func spoil(v reflect.Value, x float64) {
	switch v.Kind() {
	case reflect.Float64:
		v.SetFloat(x)
	case reflect.Struct:
		for i := range v.NumField() {
			spoil(v.Field(i), x)
		}
	case reflect.Slice:
		for i := range v.Len() {
			spoil(v.Index(i), x)
		}
	}
}

// Settling and power of nothing but NaN, infinity, zero, or nothing at all are
// printed as what they are.
func TestEvidenceOfNothing(t *testing.T) {
	for name, x := range map[string]float64{"not a number": math.NaN(), "endless": math.Inf(1), "minus endless": math.Inf(-1), "zero": 0, "huge": 1e300} {
		r := reporttest.One(name, reporttest.Ring(3), reporttest.Options{Error: 1e-4, Loop: 0.5, Stop: "at 2 us", MaxPoints: 5})
		c := &r.Cases[0]
		spoil(reflect.ValueOf(&c.Settling).Elem(), x)
		spoil(reflect.ValueOf(&c.Power).Elem(), x)
		c.Waveforms = nil
		r.Cases = append(r.Cases, *c)
		r.Cases[1].Name = "again"
		all := textOf(t, r)
		for _, s := range []string{"NaN", "Inf", "%!"} {
			if strings.Contains(all, s) {
				t.Errorf("%s: the text has %q", name, s)
			}
		}
	}
	r := reporttest.One("Empty", reporttest.Single(1), reporttest.Options{Error: 1e-4, Loop: 0.5})
	r.Cases[0].Settling, r.Cases[0].Power = record.Settling{}, record.Power{}
	all := textOf(t, r)
	for _, s := range []string{"Proof of settling", "Power: where it goes", "network holds"} {
		if strings.Contains(all, squeezed(s)) {
			t.Errorf("a record without evidence has %q", s)
		}
	}
}

func TestInTrips(t *testing.T) {
	for _, c := range []struct {
		t, trip, frequency float64
		want               string
	}{
		{0.5e-6, 1e-6, 10e6, "5.0 cycles"},
		{1.2e-6, 1e-6, 10e6, "one round trip and 2.0 cycles"},
		{4.31e-6, 1e-6, 10e6, "4 round trips and 3.1 cycles"},
		{40.5e-6, 1e-6, 10e6, "40.50 round trips"},
		{1e-6, 0, 10e6, "counted from the start of the source"},
		{1e-6, 1e-6, 0, "counted from the start of the source"},
	} {
		if got := readable(inTrips(c.t, c.trip, c.frequency)); got != c.want {
			t.Errorf("inTrips(%v, %v, %v) = %q, want %q", c.t, c.trip, c.frequency, got, c.want)
		}
	}
}

// Echoes that would fall on one line share it, those after the axis are left
// out, and there are never too many.
func TestEchoMarks(t *testing.T) {
	got := echoMarks([]record.Echo{{Name: "a", Time: 10}, {Name: "b", Time: 11}, {Name: "c", Time: 12}, {Name: "d", Time: 50}, {Name: "e", Time: 150}, {Name: "f", Time: math.NaN()}}, 100)
	want := []figure.Mark{{At: 10, Label: "a, b and 1 more"}, {At: 50, Label: "d"}}
	if !reflect.DeepEqual(got, want) {
		t.Errorf("marks %v, want %v", got, want)
	}
	var many []record.Echo
	for k := range 100 {
		many = append(many, record.Echo{Name: "x", Time: float64(k)})
	}
	if got := echoMarks(many, 100); len(got) != mostEchoes {
		t.Errorf("%d marks, want %d", len(got), mostEchoes)
	}
}

// The source's junction comes first, then the slowest, those of loads, and the
// slowest of the rest; one that did not get there is the slowest of all.
func TestShownPlaces(t *testing.T) {
	c := &record.Case{Model: record.Model{Source: record.ModelSource{At: "s"}, Loads: []record.ModelPart{{At: "l"}, {At: "s"}}}}
	for _, p := range []struct {
		name string
		time float64
	}{{"a", 1}, {"b", 5}, {"s", 2}, {"l", 3}, {"never", math.NaN()}, {"c", 4}, {"d", 0.5}} {
		c.Settling.Places = append(c.Settling.Places, record.SettlingPlace{
			Name: p.name, Kind: "junction", To1Percent: p.time, Time: []float64{0}, Departure: []float64{1},
		})
	}
	c.Settling.Places = append(c.Settling.Places, record.SettlingPlace{Name: "load", Kind: "load"})
	var got []string
	for _, p := range shownPlaces(c) {
		got = append(got, p.Name)
	}
	if s, want := strings.Join(got, " "), "s never l b c a"; s != want {
		t.Errorf("shown %q, want %q", s, want)
	}
}

// A load of a junction's name has a row of its own, and the ring-down goes to
// the junction.
func TestTimeRows(t *testing.T) {
	s := record.Settling{
		Places: []record.SettlingPlace{
			{Name: "end", Kind: "junction", To10Percent: 1, To1Percent: 2, ToTenth: 3},
			{Name: "end", Kind: "load", Quantity: "current", To10Percent: 4},
		},
		RingDown: []record.RingDown{{Name: "end", To20: 5, To40: 6, To60dB: 7}, {Name: "other", To20: 8}},
	}
	rows := timeRows(s)
	if len(rows) != 4 || rows[1].times != [6]float64{1, 2, 3, 5, 6, 7} || rows[2].name != "end (load, current)" || rows[3].times[3] != 8 {
		t.Errorf("rows %+v", rows)
	}
}

// The rule says of each of the last two windows whether it passed, and nothing
// where that was not kept.
func TestSettlingRule(t *testing.T) {
	d := &document{r: &record.Record{Design: record.Design{Tolerance: 1e-4, MaxPeriods: 100}}}
	window := func(time float64, passed bool) record.SettlingPoint {
		return record.SettlingPoint{Time: time, Passed: passed}
	}
	for name, c := range map[string]struct {
		s    record.Settling
		want [2]string
	}{
		"settled":    {record.Settling{Settled: true, Passes: 2, Curve: []record.SettlingPoint{window(1, false), window(2, true), window(3, true)}}, [2]string{"passed", "passed, 2 in a row"}},
		"one passed": {record.Settling{Passes: 1, Curve: []record.SettlingPoint{window(1, false), window(2, true)}}, [2]string{"not passed", "passed, 1 in a row"}},
		"one window": {record.Settling{Curve: []record.SettlingPoint{window(1, false)}}, [2]string{"–", "not passed"}},
		"none":       {record.Settling{}, [2]string{"–", "–"}},
		"not kept":   {record.Settling{Settled: true, Curve: []record.SettlingPoint{window(1, false), window(2, false)}}, [2]string{"–", "–"}},
	} {
		rows := d.settlingRule(&record.Case{Model: record.Model{Frequency: 1e6}, Settling: c.s}).Rows
		last := rows[len(rows)-1]
		if got := [2]string{last[3].Text, last[4].Text}; got != c.want {
			t.Errorf("%s: %q, want %q", name, got, c.want)
		}
	}
}

// Where measured and predicted loop factor differ and little was left to
// measure, the record says why; where they agree, or much is left, it does not.
func TestFactorNote(t *testing.T) {
	of := func(predicted, measured, change float64) record.Settling {
		return record.Settling{
			LoopFactor: measured, Predicted: record.PredictedSettling{LoopFactor: predicted},
			Curve: []record.SettlingPoint{{Change: 1}, {Change: change}},
		}
	}
	const tolerance = 1e-4
	for _, c := range []struct {
		s    record.Settling
		want string
	}{
		{of(0.5, 0.45, 1e-6), ""},
		{of(1e-6, 0.1, 1e-3), ""},
		{of(math.NaN(), 0.1, 1e-6), ""},
		{of(0.1, 0, 1e-6), ""},
		{of(1e-6, 0.1, 1e-9), "the change that was left, 1.00 × 10^{−7} %."},
		{of(0.1, 1e-3, 1e-9), "need not be that of the slowest mode"},
	} {
		got := readable(factorNote(c.s, tolerance))
		got = strings.NewReplacer(string(format.Sup), "^{", string(format.End), "}").Replace(got)
		if (got == "") != (c.want == "") || !strings.Contains(got, c.want) {
			t.Errorf("%v: %q, want %q", c.s.LoopFactor, got, c.want)
		}
	}
}
