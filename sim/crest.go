package sim

import (
	"math"
	"math/cmplx"
)

// gridExtremes finds the extremes of |p| along a section of the given length,
// between the points z of a grid too: from point to point p is the sum of two
// waves with the propagation constant gamma that the grid gives them.
func gridExtremes(z []float64, p []complex128, gamma complex128, length float64) extremes {
	size := make([]float64, len(p))
	for i, v := range p {
		size[i] = cmplx.Abs(v)
	}
	// Loss, or the place of the points between the crests, decides which crest
	// is the largest: all are looked at.
	out := extremes{extreme{-1, 0}, extreme{math.Inf(1), 0}}
	for i := range size {
		for _, sign := range []float64{1, -1} {
			if turns(size, i, sign) {
				out.take(extreme{size[i], z[i]})
				out.take(crest(z, p, i, gamma, length, sign))
			}
		}
	}
	return out
}

// take takes in a value.
func (e *extremes) take(v extreme) {
	if v.value > e.largest.value {
		e.largest = v
	}
	if v.value < e.smallest.value {
		e.smallest = v
	}
}

// turns reports whether point i is not below (sign 1), or not above (sign -1),
// its neighbours.
func turns(y []float64, i int, sign float64) bool {
	return (i == 0 || sign*y[i] >= sign*y[i-1]) && (i == len(y)-1 || sign*y[i] >= sign*y[i+1])
}

// widest is the phase between two points, rad, up to which two waves are drawn
// through them.
const widest = 1.25

// crest is the largest (sign 1) or smallest (sign -1) size of the wave through
// the neighbours of point i: between them, of the first and the last point between
// the other neighbour and the end of the section. On a record that was thinned too
// far, or that has one point only, it is that of point i itself.
func crest(z []float64, p []complex128, i int, gamma complex128, length, sign float64) extreme {
	a, b := max(i-1, 0), min(i+1, len(z)-1)
	if a == b || imag(gamma)*(z[b]-z[a]) > widest {
		return extreme{cmplx.Abs(p[i]), z[i]}
	}
	lo, hi := z[a], z[b]
	if i == 0 {
		lo = 0
	}
	if i == len(z)-1 {
		hi = length
	}
	w := through(gamma, z[a], z[b], p[a], p[b])
	at := w.farthest(lo, hi, sign)
	return extreme{w.size(at), at}
}

// A twoWaves is forward e^{-gamma (z - from)} + backward e^{gamma (z - from)}.
type twoWaves struct {
	gamma, forward, backward complex128
	from                     float64
}

// through is the pair of waves with given values at two places.
func through(gamma complex128, za, zb float64, a, b complex128) twoWaves {
	e := cmplx.Exp(-gamma * complex(zb-za, 0))
	m := (b - a*e) / (1/e - e)
	return twoWaves{gamma, a - m, m, za}
}

func (w twoWaves) size(z float64) float64 {
	e := cmplx.Exp(-w.gamma * complex(z-w.from, 0))
	return cmplx.Abs(w.forward*e + w.backward/e)
}

// farthest is the place between lo and hi, which hold one extreme, of the largest
// (sign 1) or smallest size, by golden-section search.
func (w twoWaves) farthest(lo, hi, sign float64) float64 {
	const golden = 0.6180339887498949
	for range 40 { // 4e-9 of the interval, and the square of that of the size
		c, d := hi-golden*(hi-lo), lo+golden*(hi-lo)
		if sign*w.size(c) > sign*w.size(d) {
			hi = d
		} else {
			lo = c
		}
	}
	return (lo + hi) / 2
}
