package design

import (
	"math"
	"strings"
)

// lumps are r, l and c of a mapping, with the losses of l or c.
type lumps struct {
	r, l, c  Value
	loss     float64 // ohm, in series with l or c
	lossText string  // " with Q 150"
	ok       bool    // something is given, and all of it reads well
}

// lumps reads r, l and c. A zero c would be an open circuit, not the absence
// of a capacitor, so it is refused.
func (f *fields) lumps() (x lumps) {
	var r, l, c bool
	x.r, r = f.value("r", resistance, notNegative)
	x.l, l = f.value("l", inductance, notNegative)
	x.c, c = f.value("c", capacity, positive)
	x.loss, x.lossText = f.quality(x)
	x.ok = (r || l || c) && r == f.has("r") && l == f.has("l") && c == f.has("c")
	return x
}

// seriesParts reads r, l and c as a series combination.
func (f *fields) seriesParts() Impedance {
	if f == nil {
		return Impedance{}
	}
	return f.inSeries(f.lumps())
}

// inSeries is the series combination of r, l and c.
func (f *fields) inSeries(x lumps) Impedance {
	z := Impedance{Pos: f.pos, Kind: SeriesParts, R: x.r.SI + x.loss, L: x.l.SI, C: x.c.SI}
	var text []string
	for _, v := range []Value{x.r, x.l, x.c} {
		if v.Text != "" {
			text = append(text, v.Text)
			z.Pos = v.Pos
		}
	}
	z.Text = strings.Join(text, ", ") + x.lossText
	return z
}

// quality reads the losses of l or c, which are a resistance in series:
//
//	R = wL/Q,  R = 1/(wC Q),  R = ESR
//
// That of Q is worked out once, at the design frequency: the same coil is in a
// case that changes the frequency.
func (f *fields) quality(x lumps) (loss float64, text string) {
	key := f.firstOf([]string{"q", "esr"})
	if key == "" || !f.hasOneReactance(key) {
		return 0, ""
	}
	if esr, ok := f.value("esr", resistance, notNegative); ok {
		return esr.SI, " with ESR " + esr.Text
	}
	q, ok := f.value("q", plain, positive)
	omega := 2 * math.Pi * f.w.frequencyFor(q.Pos)
	switch {
	case !ok || omega == 0:
		return 0, "" // told already
	case x.c.SI > 0:
		loss = 1 / (omega * x.c.SI * q.SI)
	default:
		loss = omega * x.l.SI / q.SI
	}
	return loss, " with Q " + q.Text
}

// hasOneReactance tells of a q or an esr that does not say whose it is.
func (f *fields) hasOneReactance(key string) bool {
	l, c := f.has("l"), f.has("c")
	switch at := f.at[key].key.pos; {
	case l && c:
		f.w.problem(at, say("write them apart: [{l: 2 uH, q: 150}, {c: 30 pF}]"), "%s could be that of l or that of c", f.name(key))
	case !l && !c:
		f.w.problem(at, say("a resistor of its own is written r"), "%s is that of an l or a c, and there is none", f.name(key))
	}
	return l != c
}

// frequencyFor is the frequency at which a value at a place of the file is
// known: that of the nominal design, unless the case itself gives the value.
// It is 0 if the source did not read well.
func (w *walker) frequencyFor(pos Pos) float64 {
	if w.base != nil && !w.patch.covers(pos) {
		return w.base.design.Source.Frequency.SI
	}
	return w.design.Source.Frequency.SI
}
