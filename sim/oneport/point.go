package oneport

import (
	"math"
	"math/cmplx"
)

// A Point is a one-port at one frequency. An open has S = 1 and Z =
// cmplx.Inf(); a short has S = -1 and Z = 0.
type Point struct {
	F float64    // Hz
	S complex128 // reflection coefficient against the reference of the table
	Z complex128 // impedance, ohm
}

// passiveTolerance is how far |S| may pass 1 by rounding: files commonly have
// six digits, which round the parts of a reflection by up to 5e-7 each. A point
// within it is taken as lossless, so that a measured short or open does not
// turn into a source.
const passiveTolerance = 1e-6

// fromReflection gives the point with the reflection s against the reference.
func fromReflection(f float64, s complex128, reference float64) Point {
	if a := cmplx.Abs(s); a > 1 && a <= 1+passiveTolerance {
		s /= complex(a, 0)
		if real(s) == 1 {
			s = 1
		}
		return Point{f, s, reactance(s, reference)}
	}
	return Point{f, s, impedance(s, reference)}
}

// fromImpedance gives the point with the impedance z.
func fromImpedance(f float64, z complex128, reference float64) Point {
	if cmplx.IsInf(z) {
		return Point{f, 1, cmplx.Inf()}
	}
	s := reflection(z, reference)
	if real(z) < 0 && cmplx.Abs(s) <= 1+passiveTolerance {
		z = complex(0, imag(z))
		s = reflection(z, reference)
	}
	return Point{f, s, z}
}

// impedance is R (1+s)/(1-s), written so that its real part has the sign of
// 1 - |s| whatever the rounding:
//
//	Z = R (1 - |s|^2 + 2j Im s)/|1 - s|^2
func impedance(s complex128, reference float64) complex128 {
	if s == 1 {
		return cmplx.Inf()
	}
	a, d := cmplx.Abs(s), cmplx.Abs(1-s)
	return complex(reference*(1-a)/d*((1+a)/d), reference*2*imag(s)/d/d)
}

// reactance is the impedance of a reflection that is taken to have |s| = 1.
func reactance(s complex128, reference float64) complex128 {
	z := impedance(s, reference)
	if cmplx.IsInf(z) {
		return z
	}
	return complex(0, imag(z))
}

// reflection is (Z-R)/(Z+R), in the form that does not overflow. It is
// infinite at Z = -R, and z is finite.
func reflection(z complex128, reference float64) complex128 {
	r := complex(reference, 0)
	if math.Abs(real(z)) > reference || math.Abs(imag(z)) > reference {
		y := r / z
		return (1 - y) / (1 + y)
	}
	w := z / r
	return (w - 1) / (w + 1)
}

func finite(z complex128) bool { return !cmplx.IsInf(z) && !cmplx.IsNaN(z) }
