package recheck

import (
	"math"
	"math/cmplx"
)

// impedance: Z = V/I moves by |Z| (dV/|V| + dI/|I|).
var impedance = by(func(at *place, size float64) float64 {
	return orNothing(size * at.turned())
})

// reflection: with Z0 as it is, the reflection coefficient G of Z moves by
// |1 - G^2|/2 times what Z moves by, relative to Z.
var reflection = class{number: func(at *place, then, now complex128) (change, allowed float64) {
	return cmplx.Abs(now - then), at.reflected(now)
}}

// vswr compares standing wave ratios s as sizes of the reflection, (s-1)/(s+1):
// an infinite one, which is null, is a reflection of 1.
var vswr = class{number: func(at *place, then, now complex128) (change, allowed float64) {
	return math.Abs(size(now) - size(then)), at.reflected(at.now[len(at.now)-1].Get("reflection").Complex())
}}

func size(s complex128) float64 {
	if cmplx.IsNaN(s) {
		return 1
	}
	return (real(s) - 1) / (real(s) + 1)
}

func (at *place) reflected(g complex128) float64 {
	s := at.spread()
	turned := at.turned()
	if math.IsInf(turned, 0) || math.IsNaN(turned) { // at an open or a short end
		return share(s.v, s.largeV) + share(s.i, s.largeI)
	}
	return cmplx.Abs(1-g*g)/2*turned + rounding
}

// turned is how far the quotient of the voltage and the current beside the value
// may be off, relative to it.
func (at *place) turned() float64 {
	s, here := at.spread(), at.now[len(at.now)-1]
	return s.v/abs(here.Get("v").Complex()) + s.i/abs(here.Get("i").Complex())
}

// terminal: the power of the voltage and the current beside the value.
var terminal = by(func(at *place, _ float64) float64 {
	s, here := at.spread(), at.now[len(at.now)-1]
	return orNothing((s.v*abs(here.Get("i").Complex()) + s.i*abs(here.Get("v").Complex())) / 2)
})

// stored: energy goes with the square of a phasor.
var stored = by(func(at *place, _ float64) float64 {
	total := at.beside("stored_j")
	if at.key("sections") != "" {
		total = at.beside("../../stored_j")
	}
	return 2 * at.network().relative() * orNothing(total)
})

// quality: Q is energy over power.
var quality = by(func(at *place, size float64) float64 {
	s := at.network()
	return orNothing(size * (2*s.relative() + 2*s.power()/math.Abs(at.beside("delivered_w"))))
})

// overshoot is a peak over a steady value, less one.
var overshoot = by(func(at *place, _ float64) float64 {
	return share(orNothing(at.beside("peak_voltage/uncertainty_v")), at.network().largeV) + at.network().relative()
})

// inDB: a ratio of two sizes in dB, one of which is uncertain.
func inDB(uncertainty, figure string) class {
	return by(func(at *place, _ float64) float64 {
		factor := 20 / math.Ln10
		if at.besideText("unit") == "W" {
			factor /= 2
		}
		return orNothing(factor * at.beside(uncertainty) / math.Abs(at.beside(figure)))
	})
}

// inPercent: in per cent of a limit.
func inPercent(uncertainty, limit string) class {
	return by(func(at *place, _ float64) float64 {
		return orNothing(100 * at.beside(uncertainty) / math.Abs(at.beside(limit)))
	})
}

// discrepancy: the difference of the two solutions is known to what is left of the
// settling, and to a twentieth where it is larger.
var discrepancy = by(func(at *place, size float64) float64 {
	const known = 0.05
	return known*size + 3*orNothing(at.inCase().Float("settling", "residual")) + rounding
})

// order: an observed order is printed with two decimals and judged in tenths.
var order = by(func(*place, float64) float64 { return 0.1 })

// echo: the loop factor is a ratio of two small changes.
var echo = by(func(_ *place, size float64) float64 { return math.Max(0.01, 0.05*size) })

// measure: a difference measure has grades that are a tenth wide and more.
var measure = by(func(_ *place, size float64) float64 { return math.Max(0.01, 0.1*size) })

// portion: the part of the points in a grade; two points may change theirs.
var portion = by(func(at *place, _ float64) float64 {
	return math.Max(0.02, orNothing(2/at.beside("../../points")))
})

// category: 85 % of the points may be reached one grade sooner or later.
var category = by(func(*place, float64) float64 { return 1 })
