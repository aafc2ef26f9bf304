package report

import (
	"math"
	"strings"
	"testing"

	"linewitness/report/format"
	"linewitness/report/internal/reporttest"
	"linewitness/sim/record"
)

// readable puts plain spaces for the ones that do not break.
func readable(s string) string { return strings.ReplaceAll(s, format.Space, " ") }

// judged is a record of cases with the given requirement verdicts.
func judged(cases map[string][]record.RequirementVerdict, order ...string) *document {
	r := &record.Record{Verdict: record.Verified}
	for _, name := range order {
		c := record.Case{Name: name, Settling: record.Settling{Settled: true}}
		for i, v := range cases[name] {
			c.Requirements = append(c.Requirements, record.Requirement{ID: "R" + string(rune('1'+i)), Verdict: v})
		}
		r.Cases = append(r.Cases, c)
	}
	return &document{r: r}
}

func TestReason(t *testing.T) {
	const met, missed, open = record.Met, record.MissedReq, record.NotShownReq
	for _, c := range []struct {
		d    *document
		want string
	}{
		{
			judged(map[string][]record.RequirementVerdict{"a": {met}}, "a"),
			"Every requirement is met in every case that it applies to; the two solutions differ by at most 0 % of a section's largest value.",
		},
		{judged(nil, "a"), "The design states no requirement; the two solutions differ by at most 0 % of a section's largest value."},
		{
			judged(map[string][]record.RequirementVerdict{"a": {missed, met}, "b": {missed, open}}, "a", "b"),
			"R1 is missed in a, b. R2 is not shown in b.",
		},
		{
			judged(map[string][]record.RequirementVerdict{"a": {missed, missed, met}, "b": {met, met, missed}}, "a", "b"),
			"R1, R2 are missed in a. R3 is missed in b.",
		},
	} {
		if got := readable(c.d.reason()); got != c.want {
			t.Errorf("reason %q, want %q", got, c.want)
		}
	}
	d := judged(nil, "a")
	d.r.Cases[0].Settling = record.Settling{Periods: 20000}
	if got, want := readable(d.reason()), "Case a reached no steady state within 20 000 periods."; got != want {
		t.Errorf("reason %q, want %q", got, want)
	}
	d.r.Cases[0] = record.Case{Name: "a", Verdict: record.Disagree, Settling: record.Settling{Settled: true}, Agreement: record.Agreement{Voltage: 0.02, Limit: 0.005}}
	if got, want := readable(d.reason()), "In case a the two solutions differ by 2.00 %; the limit is 0.500 %."; got != want {
		t.Errorf("reason %q, want %q", got, want)
	}
}

func TestTally(t *testing.T) {
	qs := []record.Requirement{{Verdict: record.Met}, {Verdict: record.MissedReq}, {Verdict: record.NotShownReq}, {Verdict: record.Met}}
	if got, want := readable(count(qs).String()), "2 met, 1 missed, 1 not shown"; got != want {
		t.Errorf("%q, want %q", got, want)
	}
	if got := count(nil).String(); got != "none" {
		t.Errorf("%q for no requirement", got)
	}
}

// Which limits are drawn on which section, in peak units.
func TestLimitsOf(t *testing.T) {
	c := reporttest.FeederNetwork().Case("nominal", reporttest.Options{Error: 1e-4, Loop: 0.5})
	add := func(id, quantity, subject, unit string, limit float64) {
		c.Requirements = append(c.Requirements, reporttest.Limit(id, quantity, subject, unit, 1, limit, 0, ""))
	}
	add("A", "peak_voltage", "along main", "V peak", 100)
	add("B", "steady_voltage", "whole network", "V rms", 100)
	add("C", "peak_voltage", "at tee", "V peak", 100)
	add("D", "peak_current", "along main", "A peak", 3)
	add("E", "vswr", "main, from end", "1", 2)
	add("F", "steady_voltage", "along tail, change from iced", "dB", 1)
	for _, k := range []struct{ section, quantity, want string }{
		{"main", "voltage", "A 100.0 V, B 141.4 V"}, {"tail", "voltage", "B 141.4 V"}, {"main", "current", "D 3.000 V"}, {"stub", "current", ""},
	} {
		var got []string
		for _, l := range limitsOf(&c, k.section, k.quantity) {
			id, _, _ := strings.Cut(l.label, ",")
			got = append(got, id+" "+readable(format.SI(l.value, "V")))
		}
		if s := strings.Join(got, ", "); s != k.want {
			t.Errorf("%s of %s: %q, want %q", k.quantity, k.section, s, k.want)
		}
	}
}

func TestToPeak(t *testing.T) {
	for _, c := range []struct {
		unit string
		want float64
		ok   bool
	}{{"V peak", 1, true}, {"kV rms", 1000 * math.Sqrt2, true}, {"mA pp", 0.5e-3, true}, {"V", 1, true}, {"dB", 0, false}, {"V average", 0, false}} {
		got, ok := toPeak(c.unit)
		if ok != c.ok || ok && math.Abs(got-c.want) > 1e-12*c.want {
			t.Errorf("toPeak(%q) = %v, %v, want %v, %v", c.unit, got, ok, c.want, c.ok)
		}
	}
}

