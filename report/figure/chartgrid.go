package figure

import (
	"math"
	"math/cmplx"

	"gonum.org/v1/plot/vg"
	"linewitness/report/format"
	"linewitness/report/ink"
	"linewitness/report/typeset"
)

// gridValues are the resistances and reactances whose circles are drawn, in
// units of the reference.
var gridValues = []float64{0.5, 1, 2}

var chartTick = typeset.Style{Face: typeset.Sans, Size: 5.6, Color: ink.Soft}

// grid draws the unit circle, the real axis, and circles of constant resistance
// and reactance with their values.
func (p plane) grid() {
	p.c.SetLineStyle(ink.GridLine)
	for _, v := range gridValues {
		p.c.Stroke(p.path(constant(func(t float64) complex128 { return complex(v, t) }, true)))
		for _, side := range []float64{1, -1} {
			p.c.Stroke(p.path(constant(func(t float64) complex128 { return complex(t, side*v) }, false)))
		}
	}
	p.c.StrokeLine2(ink.GridLine, p.at(-1).X, p.at(0).Y, p.at(1).X, p.at(0).Y)
	p.c.SetLineStyle(ink.FrameLine)
	p.c.Stroke(p.circle(1))
	p.values()
}

// values writes the values: of resistance on the real axis, of reactance
// outside the rim.
func (p plane) values() {
	text := func(at vg.Point, dx, dy float64, s string) {
		chartTick.Draw(p.c, at.X.Points()+dx, at.Y.Points()+dy, s, typeset.Center)
	}
	for _, v := range gridValues {
		text(p.at(reflect(complex(v, 0))), -4.2, -5.6, format.Short(v))
		for _, side := range []float64{1, -1} {
			s := "j" + format.Short(v)
			if side < 0 {
				s = format.Minus + s
			}
			g := reflect(complex(0, side*v))
			text(p.at(g*complex(1+5.2/p.radius, 0)), 0, -2, s)
		}
	}
	text(p.at(-1), -5, -2, "0")
	text(p.at(1), 5.5, -2, "∞")
}

// reflect is the reflection coefficient of an impedance in units of the
// reference.
func reflect(z complex128) complex128 {
	if cmplx.IsInf(z) {
		return 1
	}
	return (z - 1) / (z + 1)
}

// constant returns points on a circle of the grid: z of t from 0, or from minus
// infinity, to infinity.
func constant(z func(t float64) complex128, both bool) []complex128 {
	const steps = 48
	var out []complex128
	for k := range steps + 1 {
		u := float64(k) / steps
		if both {
			u = 2*u - 1
		}
		t := math.Tan(u * math.Pi / 2 * (1 - 1e-9))
		out = append(out, reflect(z(t)))
	}
	return out
}
