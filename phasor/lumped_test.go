package phasor

import (
	"math"
	"testing"

	"linewitness/sim/line"
	"linewitness/sim/network"
)

// TestDecayOfATank: behind a matched source no wave comes round, and what rings
// is a tank at the far end, which sees the impedance of the line beside its
// load. A series R, L, C falls at (R + Rp)/(2 L).
func TestDecayOfATank(t *testing.T) {
	const f, c = 10e6, 10e-12
	w := 2 * math.Pi * f
	for _, q := range []float64{100, 3000} { // of the tank by itself
		for _, turn := range []float64{1, 1.01} { // resonance over frequency
			l := 1 / (turn * turn * w * w * c)
			net := &network.Network{
				Frequency: f, Junctions: []string{"a", "b"},
				Sections: []network.Section{{From: 0, To: 1, Length: 7, Line: line.Nominal{Z0: 50, VelocityFactor: 0.66}.At(f)}},
				Branches: []network.Branch{
					{A: 1, B: network.Ground, Series: network.Series{R: w * l / q, L: l, C: c}},
					{A: 1, B: network.Ground, Series: network.Series{R: 50}},
				},
				Source: network.Source{EMF: 1, Series: network.Series{R: 50}},
			}
			want := (w*l/q + 25) / (2 * l)
			if got := Decay(net); !(math.Abs(got/want-1) < 1e-6) { // of the derivatives, as TestDecay
				t.Errorf("Q %g, resonant at %g: decay %.7g 1/s, want %.7g", q, turn, got, want)
			}
		}
	}
}

// TestDecayOfAMismatchedTank: with a source that is not matched the mode is a root
// of R + sL + 1/(sC) + Z(s) = 0, Z being that of the line from its end.
func TestDecayOfAMismatchedTank(t *testing.T) {
	const f, l, length = 10e6, 25e-6, 7.0
	w := 2 * math.Pi * f
	k := line.Nominal{Z0: 50, VelocityFactor: 0.66}.At(f)
	for _, rs := range []float64{5, 20, 200} {
		net := &network.Network{
			Frequency: f, Junctions: []string{"a", "b"},
			Sections: []network.Section{{From: 0, To: 1, Length: length, Line: k}},
			Branches: []network.Branch{{A: 1, B: network.Ground, Series: network.Series{R: 1, L: l, C: 1 / (w * w * l)}}},
			Source:   network.Source{EMF: 1, Series: network.Series{R: rs}},
		}
		s := complex(0, w)
		for range 50 { // a fixed point: sL is by far the steepest
			_, decay := passage(net.Sections[0], s)
			g := complex((rs-50)/(rs+50), 0) * decay * decay
			z := 50 * (1 + g) / (1 - g)
			s -= (1 + s*complex(l, 0) + 1/(s*complex(1/(w*w*l), 0)) + z) / complex(2*l, 0)
		}
		if got, want := Decay(net), -real(s); !(math.Abs(got/want-1) < 1e-5) {
			t.Errorf("source of %g ohm: decay %.7g 1/s, want %.7g", rs, got, want)
		}
	}
}

// TestDecayOfARing: a ring of six quarter waves with ports at four of its corners
// rings for ever at twice the frequency, where every port is at a node. At its own
// frequency it does not.
func TestDecayOfARing(t *testing.T) {
	const f = 1e9
	k := line.Nominal{Z0: 50 * math.Sqrt2, VelocityFactor: 0.66}.At(f)
	quarter := 0.66 * line.C0 / f / 4
	net := &network.Network{
		Frequency: f, Junctions: []string{"p1", "p2", "p3", "p4"},
		Sections: []network.Section{
			{From: 0, To: 1, Length: quarter, Line: k},
			{From: 1, To: 2, Length: quarter, Line: k},
			{From: 2, To: 3, Length: quarter, Line: k},
			{From: 3, To: 0, Length: 3 * quarter, Line: k},
		},
		Source: network.Source{EMF: 1, Series: network.Series{R: 50}},
	}
	for j := 1; j < 4; j++ {
		net.Branches = append(net.Branches, network.Branch{A: j, B: network.Ground, Series: network.Series{R: 50}})
	}
	if q := net.Omega() / 2 / Decay(net); !(q < 10) {
		t.Errorf("Q %g", q)
	}
}
