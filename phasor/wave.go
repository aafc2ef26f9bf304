package phasor

import (
	"math/cmplx"

	"linewitness/sim/line"
)

// Propagation gives the propagation constant g, in 1/m, and the
// characteristic impedance Zc, in ohm, of a line at angular frequency omega:
//
//	g = sqrt((R+jwL)(G+jwC)),  Zc = (R+jwL)/g
//
// Zc is taken from g rather than as a second square root, so that the two
// always belong to the same direction of travel.
func Propagation(c line.Constants, omega float64) (gamma, zc complex128) {
	z := complex(c.R, omega*c.L)
	y := complex(c.G, omega*c.C)
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
