package report

import (
	"math"
	"math/cmplx"

	"linewitness/report/format"
	"linewitness/sim/record"
)

// rounding is the size, relative to the largest of its kind in the network,
// below which a value is the rounding of the arithmetic: a short circuit's
// voltage of 1e-28 V is 0.
const rounding = 1e-12

// floor holds what counts as zero in a case.
type floor struct{ v, i, w float64 }

// noise returns what counts as zero in a case.
func noise(c *record.Case) floor {
	v, i := tops(c.Phasor)
	v, i = max(v, c.Model.Source.EMF), max(i, cmplx.Abs(c.Phasor.Source.I))
	return floor{v: rounding * v, i: rounding * i, w: rounding * math.Abs(c.Phasor.Source.Power)}
}

func (f floor) voltage(v complex128) complex128 { return atLeast(v, f.v) }
func (f floor) current(i complex128) complex128 { return atLeast(i, f.i) }
func (f floor) power(w float64) float64         { return real(atLeast(complex(w, 0), f.w)) }

// unit returns what counts as zero in volts or amperes.
func (f floor) unit(unit string) float64 {
	if unit == "A" {
		return f.i
	}
	return f.v
}

// place prints a distance along a section; less than a nanometre is rounding.
func place(z float64) string {
	const nanometre = 1e-9
	return format.SI(real(atLeast(complex(z, 0), nanometre)), "m")
}

func atLeast(v complex128, least float64) complex128 {
	if cmplx.Abs(v) < least {
		return 0
	}
	return v
}
