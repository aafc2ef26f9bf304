package drawing

import (
	"math"

	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
	"linewitness/report/format"
	"linewitness/report/ink"
	"linewitness/report/typeset"
	"linewitness/sim/record"
)

// symbol draws a symbol of half a length around (x, y): after IEC 60617 a
// rectangle for a resistor, half circles for a coil, two plates for a capacitor
// and two windings for a transformer; a rectangle with a Z in it for any other
// impedance.
func (p *pen) symbol(s sign, x, y, half float64) {
	switch s {
	case transformer:
		p.windings(x, y)
	case coil:
		p.coil(x, y, half)
	case capacitor:
		p.plates(x, y, half)
	case general:
		p.box(x, y, half)
		valueStyle.At(6).Draw(p.c, x, y-2.1, "Z", typeset.Center)
	default:
		p.box(x, y, half)
	}
}

// windings draws a transformer: the wires come to the heads of two windings
// that face each other, and their feet are on the return conductor.
func (p *pen) windings(x, y float64) {
	const (
		reach = 1.6 * mm // of the windings above and below the wire
		apart = 0.9 * mm // from the middle to a winding
		lead  = 2.1 * mm // from the middle to where a wire turns up
	)
	for _, side := range []float64{-1, 1} {
		turn, at := x+side*lead, x+side*apart
		p.line(wireStyle, x+side*symbolHalf, y, turn, y, turn, y+reach, at, y+reach)
		p.winding(at, y, reach, side)
		p.line(wireStyle, at, y-reach, turn, y-reach)
		for k, half := range []float64{0.55 * mm, 0.3 * mm} {
			foot := turn + side*float64(k)*0.45*mm
			p.line(draw.LineStyle{Color: ink.Text, Width: 0.7}, foot, y-reach-half, foot, y-reach+half)
		}
	}
}

// winding draws half circles from y+reach down to y-reach that bulge to the
// other winding.
func (p *pen) winding(x, y, reach, side float64) {
	const turns = 3
	r := reach / turns
	var path vg.Path
	path.Move(vg.Point{X: vg.Points(x), Y: vg.Points(y + reach)})
	for k := range turns {
		center := y + reach - (2*float64(k)+1)*r
		path.Arc(vg.Point{X: vg.Points(x), Y: vg.Points(center)}, vg.Points(r), math.Pi/2, side*math.Pi)
	}
	p.c.SetLineStyle(draw.LineStyle{Color: ink.Text, Width: 0.8})
	p.c.Stroke(path)
}

func (p *pen) box(x, y, long float64) {
	const half = 1.2 * mm
	r := vg.Rectangle{
		Min: vg.Point{X: vg.Points(x - long), Y: vg.Points(y - half)},
		Max: vg.Point{X: vg.Points(x + long), Y: vg.Points(y + half)},
	}
	p.c.SetColor(ink.White)
	p.c.Fill(r.Path())
	p.c.SetLineStyle(draw.LineStyle{Color: ink.Text, Width: 0.8})
	p.c.Stroke(r.Path())
}

func (p *pen) coil(x, y, half float64) {
	const turns = 4
	r := half / turns
	var path vg.Path
	path.Move(vg.Point{X: vg.Points(x - half), Y: vg.Points(y)})
	for k := range turns {
		center := x - half + (2*float64(k)+1)*r
		path.Arc(vg.Point{X: vg.Points(center), Y: vg.Points(y)}, vg.Points(r), math.Pi, -math.Pi)
	}
	p.c.SetLineStyle(draw.LineStyle{Color: ink.Text, Width: 0.8})
	p.c.Stroke(path)
}

func (p *pen) plates(x, y, half float64) {
	const gap, height = 0.6 * mm, 1.4 * mm
	p.line(wireStyle, x-half, y, x-gap, y)
	p.line(wireStyle, x+gap, y, x+half, y)
	plate := draw.LineStyle{Color: ink.Text, Width: 1.1}
	p.line(plate, x-gap, y-height, x-gap, y+height)
	p.line(plate, x+gap, y-height, x+gap, y+height)
}

// ground draws the return conductor at the end of a wire that comes from the
// left (side 1) or from the right (side -1).
func (p *pen) ground(x, y, side float64) {
	for k, half := range []float64{1.7 * mm, 1.1 * mm, 0.5 * mm} {
		at := x + side*float64(k)*0.7*mm
		p.line(draw.LineStyle{Color: ink.Text, Width: 0.8}, at, y-half, at, y+half)
	}
}

