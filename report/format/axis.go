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

// Decade returns the label of a tick of a logarithmic axis at 10^n. It is a
// percentage throughout, so that no axis mixes per cent and parts of one; down
// to 0.001 % in decimals and with a power of ten below.
func Decade(n int) string {
	const percent = 2 // decades
	if n >= -5 && n <= 1 {
		return Fixed(math.Pow(10, float64(n+percent)), max(-n-percent, 0)) + Space + "%"
	}
	return Pow10(n+percent) + Space + "%"
}
