package figure

import (
	"math"

	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
	"linewitness/report/canvas"
	"linewitness/report/format"
	"linewitness/report/ink"
	"linewitness/report/typeset"
)

// A Bar is a part of a whole, from From to To on one scale with the others.
type Bar struct {
	Name, Text string // before and after it
	From, To   float64
	Fill       Fill
}

// A Fill is the pattern of a bar. The patterns differ without colours.
type Fill int

// The patterns.
const (
	Blank   Fill = iota // the outline alone
	Solid               // filled dark
	Rising              // strokes that rise to the right
	Falling             // strokes that fall to the right
	Upright             // upright strokes
)

// The measures of bars, in points.
const (
	barPitch  = 10.4
	barHeight = 6.6
	barAxis   = 13.0 // of the scale below the bars
	barGap    = 4.0  // between a bar and its name or its text
)

// BarsHeight returns the height that n bars and their scale take.
func BarsHeight(n int) float64 { return float64(n)*barPitch + barAxis }

// bars is a stack of bars being drawn.
type bars struct {
	c        draw.Canvas
	x0, x1   float64 // of nothing and of the whole
	whole    float64
	top      float64
	nameRoom float64
}

// Bars draws bars one under the other, each with its name at the left and its
// text behind its end, above a scale in per cent of the whole. A hairline leads
// from the lower end of each to the next.
func Bars(c draw.Canvas, list []Bar, whole float64) {
	const most = 0.3 // of the width, for names and for texts
	width := c.Size().X.Points()
	var names, texts float64
	for _, b := range list {
		names, texts = math.Max(names, textStyle.Width(b.Name)), math.Max(texts, textStyle.Width(b.Text))
	}
	names, texts = math.Min(names, most*width), math.Min(texts, most*width)
	d := &bars{
		c: c, whole: whole, top: c.Max.Y.Points(), nameRoom: names,
		x0: c.Min.X.Points() + names + barGap, x1: c.Max.X.Points() - texts - barGap - thinnest,
	}
	d.scale(len(list))
	for i, b := range list {
		d.bar(i, b, texts)
		if i > 0 {
			at := vg.Points(d.x(b.To))
			c.StrokeLine2(ink.MarkLine, at, vg.Points(d.foot(i-1)), at, vg.Points(d.foot(i)+barHeight))
		}
	}
}

// x returns the place of a value; what is outside the whole is put at its end.
func (d *bars) x(v float64) float64 {
	part := v / d.whole
	if !(part > 0) {
		part = 0
	}
	return d.x0 + math.Min(part, 1)*(d.x1-d.x0)
}

// foot returns the lower edge of the i-th bar.
func (d *bars) foot(i int) float64 { return d.top - float64(i)*barPitch - 1 - barHeight }

// scale draws the lines and labels of the scale behind n bars.
func (d *bars) scale(n int) {
	foot := d.top - float64(n)*barPitch
	for _, part := range []float64{0, 0.25, 0.5, 0.75, 1} {
		at := d.x0 + part*(d.x1-d.x0)
		d.c.StrokeLine2(ink.GridLine, vg.Points(at), vg.Points(foot-2), vg.Points(at), vg.Points(d.top))
		tickStyle.Draw(d.c, at, foot-9, format.Share(part), typeset.Center)
	}
}

// thinnest is the width of a bar that would be too thin to see.
const thinnest = 0.8

func (d *bars) bar(i int, b Bar, room float64) {
	foot, from, to := d.foot(i), d.x(b.From), d.x(b.To)
	to = math.Max(to, from+thinnest)
	base := foot + 1.2
	name := textStyle.Fit(b.Name, d.nameRoom)
	textStyle.Draw(d.c, d.x0-barGap-textStyle.Width(name), base, name, typeset.Left)
	d.fill(vg.Rectangle{
		Min: vg.Point{X: vg.Points(from), Y: vg.Points(foot)},
		Max: vg.Point{X: vg.Points(to), Y: vg.Points(foot + barHeight)},
	}, b.Fill)
	text := textStyle.Fit(b.Text, room)
	box := vg.Rectangle{
		Min: vg.Point{X: vg.Points(to + barGap - 1.5), Y: vg.Points(foot)},
		Max: vg.Point{X: vg.Points(to + barGap + textStyle.Width(text) + 1), Y: vg.Points(foot + barHeight)},
	}
	d.c.SetColor(ink.White) // no line of the scale runs through the text
	d.c.Fill(box.Path())
	textStyle.Draw(d.c, to+barGap, base, text, typeset.Left)
}

// fill draws the area of a bar.
func (d *bars) fill(r vg.Rectangle, f Fill) {
	d.c.SetColor(ink.White)
	if f == Solid {
		d.c.SetColor(ink.Accent)
	}
	d.c.Fill(r.Path())
	d.c.Push()
	canvas.Clip(d.c, r)
	const pitch, steep = 3.2, 3.2
	run := vg.Length(0)
	switch f {
	case Rising:
		run = vg.Points(barHeight / steep * 2)
	case Falling:
		run = vg.Points(-barHeight / steep * 2)
	}
	if f == Rising || f == Falling || f == Upright {
		for x := r.Min.X - vg.Points(barHeight); x < r.Max.X+vg.Points(barHeight); x += vg.Points(pitch) {
			d.c.StrokeLine2(ink.BarLine, x, r.Min.Y, x+run, r.Max.Y)
		}
	}
	d.c.Pop()
	d.c.SetLineStyle(ink.BarEdge)
	d.c.Stroke(r.Path())
}
