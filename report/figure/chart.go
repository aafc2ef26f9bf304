package figure

import (
	"math"
	"math/cmplx"

	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
	"linewitness/report/ink"
	"linewitness/report/typeset"
)

// A Chart is the plane of the reflection coefficient with circles of constant
// resistance and reactance (P. H. Smith, 1939), and curves along a section in it.
type Chart struct {
	Name, Quantity string         // of the title: bold, then plain
	Lines          [][]complex128 // of the phasor witness
	Dots           []complex128   // of the time domain
	Ring           [2]float64     // radii between which turns are left out; the same for none
	Ends           []ChartEnd
	Rims           []ChartRim
	Foot           []string // lines of text below
	Empty          string   // said in the middle instead
}

// A ChartEnd is an end of a section, by name.
type ChartEnd struct {
	Name string
	At   complex128
	Far  bool // a filled circle, else an open square
}

// A ChartRim is a circle around the middle that a curve should stay on one side
// of.
type ChartRim struct {
	Radius float64
	Inside bool // the inside is forbidden, else what is outside
	Label  string
}

// RingShows is the least width of a ring that shows, of the radius of the chart.
const RingShows = 0.01

// The measures of a chart, in points.
const (
	chartMargin = 9.0  // around the unit circle: values of reactance, the arrow
	chartArrow  = 7.0  // above it: the text of the arrow
	chartFoot   = 8.4  // distance of the lines below
	chartMost   = 86.0 // radius at most
)

// ChartHeight returns the height of a chart with so many lines below it in a
// column of the given width.
func ChartHeight(width float64, foot int) float64 {
	return titleHeight + chartArrow + 2*(chartRadius(width)+chartMargin) + float64(foot)*chartFoot + 1
}

func chartRadius(width float64) float64 { return math.Min(width/2-chartMargin-2, chartMost) }

// plane places reflection coefficients on a canvas.
type plane struct {
	c      draw.Canvas
	x, y   float64
	radius float64
}

func (p plane) at(g complex128) vg.Point {
	return vg.Point{X: vg.Points(p.x + p.radius*real(g)), Y: vg.Points(p.y + p.radius*imag(g))}
}

func (p plane) path(gs []complex128) vg.Path {
	var out vg.Path
	for _, g := range gs {
		if len(out) == 0 {
			out.Move(p.at(g))
		} else {
			out.Line(p.at(g))
		}
	}
	return out
}

func (p plane) circle(r float64) vg.Path { return circle(p.at(0), vg.Points(r*p.radius)) }

// Draw draws the chart from the upper left corner of c, over its width.
func (ch *Chart) Draw(c draw.Canvas) {
	r := chartRadius(c.Size().X.Points())
	r = math.Max(math.Min(r, (c.Size().Y.Points()-ChartHeight(2*(chartMargin+2), len(ch.Foot)))/2), 1)
	left, top := c.Min.X.Points(), c.Max.Y.Points()
	p := plane{c: c, x: left + c.Size().X.Points()/2, y: top - titleHeight - chartArrow - chartMargin - r, radius: r}
	ch.title(c)
	p.grid()
	ch.rims(p)
	if ch.Empty != "" {
		textStyle.Of(ink.Soft).Draw(c, p.x, p.y-2, ch.Empty, typeset.Center)
	} else {
		ch.curves(p)
	}
	p.arrow()
	ch.names(p)
	y := p.y - r - chartMargin - chartFoot + 2
	for _, s := range ch.Foot {
		st := textStyle
		s = st.Fit(s, c.Size().X.Points()-4)
		st.Draw(c, p.x, y, s, typeset.Center)
		y -= chartFoot
	}
}

// title writes the title over the width of the column.
func (ch *Chart) title(c draw.Canvas) {
	x, y, room := c.Min.X.Points()+2, c.Max.Y.Points()-7.5, c.Size().X.Points()-4
	x += nameStyle.Draw(c, x, y, nameStyle.Fit(ch.Name, room*0.6), typeset.Left) + 5
	textStyle.Draw(c, x, y, textStyle.Fit(ch.Quantity, c.Max.X.Points()-x), typeset.Left)
}

// curves draws what is left out, the phasor's line and the points of the time
// domain.
func (ch *Chart) curves(p plane) {
	if ch.Ring[1]-ch.Ring[0] > RingShows {
		p.c.SetColor(ink.Band)
		p.c.Fill(append(p.circle(ch.Ring[1]), p.hole(ch.Ring[0])...))
	}
	p.c.SetLineStyle(ink.PhasorLine)
	for _, line := range ch.Lines {
		if len(line) > 1 {
			p.c.Stroke(p.path(line))
		}
	}
	p.c.SetLineStyle(draw.LineStyle{Color: ink.FDTDLine.Color, Width: vg.Points(0.55)})
	for _, g := range ch.Dots {
		p.c.Stroke(circle(p.at(g), vg.Points(1.1)))
	}
}

// hole is a circle the other way round, which makes a hole in a fill.
func (p plane) hole(r float64) vg.Path {
	var out vg.Path
	at := p.at(0)
	radius := vg.Points(r * p.radius)
	out.Move(vg.Point{X: at.X + radius, Y: at.Y})
	out.Arc(at, radius, 0, -2*math.Pi)
	out.Close()
	return out
}

// rims draws the limits: a dashed circle, and strokes on the side where the
// curve should not be.
func (ch *Chart) rims(p plane) {
	for _, m := range ch.Rims {
		p.c.SetLineStyle(ink.LimitLine)
		p.c.Stroke(p.circle(m.Radius))
		const pitch, long = 3.6, 5.0
		depth := math.Min(long/p.radius, 1-m.Radius)
		if m.Inside {
			depth = -math.Min(long/p.radius, m.Radius)
		}
		n := int(2 * math.Pi * m.Radius * p.radius / pitch)
		p.c.SetLineStyle(ink.HatchLine)
		for k := range n {
			a := 2 * math.Pi * float64(k) / float64(n)
			foot, out := cmplx.Rect(m.Radius, a), cmplx.Rect(depth*0.75, a)
			p.c.Stroke(p.path([]complex128{foot, foot + out*(1-1i)})) // aslant, as other forbidden regions
		}
	}
}

// arrow draws the way toward the generator outside the rim: clockwise.
func (p plane) arrow() {
	const from, to, off = 168 * math.Pi / 180, 138 * math.Pi / 180, 4.2
	r := 1 + off/p.radius
	var arc []complex128
	const steps = 12
	for k := range steps + 1 {
		arc = append(arc, cmplx.Rect(r, from+(to-from)*float64(k)/steps))
	}
	p.c.SetLineStyle(draw.LineStyle{Color: ink.Soft, Width: vg.Points(0.6)})
	p.c.Stroke(p.path(arc))
	tip, back := cmplx.Rect(r, to), 4.6/p.radius
	along := cmplx.Rect(1, to-math.Pi/2)
	head := p.path([]complex128{tip + along*complex(0.4*back, 0), tip - along*complex(back, 0.42*back), tip - along*complex(back, -0.42*back)})
	head.Close()
	p.c.SetColor(ink.Soft)
	p.c.Fill(head)
	tickStyle.At(6.2).Of(ink.Soft).Draw(p.c, math.Max(p.x-p.radius-chartMargin, p.c.Min.X.Points()+1), p.y+p.radius+chartMargin-1.5, "toward the generator", typeset.Left)
}
