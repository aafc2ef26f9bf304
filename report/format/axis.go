package format

import "math"

// maxTickDecimals bounds the labels of an axis; axes are scaled by a prefix,
// so that no step needs more.
const maxTickDecimals = 6

// Tick returns the label of a tick at v on an axis whose ticks are step
// apart: as many decimals as the step needs and no more.
func Tick(v, step float64) string {
	decimals := 0
	for s := step; decimals < maxTickDecimals && math.Abs(s-math.Round(s)) > 1e-6; s *= 10 {
		decimals++
	}
	if v != 0 && math.Abs(v) < step/1e6 {
		v = 0 // the rest of a sum of steps
	}
	return Fixed(v, decimals)
}

// Decade returns the label of a tick of a logarithmic axis at 10^n, as a
// percentage down to 0.01 % and as a power of ten below.
func Decade(n int) string {
	if n >= -4 && n <= 1 {
		return Digits(math.Pow(10, float64(n+2)), 1) + Space + "%"
	}
	return Pow10(n)
}
