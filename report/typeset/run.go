package typeset

import (
	"strings"

	"gonum.org/v1/plot/font"
	"gonum.org/v1/plot/vg"
	"linewitness/report/format"
)

// How a superscript or subscript is set, as parts of the font size.
const (
	scriptSize = 0.68
	supRise    = 0.36
	subDrop    = -0.16
)

// run is a piece of text of one size on one baseline.
type run struct {
	text        string
	size, shift float64 // as parts of the font size
}

// runs splits s at the markup of package format.
func runs(s string) []run {
	if !strings.ContainsAny(s, string([]rune{format.Sup, format.Sub, format.End})) {
		return []run{{text: s, size: 1}}
	}
	var out []run
	cur := run{size: 1}
	next := func(r run) {
		if cur.text != "" {
			out = append(out, cur)
		}
		cur = r
	}
	for _, c := range s {
		switch c {
		case format.Sup:
			next(run{size: scriptSize, shift: supRise})
		case format.Sub:
			next(run{size: scriptSize, shift: subDrop})
		case format.End:
			next(run{size: 1})
		default:
			cur.text += string(c)
		}
	}
	next(run{})
	return out
}

// width returns the width of s in fnt.
func width(fnt font.Font, s string) vg.Length {
	var w vg.Length
	m := metricsOf(fnt)
	for _, r := range runs(s) {
		w += m.width(r.text, fnt.Size*vg.Length(r.size))
	}
	return w
}

// draw draws s from its baseline start at pt.
func draw(c vg.Canvas, fnt font.Font, pt vg.Point, s string) {
	m := metricsOf(fnt)
	for _, r := range runs(s) {
		size := fnt.Size * vg.Length(r.size)
		c.FillString(cache().Lookup(fnt, size), vg.Point{X: pt.X, Y: pt.Y + fnt.Size*vg.Length(r.shift)}, r.text)
		pt.X += m.width(r.text, size)
	}
}
