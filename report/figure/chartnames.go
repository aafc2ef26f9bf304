package figure

import (
	"math"
	"math/cmplx"

	"gonum.org/v1/plot/vg"
	"linewitness/report/ink"
	"linewitness/report/typeset"
)

// names marks the ends of the section, and writes their names and those of the
// limits where they hide least.
func (ch *Chart) names(p plane) {
	area := vg.Rectangle{
		Min: vg.Point{X: p.c.Min.X, Y: vg.Points(p.y - p.radius - chartMargin + 1)},
		Max: vg.Point{X: p.c.Max.X, Y: vg.Points(p.y + p.radius + 1)},
	}
	taken := newRaster(area)
	for i, line := range ch.Lines {
		taken.curve(i, []vg.Path{p.path(line)})
	}
	rim := constant(func(t float64) complex128 { return complex(0, t) }, true)
	taken.curve(len(ch.Lines), []vg.Path{p.path(rim)})
	for i, m := range ch.Rims {
		taken.curve(len(ch.Lines)+1+i, []vg.Path{p.path(round(m.Radius))})
		taken.curve(len(ch.Lines)+1+i, []vg.Path{p.path(round(m.Radius + 3/p.radius))})
	}
	for _, e := range ch.Ends {
		taken.block(around(p.at(e.At)))
		p.mark(e)
	}
	for _, e := range ch.Ends {
		p.beside(taken, p.at(e.At), e.Name, tagStyle)
	}
	for _, m := range ch.Rims {
		p.onRim(taken, m)
	}
}

// mark draws the mark of an end.
func (p plane) mark(e ChartEnd) {
	at := p.at(e.At)
	if e.Far {
		p.c.SetColor(ink.Text)
		p.c.Fill(circle(at, vg.Points(2)))
		return
	}
	const half = 2.1
	box := vg.Rectangle{Min: vg.Point{X: at.X - half, Y: at.Y - half}, Max: vg.Point{X: at.X + half, Y: at.Y + half}}
	p.c.SetColor(ink.White)
	p.c.Fill(box.Path())
	p.c.SetLineStyle(ink.FrameLine)
	p.c.SetColor(ink.Text)
	p.c.SetLineWidth(0.9)
	p.c.Stroke(box.Path())
}

// beside writes a label near a point, where it hides least.
func (p plane) beside(taken *raster, at vg.Point, s string, st typeset.Style) {
	s = st.Fit(s, longestTag)
	w, h := st.Width(s), st.Size
	least, best := math.Inf(1), vg.Rectangle{}
	for _, gap := range []float64{4, 8, 13, 22, 32} {
		for k := range 12 {
			a := float64(k) * math.Pi / 6
			x := at.X.Points() + math.Cos(a)*(gap+w/2) - w/2
			y := at.Y.Points() + math.Sin(a)*(gap+h/2) - h/2
			box := vg.Rectangle{Min: vg.Point{X: vg.Points(x), Y: vg.Points(y)}, Max: vg.Point{X: vg.Points(x + w), Y: vg.Points(y + h)}}
			if !within(box, taken.area) {
				continue
			}
			if cost := taken.cost(31, box) + gap*0.3; cost < least {
				least, best = cost, box
			}
		}
	}
	p.write(taken, best, s, st, least)
}

// round returns points on a circle around the middle.
func round(radius float64) []complex128 {
	const steps = 48
	out := make([]complex128, steps+1)
	for k := range out {
		out[k] = cmplx.Rect(radius, 2*math.Pi*float64(k)/steps)
	}
	return out
}

// onRim writes the label of a limit on its circle, where it hides least, or
// beside a circle that is too small for it.
func (p plane) onRim(taken *raster, m ChartRim) {
	st := tagStyle.Of(ink.Limit)
	s := st.Fit(m.Label, longestTag)
	w, h := st.Width(s), st.Size
	small := m.Radius*p.radius < w
	least, best := math.Inf(1), vg.Rectangle{}
	for k := range 24 {
		a := (-90 + float64(k)*15) * math.Pi / 180
		r := m.Radius*p.radius - h*0.7
		if small {
			r = m.Radius*p.radius + 6 + math.Abs(math.Cos(a))*w/2 + math.Abs(math.Sin(a))*h/2
		}
		x, y := p.x+math.Cos(a)*r-w/2, p.y+math.Sin(a)*r-h/2
		box := vg.Rectangle{Min: vg.Point{X: vg.Points(x), Y: vg.Points(y)}, Max: vg.Point{X: vg.Points(x + w), Y: vg.Points(y + h)}}
		if !within(box, taken.area) {
			continue
		}
		// The foot of the circle, or its head, is where one looks for it.
		if cost := taken.cost(31, box) + 3*math.Abs(math.Cos(a)) + 0.5*math.Sin(a); cost < least {
			least, best = cost, box
		}
	}
	p.write(taken, best, s, st, least)
}

func (p plane) write(taken *raster, box vg.Rectangle, s string, st typeset.Style, cost float64) {
	if math.IsInf(cost, 1) || s == "" {
		return
	}
	p.c.SetColor(ink.White)
	p.c.Fill(box.Path())
	st.Draw(p.c, box.Min.X.Points(), box.Min.Y.Points()+1.3, s, typeset.Left)
	taken.block(box)
}
