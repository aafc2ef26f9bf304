package design

import (
	"fmt"
	"strings"

	"linewitness/sim/line"
)

// lightTolerance lets r, l, g, c that were computed for the speed of light
// pass in spite of rounding.
const lightTolerance = 1e-9

// walkLines reads the kinds of line. Their constants need the frequency.
func (w *walker) walkLines(items []item) {
	w.lines, w.lineNames = map[string]*Line{}, names(items)
	for _, i := range items {
		if i.fields == nil {
			continue
		}
		l := Line{Pos: i.name.pos, Name: i.name.text}
		w.walkLine(i.fields, &l)
		l.Rating = i.fields.rating("line "+l.Name, l.Rating)
		w.design.Lines = append(w.design.Lines, l)
		w.lines[l.Name] = &l
	}
}

func (w *walker) walkLine(f *fields, l *Line) {
	var known known
	var ok bool
	switch {
	case f.has("cable"):
		known, ok = f.cable(l)
	case f.has("geometry"):
		known, ok = f.geometry(l)
	case f.firstOf(lineChoice.forms[0].keys) != "":
		known, ok = f.nominal(l)
	default:
		known, ok = f.constants(l)
	}
	asked := Model(f.oneOf("model", string(Constant), string(Dispersive)))
	if ok {
		f.model(l, known, asked)
	}
}

// reference is the frequency at which the data of lines hold: that of the
// nominal design, also in a case that changes the frequency, because the same
// cable is in it. It is 0 if the source did not read well.
func (w *walker) reference() float64 {
	if w.base != nil {
		return w.base.design.Source.Frequency.SI
	}
	return w.design.Source.Frequency.SI
}

// constants reads a line of r, l, g and c.
func (f *fields) constants(l *Line) (known, bool) {
	r, _ := f.value("r", seriesR, notNegative)
	ind, _ := f.value("l", seriesL, positive)
	g, _ := f.value("g", shuntG, notNegative)
	c, _ := f.value("c", shuntC, positive)
	var text []string
	for i, v := range []Value{r, ind, g, c} {
		if v.Text != "" {
			text = append(text, "rlgc"[i:i+1]+" "+v.Text)
			l.given("rlgc"[i:i+1], v.Text)
		}
	}
	l.Text = strings.Join(text, ", ")
	if ind.SI <= 0 || c.SI <= 0 {
		return known{}, false
	}
	k := line.Constants{R: r.SI, L: ind.SI, G: g.SI, C: c.SI}
	if v := k.FrontVelocity(); v > line.C0*(1+lightTolerance) {
		f.w.problem(ind.Pos, say("l times c is at least 1.1127e-17 s2/m2; check the unit prefixes and lengths"),
			"%s is faster than light: 1/sqrt(l c) is %.4g times c", f.what, v/line.C0)
	}
	return known{Constants: k}, true
}

// given adds a value that the file gives to the pedigree of a line.
func (l *Line) given(what, text string) { l.trace(what, text, GivenInDesign, "") }

// assumed adds a default to the pedigree of a line.
func (l *Line) assumed(what, text, note string) { l.trace(what, text, Assumed, note) }

func (l *Line) trace(what, text string, kind Origin, note string) {
	l.Pedigree = append(l.Pedigree, Provenance{what, text, kind, note})
}

// warnOf adds a warning, if there is one.
func (l *Line) warnOf(text string) {
	if text != "" {
		l.Warnings = append(l.Warnings, text)
	}
}

func (l *Line) warn(format string, args ...any) {
	l.Warnings = append(l.Warnings, fmt.Sprintf(format, args...))
}
