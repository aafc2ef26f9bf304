package phasor

import (
	"math"
	"math/cmplx"
	"testing"

	"gonum.org/v1/gonum/integrate/quad"
	"pgregory.net/rapid"

	"linewitness/sim/line"
	"linewitness/sim/network"
	"linewitness/sim/network/networktest"
)

// quadratureTolerance is relative: rounding, of a rule that is exact to it for
// the few wavelengths of a section.
const quadratureTolerance = 1e-12

// TestSquareIntegrals: the closed form against Gauss and Legendre's rule on
// |V|^2 and |I|^2, for lines with and without dispersion.
func TestSquareIntegrals(t *testing.T) {
	for name, draw := range map[string]func(*rapid.T) *network.Network{
		"constant": networktest.Draw, "dispersive": networktest.DrawDispersive,
	} {
		t.Run(name, func(t *testing.T) {
			rapid.Check(t, func(t *rapid.T) {
				net := draw(t)
				s := solved(t, net)
				for k, sec := range net.Sections {
					v2, i2 := s.SquareIntegrals(k)
					integral(t, "voltage", v2, sec.Length, func(z float64) complex128 { return s.Voltage(k, z) })
					integral(t, "current", i2, sec.Length, func(z float64) complex128 { return s.Current(k, z) })
				}
			})
		})
	}
}

func integral(t interface{ Errorf(string, ...any) }, what string, got, length float64, f func(float64) complex128) {
	const points = 60
	want := quad.Fixed(func(z float64) float64 { return square(f(z)) }, 0, length, points, nil, 0)
	if math.Abs(got-want) > quadratureTolerance*want {
		t.Errorf("%s: %.15g, by quadrature %.15g", what, got, want)
	}
}

// TestSquareIntegralsAtTheEdges: no attenuation, no phase, neither, both small
// or unlike, and a line so long that e^{al} would overflow.
func TestSquareIntegralsAtTheEdges(t *testing.T) {
	for _, g := range []complex128{
		0, 1, 1i, 0.3i, 1e-4, 1e-4i, 1e-9 + 1e-3i, 1e-3 + 1e-9i, 0.49 + 0.49i, 0.51 + 0.01i, 5 + 12i, 3 + 1e-8i, -1e-6 + 2i,
	} {
		w := wave{length: 1, gamma: g, zc: 40 - 30i, forward: 3 + 1i, backward: -1 + 2i}
		v2, i2 := w.squares()
		integral(t, "voltage", v2, 1, func(z float64) complex128 { p, m := w.parts(z); return p + m })
		integral(t, "current", i2, 1, func(z float64) complex128 { p, m := w.parts(z); return (p - m) / w.zc })
	}
	// From both ends a wave dies away long before the other: |P|^2/(2a) each.
	long := wave{length: 1e6, gamma: 2 + 300i, zc: 50, forward: 3, backward: 4i}
	v2, i2 := long.squares()
	if want := 25.0 / 4; math.Abs(v2-want) > quadratureTolerance*want || math.Abs(i2*2500-want) > quadratureTolerance*want {
		t.Errorf("long line: %v V^2 m and %v A^2 m, want %v and %v", v2, i2, want, want/2500)
	}
}

// TestSquareIntegralOfAShortOpenLine: on a line of 1e-5 radians with an open
// end the current rises evenly from the end, and its square integrates to
// |V|^2 (bl)^2 l/(3 Zc^2), ten orders below that of the waves which make it.
func TestSquareIntegralOfAShortOpenLine(t *testing.T) {
	const length = 1.0
	net := &network.Network{
		Junctions: []string{"a", "b"},
		Sections:  []network.Section{{From: 0, To: 1, Length: length, Line: line.Constants{L: 250e-9, C: 100e-12}}},
		Source:    network.Source{EMF: 10, Series: network.Series{R: 50}},
	}
	const phase = 1e-5
	net.Frequency = phase / (2 * math.Pi * 5e-9)
	s := solved(t, net)
	v2, i2 := s.SquareIntegrals(0)
	v := cmplx.Abs(s.Junction(1))
	// P and M are known to rounding, 1e-16, and differ by 1e-5.
	const tolerance = 1e-9
	if want := v * v * phase * phase * length / 3 / 2500; math.Abs(i2/want-1) > tolerance {
		t.Errorf("current: %.12g A^2 m, want %.12g", i2, want)
	}
	if want := v * v * length; math.Abs(v2/want-1) > tolerance {
		t.Errorf("voltage: %.12g V^2 m, want %.12g", v2, want)
	}
}
