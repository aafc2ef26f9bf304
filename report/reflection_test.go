package report

import (
	"math"
	"math/cmplx"
	"strings"
	"testing"

	"linewitness/report/internal/reporttest"
	"linewitness/sim/record"
	"pgregory.net/rapid"
)

// curveTolerance is what exp(-2 gamma l) leaves of double precision over the
// lengths tried, of which the longest has some thousand radians.
const curveTolerance = 1e-8

// A curve begins at what the record says of one end and comes to what it says
// of the other; along it the points of both witnesses lie. So the constants of
// the record, its states and its profiles tell the same.
func TestLocus(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		n := reporttest.Random(t, 4)
		c := n.Case("nominal", reporttest.Options{Error: 1e-9, Loop: 0.3, MaxPoints: 4096})
		for _, m := range c.Model.Sections {
			l := newLocus(&c, m)
			if !l.shown() || cmplx.Abs(l.far) > 1+1e-9 {
				continue // power comes in at both ends
			}
			g := l.along(0, m.Length)
			if e := cmplx.Abs(g[0] - l.far); e > curveTolerance {
				t.Fatalf("%s: the curve begins %.3g from %v", m.Name, e, l.far)
			}
			if e := cmplx.Abs(g[len(g)-1] - l.near); e > curveTolerance {
				t.Fatalf("%s: the curve ends %.3g from %v", m.Name, e, l.near)
			}
			// The made-up second witness is 1e-9 of the largest voltage away;
			// where the reflection is small that is as much of the coefficient.
			if _, apart := l.dots(); apart > 1e-5 {
				t.Fatalf("%s: points are %.3g from the curve", m.Name, apart)
			}
			if cmplx.Abs(l.near) > cmplx.Abs(l.far)*(1+1e-9) {
				t.Fatalf("%s: |Γ| rises toward the generator, from %v to %v", m.Name, cmplx.Abs(l.far), cmplx.Abs(l.near))
			}
		}
	})
}

// A section that is drawn against the way of the power is seen from its other
// end: |Γ| is below 1 and the ends are named the other way.
func TestLocusTurned(t *testing.T) {
	n := reporttest.Single(1.3)
	n.Sections[0].From, n.Sections[0].To = "rx", "tx"
	c := n.Case("nominal", reporttest.Options{Error: 1e-4, Loop: 0.3})
	l := newLocus(&c, c.Model.Sections[0])
	if !l.turned || l.nearAt != "tx" || l.fars != "rx" {
		t.Fatalf("turned %v, from %s to %s", l.turned, l.nearAt, l.fars)
	}
	// By hand: the load is 75 ohm and 20 nH at 100 MHz, on 50 ohm.
	z := complex(75, 2*math.Pi*100e6*20e-9) / c.Model.Sections[0].Z0
	if want := (z - 1) / (z + 1); cmplx.Abs(l.far-want) > curveTolerance {
		t.Errorf("Γ of the load is %v, want %v", l.far, want)
	}
}

// Of many turns only the first and the last are drawn.
func TestManyTurns(t *testing.T) {
	n := reporttest.Single(42)
	n.Loads[0].R, n.Sections[0].DB = 300, 0.02
	c := n.Case("nominal", reporttest.Options{Error: 1e-4, Loop: 0.3})
	l := newLocus(&c, c.Model.Sections[0])
	lines, ring := l.lines()
	if len(lines) != 2 || !(ring[0] < ring[1]) {
		t.Fatalf("%d lines, ring %v", len(lines), ring)
	}
	dots, _ := l.dots()
	if len(dots) > 40 {
		t.Errorf("%d points are drawn on two turns", len(dots))
	}
	// Each turn shrinks the radius by exp(-2 alpha lambda/2).
	if got, want := cmplx.Abs(lines[0][len(lines[0])-1])/cmplx.Abs(lines[0][0]), math.Exp(-real(l.gamma)*3); math.Abs(got-want) > 1e-4 {
		t.Errorf("a turn shrinks the radius by %v, want %v", got, want)
	}
}

// between is exact for a wave, whatever the distance of the points up to near
// half a wavelength, and gives nothing beyond or outside.
func TestBetween(t *testing.T) {
	gamma := complex(0.02, 3.0)
	wave := func(z float64) complex128 {
		return 2*cmplx.Exp(-gamma*complex(z, 0)) + (0.3-0.4i)*cmplx.Exp(gamma*complex(z, 0))
	}
	for _, step := range []float64{0.01, 0.3, 0.8} {
		var zs []float64
		var vs []complex128
		for z := 0.0; z < 5; z += step {
			zs, vs = append(zs, z), append(vs, wave(z))
		}
		for z := 0.005; z < 4; z += 0.177 {
			if e := cmplx.Abs(between(zs, vs, gamma, z) - wave(z)); e > 1e-12 {
				t.Errorf("step %v: off by %.2g at %v", step, e, z)
			}
		}
	}
	zs, vs := []float64{0, 1.2}, []complex128{wave(0), wave(1.2)}
	for _, z := range []float64{-0.1, 0.5, 1.3} {
		if got := between(zs, vs, gamma, z); !cmplx.IsNaN(got) {
			t.Errorf("at %v it is %v", z, got)
		}
	}
}

