package figure

import (
	"math"

	"gonum.org/v1/plot"
	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
	"linewitness/report/format"
	"linewitness/report/ink"
	"linewitness/report/typeset"
)

// An Axis is one axis of a panel.
type Axis struct {
	Label    string // below a horizontal axis; a vertical one has its label in the title
	Unit     string // takes an engineering prefix; empty for a plain number
	Min, Max float64
	Log      bool // decades; Min and Max must be above 0
	Bare     bool // no tick labels: a panel below shares the axis
}

// A Panel is one pair of axes with its curves.
type Panel struct {
	Name, Quantity string // of the title: bold, then plain with its unit
	p              *plot.Plot
	x, y           scale
	over           []plot.Plotter // what is drawn last, so that no curve runs through it
	tags           []vg.Rectangle // labels of marks, which names of curves keep clear of
	heads          []head         // strips above the data area
	area           vg.Rectangle   // the data area as drawn last
}

// scale maps SI values to the coordinates of an axis.
type scale struct {
	Axis
	prefix format.Prefix
}

// The text of figures.
var (
	nameStyle = typeset.Style{Face: typeset.Bold, Size: 7.5, Color: ink.Text}
	textStyle = typeset.Style{Face: typeset.Sans, Size: 7, Color: ink.Text}
	tickStyle = typeset.Style{Face: typeset.Sans, Size: 6.5, Color: ink.Text}
	tagStyle  = typeset.Style{Face: typeset.Sans, Size: 6.5, Color: ink.Text}
)

// The fixed parts of a panel, in points.
const (
	insetLeft   = 30.0 // from the left edge to the data area: tick labels
	insetRight  = 9.0  // overhang of the last tick label
	titleHeight = 11.0
)

// New returns an empty panel. A range that is empty or not finite is widened
// to one that can be drawn.
func New(name, quantity string, x, y Axis) *Panel {
	pn := &Panel{Name: name, Quantity: quantity, p: plot.New(), x: newScale(x), y: newScale(y)}
	pn.p.TextHandler = typeset.NewHandler()
	styleAxis(&pn.p.X, pn.x)
	styleAxis(&pn.p.Y, pn.y)
	pn.p.X.Label.Text = withUnit(x.Label, pn.x.unit())
	if x.Bare {
		pn.p.X.Label.Text = ""
	}
	pn.p.Add(frame{})
	return pn
}

// narrowest is the least range of an axis relative to its ends: below it the
// labels would have more digits than a number holds.
const narrowest = 1e-9

func newScale(a Axis) scale {
	if !finite(a.Min, a.Max) || a.Max-a.Min <= narrowest*math.Max(math.Abs(a.Min), math.Abs(a.Max)) {
		switch {
		case finite(a.Min) && a.Log && a.Min > 0:
			a.Max = 10 * a.Min
		case finite(a.Min) && !a.Log:
			a.Max = a.Min + math.Max(1, math.Abs(a.Min))
		default:
			a.Min, a.Max = 1, 10
		}
	}
	s := scale{Axis: a, prefix: format.Prefix{Factor: 1}}
	if a.Unit != "" && !a.Log {
		s.prefix = format.PrefixFor(math.Max(math.Abs(a.Min), math.Abs(a.Max)))
	}
	return s
}

// at returns the coordinate of an SI value.
func (s scale) at(v float64) float64 {
	if s.Log {
		// What is too low for the axis leaves the panel at its foot.
		return math.Log10(math.Max(v, s.Min*1e-3))
	}
	return v / s.prefix.Factor
}

func (s scale) unit() string {
	if s.Unit == "" {
		return ""
	}
	return s.prefix.Symbol + s.Unit
}

func withUnit(label, unit string) string {
	if unit == "" {
		return label
	}
	return label + " (" + unit + ")"
}

func styleAxis(a *plot.Axis, s scale) {
	a.Min, a.Max = s.at(s.Min), s.at(s.Max)
	a.Padding = 0
	a.LineStyle.Width = 0 // the frame is the line
	a.Tick.LineStyle = ink.FrameLine
	a.Tick.Length = vg.Points(2.5)
	a.Tick.Label.Font = tickStyle.Face.Font(tickStyle.Size)
	a.Tick.Label.Color = tickStyle.Color
	a.Tick.Label.Handler = typeset.NewHandler()
	a.Label.TextStyle.Font = textStyle.Face.Font(textStyle.Size)
	a.Label.TextStyle.Color = textStyle.Color
	a.Label.TextStyle.Handler = typeset.NewHandler()
	a.Label.Padding = vg.Points(1)
}

// Draw draws the panel over the whole of c.
func (pn *Panel) Draw(c draw.Canvas) {
	x, y := c.Min.X.Points()+insetLeft, c.Max.Y.Points()-7.5
	room := (c.Max.X - c.Min.X).Points() - insetLeft
	x += nameStyle.Draw(c, x, y, nameStyle.Fit(pn.Name, room*0.6), typeset.Left) + 5
	quantity := withUnit(pn.Quantity, pn.y.unit())
	textStyle.Draw(c, x, y, textStyle.Fit(quantity, c.Max.X.Points()-x), typeset.Left)
	c = draw.Crop(c, 0, 0, 0, vg.Points(-titleHeight))
	c = draw.Crop(c, 0, 0, 0, vg.Points(-pn.headsHeight()))
	pn.setTicks(c)
	pn.p.Add(pn.over...)
	pn.over = nil
	c = pn.align(c)
	pn.p.Draw(c)
	data := pn.p.DataCanvas(c)
	pn.area = data.Rectangle
	pn.drawHeads(data)
}

// setTicks chooses tick distances that suit the size of the panel.
func (pn *Panel) setTicks(c draw.Canvas) {
	below := 21.0 // tick labels and label of the horizontal axis
	if pn.x.Bare {
		below = 3
	}
	size := c.Size()
	widest := func(label string) float64 { return tickStyle.Width(label) + 9 }
	tall := func(string) float64 { return tickStyle.Size + 2.5 }
	pn.p.X.Tick.Marker = ticks{s: pn.x, length: size.X.Points() - insetLeft - insetRight, wish: 46, need: widest}
	pn.p.Y.Tick.Marker = ticks{s: pn.y, length: size.Y.Points() - below, wish: 17, need: tall}
}

// align crops c so that the data area begins and ends at the fixed insets.
func (pn *Panel) align(c draw.Canvas) draw.Canvas {
	data := pn.p.DataCanvas(c)
	left := vg.Points(insetLeft) - (data.Min.X - c.Min.X)
	right := vg.Points(insetRight) - (c.Max.X - data.Max.X)
	return draw.Crop(c, max(left, 0), -max(right, 0), 0, 0)
}

func finite(vs ...float64) bool {
	for _, v := range vs {
		if math.IsNaN(v) || math.IsInf(v, 0) {
			return false
		}
	}
	return true
}
