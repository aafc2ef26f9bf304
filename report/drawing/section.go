package drawing

import (
	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
	"linewitness/report/format"
	"linewitness/report/ink"
	"linewitness/sim/record"
)

// ScaleNote says what the lengths of sections in the drawing mean.
const ScaleNote = "Double lines are sections: short ones up to an eighth of a wavelength, longer ones up to two, whole and broken ones beyond; single lines have no length. " +
	"The dashed strokes are the reference planes."

// The classes of length: up to which length, in wavelengths, a section takes
// what part of its cell.
var classes = []struct{ wavelengths, part float64 }{{0.125, 0.4}, {2, 0.72}}

// A section is a pair of conductors: a double line.
var (
	outerStyle = draw.LineStyle{Color: ink.Accent, Width: 3.4}
	innerStyle = draw.LineStyle{Color: ink.White, Width: 1.5}
	planeStyle = draw.LineStyle{Color: ink.Accent, Width: 0.5, Dashes: []vg.Length{1.4, 1}}
)

// planeRise is how far the stroke of a reference plane reaches above its wire.
const planeRise = 4.2 * mm

// section draws a section from x to right in the class of its length, and a wire
// for what is left.
func (p *pen) section(s *record.ModelSection, x, right, y float64) {
	part, long := 1.0, true
	for _, c := range classes {
		if s.Wavelengths <= c.wavelengths {
			part, long = c.part, false
			break
		}
	}
	end := x + part*(right-x)
	p.line(wireStyle, end, y, right, y)
	p.line(outerStyle, x, y, end, y)
	p.line(innerStyle, x, y, end, y)
	if long {
		p.broken(x+0.62*(end-x), y)
	}
}

// broken draws the sign of a line that is not drawn at its full length: two
// strokes aslant, and nothing between them.
func (p *pen) broken(x, y float64) {
	const apart, lean, height = 1.1, 1.3, 3.4
	gap := draw.LineStyle{Color: ink.White, Width: 2 * apart}
	p.line(gap, x-lean, y-height, x+lean, y+height)
	for _, side := range []float64{-apart, apart} {
		p.line(wireStyle, x-lean+side, y-height, x+lean+side, y+height)
	}
}

// lengths returns the length in metres and in degrees, or in metres alone where
// both find no room.
func lengths(s *record.ModelSection, room float64) string {
	metres := format.SI(s.Length, "m")
	both := metres + ", " + format.Electrical(s.Degrees)
	if valueStyle.Width(both) > room {
		return metres
	}
	return both
}
