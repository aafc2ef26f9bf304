package agree

import (
	"slices"

	"linewitness/sim/line"
	"linewitness/sim/network"
)

// A Wave is how a sinusoid travels on the grid of one section.
type Wave struct {
	Exponent     complex128 // propagation exponent over the section
	Impedance    complex128 // V over I inside, ohm
	EndImpedance complex128 // characteristic impedance at the junctions, ohm
}

// Equivalent is the network in which uniform lines do to a sinusoid exactly
// what the grid does: with g = Exponent/l,
//
//	R + jwL = g EndImpedance,  G + jwC = g/EndImpedance
//
// The loss of an equivalent line may come out slightly negative.
func Equivalent(net *network.Network, waves []Wave) *network.Network {
	eq := *net
	eq.Sections = slices.Clone(net.Sections)
	for k, w := range waves {
		s := &eq.Sections[k]
		g := w.Exponent / complex(s.Length, 0)
		z, y := g*w.EndImpedance, g/w.EndImpedance
		s.Dispersion = line.Dispersion{}
		s.Line = line.Constants{
			R: real(z), L: imag(z) / net.Omega(),
			G: real(y), C: imag(y) / net.Omega(),
		}
	}
	return &eq
}
