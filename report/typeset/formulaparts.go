package typeset

import "gonum.org/v1/plot/vg"

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

// fence puts brackets or bars around what has them.
func (p *parser) fence(kind rune, b Box, size float64) Box {
	const lead, bulge = 0.30, 0.17
	above, below := b.Above+0.06*size, b.Below+0.06*size
	return Box{b.Width + 2*lead*size, above, below, func(c vg.Canvas, x, y float64) {
		b.draw(c, x+lead*size, y)
		for _, side := range []float64{-1, 1} {
			at := x + b.Width/2 + lead*size + side*(b.Width/2+0.07*size)
			if kind == bars {
				p.stroke(c, size, at, y-below, at, y+above)
				continue
			}
			p.bow(c, size, at, y-below, y+above, side*bulge*size)
		}
	}}
}

// bow draws a bracket: a curve from foot to top that swings out by swing.
func (p *parser) bow(c vg.Canvas, size, x, foot, top, swing float64) {
	c.SetColor(p.st.Color)
	c.SetLineWidth(vg.Points(1.3 * barWidth * size))
	c.SetLineDash(nil, 0)
	at := func(x, y float64) vg.Point { return vg.Point{X: vg.Points(x), Y: vg.Points(y)} }
	third := (top - foot) / 3
	var path vg.Path
	path.Move(at(x, foot))
	path.CubeTo(at(x+swing*1.3, foot+third), at(x+swing*1.3, top-third), at(x, top))
	c.Stroke(path)
}
