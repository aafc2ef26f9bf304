package fdtd

import (
	"math"
	"testing"

	"linewitness/sim/line"
	"linewitness/sim/network"
)

// bounceTol is the relative tolerance of a plateau. At Courant number 1 with
// resistive ends the scheme is exact for any waveform that is 0 at t = 0; some
// thousand additions are left.
const bounceTol = 1e-12

// bounceCells is the number of cells, and of steps in one passage.
const bounceCells = 50

// ladder is one lossless line between resistances, its period one passage.
func ladder(t *testing.T, zg, z0, zl, length, u float64) *bench {
	net := &network.Network{
		Frequency: u / length,
		Junctions: []string{"generator", "load"},
		Sections: []network.Section{{
			Name: "line", From: 0, To: 1, Length: length, Line: line.Constants{L: z0 / u, C: 1 / (z0 * u)},
		}},
		Branches: []network.Branch{{Name: "load", A: 1, B: network.Ground, Series: network.Series{R: zl}}},
		Source:   network.Source{EMF: 1, Series: network.Series{R: zg}},
	}
	g := fixedGrid(net, bounceCells)
	if g.Courant[0] != 1 || g.Cells[0] != bounceCells {
		t.Fatalf("grid %+v", g)
	}
	return newBench(t, net, g)
}

// nearEnd gives the current waves at the generator, A: positive along the
// line, forward and backward, V = z (f - b) and I = f + b. The current is that
// of the first cell centre, half a step ago.
func (b *bench) nearEnd() (forward, backward float64) {
	v, w := b.v[0][0]/b.m.z[0], b.w[0][0]/b.m.z[0]
	return (w + v) / 2, (w - v) / 2
}

// A plateau is a value that holds from one time to another, in passages; what
// is printed is right to half of its last digit.
type plateau struct {
	from, to, want, printed, half float64
}

// holds compares a sample with the plateau it falls in: step n belongs to the
// plateau that holds from before n to n.
func holds(t *testing.T, what string, n int, got float64, all []plateau) {
	t.Helper()
	for _, p := range all {
		if at := float64(n) / bounceCells; at <= p.from || at > p.to {
			continue
		}
		if d := math.Abs(got - p.want); d > bounceTol*math.Abs(p.want) {
			t.Fatalf("%s, step %d: %.15g, want %.15g (off by %.2g)", what, n, got, p.want, d)
		}
		if d := math.Abs(got - p.printed); d > p.half {
			t.Fatalf("%s, step %d: %.9g, printed %g", what, n, got, p.printed)
		}
	}
}

// M.N.O. Sadiku, Elements of Electromagnetics, 7th ed. (Oxford UP, 2017),
// Example 11.8, p.594-598 (read in the source): 12 V switched onto 100 ohm, a
// 50 ohm line of 100 m with u = 1e8 m/s, and 200 ohm. The printed values are
// 4 V, 2.4 V (first reflection), 0.8 V (second forward wave), 8 V and the
// currents 0.08 A and 0.04 A in the end; the further steps are the exact sums
// of the series.
func TestOutsideBounceStep(t *testing.T) {
	b := ladder(t, 100, 50, 200, 100, 1e8)
	load := []plateau{
		{0, 1, 0, 0, 0},
		{1, 3, 6.4, 4 + 2.4, 0.05},
		{3, 5, 7.68, 7.68, 5e-4},
		{5, 7, 7.936, 7.936, 5e-4},
		{60, 70, 8, 8, 1e-6},
	}
	generator := []plateau{
		{0, 2, 4, 4, 0.05}, {2, 4, 7.2, 4 + 2.4 + 0.8, 0.05}, {4, 6, 7.84, 7.84, 5e-4}, {60, 70, 8, 8, 1e-6},
	}
	// The current changes half a cell inside and half a step before.
	current := []plateau{{1. / bounceCells, 2, 0.08, 0.08, 5e-4}, {60, 70, 0.04, 0.04, 5e-4}}
	for b.n < 70*bounceCells {
		b.advance(func(float64) float64 { return 12 })
		holds(t, "load voltage", b.n, b.j[1], load)
		holds(t, "generator voltage", b.n, b.j[0], generator)
		f, back := b.nearEnd()
		holds(t, "generator current", b.n, f+back, current)
	}
}

// The same, Example 11.9, p.601-602 (read in the source): a pulse of 4 V and
// 5 us from 25 ohm onto a 75 ohm line of 60 m with u = 3e7 m/s (2 us), and
// 100 ohm. Printed are the current waves at the generator: 40 mA out, then
// arriving and reflected again -5.714 and -2.857 (4-9 us), 0.4082 and 0.2041
// (8-13 us), -0.0292 and -0.0146 mA (12-17 us). The exact values follow from
// the current reflection coefficients -1/7 and 1/2.
func TestOutsideBouncePulse(t *testing.T) {
	const passage = 2e-6
	b := ladder(t, 25, 75, 100, 60, 3e7)
	type wave struct{ from, to, want, printed, half float64 } // us, mA
	arriving := []wave{
		{4, 9, -40. / 7, -5.714, 5e-4}, {8, 13, 20. / 49, 0.4082, 5e-5}, {12, 17, -10. / 343, -0.0292, 5e-5},
	}
	leaving := []wave{
		{0, 5, 40, 40, 0.5}, {4, 9, -20. / 7, -2.857, 5e-4}, {8, 13, 10. / 49, 0.2041, 5e-5}, {12, 17, -5. / 343, -0.0146, 5e-5},
	}
	const step = 1e6 * passage / bounceCells // us
	// edge reports whether some wave has begun or ended with step n: the
	// current sample, half a step older, has not seen it yet.
	edge := func(n int) bool {
		for _, w := range append(arriving, leaving...) {
			at := float64(n-1) * step
			if math.Abs(at-w.from) < step/2 || math.Abs(at-w.to) < step/2 {
				return true
			}
		}
		return false
	}
	check := func(what string, n int, got float64, all []wave) {
		want, printed, half := 0.0, 0.0, 0.0
		for _, w := range all {
			if at := float64(n) * step; at > w.from+step/2 && at < w.to+step/2 {
				want, printed, half = want+w.want, printed+w.printed, half+w.half
			}
		}
		if math.Abs(got-want) > bounceTol*40 {
			t.Fatalf("%s, %d: %.15g mA, want %.15g", what, n, got, want)
		}
		if math.Abs(got-printed) > half+bounceTol*40 {
			t.Fatalf("%s, %d: %.9g mA, printed %g", what, n, got, printed)
		}
	}
	pulse := func(t float64) float64 {
		if t > 5e-6*(1+1e-9) {
			return 0
		}
		return 4
	}
	for b.n < 8*bounceCells { // 16 us: until the next echo
		b.advance(pulse)
		if edge(b.n) {
			continue
		}
		f, back := b.nearEnd()
		check("leaving", b.n, 1e3*f, leaving)
		check("arriving", b.n, 1e3*back, arriving)
	}
}
