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

// tagAt writes a label on white, so that curves do not run through it.
func tagAt(c draw.Canvas, x, y float64, s string, style draw.LineStyle) {
	if s == "" {
		return
	}
	y = math.Min(math.Max(y, c.Min.Y.Points()+1.8), c.Max.Y.Points()-tagStyle.Size+0.5)
	x = math.Max(x, c.Min.X.Points()+2)
	c.SetColor(ink.White)
	c.Fill(tagBox(x, y, s).Path())
	tagStyle.Of(style.Color).Draw(c, x, y, s, typeset.Left)
}

// tagBox is the area of a label whose baseline begins at (x, y).
func tagBox(x, y float64, s string) vg.Rectangle {
	return vg.Rectangle{
		Min: vg.Point{X: vg.Points(x - 1.2), Y: vg.Points(y - 1.5)},
		Max: vg.Point{X: vg.Points(x + tagStyle.Width(s) + 1.2), Y: vg.Points(y + tagStyle.Size*0.8)},
	}
}

func circle(at vg.Point, r vg.Length) vg.Path {
	var p vg.Path
	p.Move(vg.Point{X: at.X + r, Y: at.Y})
	p.Arc(at, r, 0, 2*math.Pi)
	p.Close()
	return p
}
