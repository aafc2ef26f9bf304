package figure

import (
	"math"

	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
	"linewitness/report/ink"
	"linewitness/report/typeset"
)

// Level draws a horizontal line over the panel, with a label on it at the
// left.
func (pn *Panel) Level(v float64, style draw.LineStyle, label string) {
	if !finite(v) {
		return
	}
	pn.p.Add(inData(func(c draw.Canvas, _, y func(float64) vg.Length) {
		at := y(pn.y.at(v))
		c.StrokeLine2(style, c.Min.X, at, c.Max.X, at)
		tagAt(c, c.Min.X.Points()+3, at.Points()+2, label, style)
	}))
}

// Forbid draws a limit and hatches the side of it that is not allowed.
func (pn *Panel) Forbid(v float64, above bool, label string) {
	if !finite(v) {
		return
	}
	pn.p.Add(inData(func(c draw.Canvas, _, y func(float64) vg.Length) {
		at := y(pn.y.at(v))
		region := c.Rectangle
		if above {
			region.Min.Y = at
		} else {
			region.Max.Y = at
		}
		hatch(c, region)
		c.StrokeLine2(ink.LimitLine, c.Min.X, at, c.Max.X, at)
		rise := 2.5
		if !above { // the label stands on the side where curves should not be
			rise = -tagStyle.Size - 0.5
		}
		tag(c, c.Max.X.Points()-3, at.Points()+rise, label, ink.LimitLine)
	}))
}

// Upright draws vertical lines, the first with a label at its head.
func (pn *Panel) Upright(vs []float64, style draw.LineStyle, label string) {
	pn.p.Add(inData(func(c draw.Canvas, x, _ func(float64) vg.Length) {
		for _, v := range vs {
			if finite(v) {
				at := x(pn.x.at(v))
				c.StrokeLine2(style, at, c.Min.Y, at, c.Max.Y)
			}
		}
		if len(vs) > 0 && label != "" {
			tagAt(c, x(pn.x.at(vs[0])).Points()+2, c.Max.Y.Points()-tagStyle.Size-1, label, style)
		}
	}))
}

// Spot marks a point with a filled circle and a label beside it, on the side
// that has room.
func (pn *Panel) Spot(xv, yv float64, label string) {
	if !finite(xv, yv) {
		return
	}
	pn.p.Add(inData(func(c draw.Canvas, x, y func(float64) vg.Length) {
		at := vg.Point{X: x(pn.x.at(xv)), Y: y(pn.y.at(yv))}
		c.SetColor(ink.Text)
		c.Fill(circle(at, vg.Points(1.7)))
		w := tagStyle.Width(label)
		left := at.X.Points() + 5
		if left+w > c.Max.X.Points()-2 {
			left = at.X.Points() - 5 - w
		}
		base := math.Min(at.Y.Points()-2.2, c.Max.Y.Points()-tagStyle.Size)
		tagAt(c, left, math.Max(base, c.Min.Y.Points()+2), label, ink.FrameLine)
	}))
}

// Say writes a text in the middle of a panel that has nothing to draw.
func (pn *Panel) Say(s string) {
	pn.p.Add(inData(func(c draw.Canvas, _, _ func(float64) vg.Length) {
		middle := c.Center()
		textStyle.Of(ink.Soft).Draw(c, middle.X.Points(), middle.Y.Points()-2, s, typeset.Center)
	}))
}

// tag writes a label that ends at x, on white, so that curves do not run
// through it.
func tag(c draw.Canvas, x, y float64, s string, style draw.LineStyle) {
	tagAt(c, x-tagStyle.Width(s), y, s, style)
}

func tagAt(c draw.Canvas, x, y float64, s string, style draw.LineStyle) {
	if s == "" {
		return
	}
	y = math.Min(math.Max(y, c.Min.Y.Points()+1.8), c.Max.Y.Points()-tagStyle.Size+0.5)
	x = math.Max(x, c.Min.X.Points()+2)
	box := vg.Rectangle{
		Min: vg.Point{X: vg.Points(x - 1.2), Y: vg.Points(y - 1.5)},
		Max: vg.Point{X: vg.Points(x + tagStyle.Width(s) + 1.2), Y: vg.Points(y + tagStyle.Size*0.8)},
	}
	c.SetColor(ink.White)
	c.Fill(box.Path())
	tagStyle.Of(style.Color).Draw(c, x, y, s, typeset.Left)
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

func circle(at vg.Point, r vg.Length) vg.Path {
	var p vg.Path
	p.Move(vg.Point{X: at.X + r, Y: at.Y})
	p.Arc(at, r, 0, 2*math.Pi)
	p.Close()
	return p
}
