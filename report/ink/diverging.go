package ink

import (
	"image/color"
	"math"
)

// The stops of the scale of signed values: white for zero, and to either side
// ever darker.
var (
	negative = []color.NRGBA{{250, 250, 250, 255}, {116, 169, 207, 255}, {5, 48, 97, 255}}
	positive = []color.NRGBA{{250, 250, 250, 255}, {241, 163, 64, 255}, {127, 39, 4, 255}}
)

// Diverging returns the colour of v from -1 to 1: blue for negative values and
// orange to brown for positive ones. The lightness falls with the size on either
// side, so that a print in grey shows sizes; signs need a mark of their own.
func Diverging(v float64) color.NRGBA {
	stops := positive
	if v < 0 {
		stops = negative
	}
	at := math.Min(math.Abs(v), 1) * float64(len(stops)-1)
	i := min(int(at), len(stops)-2)
	return Mix(stops[i], stops[i+1], at-float64(i))
}

// Mix returns the colour that is the part t of the way from a to b.
func Mix(a, b color.NRGBA, t float64) color.NRGBA {
	mix := func(x, y uint8) uint8 { return uint8(math.Round(float64(x) + t*(float64(y)-float64(x)))) }
	return color.NRGBA{R: mix(a.R, b.R), G: mix(a.G, b.G), B: mix(a.B, b.B), A: 255}
}
