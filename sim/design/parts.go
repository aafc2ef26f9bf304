package design

import "strings"

// walkParts reads the loads or the elements.
func (w *walker) walkParts(items []item, kind string) (parts []Part) {
	for _, i := range items {
		if i.fields == nil {
			continue
		}
		p := i.fields.part(i.name)
		if kind == "element" && p.Impedance.Kind == Matched {
			w.problem(i.fields.node("impedance").pos, say("make it a load, or give its value"), "an element cannot be matched")
		}
		parts = append(parts, p)
	}
	return parts
}

// part reads a load or an element.
func (f *fields) part(name *node) Part {
	p := Part{Pos: name.pos, Name: name.text, At: f.junction("at")}
	if ends, _, ok := f.pair("between"); ok {
		p.At, p.To = ends[0], ends[1]
	}
	if f.has("ratio") || f.has("from") || f.has("to") {
		f.transformer(&p)
		return p
	}
	p.Impedance, p.Warnings = f.partImpedance()
	return p
}

// partImpedance reads the impedance of a load or element in any of its forms.
func (f *fields) partImpedance() (z Impedance, warnings []string) {
	switch {
	case f.has("impedance"):
		return f.impedance("impedance"), nil
	case f.has("admittance"):
		return f.admittance("admittance"), nil
	case f.has("series"):
		return f.combination("series"), nil
	case f.has("parallel"):
		return f.combination("parallel"), nil
	case f.has("table"):
		return f.tableImpedance("table")
	case f.has("file"):
		return f.fileImpedance("file")
	default:
		return f.seriesParts(), nil
	}
}

var impedanceWords = map[string]ImpedanceKind{"short": Short, "open": Open, "matched": Matched}

// impedance reads short, open, matched or a complex value.
func (f *fields) impedance(key string) Impedance {
	n := f.scalar(key)
	if n == nil {
		return Impedance{}
	}
	if kind, ok := impedanceWords[n.text]; ok {
		return Impedance{Pos: n.pos, Text: n.text, Kind: kind}
	}
	if word := nearest(n.text, []string{"short", "open", "matched"}); word != "" && startsLower(strings.ToLower(n.text)) {
		f.w.problem(n.pos, say(`did you mean "%s"?`, word), "%s: %q is not an impedance", f.name(key), n.text)
		return Impedance{Pos: n.pos, Text: n.text}
	}
	return Impedance{Pos: n.pos, Text: n.text, Kind: Complex, Z: f.complexImpedance(key, n)}
}

// complexImpedance reads a complex value in ohm of a passive part.
func (f *fields) complexImpedance(key string, n *node) complex128 {
	z, fault := parseComplex(n.text, resistance, f.w.design.Convention)
	switch {
	case fault != nil:
		f.w.fault(n, f.name(key), fault)
	case real(z) < 0:
		f.w.problem(n.pos, say("check the sign; a passive part has R of zero or more"), "%s has a negative resistance: %q", f.name(key), n.text)
	}
	return z
}

// admittance reads a complex value in siemens. None at all is an open circuit.
func (f *fields) admittance(key string) Impedance {
	n := f.scalar(key)
	if n == nil {
		return Impedance{}
	}
	z := Impedance{Pos: n.pos, Text: n.text}
	y, fault := parseComplex(n.text, admittance, f.w.design.Convention)
	switch {
	case fault != nil:
		f.w.fault(n, f.name(key), fault)
	case real(y) < 0:
		f.w.problem(n.pos, say("check the sign; a passive part has G of zero or more"), "%s has a negative conductance: %q", f.name(key), n.text)
	case y == 0:
		z.Kind = Open
	default:
		z.Kind, z.Z = Complex, 1/y
	}
	return z
}
