package fsv

import (
	"math"
	"testing"

	"pgregory.net/rapid"
)

// The method once more from its formulas, with sums in place of transforms and
// all n bins in place of one half: what the halves and their mirror images do
// is checked against it.

// sum gives the part of y that weight takes out of its spectrum: bin k and its
// mirror image n-k are both of frequency k.
func sum(n int, y []float64, weight func(frequency int) float64) []float64 {
	out := make([]float64, n)
	for k := range n {
		w := weight(min(k, n-k))
		if w == 0 {
			continue
		}
		re, im := bin(y, k)
		for i := range out {
			s, c := math.Sincos(2 * math.Pi * float64(i*k%n) / float64(n))
			out[i] += w * (re*c - im*s) / float64(n)
		}
	}
	return out
}

func bin(y []float64, k int) (re, im float64) {
	for i, v := range y {
		s, c := math.Sincos(2 * math.Pi * float64(i*k%len(y)) / float64(len(y)))
		re += v * c
		im -= v * s
	}
	return re, im
}

func inside(yes bool) float64 {
	if yes {
		return 1
	}
	return 0
}

// fortyPercent is the bin that holds 40 % of the magnitudes from bin 4 up.
func fortyPercent(y []float64) int {
	var total, running float64
	magnitude := make([]float64, len(y)/2+1)
	for k := 4; k < len(magnitude); k++ {
		magnitude[k] = math.Hypot(bin(y, k))
		total += magnitude[k]
	}
	for k := 4; k < len(magnitude); k++ {
		running += magnitude[k]
		if total > 0 && running >= 0.4*total {
			return k
		}
	}
	return len(y)
}

type measures struct{ adm, fdm, gdm []float64 }

func reference(y1, y2 []float64) (out measures) {
	n := len(y1)
	b := min(fortyPercent(y1), fortyPercent(y2)) + 5
	low := func(k int) float64 { // 1, 3/4, 1/2, 1/4, 0 from b-2 to b+2
		return math.Max(0, math.Min(1, float64(b+2-k)/4))
	}
	part := func(y []float64) (dc, lo, hi []float64) {
		dc = sum(n, y, func(k int) float64 { return inside(k < 4) })
		lo = sum(n, y, func(k int) float64 { return inside(k >= 4) * low(k) })
		hi = sum(n, y, func(k int) float64 { return inside(k >= 4) * (1 - low(k)) })
		return dc, lo, hi
	}
	derivative := func(y []float64, d int) []float64 {
		out := make([]float64, n)
		for i := range out {
			out[i] = y[min(i+d, n-1)] - y[max(i-d, 0)]
		}
		return out
	}
	relative := func(a, b []float64, i int) float64 {
		bottom := 0.0
		for j := range a {
			bottom += (math.Abs(a[j]) + math.Abs(b[j])) / float64(n)
		}
		// where a part is empty, its rounding is not to be measured
		if bottom < 1e-9 {
			return 0
		}
		return (math.Abs(a[i]) - math.Abs(b[i])) / bottom
	}
	dc1, lo1, hi1 := part(y1)
	dc2, lo2, hi2 := part(y2)
	slope1, slope2 := derivative(hi1, 3), derivative(hi2, 3)
	for i := range n {
		odm := math.Abs(relative(dc1, dc2, i))
		adm := math.Abs(relative(lo1, lo2, i)) + odm*math.Exp(odm)
		fdm := 2 * math.Abs(relative(derivative(lo1, 2), derivative(lo2, 2), i)/2+
			relative(slope1, slope2, i)/6+
			relative(derivative(slope1, 3), derivative(slope2, 3), i)/7.2)
		out.adm = append(out.adm, adm)
		out.fdm = append(out.fdm, fdm)
		out.gdm = append(out.gdm, math.Sqrt(adm*adm+fdm*fdm))
	}
	return out
}

// TestReference compares every point of drawn curves, of even and odd lengths,
// with the method written out in sums.
func TestReference(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		y1, y2 := drawPair(t)
		got, want := mustCurves(t, y1, y2), reference(y1, y2)
		for i := range y1 {
			for _, p := range [][2]float64{
				{got.ADM.Points[i], want.adm[i]},
				{got.FDM.Points[i], want.fdm[i]},
				{got.GDM.Points[i], want.gdm[i]},
			} {
				if math.Abs(p[0]-p[1]) > identityTolerance*(1+p[1]) {
					t.Fatalf("point %d of %d: %.12g, want %.12g", i, len(y1), p[0], p[1])
				}
			}
		}
	})
}
