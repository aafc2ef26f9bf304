package figure

import (
	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
	"linewitness/report/format"
	"linewitness/report/ink"
	"linewitness/report/typeset"
)

// second is a second horizontal axis, above the data area.
type second struct {
	unit string
	per  float64 // its value for one SI unit of the first
}

// secondHeight is what the labels of a second axis take, in points.
const secondHeight = 8.5

// Second gives a panel a second horizontal axis above its data area: per is its
// value for one SI unit of the first, as 0.2 wavelengths to the metre. Each
// label carries the unit.
func (pn *Panel) Second(unit string, per float64) {
	if per > 0 && finite(per) {
		s := second{unit, per}
		pn.heads = append(pn.heads, head{secondHeight, func(data draw.Canvas, _ float64) { s.draw(data, pn.x) }})
	}
}

// draw draws the axis above the data area.
func (s second) draw(data draw.Canvas, x scale) {
	from, to := x.Min*s.per, x.Max*s.per
	length := data.Size().X.Points()
	if !(to > from) || length <= 0 {
		return
	}
	label := func(v, step float64) string { return format.Tick(v, step) + format.Space + s.unit }
	need := func(tick string) float64 { return tickStyle.Width(tick+format.Space+s.unit) + 9 }
	t := ticks{length: length, wish: 60, need: need}
	step := t.step(from, to)
	for _, tick := range t.Ticks(from, to) {
		at := data.Min.X + vg.Points((tick.Value-from)/(to-from)*length)
		data.StrokeLine2(ink.FrameLine, at, data.Max.Y, at, data.Max.Y+vg.Points(2.5))
		tickStyle.Draw(data, at.Points(), data.Max.Y.Points()+3.6, label(tick.Value, step), typeset.Center)
	}
}
