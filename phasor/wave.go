package phasor

import (
	"math/cmplx"

	"linewitness/sim/network"
)

// lineAt gives the series impedance, ohm/m, and the shunt admittance, S/m, of
// a section at s, with its dispersion in exact form.
func lineAt(sec network.Section, s complex128) (z, y complex128) {
	z = complex(sec.Line.R, 0) + s*complex(sec.Line.L, 0) + sec.Dispersion.Series(s)
	y = complex(sec.Line.G, 0) + s*complex(sec.Line.C, 0) + sec.Dispersion.Shunt(s)
	return z, y
}

// Propagation gives the propagation constant g, in 1/m, and the
// characteristic impedance Zc, in ohm, of a section at angular frequency omega:
//
//	g = sqrt(Z' Y'),  Zc = Z'/g
//
// Zc is taken from g rather than as a second square root, so that the two
// always belong to the same direction of travel.
func Propagation(sec network.Section, omega float64) (gamma, zc complex128) {
	z, y := lineAt(sec, complex(0, omega))
	// sqrt(z) sqrt(y), not sqrt(z y): each factor lies in the right half
	// plane, so the product keeps Im g > 0 however small the loss is.
	gamma = cmplx.Sqrt(z) * cmplx.Sqrt(y)
	return gamma, z / gamma
}

// A wave is one section with its solved amplitudes.
type wave struct {
	length    float64
	gamma, zc complex128
	forward   complex128 // P, V at the From end
	backward  complex128 // M, V at the To end
}

func (w wave) parts(z float64) (p, m complex128) {
	p = w.forward * cmplx.Exp(-w.gamma*complex(z, 0))
	m = w.backward * cmplx.Exp(-w.gamma*complex(w.length-z, 0))
	return p, m
}
