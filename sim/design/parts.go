package design

import "strings"

// walkParts reads the loads or the elements.
func (w *walker) walkParts(items []item, kind string) (parts []Part) {
	for _, i := range items {
		if i.fields == nil {
			continue
		}
		p := Part{Pos: i.name.pos, Name: i.name.text, At: i.fields.junction("at")}
		if ends, _, ok := i.fields.pair("between"); ok {
			p.At, p.To = ends[0], ends[1]
		}
		p.Impedance = i.fields.partImpedance()
		if kind == "element" && p.Impedance.Kind == Matched {
			w.problem(i.fields.node("impedance").pos, say("make it a load, or give its value"), "an element cannot be matched")
		}
		parts = append(parts, p)
	}
	return parts
}

// partImpedance reads the impedance or the series parts of a load or element.
func (f *fields) partImpedance() Impedance {
	if _, ok := f.at["impedance"]; ok {
		return f.impedance("impedance")
	}
	return f.seriesParts()
}

var impedanceWords = map[string]ImpedanceKind{"short": Short, "open": Open, "matched": Matched}

// impedance reads short, open, matched or a complex value.
func (f *fields) impedance(key string) Impedance {
	n := f.scalar(key)
	if n == nil {
		return Impedance{}
	}
	z := Impedance{Pos: n.pos, Text: n.text}
	if kind, ok := impedanceWords[n.text]; ok {
		z.Kind = kind
		return z
	}
	if word := nearest(n.text, []string{"short", "open", "matched"}); word != "" && startsLower(strings.ToLower(n.text)) {
		f.w.problem(n.pos, say(`did you mean "%s"?`, word), "%s: %q is not an impedance", f.name(key), n.text)
		return z
	}
	var fault *fault
	z.Kind = Complex
	z.Z, fault = parseComplex(n.text, f.w.design.Convention)
	switch {
	case fault != nil:
		f.w.fault(n, f.name(key), fault)
	case real(z.Z) < 0:
		f.w.problem(n.pos, say("check the sign; a passive part has R of zero or more"), "%s has a negative resistance: %q", f.name(key), n.text)
	}
	return z
}

// seriesParts reads r, l and c. A zero c would be an open circuit, not the
// absence of a capacitor, so it is refused.
func (f *fields) seriesParts() Impedance {
	if f == nil {
		return Impedance{}
	}
	z := Impedance{Pos: f.pos, Kind: SeriesParts}
	r, _ := f.value("r", resistance, notNegative)
	l, _ := f.value("l", inductance, notNegative)
	c, _ := f.value("c", capacity, positive)
	z.R, z.L, z.C = r.SI, l.SI, c.SI
	var text []string
	for _, v := range []Value{r, l, c} {
		if v.Text != "" {
			text = append(text, v.Text)
			z.Pos = v.Pos
		}
	}
	z.Text = strings.Join(text, ", ")
	return z
}
