package typeset

import (
	"strings"

	"gonum.org/v1/plot/vg"
	"linewitness/report/format"
)

// The markup of formulas, beside that of package format: a fraction is
// over, numerator, under, denominator, closed; a root is root, radicand, closed.
const (
	over   = '\ue003'
	under  = '\ue004'
	root   = '\ue005'
	closed = '\ue006'
)

// Frac marks up a fraction with a bar for [Style.Formula].
func Frac(numerator, denominator string) string {
	return string(over) + numerator + string(under) + denominator + string(closed)
}

// Sqrt marks up a square root with a bar over its radicand.
func Sqrt(radicand string) string { return string(root) + radicand + string(closed) }

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
// that of package format, of [Frac] and of [Sqrt], nested as needed.
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
			parts = append(parts, p.script(r, size))
		case over:
			n, d := p.row(size*partSize), p.row(size*partSize)
			parts = append(parts, p.fraction(n, d, size))
		case root:
			parts = append(parts, p.root(p.row(size), size))
		default:
			p.at--
			parts = append(parts, p.text(size)...)
		}
	}
	return beside(parts)
}

// script sets a superscript or a subscript.
func (p *parser) script(kind rune, size float64) Box {
	rise := size * supRise
	if kind == format.Sub {
		rise = size * subDrop
	}
	b := p.row(size * scriptSize)
	return Box{b.Width + scriptRow*size*scriptSize, b.Above + rise, b.Below - rise, func(c vg.Canvas, x, y float64) { b.draw(c, x, y+rise) }}
}

// text sets characters up to the next markup, letters and the rest apart.
func (p *parser) text(size float64) []Box {
	from := p.at
	for p.at < len(p.in) && !strings.ContainsRune(string([]rune{format.Sup, format.Sub, format.End, over, under, root, closed}), p.in[p.at]) {
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

// fraction sets a numerator over a denominator.
func (p *parser) fraction(n, d Box, size float64) Box {
	width := max(n.Width, d.Width) + 2*overhang*size
	mid, gap := axis*size, barGap*size
	return Box{width + 2*overhang*size, mid + gap + n.Below + n.Above, gap + d.Above + d.Below - mid, func(c vg.Canvas, x, y float64) {
		x += overhang * size
		n.draw(c, x+(width-n.Width)/2, y+mid+gap+n.Below)
		d.draw(c, x+(width-d.Width)/2, y+mid-gap-d.Above)
		p.stroke(c, size, x, y+mid, x+width, y+mid)
	}}
}

// root sets a radicand under its sign.
func (p *parser) root(r Box, size float64) Box {
	top, foot, lead := r.Above+barGap*size, -r.Below*0.8, tick*size
	return Box{lead + r.Width + overhang*size, top + barGap*size, r.Below, func(c vg.Canvas, x, y float64) {
		p.stroke(c, size, x+0.04*size, y+foot+0.36*size, x+0.12*size, y+foot+0.42*size, x+0.24*size, y+foot,
			x+0.38*size, y+top, x+lead+r.Width, y+top)
		r.draw(c, x+lead, y)
	}}
}

// stroke draws a line through points.
func (p *parser) stroke(c vg.Canvas, size float64, xy ...float64) {
	c.SetColor(p.st.Color)
	c.SetLineWidth(vg.Points(barWidth * size))
	c.SetLineDash(nil, 0)
	var path vg.Path
	for i := 0; i+1 < len(xy); i += 2 {
		at := vg.Point{X: vg.Points(xy[i]), Y: vg.Points(xy[i+1])}
		if i == 0 {
			path.Move(at)
		} else {
			path.Line(at)
		}
	}
	c.Stroke(path)
}
