package phasor

import (
	"math"
	"math/cmplx"
	"testing"

	"linewitness/sim/line"
	"linewitness/sim/network"
)

// mismatches are the identities between standing-wave ratio s, |Gamma|, return
// loss and mismatch loss,
//
//	|Gamma| = (s-1)/(s+1),  RL = -20 log |Gamma|,  ML = -10 log (1-|Gamma|^2)
//
// computed apart from this program; the digits are as given.
var mismatches = []struct{ swr, gamma, returnLoss, mismatchLoss float64 }{
	{1.1, 0.047619, 26.4444, 0.009859},
	{1.5, 0.2, 13.9794, 0.177288},
	{2, 0.333333, 9.5424, 0.511525},
	{3, 0.5, 6.0206, 1.249387},
	{5.828427, 0.707107, 3.0103, 3.010300},
}

// TestOutsideMismatch measures all four on a lossless line between a matched
// source and a resistance: the ratio from the largest and the smallest voltage,
// |Gamma| and the return loss from the waves at the near end, the mismatch
// loss from the power that the load takes of what is available.
func TestOutsideMismatch(t *testing.T) {
	const z0, v, f = 50, 2e8, 1e8
	within := func(what string, swr, got, want, half float64) {
		t.Helper()
		if math.Abs(got-want) > half {
			t.Errorf("SWR %g: %s = %.8g, want %g within %g", swr, what, got, want, half)
		}
	}
	for _, m := range mismatches {
		for _, r := range []float64{z0 * m.swr, z0 / m.swr} {
			net := &network.Network{
				Frequency: f, Junctions: []string{"source", "load"},
				Sections: []network.Section{{From: 0, To: 1, Length: 0.8 * v / f, Line: line.Constants{L: z0 / v, C: 1 / (z0 * v)}}},
				Branches: []network.Branch{{A: 1, B: network.Ground, Series: network.Series{R: r}}},
				Source:   network.Source{EMF: 1, Series: network.Series{R: z0}},
			}
			s, err := Solve(net)
			if err != nil {
				t.Fatal(err)
			}
			most, least := s.VoltageExtremes(0)
			vin, iin := s.Voltage(0, 0), s.Current(0, 0)*z0
			gamma := cmplx.Abs((vin - iin) / (vin + iin))
			power := real(s.Junction(1)*cmplx.Conj(s.Branch(0))) / 2
			within("SWR", m.swr, most.Value/least.Value, m.swr, 1e-9*m.swr)
			within("|Gamma|", m.swr, gamma, m.gamma, 5.1e-7)
			within("return loss", m.swr, -20*math.Log10(gamma), m.returnLoss, 5.1e-5)
			within("mismatch loss", m.swr, -10*math.Log10(power/net.Source.Available()), m.mismatchLoss, 5.1e-7)
		}
	}
}
