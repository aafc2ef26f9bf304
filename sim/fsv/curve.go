package fsv

import (
	"fmt"
	"math"
	"sort"
)

// largestFactor bounds the prime factors of the number of points of long
// curves: a transform costs as many times more. Up to freePoints any number is
// quick enough, and the points stay as they are.
const (
	largestFactor = 31
	freePoints    = 512
)

// points is the number of points to compare where n are given: n, or if that
// would be slow a number just below it, but no more than mostPoints.
func points(n int) int {
	n = min(n, mostPoints)
	for n > freePoints && !smooth(n) {
		n--
	}
	return n
}

// smooth reports whether n has no prime factor above largestFactor.
func smooth(n int) bool {
	for f := 2; f <= largestFactor; f++ {
		for n%f == 0 {
			n /= f
		}
	}
	return n == 1
}

// checkValues gives an error for values that are not finite.
func checkValues(which string, y []float64) error {
	for i, v := range y {
		if math.IsNaN(v) || math.IsInf(v, 0) {
			return fmt.Errorf("%s curve: point %d is %g; a comparison needs finite values", which, i+1, v)
		}
	}
	return nil
}

// checkCurve gives an error for a curve that is not y at rising x.
func checkCurve(which string, x, y []float64) error {
	if len(x) != len(y) {
		return fmt.Errorf("%s curve: %d abscissae for %d values", which, len(x), len(y))
	}
	for i := range x {
		if math.IsNaN(x[i]) || math.IsInf(x[i], 0) {
			return fmt.Errorf("%s curve: abscissa %d is %g; a comparison needs finite ones", which, i+1, x[i])
		}
		if i > 0 && x[i] <= x[i-1] {
			return fmt.Errorf("%s curve: abscissa %d does not rise; give the points with rising abscissae", which, i+1)
		}
	}
	return checkValues(which, y)
}

// tooFew is the error for curves of fewer points than leastPoints.
func tooFew(n int) error {
	if n >= leastPoints {
		return nil
	}
	return fmt.Errorf("%d points in the range that the curves share; a comparison needs at least %d", max(n, 0), leastPoints)
}

// edge is the part of the shared range by which a point may lie outside of it
// and still count: abscissae of the same grid may be rounded differently.
const edge = 1e-9

// within counts the x from low to high; not above 0 if there are none.
func within(x []float64, low, high float64) int {
	slack := edge*high - edge*low // in this order, as high - low may overflow
	low, high = low-slack, high+slack
	return sort.Search(len(x), func(i int) bool { return x[i] > high }) - sort.SearchFloat64s(x, low)
}

// resample interpolates the curve linearly at n evenly spaced points from low
// to high, which lie in its range.
func resample(x, y []float64, low, high float64, n int) []float64 {
	out := make([]float64, n)
	k := 0 // the interval from x[k] to x[k+1]
	for i := range out {
		// two products, as high - low may overflow
		share := float64(i) / float64(n-1)
		at := low*(1-share) + high*share
		for k < len(x)-2 && x[k+1] < at {
			k++
		}
		out[i] = between(y[k], y[k+1], (at/2-x[k]/2)/(x[k+1]/2-x[k]/2))
	}
	return out
}

// thin interpolates evenly spaced values at n evenly spaced points.
func thin(y []float64, n int) []float64 {
	out := make([]float64, n)
	last, to := int64(len(y)-1), int64(n-1)
	for i := range out {
		// whole numbers, so that points that coincide do so exactly
		at := int64(i) * last
		out[i] = between(y[at/to], y[min(at/to+1, last)], float64(at%to)/float64(to))
	}
	return out
}

// between is the value at the share of the way from a to b, which rounding may
// put a little outside.
func between(a, b, share float64) float64 {
	share = math.Min(math.Max(share, 0), 1)
	return a*(1-share) + b*share
}
