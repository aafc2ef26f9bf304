package design

import (
	"fmt"
	"math"

	"linewitness/sim/line"
)

// nominal reads a line of datasheet figures.
func (f *fields) nominal(l *Line) (known, bool) {
	z0, ok := f.value("z0", resistance, positive)
	l.Nominal = &Nominal{Z0: z0.SI}
	l.Text = "z0 " + z0.Text
	l.given("z0", z0.Text)
	factor, read := f.velocity(l)
	l.Nominal.VelocityFactor = factor
	if n := f.node("loss"); n != nil && n.kind == list {
		f.lossTable(l)
	} else if n != nil {
		f.w.fields(n, f.at["loss"].key.pos, "the loss of "+f.what, lossTable).loss(l)
	}
	if !ok || !read {
		return known{}, false
	}
	return knownNominal(*l.Nominal, f.w.reference())
}

// knownNominal is a nominal line at the reference frequency.
func knownNominal(n Nominal, ref float64) (known, bool) {
	if ref == 0 {
		return known{}, false
	}
	k := n.At(ref)
	return known{k, k.R, k.G}, true
}

// velocity reads the velocity factor in whatever form it is given.
func (f *fields) velocity(l *Line) (factor float64, ok bool) {
	switch {
	case f.has("velocity_factor"):
		factor, ok = f.velocityFactor(l)
	case f.has("permittivity"):
		factor, ok = f.permittivity(l)
	case f.has("delay"):
		factor, ok = f.slowed("delay", slowing, l, func(d float64) float64 { return 1 / (d * line.C0) })
	case f.has("capacitance"):
		return f.slowed("capacitance", shuntC, l, func(c float64) float64 { return 1 / (l.Nominal.Z0 * c * line.C0) })
	default:
		f.w.problem(f.at[f.firstOf(lineChoice.forms[0].keys)].key.pos, say("for example velocity_factor: 0.66"),
			`missing "velocity_factor", "permittivity", "delay" or "capacitance" in %s`, f.what)
	}
	if ok {
		f.checkCapacitance(l, factor)
	}
	return factor, ok
}

func (f *fields) velocityFactor(l *Line) (float64, bool) {
	q, n, ok := f.quantity("velocity_factor", fraction)
	if !ok {
		return 0, false
	}
	if q.value <= 0 || q.value > 1 {
		f.w.problem(n.pos, say("it is the phase velocity over that of light, such as 0.66"),
			"%s must be above 0 and at most 1, not %q", f.name("velocity_factor"), n.text)
		return 0, false
	}
	l.tell("velocity factor", n.text)
	return q.value, true
}

func (f *fields) permittivity(l *Line) (float64, bool) {
	q, n, ok := f.quantity("permittivity", plain)
	if !ok {
		return 0, false
	}
	if q.value < 1 {
		f.w.problem(n.pos, say("it is relative to vacuum, such as 2.25"), "%s must be at least 1, not %q", f.name("permittivity"), n.text)
		return 0, false
	}
	l.tell("permittivity", n.text)
	return 1 / math.Sqrt(q.value), true
}

// slowed reads a value per length from which the velocity factor follows.
func (f *fields) slowed(key string, d *dimension, l *Line, factorOf func(float64) float64) (float64, bool) {
	v, ok := f.value(key, d, positive)
	if !ok || l.Nominal.Z0 == 0 {
		return 0, false
	}
	factor := factorOf(v.SI)
	if factor > 1+lightTolerance {
		f.w.problem(v.Pos, say("check the unit prefix and the length; light takes 3.3357 ns/m"),
			"%s makes the line faster than light: velocity factor %.4g", f.name(key), factor)
		return 0, false
	}
	l.tell(key, v.Text)
	return factor, true
}

// checkCapacitance compares the capacitance, if it is given too, with what the
// other figures make of it: C = 1/(z0 v).
func (f *fields) checkCapacitance(l *Line, factor float64) {
	c, ok := f.value("capacitance", shuntC, positive)
	if !ok || l.Nominal.Z0 == 0 {
		return
	}
	l.tell("capacitance", c.Text)
	l.warnOf(line.CapacitanceWarning(l.Nominal.Z0, factor, c.SI))
}

// tell adds a value of the file to the text and the pedigree of a line.
func (l *Line) tell(what, text string) {
	l.Text += ", " + what + " " + text
	l.given(what, text)
}

// loss reads the loss at one frequency.
func (f *fields) loss(l *Line) {
	if f == nil {
		return
	}
	at, ok1 := f.value("at", frequency, positive)
	attenuation, ok2 := f.value("attenuation", fading, notNegative)
	if !ok1 || !ok2 {
		return
	}
	l.Nominal.LossAt, l.Nominal.Attenuation = at.SI, attenuation.SI
	text := fmt.Sprintf("%s at %s", attenuation.Text, at.Text)
	l.Text += ", " + text
	l.given("loss", text)
	share, n, ok := f.quantity("dielectric_share", fraction)
	switch {
	case !ok:
		l.assumed("dielectric share of the loss", "0", "all of the loss is taken as that of the conductors")
		return
	case share.value < 0 || share.value > 1:
		f.w.problem(n.pos, say("it is the part of the loss that is in the dielectric"), "%s must be from 0 to 1, not %q", f.name("dielectric_share"), n.text)
		return
	}
	l.Nominal.DielectricShare = share.value
	l.tell("dielectric share", n.text)
}
