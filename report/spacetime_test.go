package report

import (
	"math"
	"strings"
	"testing"

	"linewitness/report/internal/reporttest"
	"linewitness/sim/record"
)

func plain(s string) string { return strings.ReplaceAll(s, "\u00a0", " ") }

// mapped is a made-up map over two sections, the second of them reversed.
func mapped() *record.Case {
	return &record.Case{
		Name: "nominal",
		Model: record.Model{Sections: []record.ModelSection{
			{Name: "a", From: "tx", To: "tee"}, {Name: "b", From: "mast", To: "tee"},
		}},
		SpaceTime: record.SpaceTime{
			Path: []record.PathSection{{Section: "a", From: 0, To: 30}, {Section: "b", Reversed: true, From: 30, To: 50}},
			Z:    []float64{0, 25, 50}, T: []float64{0, 1e-7, 2e-7, 3e-7},
			V:      [][]float64{{1, 0, 0}, {0, 2, math.NaN()}, {0, 1, -3}, {math.Inf(1), 0, 0}},
			Fronts: []record.Front{{Z1: 30, T1: 1e-7, Passage: 1}, {Z0: 30, T0: 1e-7, Z1: 50, T1: 1.7e-7, Passage: 1}, {Z0: 50, T0: 1.7e-7, Z1: 30, T1: 2.4e-7, Passage: 2}},
		},
	}
}

func TestMapFinding(t *testing.T) {
	c := mapped()
	want := "The path to mast is 50.00 m long; the first front is there after 170.0 ns; the largest voltage on the map is 3.000 V, at 0 m of b, 200.0 ns after switch-on."
	if got := plain(mapFinding(c)); got != want {
		t.Errorf("finding %q,\n want %q", got, want)
	}
	c.SpaceTime.Envelope = true
	c.SpaceTime.V[2][2] = 0
	if got := plain(mapFinding(c)); !strings.Contains(got, "the largest amplitude on the map is 2.000 V, at 25.00 m of a, 100.0 ns") {
		t.Errorf("finding %q", got)
	}
	c.SpaceTime.V = [][]float64{{0, math.NaN()}}
	if got := plain(mapFinding(c)); !strings.HasSuffix(got, "no voltage is above zero.") {
		t.Errorf("finding %q", got)
	}
}

// The junctions along the path are named in its direction, and the key has the
// passages that there are.
func TestMapNames(t *testing.T) {
	c := mapped()
	var names []string
	for _, m := range pathBounds(c) {
		names = append(names, m.Label)
	}
	if got := strings.Join(names, " "); got != "tx tee mast" {
		t.Errorf("junctions %q", got)
	}
	var key []string
	for _, e := range mapKey(c.SpaceTime) {
		key = append(key, e.Text)
	}
	if got, want := strings.Join(key, "; "), "wave front from the source; its echo; junction"; got != want {
		t.Errorf("key %q, want %q", got, want)
	}
	for _, m := range []record.SpaceTime{{}, {Envelope: true}, {Envelope: true, Crests: true}} {
		if note := mapNote(m); strings.Contains(note, "amplitude") != m.Envelope || strings.Contains(note, "quarter") != m.Crests {
			t.Errorf("note %q for %+v", note, m)
		}
	}
}

// A chain has its bounce table; anything else has none.
func TestBounceTable(t *testing.T) {
	opt := reporttest.Options{Error: 1e-4, Loop: 0.3}
	for _, c := range []struct {
		n    reporttest.Network
		want bool
	}{{reporttest.Cascade(3), true}, {reporttest.FeederNetwork(), false}} {
		text := strings.Join(text(t, reporttest.One("One", c.n, opt), Options{}), "\n")
		if got := strings.Contains(text, "Bounce table"); got != c.want {
			t.Errorf("table %v, want %v", got, c.want)
		}
	}
	b := record.Bounces{Coefficients: make([]record.BounceCoefficient, 3), Sections: make([]record.BounceSection, 2)}
	for range arrivalRows + 5 {
		b.Arrivals = append(b.Arrivals, record.Bounce{Junction: "j"})
	}
	if table := bounceArrivals(b); len(table.Rows) != arrivalRows/2 || len(table.Rows[0]) != len(table.Columns) {
		t.Errorf("%d rows of %d cells", len(table.Rows), len(table.Rows[0]))
	}
	b.Arrivals = b.Arrivals[:3]
	table := bounceArrivals(b)
	if got := table.Rows[1][5].Text + table.Rows[1][1].Text; len(table.Rows) != 2 || got != "j" {
		t.Errorf("rows %+v", table.Rows)
	}
	for _, row := range bounceCoefficients(b).Rows {
		if len(row) != len(bounceCoefficients(b).Columns) {
			t.Errorf("a row of %d cells", len(row))
		}
	}
}
