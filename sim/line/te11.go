package line

import "math"

// te11 is the cut-off wave number of the TE11 mode of a coaxial line, rad/m,
// the first root of
//
//	J1'(ka) Y1'(kb) = J1'(kb) Y1'(ka)
//
// The approximation 2/(a+b) is 3 % below it at b/a = 3.6 and 9 % above it for a thin wire,
// which brackets the root for bisection. Source: D.M. Pozar, Microwave Engineering, 4th ed.
// (2012), section 3.5 (from a digest).
func te11(a, b float64) float64 {
	low, high := 1.6/(a+b), 2.3/(a+b)
	sign := te11Residual(low, a, b) > 0
	for range 60 {
		middle := (low + high) / 2
		if te11Residual(middle, a, b) > 0 == sign {
			low = middle
		} else {
			high = middle
		}
	}
	return (low + high) / 2
}

func te11Residual(k, a, b float64) float64 {
	dj := func(x float64) float64 { return math.J0(x) - math.J1(x)/x }
	dy := func(x float64) float64 { return math.Y0(x) - math.Y1(x)/x }
	return dj(k*a)*dy(k*b) - dj(k*b)*dy(k*a)
}
