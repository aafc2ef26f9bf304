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
// highest ones for a line to be dispersive without being asked. Below that more
// than half of its reactance is that of the skin effect, or of a dielectric with
// a loss tangent above a tenth: hardly a line, and most likely a wrong unit.
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
	omega := 2 * math.Pi * ref
	warning, err := line.CheckDispersion(k.Constants, omega, k.conductor, k.dielectric)
	base, d := line.Disperse(k.Constants, omega, k.conductor, k.dielectric)
	switch doubtful := err != nil || base.L < leastLeft*k.L || base.C < leastLeft*k.C; {
	case asked == Dispersive && err != nil:
		f.w.problem(f.node("model").pos, say("check the unit of the loss"), "%s cannot have the dispersive model: %s", f.what, rawText(err.Error()))
		return
	case asked != Dispersive && doubtful:
		l.warn("its loss at the design frequency is too high to be skin effect and a loss tangent, so r, l, g, c are taken as constant: check the unit of the loss")
		l.assumed("model", "constant", "too much loss for the dispersive model")
		return
	}
	l.Model, l.Base, l.Dispersion = Dispersive, base, d
	l.warnOf(warning)
	if freq != ref {
		l.Constants = d.At(base, 2*math.Pi*freq)
	}
	if asked == Dispersive {
		l.given("model", "dispersive")
	} else {
		l.assumed("model", "dispersive", "resistance by skin effect, conductance by a constant loss tangent")
	}
}
