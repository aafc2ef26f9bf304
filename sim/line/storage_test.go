package line

import (
	"math"
	"testing"
)

// TestStorage: the closed derivatives of the reactance and the susceptance
// against differences of the law itself; L and C where there is no dispersion.
func TestStorage(t *testing.T) {
	const step = 1e-4     // of the frequency, central: error 1e-8
	const accuracy = 1e-7 // that, and rounding of 1e-16 over the step
	for _, f := range []float64{2e3, 1e6, 98.1e6, 3e11} {
		omega := 2 * math.Pi * f
		whole := Constants{R: 0.1 * omega * 250e-9, L: 250e-9, G: 0.02 * omega * 100e-12, C: 100e-12}
		for _, part := range []struct{ r, g float64 }{{0, 0}, {1, 0}, {0, 1}, {0.5, 0.7}} {
			c, d := Disperse(whole, omega, part.r*whole.R, part.g*whole.G)
			l, k := d.Storage(c, omega)
			up, down := omega*(1+step), omega*(1-step)
			wantL := (up*d.At(c, up).L - down*d.At(c, down).L) / (up - down)
			wantC := (up*d.At(c, up).C - down*d.At(c, down).C) / (up - down)
			if math.Abs(l/wantL-1) > accuracy || math.Abs(k/wantC-1) > accuracy {
				t.Errorf("%g Hz, %+v: %.9g H/m and %.9g F/m, want %.9g and %.9g", f, part, l, k, wantL, wantC)
			}
			if d.None() && (l != whole.L || k != whole.C) {
				t.Errorf("%g Hz: %g H/m and %g F/m without dispersion", f, l, k)
			}
		}
	}
}
