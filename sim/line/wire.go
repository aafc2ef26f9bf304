package line

import (
	"math"
	"math/cmplx"
)

// WireImpedance is the exact internal impedance per metre of a round wire of
// the given radius in m, alone in space, at f in Hz:
//
//	Z = g/(2 pi a sigma) I0(g a)/I1(g a),  g = sqrt(j w mu0 sigma)
//
// Far above the frequency where the skin depth is the radius it tends to
// Rs/(2 pi a) (1 + j) + R0/4, R0 the resistance at direct current. Source:
// textbooks on skin effect, from memory; the values that test it were computed
// apart from it.
func WireImpedance(conductivity, radius, f float64) complex128 {
	g := cmplx.Sqrt(complex(0, 2*math.Pi*f*mu0*conductivity))
	x := g * complex(radius, 0)
	return g / complex(2*math.Pi*radius*conductivity, 0) * besselRatio(x)
}

// besselRatio is I0(x)/I1(x) by the continued fraction
//
//	I0/I1 = 2/x + 1/(4/x + 1/(6/x + ...))
//
// from the recurrence of the I, whose terms are all positive for positive x.
// It starts where the order is well above |x|; for large |x| it takes
// the asymptotic form 1 + 1/(2x) + 3/(8x^2), right to 1e-8 from |x| = 300 on.
func besselRatio(x complex128) complex128 {
	const large = 300
	if cmplx.Abs(x) > large {
		return 1 + 1/(2*x) + 3/(8*x*x)
	}
	start := int(2*cmplx.Abs(x)) + 30
	ratio := complex(2*float64(start), 0) / x
	for n := start - 1; n > 0; n-- {
		ratio = complex(2*float64(n), 0)/x + 1/ratio
	}
	return ratio
}
