package design

import "strings"

// A walker turns nodes into one Design. It walks the nominal design and then
// every case, merged with it.
type walker struct {
	*problems
	patch *patch  // the case; nil for the nominal design
	base  *walker // the walker of the nominal design; nil in itself

	design *Design
	file   *fields // the whole file as merged
	flawed bool    // a problem was met: what needs a whole design must not be checked
	whole  bool    // the network read well

	sections, loads, elements []item
	lines                     map[string]*Line
	lineNames                 []string
	sourceAt                  Pos
	lengths                   map[string]Value // of the sections
	entry, siblings           string           // the named entry being read, and the key it stands under
}

// An item is a named entry with the nodes that later checks point at.
type item struct {
	name   *node
	fields *fields
}

// problem records a problem at a place of this design. What a case brings
// about is told at its patch: where the patch gives the value itself if the
// place lies there, else where the patch makes its change.
func (w *walker) problem(pos Pos, h hint, format string, args ...any) {
	w.flawed = true
	if w.patch == nil {
		w.problems.problem(pos, h, format, args...)
		return
	}
	tell, message := pos, sprintf(format, args...)
	if !w.patch.covers(pos) {
		tell = w.patch.anchor
	}
	w.problems.add(w.patch.name, pos, tell, h, message)
}

// fault records what is wrong with a scalar.
func (w *walker) fault(n *node, what string, f *fault) {
	w.problem(n.pos, f.hint, "%s: %s", what, rawText(f.message))
}

// rawText marks a text that is not from the file and is not to be shortened.
type rawText string

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
		if first := f.firstOf(form.keys); first != "" {
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
			f.w.problem(f.at[given].key.pos, noHint, "missing %q in %s, which goes with %q", need, f.what, given)
		}
	}
}

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

// node returns the value of a key, or nil if it is not there or has no value.
func (f *fields) node(key string) *node {
	p, ok := f.at[key]
	if !ok || p.value.kind == null || p.value.kind == refused {
		return nil
	}
	return p.value
}

// scalar returns the value of a key if it is a scalar, or nil.
func (f *fields) scalar(key string) *node {
	n := f.node(key)
	if n == nil || !f.w.isKind(n, f.name(key), scalar) {
		return nil
	}
	return n
}

// name is how diagnostics call the value of a key: length of section "main".
func (f *fields) name(key string) string { return key + " of " + f.what }

// text returns the value of a key as text.
func (f *fields) text(key string) string {
	if n := f.scalar(key); n != nil {
		return n.text
	}
	return ""
}

// oneOf returns the value of a key that must be one of some words, or "".
func (f *fields) oneOf(key string, words ...string) string {
	n := f.scalar(key)
	if n == nil {
		return ""
	}
	for _, w := range words {
		if n.text == w {
			return w
		}
	}
	f.w.problem(n.pos, didYouMean(n.text, words), "%s must be %s, not %q", f.name(key), strings.Join(words, " or "), n.text)
	return ""
}

// quantity reads a quantity; ok is false if it is not there or not good.
func (f *fields) quantity(key string, d *dimension) (q quantity, n *node, ok bool) {
	n = f.scalar(key)
	if n == nil {
		return q, nil, false
	}
	q, fault := parseQuantity(n.text, d)
	if fault != nil {
		f.w.fault(n, f.name(key), fault)
		return q, n, false
	}
	return q, n, q.unit.name != "" || f.isPlain(key, n)
}

// isPlain tells of a plain number in quotes, which is a text.
func (f *fields) isPlain(key string, n *node) bool {
	if !n.plain {
		f.w.problem(n.pos, say("take the quotes away"), "%s must be a number, not the text %q", f.name(key), n.text)
	}
	return n.plain
}

// sign is what a value may be.
type sign int

const (
	anySign sign = iota
	notNegative
	positive
)

// value reads a quantity into a Value. It tells of a sign that cannot be.
func (f *fields) value(key string, d *dimension, s sign) (Value, bool) {
	q, n, ok := f.quantity(key, d)
	if !ok || !f.hasSign(key, n, q.value, s) {
		return Value{}, false
	}
	return Value{q.value, n.text, n.pos}, true
}

func (f *fields) hasSign(key string, n *node, v float64, s sign) bool {
	switch {
	case s == notNegative && v < 0:
		f.w.problem(n.pos, say("check the sign"), "%s is negative: %q", f.name(key), n.text)
	case s == positive && v <= 0:
		f.w.problem(n.pos, say("give a value above zero"), "%s must be above zero, not %q", f.name(key), n.text)
	default:
		return true
	}
	return false
}

// number reads a plain number. A quoted number is text.
func (f *fields) number(key string) (v float64, n *node, ok bool) {
	n = f.scalar(key)
	if n == nil {
		return 0, nil, false
	}
	if !f.isPlain(key, n) {
		return 0, n, false
	}
	v, fault := plainNumber(n.text)
	if fault != nil {
		f.w.fault(n, f.name(key), fault)
	}
	return v, n, fault == nil
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
	"source.at": "tx", "source.frequency": "1.6 MHz", "source.impedance": "50 ohm",
	"start.profile": "abrupt", "stop.at": "15 us",
	"loss.at": "10 MHz", "loss.attenuation": "2.0 dB/100m",
	"section.length": "85 m", "load.at": "mast",
}
