package line

import (
	"math"
	"math/cmplx"
	"testing"
)

// TestWidebandDebye: er = 4.2 and tan d = 0.02 at 1 GHz, 1 kHz to 1 THz.
// Source: recomputed from the formula of Djordjevic et al. (2001) with mpmath;
// the published fit itself was not read.
func TestWidebandDebye(t *testing.T) {
	const er, tand = 4.2, 0.02
	omega := 2 * math.Pi * 1e9
	// C stands for the permittivity.
	c, d := Disperse(Constants{L: 1, C: er, G: omega * er * tand}, omega, 0, omega*er*tand)
	const printed = 6e-9 // to nine figures
	if math.Abs(c.C/3.83036488-1) > printed || math.Abs(d.Delta/1.10890528-1) > printed || c.G != 0 {
		t.Errorf("C = %.9f, D = %.9f, G = %g", c.C, d.Delta, c.G)
	}
	for _, row := range []struct{ f, er, tand float64 }{
		{1e3, 4.920725, 0.0085408},
		{1e6, 4.569635, 0.0183822},
		{100e6, 4.323212, 0.0194410},
		{1e9, 4.2, 0.02},
		{10e9, 4.076791, 0.0204863},
		{100e9, 3.953843, 0.0199098},
	} {
		w := 2 * math.Pi * row.f
		at := d.At(c, w)
		if math.Abs(at.C-row.er) > 6e-7 || math.Abs(at.G/(w*at.C)-row.tand) > 6e-8 {
			t.Errorf("%g Hz: er %.6f, tan d %.7f; want %.6f, %.7f", row.f, at.C, at.G/(w*at.C), row.er, row.tand)
		}
	}
}

// TestDisperseKeepsTheDesignFrequency: whatever the model, the line is the
// same at the frequency it was made at.
func TestDisperseKeepsTheDesignFrequency(t *testing.T) {
	omega := 2 * math.Pi * 98.1e6
	whole := Constants{R: 0.08, L: 181e-9, G: 3e-6, C: 72e-12}
	for _, part := range []struct{ r, g float64 }{{0, 0}, {0.08, 0}, {0, 3e-6}, {0.05, 2e-6}} {
		c, d := Disperse(whole, omega, part.r, part.g)
		at := d.At(c, omega)
		const rounding = 1e-12
		for i, pair := range [][2]float64{{at.R, whole.R}, {at.L, whole.L}, {at.G, whole.G}, {at.C, whole.C}} {
			if math.Abs(pair[0]/pair[1]-1) > rounding {
				t.Errorf("%+v: constant %d is %.15g, want %.15g", part, i, pair[0], pair[1])
			}
		}
		if c.L > whole.L || c.C > whole.C {
			t.Errorf("%+v: the wave front is slower than the wave", part)
		}
	}
}

// TestSkinEffect: R grows as the square root of the frequency, and the
// internal reactance is as large as the resistance.
func TestSkinEffect(t *testing.T) {
	omega := 2 * math.Pi * 10e6
	_, d := Disperse(Constants{R: 2, L: 250e-9, C: 100e-12}, omega, 2, 0)
	for _, times := range []float64{0.01, 1, 4, 100} {
		z := d.Series(complex(0, omega*times))
		want := complex(2, 2) * complex(math.Sqrt(times), 0)
		if cmplx.Abs(z-want) > 1e-12*cmplx.Abs(want) {
			t.Errorf("%g times the frequency: %v, want %v", times, z, want)
		}
	}
}
