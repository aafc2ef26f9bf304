package design

import (
	"math"

	"linewitness/sim/line"
)

// known is what the data of a line amount to at the reference frequency: its
// constants, and how much of R is skin effect and of G a loss tangent. Both are
// zero for r, l, g, c, which say nothing of the kind.
type known struct {
	line.Constants
	conductor, dielectric float64
}

// leastLeft is how much of L and C at the design frequency must be left at the
// highest ones. Below that the skin effect has more reactance than the line's
// outer field, which is no line of the radio kind, and the law of the root
// does not hold for it.
const leastLeft = 0.5

// model decides how the line depends on frequency, which the file may ask for,
// and gives it its constants.
func (f *fields) model(l *Line, k known, asked Model) {
	ref, freq := f.w.reference(), f.w.design.Source.Frequency.SI
	if ref == 0 || freq == 0 {
		return // told already
	}
	l.Model, l.Constants = Constant, k.at(freq/ref)
	l.Base = l.Constants
	if asked == Dispersive && k.conductor == 0 && k.dielectric == 0 {
		k.conductor, k.dielectric = k.R, k.G
	}
	switch {
	case asked == Constant:
		l.given("model", "constant")
	case k.conductor > 0 || k.dielectric > 0:
		f.disperse(l, k, asked)
	case asked == Dispersive:
		l.warn("model: dispersive changes nothing: the line has no loss")
	}
}

// at is the line at ratio times the reference frequency with the constant
// model: what is skin effect grows as the root of the frequency, what is a loss
// tangent as the frequency.
func (k known) at(ratio float64) line.Constants {
	c := k.Constants
	if ratio != 1 {
		c.R += k.conductor * (math.Sqrt(ratio) - 1)
		c.G += k.dielectric * (ratio - 1)
	}
	return c
}

// disperse gives a line the dispersive model, if it can have it.
func (f *fields) disperse(l *Line, k known, asked Model) {
	ref, freq := f.w.reference(), f.w.design.Source.Frequency.SI
	base, d := line.Disperse(k.Constants, 2*math.Pi*ref, k.conductor, k.dielectric)
	switch {
	case base.L >= leastLeft*k.L && base.C >= leastLeft*k.C:
	case asked == Dispersive:
		f.w.problem(f.node("model").pos, say("write model: constant, or check the unit of the loss"),
			"%s has too much loss at the design frequency for the laws of the dispersive model", f.what)
		return
	default:
		l.warn("constant r, l, g, c, because the loss at the design frequency is too high for the laws of the dispersive model: check its unit")
		l.assumed("model", "constant", "too much loss for the dispersive model")
		return
	}
	l.Model, l.Base, l.Dispersion = Dispersive, base, d
	if freq != ref {
		l.Constants = d.At(base, 2*math.Pi*freq)
	}
	if asked == Dispersive {
		l.given("model", "dispersive")
	} else {
		l.assumed("model", "dispersive", "resistance by skin effect, conductance by a constant loss tangent")
	}
	if v := base.FrontVelocity() / line.C0; v > 1+frontTolerance {
		l.warn("the wave front of the dispersive model is %.2g %% faster than light: the velocity and the loss at the design frequency do not fit each other", 100*(v-1))
	}
}

// frontTolerance is how much faster than light a wave front may come out
// because a velocity factor was rounded to three figures.
const frontTolerance = 1e-3
