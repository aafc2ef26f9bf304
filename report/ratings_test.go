package report

import (
	"math"
	"strings"
	"testing"

	"linewitness/report/internal/reporttest"
	"linewitness/sim/record"
)

// rated is a record of cases with ratings of the given verdicts on section main.
func rated(advisory bool, cases ...record.RequirementVerdict) *document {
	d := judged(nil, "a", "b", "c")
	for i, v := range cases {
		d.r.Cases[i].Ratings = []record.Rating{{Section: "main", Quantity: "voltage", Verdict: v, Advisory: advisory}}
	}
	return d
}

// The verdict's reason tells of ratings, and of those that do not count as not
// counting.
func TestReasonOfRatings(t *testing.T) {
	const agree = "the two solutions differ by at most 0 % of a section's largest value."
	for _, c := range []struct {
		d    *document
		want string
	}{
		{rated(false, record.Met, record.Met), "The design states no requirement; every rating is kept in every case; " + agree},
		{rated(false, record.MissedReq, record.Met, record.MissedReq), "Section main is beyond its allowed voltage in a, c."},
		{rated(false, record.NotShownReq), "Section main is not shown to keep its allowed voltage in a."},
		{rated(true, record.Met, record.MissedReq), "The design states no requirement; " + agree +
			" Section main is not within the voltage rating of the cable table, which is from memory and not counted, in b."},
	} {
		if got := readable(c.d.reason()); got != c.want {
			t.Errorf("reason %q, want %q", got, c.want)
		}
	}
}

// Worst first over all cases; a margin that is not known comes before all.
func TestRanked(t *testing.T) {
	d := judged(nil, "a", "b")
	d.r.Cases[0].Ratings = []record.Rating{{Section: "x", MarginDB: 3}, {Section: "y", MarginDB: math.NaN()}}
	d.r.Cases[1].Ratings = []record.Rating{{Section: "x", MarginDB: -1}, {Section: "y", MarginDB: 3}}
	var got []string
	for _, r := range d.ranked() {
		got = append(got, r.name+r.Section)
	}
	if s := strings.Join(got, " "); s != "ay bx ax by" {
		t.Errorf("order %s", s)
	}
}

// A rating is drawn as what it allows, hatched, and as rated, not hatched; a
// rating without derating as one line.
func TestRatedLimits(t *testing.T) {
	r := record.Rating{Section: "s", Quantity: "voltage", Unit: "V", Rated: 1000 * math.Sqrt2, Text: "1 kV rms", Derating: 6, Allowed: 708.8}
	ls := ratedLimits(r)
	if len(ls) != 2 || ls[0].mild || !ls[1].mild || readable(ls[0].label) != "allowed 708.8 V" || readable(ls[1].label) != "rated 1.414 kV" {
		t.Fatalf("limits %+v", ls)
	}
	tr := &track{unit: "V", phasor: []float64{500}, fdtd: []float64{501}, peak: []float64{638}}
	if got, want := readable(ls[0].finding(tr)), "10 % below the allowed 708.8 V (1 kV rms less 6.00 dB)"; got != want {
		t.Errorf("finding %q, want %q", got, want)
	}
	r.Derating, r.Advisory = 0, true
	if ls = ratedLimits(r); len(ls) != 1 || ls[0].mild || readable(ls[0].label) != "rated 1.414 kV (cable table)" {
		t.Errorf("limits %+v", ls)
	}
}

func TestDistance(t *testing.T) {
	for _, c := range []struct {
		value, limit float64
		want         string
	}{{90, 100, "10 % below"}, {124, 100, "24 % above"}, {1, 1000, "60 dB below"}, {0, 10, "100 % below"}, {100, 100, "0 % below"}} {
		if got := readable(distance(c.value, c.limit)); got != c.want {
			t.Errorf("distance(%v, %v) = %q, want %q", c.value, c.limit, got, c.want)
		}
	}
}

// A requirement that names its section is about that one, whatever its words.
func TestRequirementNamesItsSection(t *testing.T) {
	m := reporttest.FeederNetwork().Model()
	q := record.Requirement{Subject: "whole network", Section: "tail"}
	if concerns(m, q, "main") || !concerns(m, q, "tail") {
		t.Error("the section of a requirement is not heeded")
	}
}

// A line that a case has otherwise is told of; one that only one of two models
// has shows in its sections.
func TestChangedLines(t *testing.T) {
	a, b := record.Model{Lines: reporttest.Lines()}, record.Model{Lines: reporttest.Lines()[:2]}
	b.Lines[0].Model = "constant"
	got := changes(a, b)
	if want := "line RG-213: RG-213 of the cable table (constant) instead of RG-213 of the cable table (dispersive)"; len(got) != 1 || got[0] != want {
		t.Errorf("changes %q, want %q", got, want)
	}
}