// The circles of requirements: at which radius, which side is forbidden, and
// how far the curve is.
func TestReflectionLimits(t *testing.T) {
	limit := func(v float64) *float64 { return &v }
	c := reporttest.Single(1).Case("nominal", reporttest.Options{Error: 1e-4, Loop: 0.3})
	c.Requirements = []record.Requirement{
		{ID: "A", Quantity: "vswr", Section: "line", Subject: "line, from end", Max: limit(1.5)},
		{ID: "B", Quantity: "return_loss", Subject: "line, to end", Min: limit(20)},
		{ID: "C", Quantity: "reflection", Section: "line", Subject: "line, to end", Min: limit(0.1)},
		{ID: "D", Quantity: "vswr", Section: "line", Subject: "line, from end, reference 75 ohm", Max: limit(1.5)},
		{ID: "E", Quantity: "vswr", Section: "other", Subject: "other, from end", Max: limit(1.5)},
		{ID: "F", Quantity: "steady_voltage", Section: "line", Subject: "line", Max: limit(1.5)},
	}
	l := newLocus(&c, c.Model.Sections[0])
	l.near, l.far = 0.15, 0.3
	got := reflectionLimits(&c, l)
	want := []struct {
		m       reflectionLimit
		finding string
	}{
		{reflectionLimit{"A", 0.2, false, "from"}, "25 % below the circle of A, VSWR 1.500 at tx"},
		{reflectionLimit{"B", 0.1, false, "to"}, "200 % above the circle of B, VSWR 1.222 at rx"},
		{reflectionLimit{"C", 0.1, true, "to"}, "200 % above the circle of C, VSWR 1.222 at rx"},
	}
	if len(got) != len(want) {
		t.Fatalf("%d limits, want %d: %+v", len(got), len(want), got)
	}
	for i, w := range want {
		g := got[i]
		if g.id != w.m.id || math.Abs(g.radius-w.m.radius) > 1e-12 || g.least != w.m.least || g.end != w.m.end {
			t.Errorf("limit %+v, want %+v", g, w.m)
		}
		if f := strings.ReplaceAll(g.finding(l), "\u00a0", " "); f != w.finding {
			t.Errorf("finding %q, want %q", f, w.finding)
		}
	}
}

// The unwrapped phase of a matched line falls by its electrical length, however
// few points there are; that of a standing wave steps by half turns.
func TestUnwrapped(t *testing.T) {
	for _, points := range []int{4096, 500, 150} { // 150: more than half a wavelength apart
		n := reporttest.Single(100.25)
		n.Loads[0].R, n.Loads[0].L = 50, 0
		c := n.Case("nominal", reporttest.Options{Error: 1e-6, Loop: 0.3, MaxPoints: points})
		first, last, _ := ends(newPhaseTrack(newLocus(&c, c.Model.Sections[0])).phasor)
		if got, want := last-first, -c.Model.Sections[0].Degrees; math.Abs(got-want) > 0.1 {
			t.Errorf("%d points: the phase turns by %v°, want %v°", points, got, want)
		}
	}
	n := reporttest.Single(1)
	n.Loads[0].Short, n.Sections[0].DB = true, 1e-6
	c := n.Case("nominal", reporttest.Options{Error: 1e-6, Loop: 0.3})
	first, last, _ := ends(newPhaseTrack(newLocus(&c, c.Model.Sections[0])).phasor)
	if got := last - first; math.Abs(math.Abs(got)-180) > 1 {
		t.Errorf("between two nulls the phase turns by %v°, want half a turn", got)
	}
}

// Profiles that are NaN, infinite or missing are said to be empty, and nothing
// of them is drawn.
func TestReflectionsOfNothing(t *testing.T) {
	c := reporttest.Single(1).Case("nominal", reporttest.Options{Error: 1e-4, Loop: 0.3})
	nan := complex(math.NaN(), math.Inf(1))
	for i := range c.Profiles[0].VP {
		c.Profiles[0].VP[i], c.Profiles[0].VF[i] = nan, nan
	}
	c.Phasor.Sections[0].To.Reflection = nan
	chart, finding := newLocus(&c, c.Model.Sections[0]).chart(&c)
	if chart.Empty == "" || !strings.Contains(finding, "no value") {
		t.Errorf("chart %+v, finding %q", chart, finding)
	}
	if got := newPhaseTrack(newLocus(&c, c.Model.Sections[0])).finding(); got != "V has no phase" {
		t.Errorf("finding %q", got)
	}
}

// Of matched sections without a limit only the names are given; but one chart is
// always there.
func TestUneven(t *testing.T) {
	n := reporttest.Star(3)
	n.Loads[1].R = 300
	c := n.Case("nominal", reporttest.Options{Error: 1e-4, Loop: 0.3})
	var list []*locus
	for _, m := range c.Model.Sections {
		list = append(list, newLocus(&c, m))
	}
	drawn, even := uneven(&c, list)
	var names []string
	for _, l := range drawn {
		names = append(names, l.section.Name)
	}
	if got := strings.Join(names, " "); got != "feed branch_2" {
		t.Errorf("drawn: %s", got)
	}
	if got := plain(strings.Join(even, ", ")); got != "branch_1 (−2058°), branch_3 (−2062°)" {
		t.Errorf("not drawn: %s", got)
	}
	if drawn, even = uneven(&c, list[1:2]); len(drawn) != 1 || len(even) != 0 {
		t.Errorf("%d drawn of one section", len(drawn))
	}
	limit := 1.5
	c.Requirements = []record.Requirement{{ID: "R", Quantity: "vswr", Section: "branch_1", Subject: "branch_1, to end", Max: &limit}}
	if drawn, _ = uneven(&c, list); len(drawn) != 3 {
		t.Errorf("%d drawn with a limit on one more", len(drawn))
	}
}
