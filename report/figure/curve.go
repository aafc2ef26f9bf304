package figure

import (
	"gonum.org/v1/plot"
	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
	"linewitness/report/canvas"
	"linewitness/report/ink"
)

// frame draws the grid and the border of the data area.
type frame struct{ bare bool } // bare: no grid

func (f frame) Plot(c draw.Canvas, p *plot.Plot) {
	if !f.bare {
		f.grid(c, p)
	}
	c.SetLineStyle(ink.FrameLine)
	c.Stroke(c.Rectangle.Path())
}

func (frame) grid(c draw.Canvas, p *plot.Plot) {
	x, y := p.Transforms(&c)
	for _, t := range p.X.Tick.Marker.Ticks(p.X.Min, p.X.Max) {
		c.StrokeLine2(ink.GridLine, x(t.Value), c.Min.Y, x(t.Value), c.Max.Y)
	}
	for _, t := range p.Y.Tick.Marker.Ticks(p.Y.Min, p.Y.Max) {
		c.StrokeLine2(ink.GridLine, c.Min.X, y(t.Value), c.Max.X, y(t.Value))
	}
}

// inData plots with everything clipped to the data area.
type inData func(c draw.Canvas, x, y func(float64) vg.Length)

func (f inData) Plot(c draw.Canvas, p *plot.Plot) {
	x, y := p.Transforms(&c)
	c.Push()
	canvas.Clip(c, c.Rectangle)
	f(c, x, y)
	c.Pop()
}

// Line draws a curve; where a point is not finite it is broken.
func (pn *Panel) Line(xs, ys []float64, style draw.LineStyle) {
	pn.p.Add(inData(func(c draw.Canvas, x, y func(float64) vg.Length) {
		c.SetLineStyle(style)
		for _, path := range pn.paths(xs, ys, x, y) {
			c.Stroke(path)
		}
	}))
}

// paths returns the unbroken pieces of a curve. A piece of one point becomes
// a dot, for a line of no length does not print.
func (pn *Panel) paths(xs, ys []float64, x, y func(float64) vg.Length) []vg.Path {
	var out []vg.Path
	var cur vg.Path
	end := func() {
		if len(cur) == 1 {
			cur.Line(vg.Point{X: cur[0].Pos.X + 0.5, Y: cur[0].Pos.Y})
		}
		if len(cur) > 0 {
			out = append(out, cur)
		}
		cur = nil
	}
	for i := range min(len(xs), len(ys)) {
		if !finite(xs[i], ys[i]) {
			end()
			continue
		}
		at := vg.Point{X: x(pn.x.at(xs[i])), Y: y(pn.y.at(ys[i]))}
		if cur == nil {
			cur.Move(at)
		} else {
			cur.Line(at)
		}
	}
	end()
	return out
}

// Dots draws an open circle at every point.
func (pn *Panel) Dots(xs, ys []float64, style draw.LineStyle) {
	pn.p.Add(inData(func(c draw.Canvas, x, y func(float64) vg.Length) {
		c.SetLineStyle(draw.LineStyle{Color: style.Color, Width: vg.Points(0.6)})
		for i := range min(len(xs), len(ys)) {
			if finite(xs[i], ys[i]) {
				c.Stroke(circle(vg.Point{X: x(pn.x.at(xs[i])), Y: y(pn.y.at(ys[i]))}, vg.Points(1.3)))
			}
		}
	}))
}

// Band fills the area between two curves and strokes its edges.
func (pn *Panel) Band(b Thinned, edge draw.LineStyle) {
	pn.p.Add(inData(func(c draw.Canvas, x, y func(float64) vg.Length) {
		var area vg.Path
		for i, v := range b.X {
			at := vg.Point{X: x(pn.x.at(v)), Y: y(pn.y.at(b.Hi[i]))}
			if i == 0 {
				area.Move(at)
			} else {
				area.Line(at)
			}
		}
		for i := len(b.X) - 1; i >= 0; i-- {
			area.Line(vg.Point{X: x(pn.x.at(b.X[i])), Y: y(pn.y.at(b.Lo[i]))})
		}
		if len(area) == 0 {
			return
		}
		area.Close()
		c.SetColor(ink.Band)
		c.Fill(area)
		c.SetLineStyle(edge)
		c.Stroke(area)
	}))
}
