package sheet

import (
	"math"

	"gonum.org/v1/plot/vg"
	"linewitness/report/ink"
)

// A Mark is the shape that goes with the word of a verdict. The shapes differ
// without their colours too: outlined for what holds, filled for what fails. One
// more flags data that need confirmation.
type Mark int

// The marks.
const (
	NoMark    Mark = iota
	Holds          // a circle with a tick
	Open           // an outlined triangle with a stroke: not shown
	Fails          // a filled square with a cross
	Differs        // a filled diamond with two bars: the methods disagree
	Unsettled      // a filled circle with a wave
	Confirm        // a flag on a staff: a value that needs confirmation
)

// Draw draws the mark in a square of the given size around (x, y).
func (m Mark) Draw(c vg.Canvas, x, y, size float64) {
	g := glyph{c: c, x: x, y: y, r: size / 2}
	c.SetLineDash(nil, 0)
	c.SetLineWidth(vg.Points(size * 0.11))
	switch m {
	case Holds:
		c.SetColor(ink.Good)
		g.stroke(g.circle())
		g.stroke(g.poly(false, -0.45, 0, -0.1, -0.38, 0.48, 0.4))
	case Open:
		c.SetColor(ink.Doubt)
		g.stroke(g.poly(true, -0.95, -0.8, 0.95, -0.8, 0, 0.9))
		g.stroke(g.poly(false, 0, 0.3, 0, -0.5))
	case Fails:
		c.SetColor(ink.Bad)
		c.Fill(g.poly(true, -0.9, -0.9, 0.9, -0.9, 0.9, 0.9, -0.9, 0.9))
		g.white(-0.45, -0.45, 0.45, 0.45)
		g.white(-0.45, 0.45, 0.45, -0.45)
	case Differs:
		c.SetColor(ink.Bad)
		c.Fill(g.poly(true, -1, 0, 0, -1, 1, 0, 0, 1))
		g.white(-0.4, 0.2, 0.4, 0.2)
		g.white(-0.4, -0.2, 0.4, -0.2)
	case Unsettled:
		c.SetColor(ink.Bad)
		c.Fill(g.circle())
		g.white(-0.6, -0.15, -0.3, 0.3, 0, 0, 0.3, -0.3, 0.6, 0.15)
	case Confirm:
		c.SetColor(ink.Doubt)
		g.stroke(g.poly(false, -0.6, -1, -0.6, 1))
		c.Fill(g.poly(true, -0.6, 1, 0.9, 0.45, -0.6, -0.1))
	}
}

// glyph scales the unit shape of a mark to its place.
type glyph struct {
	c       vg.Canvas
	x, y, r float64
}

func (g glyph) poly(closed bool, xy ...float64) vg.Path {
	var p vg.Path
	for i := 0; i < len(xy); i += 2 {
		at := vg.Point{X: vg.Points(g.x + g.r*xy[i]), Y: vg.Points(g.y + g.r*xy[i+1])}
		if i == 0 {
			p.Move(at)
		} else {
			p.Line(at)
		}
	}
	if closed {
		p.Close()
	}
	return p
}

func (g glyph) circle() vg.Path {
	var p vg.Path
	r := vg.Points(0.92 * g.r)
	center := vg.Point{X: vg.Points(g.x), Y: vg.Points(g.y)}
	p.Move(vg.Point{X: center.X + r, Y: center.Y})
	p.Arc(center, r, 0, 2*math.Pi)
	p.Close()
	return p
}

func (g glyph) stroke(p vg.Path) { g.c.Stroke(p) }

func (g glyph) white(xy ...float64) {
	g.c.SetColor(ink.White)
	g.c.Stroke(g.poly(false, xy...))
}