func (p *pen) dot(x, y, r float64) {
	p.c.SetColor(ink.Text)
	p.c.Fill(disc(x, y, r))
}

// ring draws an open end.
func (p *pen) ring(x, y, r float64) {
	p.c.SetColor(ink.White)
	p.c.Fill(disc(x, y, r))
	p.c.SetLineStyle(draw.LineStyle{Color: ink.Text, Width: 0.8})
	p.c.Stroke(disc(x, y, r))
}

func disc(x, y, r float64) vg.Path {
	var path vg.Path
	center := vg.Point{X: vg.Points(x), Y: vg.Points(y)}
	path.Move(vg.Point{X: center.X + vg.Points(r), Y: center.Y})
	path.Arc(center, vg.Points(r), 0, 2*math.Pi)
	path.Close()
	return path
}

// lead draws what a band starts with: the source, or the letter of the band
// and the junction that it continues.
func (p *pen) lead() {
	x, y := p.x0-leadWidth+2*mm, p.y0
	if p.band.Source != nil {
		p.source(p.band.Source, x, y)
		return
	}
	p.line(wireStyle, x+7*mm, y, p.x0, y)
	what := "continued"
	if !p.band.Tied {
		what = "not tied to the source"
	} else {
		p.pennant(x+3*mm, y, letter(p.band.Index))
	}
	room := leadWidth - 7*mm - textGap - 2*mm
	p.label(valueStyle, x+7*mm, y+0.8*mm, room, what)
	p.label(nodeStyle, x+7*mm, y-2.9*mm, room, p.band.Lead)
}

// source draws the source: EMF behind its impedance.
func (p *pen) source(s *record.ModelSource, x, y float64) {
	const radius = 2.6 * mm
	center, middle := x+6*mm, x+18*mm
	p.ground(x+1*mm, y, -1)
	p.line(wireStyle, x+1*mm, y, center-radius, y)
	p.line(wireStyle, center+radius, y, p.x0, y)
	p.c.SetLineStyle(draw.LineStyle{Color: ink.Text, Width: 0.8})
	p.c.Stroke(disc(center, y, radius))
	p.wave(center, y)
	if s.Impedance != 0 {
		list := seriesSigns(s.R, s.L, s.C)
		p.c.SetColor(ink.White)
		p.c.Fill(vg.Rectangle{
			Min: vg.Point{X: vg.Points(middle - half(list)), Y: vg.Points(y - 1)},
			Max: vg.Point{X: vg.Points(middle + half(list)), Y: vg.Points(y + 1)},
		}.Path())
		p.row(list, middle, y)
	}
	room := leadWidth - 2*mm - textGap
	p.label(nameStyle, x, y+5.6*mm, room, "source")
	p.label(valueStyle, x, y+3.1*mm, room, typeset.Clean(s.Given))
	p.label(valueStyle, x+9*mm, y-3.9*mm, room-9*mm, format.Complex(s.Impedance, "Ω"))
}

// wave draws a period of a sine in the circle of the source.
func (p *pen) wave(x, y float64) {
	const half, height = 1.5 * mm, 1.0 * mm
	var xy []float64
	for k := -8; k <= 8; k++ {
		t := float64(k) / 8
		xy = append(xy, x+half*t, y+height*math.Sin(math.Pi*t))
	}
	p.line(draw.LineStyle{Color: ink.Text, Width: 0.7}, xy...)
}

// flagAt is how far to the right of its junction a flag stands, in cells.
const flagAt = 0.6

// flag marks a junction that another band continues.
func (p *pen) flag(x, y float64, n *node) {
	if n.used { // the flag hangs below the branches that found room
		low := p.y(n.low) - RowHeight*0.32
		p.line(wireStyle, x, y, x, low)
		p.pennant(x, low-4, letter(n.on))
		return
	}
	at := x + p.cell*flagAt
	p.line(wireStyle, x, y, at, y)
	p.pennant(at, y, letter(n.on))
}

// pennant draws the letter of a band in a circle.
func (p *pen) pennant(x, y float64, s string) {
	const r = 4.4
	p.c.SetColor(ink.Accent)
	p.c.Fill(disc(x, y, r))
	st := nameStyle.Of(ink.White)
	st.Draw(p.c, x, y-2.4, s, typeset.Center)
}

// letter names a band: A, B, ... Z, AA, AB, ...
func letter(n int) string {
	s := ""
	for ; n > 0; n = (n - 1) / 26 {
		s = string(rune('A'+(n-1)%26)) + s
	}
	return s
}
