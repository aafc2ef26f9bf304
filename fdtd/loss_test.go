package fdtd

import (
	"context"
	"math"
	"math/cmplx"
	"testing"

	"linewitness/sim/network"
)

// TestSumsBalance: on any grid, however coarse, the sums of Loss |I|^2 and
// Loss |V|^2 over the cells of a section are the power that goes in at one end
// and does not come out at the other.
func TestSumsBalance(t *testing.T) {
	const tolerance = 1e-9 // of the settling, relative to the power that goes in
	for name, net := range map[string]*network.Network{"constant": lossyCascade(), "dispersive": dispersiveCascade()} {
		for _, steps := range []int{10, 24} {
			g := fixedGrid(net, steps)
			st := settled(t, net, g, 1e-11)
			for k, s := range st.Sections {
				in := real(s.VFrom*cmplx.Conj(s.IFrom)) / 2
				out := real(s.VTo*cmplx.Conj(s.ITo)) / 2
				r, gg := g.Loss(net, k)
				lost := (r*s.SquareI + gg*s.SquareV) / 2
				if math.Abs(in-out-lost) > tolerance*math.Abs(in) {
					t.Errorf("%s, %d steps, section %d: in %.10g W, out %.10g W, lost %.10g W, missing %.3g W", name, steps, k, in, out, lost, in-out-lost)
				}
			}
		}
	}
}

// TestSumsTakeEveryCell: the integrals are the same when two points a section
// are recorded as when all are, and those of the phasors of all points.
func TestSumsTakeEveryCell(t *testing.T) {
	net := lossyCascade()
	g := fixedGrid(net, 40)
	run := func(points int) *Steady {
		st, err := Settle(context.Background(), net, g, Settings{MaxPoints: points, Tolerance: 1e-11})
		if err != nil {
			t.Fatal(err)
		}
		return st
	}
	all, few := run(0), run(2)
	const tolerance = 1e-9 // of the settling, which looks at other points
	for k, s := range all.Sections {
		if n := len(few.Sections[k].V); n != 2 {
			t.Fatalf("section %d: %d points recorded, want 2", k, n)
		}
		dx := net.Sections[k].Length / float64(g.Cells[k])
		v2 := -(squared(s.VFrom) + squared(s.VTo)) / 2
		i2 := 0.0
		for _, v := range s.V {
			v2 += squared(v)
		}
		for _, i := range s.I {
			i2 += squared(i)
		}
		for what, pair := range map[string][3]float64{
			"voltage": {s.SquareV, few.Sections[k].SquareV, v2 * dx},
			"current": {s.SquareI, few.Sections[k].SquareI, i2 * dx},
		} {
			for _, got := range pair[:2] {
				if math.Abs(got/pair[2]-1) > tolerance {
					t.Errorf("section %d, %s: %.12g, of its phasors %.12g", k, what, got, pair[2])
				}
			}
		}
	}
}

func squared(p complex128) float64 { return real(p)*real(p) + imag(p)*imag(p) }

// TestSampleDoesNotAllocate: recording is part of every step of a window.
func TestSampleDoesNotAllocate(t *testing.T) {
	net := lossyCascade()
	m, err := newModel(net, fixedGrid(net, 40))
	if err != nil {
		t.Fatal(err)
	}
	r, l := newRecorder(t.Context(), m, 4096), m.newLane()
	if n := testing.AllocsPerRun(10, func() { r.sample(l, 1); r.sample(l, 2) }); n != 0 {
		t.Errorf("%v allocations", n)
	}
}

// TestLossTendsToTheLaw: the resistance and conductance that the scheme steps
// are those of the line, to what the rational form is good for.
func TestLossTendsToTheLaw(t *testing.T) {
	net := dispersiveCascade()
	g := fixedGrid(net, 400)
	for k, s := range net.Sections {
		at := s.At(net.Omega())
		r, gg := g.Loss(net, k)
		series, shunt := FormResidual(s.Dispersion, net.Omega())
		// The residual is relative to the size of the law, of which the
		// conductance is a small part.
		if d := math.Abs(r - at.R); d > series*cmplx.Abs(s.Dispersion.Series(complex(0, net.Omega()))) {
			t.Errorf("section %d: resistance %.6g, want %.6g", k, r, at.R)
		}
		if d := math.Abs(gg - at.G); d > shunt*cmplx.Abs(s.Dispersion.Shunt(complex(0, net.Omega()))) {
			t.Errorf("section %d: conductance %.6g, want %.6g", k, gg, at.G)
		}
	}
	plain := lossyCascade()
	for k, s := range plain.Sections {
		if r, gg := fixedGrid(plain, 10).Loss(plain, k); r != s.Line.R || gg != s.Line.G {
			t.Errorf("section %d: %g and %g without dispersion, want %g and %g", k, r, gg, s.Line.R, s.Line.G)
		}
	}
}
