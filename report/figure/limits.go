package figure

import (
	"cmp"
	"math"
	"slices"

	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
	"linewitness/report/ink"
)

// A Limit is a horizontal line that a curve should stay on one side of.
type Limit struct {
	Value float64
	Above bool // the side above it is not allowed, else that below
	Mild  bool // the side beyond is not hatched: a nearer limit decides
	Label string
}

func (l Limit) style() draw.LineStyle {
	if l.Mild {
		return ink.RatedLine
	}
	return ink.LimitLine
}

// Limits draws limits and hatches what is beyond the nearest of them. A label
// stands on its line at the right, on the side where curves should not be; the
// labels of lines that are too close for that are stacked in their order.
func (pn *Panel) Limits(limits []Limit) {
	var above, below []Limit
	for _, l := range limits {
		switch {
		case !finite(l.Value):
		case l.Above:
			above = append(above, l)
		default:
			below = append(below, l)
		}
	}
	height := func(y func(float64) vg.Length) func(Limit) float64 {
		return func(l Limit) float64 { return y(pn.y.at(l.Value)).Points() }
	}
	pn.p.Add(inData(func(c draw.Canvas, _, y func(float64) vg.Length) {
		at := height(y)
		hatch(c, beyond(c.Rectangle, above, at))
		hatch(c, beyond(c.Rectangle, below, at))
		for _, l := range slices.Concat(above, below) {
			c.StrokeLine2(l.style(), c.Min.X, vg.Points(at(l)), c.Max.X, vg.Points(at(l)))
		}
	}))
	pn.over = append(pn.over, inData(func(c draw.Canvas, _, y func(float64) vg.Length) {
		tags(c, above, height(y))
		tags(c, below, height(y))
	}))
}

// beyond returns the part of r beyond the nearest of limits of one side.
func beyond(r vg.Rectangle, limits []Limit, at func(Limit) float64) vg.Rectangle {
	lo, hi := r.Max.Y, r.Min.Y
	for _, l := range limits {
		switch {
		case l.Mild:
		case l.Above:
			lo, hi = min(lo, vg.Points(at(l))), r.Max.Y
		default:
			lo, hi = r.Min.Y, max(hi, vg.Points(at(l)))
		}
	}
	r.Min.Y, r.Max.Y = lo, hi
	return r
}

// TagHeight is the distance of the baselines of two labels in a stack.
const TagHeight = 7.6

// tags writes the labels of limits of one side at the right end of their lines.
func tags(c draw.Canvas, limits []Limit, at func(Limit) float64) {
	slices.SortFunc(limits, func(a, b Limit) int { return cmp.Compare(a.Value, b.Value) })
	ys := make([]float64, len(limits))
	for i, l := range limits {
		ys[i] = at(l) + 2.5
		if !l.Above {
			ys[i] = at(l) - tagStyle.Size - 0.5
		}
	}
	spread(ys, c.Min.Y.Points()+1.8, c.Max.Y.Points()-tagStyle.Size+0.5, len(limits) > 0 && limits[0].Above)
	for i, l := range limits {
		s := tagStyle.Fit(l.Label, (c.Max.X-c.Min.X).Points()-6)
		tagAt(c, c.Max.X.Points()-3-tagStyle.Width(s), ys[i], s, l.style())
	}
}

// spread moves ascending positions apart to TagHeight, inside lo to hi if they
// find room there: up first if up is true, down first otherwise.
func spread(ys []float64, lo, hi float64, up bool) {
	raise := func() {
		for i, least := 0, lo; i < len(ys); i, least = i+1, ys[i]+TagHeight {
			ys[i] = math.Max(ys[i], least)
		}
	}
	lower := func() {
		for i, most := len(ys)-1, hi; i >= 0; i, most = i-1, ys[i]-TagHeight {
			ys[i] = math.Min(ys[i], most)
		}
	}
	if up {
		raise()
		lower()
		return
	}
	lower()
	raise()
}

// hatch draws oblique lines over a region.
func hatch(c draw.Canvas, r vg.Rectangle) {
	const pitch = 4.0 // points
	c.SetLineStyle(ink.HatchLine)
	h := r.Size().Y
	if h <= 0 {
		return
	}
	for x := r.Min.X - h; x < r.Max.X; x += vg.Points(pitch) {
		from, to := vg.Point{X: x, Y: r.Min.Y}, vg.Point{X: x + h, Y: r.Max.Y}
		if from.X < r.Min.X {
			from = vg.Point{X: r.Min.X, Y: r.Min.Y + (r.Min.X - x)}
		}
		if to.X > r.Max.X {
			to = vg.Point{X: r.Max.X, Y: r.Max.Y - (to.X - r.Max.X)}
		}
		c.StrokeLine2(ink.HatchLine, from.X, from.Y, to.X, to.Y)
	}
}
