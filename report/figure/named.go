package figure

import (
	"math"

	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
	"linewitness/report/ink"
	"linewitness/report/typeset"
)

// A Curve is a curve that carries its name.
type Curve struct {
	Name  string
	X, Y  []float64
	Style draw.LineStyle
}

// Curves draws curves and writes the name of each beside it, at the place where
// it hides least of the others. A dot on the curve says where it belongs.
func (pn *Panel) Curves(curves []Curve) {
	for _, v := range curves {
		pn.Line(v.X, v.Y, v.Style)
	}
	pn.over = append(pn.over, inData(func(c draw.Canvas, x, y func(float64) vg.Length) {
		n := &namer{c: c, taken: newRaster(c.Rectangle)}
		for _, r := range pn.tags {
			n.taken.block(r)
		}
		for i, v := range curves {
			n.points = append(n.points, n.taken.curve(i, pn.paths(v.X, v.Y, x, y)))
		}
		for i, v := range curves {
			n.name(i, v)
		}
	}))
}

// longestTag is the most width that a name in a panel takes.
const longestTag = 90.0

// namer places the names of curves.
type namer struct {
	c      draw.Canvas
	taken  *raster
	points [][]vg.Point // along each curve, inside the panel
}

// The cost of a place for a name, by what it hides: a cell of another curve, of
// its own, and of another name.
const (
	hidesOther = 4
	hidesOwn   = 1
	hidesName  = 400
)

// name writes the name of the i-th curve where that costs least.
func (n *namer) name(i int, v Curve) {
	const tries, gap = 60, 3.5
	text := tagStyle.Fit(v.Name, longestTag)
	w, h := tagStyle.Width(text), tagStyle.Size
	least, at, from := math.Inf(1), vg.Rectangle{}, vg.Point{}
	points := n.points[i]
	step := max(len(points)/tries, 1)
	for k := step / 2; k < len(points); k += step {
		p := points[k]
		for _, d := range [][2]float64{{gap, gap - 1}, {gap, -gap - h + 1}, {-gap - w, gap - 1}, {-gap - w, -gap - h + 1}} {
			corner := p.Add(vg.Point{X: vg.Points(d[0]), Y: vg.Points(d[1])})
			box := vg.Rectangle{Min: corner, Max: corner.Add(vg.Point{X: vg.Points(w), Y: vg.Points(h)})}
			if !within(box, n.c.Rectangle) {
				continue
			}
			if cost := n.taken.cost(i, box) + n.taken.cost(i, around(p)); cost < least {
				least, at, from = cost, box, p
			}
		}
	}
	if math.IsInf(least, 1) {
		return // no part of the curve is in the panel, or the name is too long
	}
	n.c.SetColor(v.Style.Color)
	n.c.Fill(circle(from, vg.Points(1.2)))
	n.c.SetColor(ink.White)
	n.c.Fill(at.Path())
	tagStyle.Of(v.Style.Color).Draw(n.c, at.Min.X.Points(), at.Min.Y.Points()+1.3, text, typeset.Left)
	n.taken.block(at)
}

// around is the neighbourhood of a point in which other curves would make it
// doubtful which one a name belongs to.
func around(p vg.Point) vg.Rectangle {
	const reach = 5
	d := vg.Point{X: reach, Y: reach}
	return vg.Rectangle{Min: p.Sub(d), Max: p.Add(d)}
}

func within(r, area vg.Rectangle) bool {
	return r.Min.X >= area.Min.X && r.Max.X <= area.Max.X && r.Min.Y >= area.Min.Y && r.Max.Y <= area.Max.Y
}
