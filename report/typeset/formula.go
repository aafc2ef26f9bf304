package typeset

import (
	"strings"

	"gonum.org/v1/plot/vg"
	"linewitness/report/format"
)

// The markup of formulas, beside that of package format: a fraction is
// over, numerator, under, denominator, closed; a root is root, radicand, closed;
// what stands between brackets or bars is round or bars, content, closed.
const (
	over   = '\ue003'
	under  = '\ue004'
	root   = '\ue005'
	closed = '\ue006'
	round  = '\ue007'
	bars   = '\ue008'
)

// marks are all runes that are not text.
var marks = string([]rune{format.Sup, format.Sub, format.End, over, under, root, closed, round, bars})

// Frac marks up a fraction with a bar for [Style.Formula].
func Frac(numerator, denominator string) string {
	return string(over) + numerator + string(under) + denominator + string(closed)
}

// Sqrt marks up a square root with a bar over its radicand.
func Sqrt(radicand string) string { return string(root) + radicand + string(closed) }

// Round puts brackets of the height of x around it.
func Round(x string) string { return string(round) + x + string(closed) }

// Bars puts bars of the height of x around it, for its magnitude.
func Bars(x string) string { return string(bars) + x + string(closed) }

// The measures of formulas, as parts of the size of their text.
const (
	axis      = 0.26 // of fraction bars and minus signs, above the baseline
	partSize  = 0.92 // of numerators and denominators
	barGap    = 0.14 // between a bar and what is above or below it
	barWidth  = 0.05
	ascent    = 0.73 // of capitals and digits
	descent   = 0.21
	tick      = 0.42 // width of the sign of a root
	overhang  = 0.10 // of a bar on either side
	scriptRow = 0.10 // between a script and what follows
)

// A Box is a formula, or a part of one, that is ready to be drawn. Width, Above
// and Below are its extent from its start on the baseline, in points.
type Box struct {
	Width, Above, Below float64
	draw                func(c vg.Canvas, x, y float64)
}

// Draw draws the formula with its baseline at y.
func (b Box) Draw(c vg.Canvas, x, y float64) { b.draw(c, x, y) }

// Formula sets a formula: single letters are italic, as signs of quantities;
// digits, words and names of functions are upright (ISO 80000-2). The markup is
// that of package format, of [Frac], [Sqrt], [Round] and [Bars], nested as needed.
func (st Style) Formula(s string) Box {
	p := parser{in: []rune(s), st: st}
	parts := []Box{p.row(st.Size)}
	for p.at < len(p.in) { // closed once too often
		parts = append(parts, p.row(st.Size))
	}
	return beside(parts)
}

// parser reads a formula from left to right.
type parser struct {
	in []rune
	at int
	st Style
}

// row sets what comes up to the end of the part in work, and goes past that.
func (p *parser) row(size float64) Box {
	var parts []Box
	for p.at < len(p.in) {
		r := p.in[p.at]
		p.at++
		switch r {
		case format.End, under, closed:
			return beside(parts)
		case format.Sup, format.Sub:
			parts = append(parts, p.script(r, size, parts))
		case over:
			n, d := p.row(size*partSize), p.row(size*partSize)
			parts = append(parts, p.fraction(n, d, size))
		case root:
			parts = append(parts, p.root(p.row(size), size))
		case round, bars:
			parts = append(parts, p.fence(r, p.row(size), size))
		default:
			p.at--
			parts = append(parts, p.text(size)...)
		}
	}
	return beside(parts)
}

// script sets a superscript or a subscript; what is raised stands at the top of
// what it belongs to, where that is high.
func (p *parser) script(kind rune, size float64, before []Box) Box {
	rise := size * supRise
	if kind == format.Sub {
		rise = size * subDrop
	} else if n := len(before); n > 0 {
		rise = max(rise, before[n-1].Above-size*ascent+size*supRise)
	}
	b := p.row(size * scriptSize)
	return Box{b.Width + scriptRow*size*scriptSize, b.Above + rise, b.Below - rise, func(c vg.Canvas, x, y float64) { b.draw(c, x, y+rise) }}
}

// text sets characters up to the next markup, letters and the rest apart.
func (p *parser) text(size float64) []Box {
	from := p.at
	for p.at < len(p.in) && !strings.ContainsRune(marks, p.in[p.at]) {
		p.at++
	}
	var out []Box
	for _, s := range shaped(string(p.in[from:p.at])) {
		st := p.st.In(s.face).At(size)
		out = append(out, Box{st.Width(s.text), size * ascent, size * descent, func(c vg.Canvas, x, y float64) { st.Draw(c, x, y, s.text, Left) }})
	}
	return out
}

// beside puts boxes one after the other on one baseline.
func beside(parts []Box) Box {
	var b Box
	for _, p := range parts {
		b.Width += p.Width
		b.Above, b.Below = max(b.Above, p.Above), max(b.Below, p.Below)
	}
	b.draw = func(c vg.Canvas, x, y float64) {
		for _, p := range parts {
			p.draw(c, x, y)
			x += p.Width
		}
	}
	return b
}
