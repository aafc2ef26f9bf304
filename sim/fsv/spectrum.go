package fsv

import (
	"math"
	"math/cmplx"

	"gonum.org/v1/gonum/dsp/fourier"
)

// Parts are a curve split up: their sum is the curve, but for rounding.
type parts struct{ dc, lo, hi []float64 }

// rounding is the size, relative to the largest bin of both curves, below which
// a bin of both is the rounding of the transform. Such bins are taken as
// empty: where a curve has no high part its rounding would be measured.
const rounding = 1e-12

// split splits two curves of the same length at the same bins.
//
// The transforms hold the bins 0 to n/2 only. The other bins are the complex
// conjugates of those, so a real window on bin k is on bin n-k as well, and
// the parts are real.
func (m *method) split(y1, y2 []float64) (p1, p2 parts) {
	fft := fourier.NewFFT(len(y1))
	c1, c2 := fft.Coefficients(nil, y1), fft.Coefficients(nil, y2)
	clean(c1, c2, math.Max(rounding, m.floor))
	window := m.window(len(c1), m.breakPoint(c1, c2))
	return m.apart(fft, c1, window), m.apart(fft, c2, window)
}

// clean empties the bins that are no larger than a part of the largest in both.
func clean(c1, c2 []complex128, part float64) {
	top := 0.0
	for k := range c1 {
		top = math.Max(top, math.Max(cmplx.Abs(c1[k]), cmplx.Abs(c2[k])))
	}
	for k := range c1 {
		if math.Max(cmplx.Abs(c1[k]), cmplx.Abs(c2[k])) <= part*top {
			c1[k], c2[k] = 0, 0
		}
	}
}

// breakPoint is the bin of the break between the low and the high part: the
// lower of the 40 % locations of the curves that have one, and the offset.
func (m *method) breakPoint(c1, c2 []complex128) int {
	return min(m.location(c1), m.location(c2)) + m.breakOffset
}

// location is the first bin at which the running sum of the bins above the DC
// part reaches its share of their total; len(c) if they are all empty.
func (m *method) location(c []complex128) int {
	total := 0.0
	for _, v := range c[m.dcBins:] {
		total += m.weight(v)
	}
	sum := 0.0
	for k, v := range c[m.dcBins:] {
		sum += m.weight(v)
		if total > 0 && sum >= m.breakShare*total {
			return m.dcBins + k
		}
	}
	return len(c)
}

func (m *method) weight(v complex128) float64 {
	if m.sumOfSquares {
		return real(v)*real(v) + imag(v)*imag(v)
	}
	return cmplx.Abs(v)
}

// window is the part of each of the bins that belongs to the low part.
func (m *method) window(bins, breakPoint int) []float64 {
	w := make([]float64, bins)
	for k := range w {
		switch d := k - breakPoint; {
		case d <= -m.halfWidth:
			w[k] = 1
		case d < m.halfWidth:
			w[k] = float64(m.halfWidth-d) / float64(2*m.halfWidth)
		}
	}
	return w
}

// apart turns the bins into the parts of the curve.
func (m *method) apart(fft *fourier.FFT, c []complex128, window []float64) parts {
	dc, lo, hi := make([]complex128, len(c)), make([]complex128, len(c)), make([]complex128, len(c))
	for k, v := range c {
		v /= complex(float64(fft.Len()), 0) // the transform and its inverse multiply by n
		if k < m.dcBins {
			dc[k] = v
			continue
		}
		lo[k] = v * complex(window[k], 0)
		hi[k] = v - lo[k]
	}
	return parts{fft.Sequence(nil, dc), fft.Sequence(nil, lo), fft.Sequence(nil, hi)}
}
