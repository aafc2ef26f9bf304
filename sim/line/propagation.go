package line

import (
	"math"
	"math/cmplx"
)

// Propagation is the propagation constant alpha + j beta in Np/m and rad/m at
// the angular frequency omega in rad/s:
//
//	gamma = sqrt((R + jwL)(G + jwC))
//
// The product of the square roots is used: each factor lies in the first
// quadrant, so the product has alpha >= 0 and beta >= 0 without a choice of
// branch.
func (k Constants) Propagation(omega float64) complex128 {
	return cmplx.Sqrt(complex(k.R, omega*k.L)) * cmplx.Sqrt(complex(k.G, omega*k.C))
}

// Impedance is the characteristic impedance sqrt((R + jwL)/(G + jwC)) in ohm.
func (k Constants) Impedance(omega float64) complex128 {
	return cmplx.Sqrt(complex(k.R, omega*k.L)) / cmplx.Sqrt(complex(k.G, omega*k.C))
}

// PhaseVelocity is omega/beta, m/s.
func (k Constants) PhaseVelocity(omega float64) float64 {
	return omega / imag(k.Propagation(omega))
}

// Wavelength is 2 pi/beta at the frequency f in Hz, m.
func (k Constants) Wavelength(f float64) float64 {
	return 2 * math.Pi / imag(k.Propagation(2*math.Pi*f))
}

// FrontVelocity is 1/sqrt(LC), m/s: the speed of a wave front, which the loss
// does not change. A delay of a line of length l is l/FrontVelocity.
func (k Constants) FrontVelocity() float64 {
	return 1 / (math.Sqrt(k.L) * math.Sqrt(k.C))
}
