package design

import "strings"

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

// has reports whether a key is given.
func (f *fields) has(key string) bool { _, ok := f.at[key]; return ok }

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

// rows reads a list of mappings of one kind; ok is false if one does not read.
func (f *fields) rows(key string, n *node, t *table, most int) (rows []*fields, ok bool) {
	if !f.w.isKind(n, f.name(key), list) {
		return nil, false
	}
	switch {
	case len(n.items) == 0:
		f.w.problem(n.pos, noHint, "%s has no rows", f.name(key))
		return nil, false
	case len(n.items) > most:
		f.w.problem(n.items[most].pos, say("thin it out"), "%s has more than %d rows", f.name(key), most)
		return nil, false
	}
	ok = true
	for _, item := range n.items {
		row := f.w.fields(item, item.pos, "a row of "+f.name(key), t)
		if row == nil {
			ok = false
			continue
		}
		rows = append(rows, row)
	}
	return rows, ok
}
