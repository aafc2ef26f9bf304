package format

import (
	"math"
	"math/cmplx"
)

// Complex returns z as real and imaginary part, "50.01 − j0.03 Ω": both with
// the decimals that give the larger one four significant digits.
func Complex(z complex128, unit string) string {
	switch {
	case cmplx.IsInf(z):
		return Infinite
	case cmplx.IsNaN(z):
		return Missing
	}
	size := math.Max(math.Abs(real(z)), math.Abs(imag(z)))
	p := Prefix{Factor: 1}
	if prefixed[unit] {
		p = PrefixFor(size)
	}
	decimals := decimalsFor(size / p.Factor)
	re, im := real(z)/p.Factor, imag(z)/p.Factor
	operator := "+"
	if im < 0 && plain(im, decimals) != plain(0, decimals) {
		operator = Minus
	}
	s := plain(re, decimals) + Space + operator + Space + "j" + plain(math.Abs(im), decimals)
	if p.Symbol+unit != "" {
		s += Space + p.Symbol + unit
	}
	return s
}

// decimalsFor returns how many decimals give v four significant digits.
func decimalsFor(v float64) int {
	if v == 0 {
		return significant - 2
	}
	_, exponent := split(v, significant)
	return max(significant-1-exponent, 0)
}

// Polar returns z as size and angle, "1.315 kV at −59.10°".
func Polar(z complex128, unit string) string {
	switch {
	case cmplx.IsInf(z):
		return Infinite
	case cmplx.IsNaN(z):
		return Missing
	case z == 0:
		return "0" + Space + unit
	}
	return SI(cmplx.Abs(z), unit) + " at" + Space + Angle(cmplx.Phase(z)*180/math.Pi)
}
