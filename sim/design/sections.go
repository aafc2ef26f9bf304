package design

import "linewitness/sim/line"

// walkSections reads the sections. Lengths need the lines and the frequency.
func (w *walker) walkSections(items []item) {
	w.lengths = make(map[string]Value, len(items))
	for _, i := range items {
		if i.fields == nil {
			continue
		}
		s := Section{Pos: i.name.pos, Name: i.name.text, From: i.fields.junction("from"), To: i.fields.junction("to")}
		if s.From == s.To && s.From != "" {
			w.problem(i.fields.at["to"].value.pos, say("put a junction in the loop: make it two sections"),
				"%s begins and ends at %q", i.fields.what, s.From)
		}
		l := w.lineOf(i.fields)
		if l != nil {
			s.Line, s.Constants, s.Base, s.Dispersion = l.Name, l.Constants, l.Base, l.Dispersion
		}
		s.Rating = i.fields.sectionRating(s.Name, l)
		s.Length = w.sectionLength(i.fields, s.Name, l)
		w.lengths[s.Name] = s.Length
		w.design.Sections = append(w.design.Sections, s)
	}
}

// lineOf finds the line a section is made of.
func (w *walker) lineOf(f *fields) *Line {
	n := f.scalar("line")
	if n == nil {
		return nil
	}
	if !contains(w.lineNames, n.text) {
		w.problem(n.pos, didYouMean(n.text, w.lineNames), "there is no line %q", n.text)
	}
	return w.lines[n.text]
}

// sectionLength turns a length into metres, whatever it was given in.
//
// A length in degrees, wavelengths or as a delay is cut once, for the nominal
// design. A case that changes the frequency or the line has the same piece of
// line in it, so it keeps those metres unless it gives the length itself.
func (w *walker) sectionLength(f *fields, name string, l *Line) Value {
	q, n, ok := f.quantity("length", length)
	if !ok || !f.hasSign("length", n, q.value, positive) {
		return Value{}
	}
	v := Value{q.value, n.text, n.pos}
	if q.unit.of == si {
		return v
	}
	if w.base != nil && !w.patch.covers(n.pos) {
		if cut, ok := w.base.lengths[name]; ok {
			return cut
		}
	}
	freq := w.design.Source.Frequency.SI
	if l == nil || freq == 0 || l.Constants == (line.Constants{}) {
		w.flawed = true // by what has been told of the line or the source
		return v
	}
	if q.unit.of == delay {
		v.SI = q.value * l.Constants.FrontVelocity()
	} else {
		v.SI = q.value * l.wavelength(freq)
	}
	return v
}

// wavelength is that of the line at the design frequency f, m. Where z0 and
// the velocity are nominal, it is of that velocity: the loss does not change it.
func (l *Line) wavelength(f float64) float64 {
	if l.Nominal != nil {
		return l.Constants.FrontVelocity() / f
	}
	return l.Constants.Wavelength(f)
}
