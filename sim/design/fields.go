package design

import (
	"slices"
	"strings"
)

// fields are the values of one mapping by key.
type fields struct {
	w     *walker
	what  string // how diagnostics call the mapping: section "main"
	pos   Pos
	table *table
	at    map[string]pair
}

// fields reads a mapping whose keys are those of the table. It tells of
// unknown and missing keys and of forms that exclude each other. It returns
// nil, having told so, if n is not a mapping.
func (w *walker) fields(n *node, pos Pos, what string, t *table) *fields {
	if !w.isKind(n, what, mapping) {
		return nil
	}
	f := &fields{w, what, pos, t, make(map[string]pair, len(n.pairs))}
	for _, p := range n.pairs {
		if !t.has(p.key.text) {
			w.problem(p.key.pos, didYouMean(p.key.text, t.names()), "unknown key %q in %s", p.key.text, what)
			continue
		}
		if p.value.kind == null {
			w.problem(p.key.pos, say("give it a value or delete the line"), "%q in %s has no value", p.key.text, what)
		}
		f.at[p.key.text] = p
	}
	for _, k := range t.keys {
		if _, ok := f.at[k.name]; k.required && !ok {
			w.problem(pos, w.missingHint(t, k.name), "missing %q in %s", k.name, what)
		}
	}
	for _, c := range t.choices {
		f.checkChoice(c)
	}
	return f
}

// isKind tells of a node that is not of the kind that is due.
func (w *walker) isKind(n *node, what string, due nodeKind) bool {
	if n.kind == due {
		return true
	}
	w.flawed = true
	if n.kind == null || n.kind == refused {
		return false // told already
	}
	h := say("write it as key: value lines, or in braces, {key: value, ...}")
	switch due {
	case scalar:
		h = say("write a single value here")
	case list:
		h = say("write it in brackets, [a, b], or as lines that begin with a dash")
	}
	w.problem(n.pos, h, "%s must be %s, not %s", what, due, n.kind)
	return false
}

func (f *fields) checkChoice(c choice) {
	var given []string // the first key of each form that is given
	for _, form := range c.forms {
		if first := f.firstOf(form.all()); first != "" {
			given = append(given, first)
			f.checkForm(form, first)
		}
	}
	switch {
	case len(given) == 0 && c.required:
		f.w.problem(f.pos, noHint, "missing %s in %s", c, f.what)
	case len(given) > 1:
		f.w.problem(f.at[given[1]].key.pos, say("they are two ways to say one thing; keep one"),
			"%q cannot be given together with %q in %s", given[1], given[0], f.what)
	}
}

func (f *fields) checkForm(form form, given string) {
	for _, need := range form.need {
		if _, ok := f.at[need]; !ok {
			f.w.problem(f.at[given].key.pos, example(f.table, need), "missing %q in %s, which goes with %q", need, f.what, given)
		}
	}
}

// all are the keys that belong to a form.
func (f form) all() []string { return slices.Concat(f.keys, f.with) }

func (f *fields) firstOf(keys []string) string {
	for _, k := range keys {
		if _, ok := f.at[k]; ok {
			return k
		}
	}
	return ""
}

// String lists what a choice is between: "emf" or "available_power".
func (c choice) String() string {
	var forms []string
	for _, f := range c.forms {
		switch {
		case len(f.need) > 0:
			forms = append(forms, `"`+strings.Join(f.need, `" and "`)+`"`)
		case len(f.keys) > 1:
			forms = append(forms, `at least one of "`+strings.Join(f.keys, `", "`)+`"`)
		default:
			forms = append(forms, `"`+f.keys[0]+`"`)
		}
	}
	return strings.Join(forms, " or ")
}

// missingHint hints at what to do about a missing key. An entry that only a
// case has, and that is not whole, is most likely a misspelled one of the
// nominal design.
func (w *walker) missingHint(t *table, key string) hint {
	if w.base == nil || w.entry == "" {
		return example(t, key)
	}
	known := w.base.file.node(w.siblings)
	if known == nil || known.get(w.entry) != nil {
		return example(t, key)
	}
	return didYouMean(w.entry, known.keys())
}

// example hints at what a missing key looks like.
func example(t *table, key string) hint {
	e := examples[t.def+"."+key]
	if q, of := strings.CutPrefix(t.def, claimPrefix); of && e == "" {
		e = claimable[Quantity(q)].example(key)
	}
	if e == "" {
		return noHint
	}
	return say("for example %s: %s", key, rawText(e))
}

var examples = map[string]string{
	".format": "1", ".record": "{title: Mast feeder, number: RF-12}",
	".source":   "{at: tx, frequency: 1.6 MHz, emf: 300 V peak, impedance: 50 ohm}",
	".lines":    "{coax: {z0: 50 ohm, velocity_factor: 0.66}}",
	".sections": "{main: {from: tx, to: mast, length: 85 m, line: coax}}",

	"record.title": "Mast feeder", "record.number": "RF-12",
	"revision.revision": "A", "revision.text": "First issue",
	"source.at": "tx", "source.frequency": "1.6 MHz", "source.impedance": "50 ohm",
	"start.profile": "abrupt", "stop.at": "15 us",
	"loss.at": "10 MHz", "loss.attenuation": "2.0 dB/100m",
	"section.length": "85 m", "load.at": "mast", "element.ratio": "1:4; other parts between two junctions have between: [a, b]",
	"loss_point.at": "10 MHz", "loss_point.attenuation": "2.0 dB/100m",
	"impedance_point.at": "90 MHz", "impedance_point.impedance": "28 + j10 ohm",
	"coax.inner_diameter": "5.5 mm", "coax.outer_diameter": "16 mm",
	"two_wire.diameter": "2 mm", "two_wire.spacing": "150 mm",
	"wire_over_ground.diameter": "4 mm", "wire_over_ground.height": "3 m",
	"microstrip.width": "3 mm", "microstrip.height": "1.6 mm",
	"stripline.width": "1 mm", "stripline.ground_spacing": "2 mm",
}
