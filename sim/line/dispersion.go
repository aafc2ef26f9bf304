package line

import (
	"math"
	"math/cmplx"
)

// A Dispersion is what makes a line depend on frequency, on top of its
// Constants, which are then those of the highest frequencies:
//
//	Z'(s) = R + sL + K sqrt(s)
//	Y'(s) = G + sC + s D ln[(w2+s)/(w1+s)]/ln(w2/w1)
//
// K sqrt(s) is the skin effect in conductors much thicker than the skin depth:
// resistance and internal reactance K sqrt(w/2) each. The logarithm is the
// wideband Debye form of a dielectric whose loss tangent is nearly constant
// between w1 and w2. The zero value is no dispersion.
//
// Source: for the logarithm A. R. Djordjevic et al., IEEE Trans. EMC 43(4),
// 2001, pp. 662-667 (read in a digest).
type Dispersion struct {
	Skin   float64 // K, ohm sqrt(s) per m
	Delta  float64 // D, F/m
	W1, W2 float64 // rad/s; not used if Delta is 0
}

// The band of a constant loss tangent, 1 kHz to 1 THz, as is usual.
const (
	debyeLow  = 2 * math.Pi * 1e3
	debyeHigh = 2 * math.Pi * 1e12
)

// None reports whether there is no dispersion.
func (d Dispersion) None() bool { return d.Skin == 0 && d.Delta == 0 }

// Series is K sqrt(s), ohm/m.
func (d Dispersion) Series(s complex128) complex128 {
	return complex(d.Skin, 0) * cmplx.Sqrt(s)
}

// Shunt is s D ln[(w2+s)/(w1+s)]/ln(w2/w1), S/m.
func (d Dispersion) Shunt(s complex128) complex128 {
	if d.Delta == 0 {
		return 0
	}
	return s * complex(d.Delta, 0) * d.shape(s)
}

// shape is ln[(w2+s)/(w1+s)]/ln(w2/w1): near 1 below w1, near 0 above w2.
func (d Dispersion) shape(s complex128) complex128 {
	l := cmplx.Log(complex(d.W2, 0)+s) - cmplx.Log(complex(d.W1, 0)+s)
	return l / complex(math.Log(d.W2/d.W1), 0)
}

// At gives the constants that a line with the high-frequency constants c has
// at the angular frequency omega.
func (d Dispersion) At(c Constants, omega float64) Constants {
	s := complex(0, omega)
	z, y := d.Series(s), d.Shunt(s)
	return Constants{
		R: c.R + real(z), L: c.L + imag(z)/omega,
		G: c.G + real(y), C: c.C + imag(y)/omega,
	}
}

// Disperse makes a dispersive line of one that is known at one frequency: at
// omega it has the constants c, of whose resistance conductor, in ohm/m, is
// skin effect, and of whose conductance dielectric, in S/m, is a constant loss
// tangent. What is left of R and G stays constant. It gives the high-frequency
// constants, smaller in L and C, and the dispersion:
//
//	K = conductor/sqrt(w/2),  L - K/sqrt(2w)
//	D = -(dielectric/w)/Im shape(jw),  C - D Re shape(jw)
//
// It panics if a part is more than the whole.
func Disperse(c Constants, omega, conductor, dielectric float64) (Constants, Dispersion) {
	const slack = 1 + 1e-12
	if conductor < 0 || dielectric < 0 || conductor > c.R*slack || dielectric > c.G*slack {
		panic("line: dispersive part outside the whole")
	}
	d := Dispersion{Skin: conductor / math.Sqrt(omega/2)}
	c.R = math.Max(0, c.R-conductor)
	c.L -= d.Skin / math.Sqrt(2*omega)
	if dielectric > 0 {
		d.W1, d.W2 = debyeLow, debyeHigh
		shape := d.shape(complex(0, omega))
		d.Delta = -dielectric / omega / imag(shape)
		c.G = math.Max(0, c.G-dielectric)
		c.C -= d.Delta * real(shape)
	}
	return c, d
}