func TestChanges(t *testing.T) {
	a := reporttest.FeederNetwork()
	b := reporttest.FeederNetwork()
	b.Frequency, b.EMF = 100e6, 1000
	b.Sections = append(b.Sections[:2], reporttest.Section{Name: "spare", From: "tee", To: "x", Length: 1, Z0: 50, VF: 1})
	b.Loads = b.Loads[1:]
	got := readable(strings.Join(changes(a.Model(), b.Model()), "\n"))
	for _, s := range []string{
		"frequency: 100.0 MHz instead of 98.10 MHz", "source: 1000 V peak EMF at transmitter",
		"section stub is absent", "section spare is added: tee to x", "load antenna is absent",
	} {
		if !strings.Contains(got, s) {
			t.Errorf("changes lack %q:\n%s", s, got)
		}
	}
	b = a
	b.Frequency *= 0.7
	if got := changes(a.Model(), b.Model()); len(got) != 1 {
		t.Errorf("another frequency alone gives %q", got)
	}
	if got := changes(a.Model(), a.Model()); got != nil {
		t.Errorf("changes of a model to itself: %q", got)
	}
}

// What repeats or is silent is not drawn twice.
func TestWaveformsChosen(t *testing.T) {
	w := func(name, unit string, samples ...float64) record.Waveform {
		return record.Waveform{Name: name, Unit: unit, Step: 1, Samples: samples}
	}
	list, silent := heard(distinct([]record.Waveform{
		w("source", "V", 1, 2), w("tee", "V", 1, 2), w("short", "V", 0, 1e-20), w("current", "A", 1, 2), w("empty", "V"),
	}), floor{v: 1e-12, i: 1e-12})
	var names []string
	for _, l := range list {
		names = append(names, l.Name)
	}
	if got, want := strings.Join(names, ", "), "source = tee, current"; got != want {
		t.Errorf("drawn %q, want %q", got, want)
	}
	if got := strings.Join(silent, ", "); got != "short" {
		t.Errorf("silent %q", got)
	}
}

func TestRoundTrips(t *testing.T) {
	if got := roundTrips(1, 4.5); len(got) != 4 || got[3] != 4 {
		t.Errorf("marks at %v", got)
	}
	if got := roundTrips(1, 100); len(got) != 9 || got[0] != 10 {
		t.Errorf("marks at %v", got)
	}
	for _, trip := range []float64{0, -1, math.NaN(), math.Inf(1)} {
		if got := roundTrips(trip, 5); len(got) != 0 {
			t.Errorf("a round trip of %v gives marks at %v", trip, got)
		}
	}
}

// The finding under a waveform is made of its data.
func TestWaveformFinding(t *testing.T) {
	w := record.Waveform{
		Name: "tee", Unit: "V", Step: 1e-9, Samples: []float64{0, 1, -1500, 990},
		Tail: record.Tail{Samples: []float64{1001, -1000}, Phasor: []float64{1000, -1000}},
	}
	want := "tee: largest 1.500 kV at 2.000 ns, 1.500 of the steady amplitude; last periods within 0.100 % of the phasor's waveform."
	if got := readable(waveformFinding(&w)); got != want {
		t.Errorf("%q, want %q", got, want)
	}
	w.Tail.Phasor = nil
	if got := waveformFinding(&w); !strings.Contains(got, "the source has stopped") {
		t.Errorf("%q for a source that stopped", got)
	}
}

// The finding under a figure of several waveforms names the largest value of
// each and the one whose last periods are farthest from its phasor's.
func TestWavesFinding(t *testing.T) {
	wave := func(name string, off float64) record.Waveform {
		return record.Waveform{
			Name: name, Unit: "V", Step: 1e-9, Samples: []float64{0, 1, -1500, 990},
			Tail: record.Tail{Samples: []float64{1000 + off, -1000}, Phasor: []float64{1000, -1000}},
		}
	}
	ws := []record.Waveform{wave("tee", 1), wave("end", -2)}
	want := "Largest values: tee 1.500 kV at 2.000 ns (1.500 of the steady amplitude); end 1.500 kV at 2.000 ns (1.500)." +
		" The last periods are within 0.200 % of the phasor's waveforms, end the farthest."
	if got := readable(wavesFinding(ws)); got != want {
		t.Errorf("%q, want %q", got, want)
	}
	ws[0].Tail.Phasor, ws[1].Samples = nil, []float64{math.NaN()}
	got := readable(wavesFinding(ws))
	for _, s := range []string{"tee 1.500 kV at 2.000 ns;", "end has no finite value", "The source has stopped"} {
		if !strings.Contains(got, s) {
			t.Errorf("%q lacks %q", got, s)
		}
	}
}
