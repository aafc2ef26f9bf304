package ink

import "testing"

// The lightness falls with the size on either side, and to about the same, so
// that a print in grey shows sizes.
func TestDiverging(t *testing.T) {
	for _, side := range []float64{-1, 1} {
		last := 2.0
		for k := range 51 {
			v := side * float64(k) / 50
			if y := luminance(Diverging(v)); y >= last {
				t.Errorf("%v is as light as what is smaller: %v after %v", v, y, last)
			} else {
				last = y
			}
		}
	}
	if got := contrast(Diverging(1), Diverging(-1)); got > 1.6 {
		t.Errorf("the ends differ in lightness by a contrast of %.2f", got)
	}
	if Diverging(7) != Diverging(1) || Diverging(-7) != Diverging(-1) {
		t.Error("beyond the ends it is not the colour of the ends")
	}
}
