package phasor

import "math"

// SquareIntegrals gives the integrals of |V|^2, V^2 m, and of |I|^2, A^2 m,
// along section k, for peak phasors. The mean power lost in the section is
// (R i2 + G v2)/2, the mean energy stored there (L i2 + C v2)/4.
func (s *Solution) SquareIntegrals(k int) (v2, i2 float64) {
	return s.waves[k].squares()
}

// squares integrates |V|^2 and |I|^2 over the length l, with g = a + jb:
//
//	|V|^2 = |P|^2 e^{-2az} + |M|^2 e^{-2a(l-z)} + 2 e^{-al} Re(P M* e^{jb(l-2z)})
//
// The first two integrate to E = (1 - e^{-2al})/(2a), the last factor to
// F = e^{-al} sin(bl)/b, a real number. With the sum and the difference of P and
// M, so that nothing cancels on a short line with an open or a shorted end,
//
//	v2 = |P+M|^2 (E+F)/2 + |P-M|^2 (E-F)/2
//
// and i2 likewise with P-M for P+M and over |Zc|^2.
func (w wave) squares() (v2, i2 float64) {
	even, odd := standing(real(w.gamma)*w.length, imag(w.gamma)*w.length)
	sum, difference := square(w.forward+w.backward), square(w.forward-w.backward)
	v2 = (sum*even + difference*odd) * w.length
	i2 = (difference*even + sum*odd) * w.length / square(w.zc)
	return v2, i2
}

func square(p complex128) float64 { return real(p)*real(p) + imag(p)*imag(p) }

// standing gives (E+F)/(2l) and (E-F)/(2l) of squares for x = al and y = bl:
// the parts of a standing wave with its crest, and with its null, in the middle
// of a line without loss.
func standing(x, y float64) (even, odd float64) {
	e, f := 1.0, 1.0
	if x != 0 {
		e = -math.Expm1(-2*x) / (2 * x)
	}
	if y != 0 {
		f = math.Sin(y) / y
	}
	decay := math.Exp(-x)
	even = (e + decay*f) / 2
	if math.Abs(x) < shortLine && math.Abs(y) < shortLine {
		return even, decay * shortDifference(x, y) / 2
	}
	return even, (e - decay*f) / 2
}

// shortLine is the exponent below which E and F are near enough to each other
// for their difference to lose digits.
const shortLine = 0.5

// shortDifference is sinh(x)/x - sin(y)/y by its series,
//
//	sum over k of (x^{2k} - (-y^2)^k)/(2k+1)!
//
// whose first term is the largest and never cancels.
func shortDifference(x, y float64) float64 {
	const terms = 8 // below shortLine the next is less than 1e-18 of the first
	sum, a, b, factorial := 0.0, 1.0, 1.0, 1.0
	for k := 1; k <= terms; k++ {
		a, b = a*x*x, -b*y*y
		factorial *= float64(2*k) * float64(2*k+1)
		sum += (a - b) / factorial
	}
	return sum
}
