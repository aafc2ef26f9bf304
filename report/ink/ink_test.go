package ink

import (
	"image/color"
	"math"
	"testing"
)

// luminance is the relative luminance of WCAG 2.1.
func luminance(c color.NRGBA) float64 {
	f := func(v uint8) float64 {
		x := float64(v) / 255
		if x <= 0.04045 {
			return x / 12.92
		}
		return math.Pow((x+0.055)/1.055, 2.4)
	}
	return 0.2126*f(c.R) + 0.7152*f(c.G) + 0.0722*f(c.B)
}

func contrast(a, b color.NRGBA) float64 {
	x, y := luminance(a)+0.05, luminance(b)+0.05
	return math.Max(x, y) / math.Min(x, y)
}

// The limits are those of WCAG 2.1, success criteria 1.4.3 and 1.4.11. The
// pale line of the phasor is not among them: it is 2.4 pt wide, lies under the
// dark one and is named in the key.
func TestContrast(t *testing.T) {
	const text, graphic = 4.5, 3.0
	for name, c := range map[string]color.NRGBA{"Text": Text, "Soft": Soft, "Accent": Accent, "Good": Good, "Bad": Bad, "Doubt": Doubt, "Limit": Limit} {
		for _, ground := range []color.NRGBA{White, Zebra, Panel} {
			if got := contrast(c, ground); got < text {
				t.Errorf("%s on %v: contrast %.2f, want %v", name, ground, got, text)
			}
		}
	}
	for name, c := range map[string]color.NRGBA{"FDTD": FDTD, "Peak": Peak} {
		if got := contrast(c, White); got < graphic {
			t.Errorf("%s: contrast %.2f, want %v", name, got, graphic)
		}
	}
	if got := contrast(FDTD, Phasor); got < graphic {
		t.Errorf("the two witnesses: contrast %.2f, want %v", got, graphic)
	}
}
