package figure

import (
	"math"

	"linewitness/report/ink"
)

// Thinned is a curve reduced to its extremes in windows along x.
type Thinned struct{ X, Lo, Hi []float64 }

// columns is the number of windows across a panel: closer than this two
// points of a curve do not show apart.
const columns = 360

// crowded is the number of cycles from which on a waveform is drawn as a band:
// more do not show apart on half the width of a page.
const crowded = 60

// Extremes returns the smallest and largest finite y in each of n windows of
// equal width between the first and the last x, which must ascend. Windows
// without a finite point are left out.
func Extremes(xs, ys []float64, n int) Thinned {
	var t Thinned
	count := min(len(xs), len(ys))
	if count == 0 || n < 1 {
		return t
	}
	x0, width := xs[0], (xs[count-1]-xs[0])/float64(n)
	window := -1
	for i := range count {
		if !finite(xs[i], ys[i]) {
			continue
		}
		w := 0
		if width > 0 {
			w = min(int((xs[i]-x0)/width), n-1)
		}
		if w != window {
			window = w
			t.X = append(t.X, x0+(float64(w)+0.5)*width)
			t.Lo, t.Hi = append(t.Lo, ys[i]), append(t.Hi, ys[i])
			continue
		}
		last := len(t.X) - 1
		t.Lo[last] = math.Min(t.Lo[last], ys[i])
		t.Hi[last] = math.Max(t.Hi[last], ys[i])
	}
	return t.stretch(x0, xs[count-1])
}

// stretch moves the outer windows to the ends of the curve, so that a band
// reaches from edge to edge.
func (t Thinned) stretch(first, last float64) Thinned {
	if n := len(t.X); n > 1 {
		t.X[0], t.X[n-1] = first, last
	}
	return t
}

// Times returns n equally spaced abscissas.
func Times(start, step float64, n int) []float64 {
	ts := make([]float64, n)
	for i := range ts {
		ts[i] = start + float64(i)*step
	}
	return ts
}

// Trace draws a waveform of so many cycles as a line, or as a band if they
// are crowded. Each window of the band holds a cycle or more, for with less
// the edges of the band would beat with the waveform.
func (pn *Panel) Trace(xs, ys []float64, cycles float64) {
	if cycles > crowded {
		pn.Band(Extremes(xs, ys, min(columns, int(cycles))), ink.TraceLine)
		return
	}
	pn.Line(xs, ys, ink.TraceLine)
}
