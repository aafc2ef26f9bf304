package fdtd

import (
	"context"
	"math"
	"math/cmplx"
	"testing"

	"linewitness/sim/line"
	"linewitness/sim/network"
)

// lossyCascade is a mismatched cascade with a stub, conductor and dielectric
// loss, and Courant numbers below 1.
func lossyCascade() *network.Network {
	coax := line.Constants{R: 0.8, L: 250e-9, G: 2e-4, C: 100e-12}
	wire := line.Constants{R: 0.3, L: 1.1e-6, G: 1e-6, C: 12e-12}
	return &network.Network{
		Frequency: testFrequency, Junctions: []string{"a", "b", "c", "d"},
		Sections: []network.Section{
			{From: 0, To: 1, Length: 2.117, Line: coax},
			{From: 1, To: 2, Length: 1.031, Line: wire},
			{From: 1, To: 3, Length: 0.371, Line: coax},
		},
		Branches: []network.Branch{
			{A: 2, B: network.Ground, Series: network.Series{R: 120, L: 100e-9}},
			{A: 3, B: network.Ground, Series: network.Series{}},
			{A: 1, B: network.Ground, Series: network.Series{R: 300, C: 8e-12}},
		},
		Source: network.Source{EMF: 10, Series: network.Series{R: 40, L: 20e-9}},
	}
}

// TestObservedOrder: cells and steps are doubled together, so the error of
// every phasor falls by four. The closed form of the scheme on ever finer
// grids tends to the exact one, which Richardson's extrapolation of the two
// finest runs stands for here to an error of fourth order; that of the phasor
// witness is compared in package agree.
func TestObservedOrder(t *testing.T) {
	net := lossyCascade()
	g := fixedGrid(net, 24)
	var load []complex128
	for r := range 4 {
		load = append(load, settled(t, net, g.Refine(r), 1e-9).Junctions[2])
	}
	n := len(load)
	exact := load[n-1] + (load[n-1]-load[n-2])/3
	const least = 1e-3 // relative error on the second finest of these grids, as a bound
	if e := cmplx.Abs(load[n-2]-exact) / cmplx.Abs(exact); e > least {
		t.Errorf("error on the third grid %.3g, want below %g", e, least)
	}
	for r := 1; r < n-1; r++ {
		p := math.Log2(cmplx.Abs(load[r-1]-load[r]) / cmplx.Abs(load[r]-load[r+1]))
		t.Logf("order over grids %d to %d: %.4f", r-1, r+1, p)
		if math.Abs(p-2) > 0.2 {
			t.Errorf("observed order %.3f, want 2 within 0.2", p)
		}
	}
}

// TestDispersionRelation measures the wave on the grid of a matched line from
// the phasors of neighbouring cells and compares it with Numerical.
func TestDispersionRelation(t *testing.T) {
	const tolerance = 1e-9 // rounding, times the cells over which the phase is measured
	for _, c := range []line.Constants{
		{L: 250e-9, C: 100e-12},
		{R: 20, L: 250e-9, G: 2e-3, C: 100e-12},
		{R: 400, L: 250e-9, C: 100e-12}, // more resistance than reactance
	} {
		for _, courant := range []float64{1, 0.9, 0.5} {
			const steps = 40
			v := 1 / math.Sqrt(c.L*c.C)
			cells := 80.0
			length := cells * v / testFrequency / steps / courant
			net := &network.Network{
				Frequency: testFrequency, Junctions: []string{"a", "b"},
				Sections: []network.Section{{From: 0, To: 1, Length: length, Line: c}},
				Branches: []network.Branch{{A: 1, B: network.Ground, Series: network.Series{R: 50}}},
				Source:   network.Source{EMF: 1, Series: network.Series{R: 50}},
			}
			g := Grid{
				StepsPerPeriod: steps, Step: net.Period() / steps,
				Cells: []int{int(cells)}, Courant: []float64{courant},
			}
			// Without loss and below Courant 1 the waves near the cut-off
			// of the grid hardly move and hardly decay. At 3e-10 of the
			// signal they need not be waited for.
			st, err := Settle(context.Background(), net, g, Settings{Tolerance: 1e-11, MaxPeriods: 4000})
			if err != nil {
				t.Fatal(err)
			}
			s := st.Sections[0]
			want := g.Numerical(net, 0)
			// For any mixture of the two waves V[i-1] + V[i+1] is
			// 2 cosh(k) V[i].
			k := want.Exponent / complex(cells, 0)
			for i := 1; i < 20; i++ {
				got := (s.V[i-1] + s.V[i+1]) / (2 * s.V[i])
				if d := cmplx.Abs(got - cmplx.Cosh(k)); d > tolerance {
					t.Errorf("R=%g S=%g cell %d: cosh k = %v, want %v", c.R, courant, i, got, cmplx.Cosh(k))
				}
			}
			// and V[i+1] - V[i] = -2 sinh(k/2) Zc I[i+1/2] x (the phase is in I).
			zc := -(s.V[11] - s.V[10]) / (2 * cmplx.Sinh(k/2) * s.I[10])
			if d := cmplx.Abs(zc/want.Impedance - 1); d > 10*tolerance { // a difference of neighbours, a tenth of their size
				t.Errorf("R=%g S=%g: impedance %v, want %v", c.R, courant, zc, want.Impedance)
			}
		}
	}
}
