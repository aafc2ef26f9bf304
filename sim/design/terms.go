package design

import (
	"math"
	"strings"
)

// A Term is a piece of a design file as it is written: a key with its value, or
// an entry of a list with its id.
type Term struct {
	Key   string
	Text  string // of a value, as written; of a mapping or a list in one line, "{at: tx, c: 120 pF}"
	Terms []Term // of a mapping, or of a list whose entries have ids, in file order
}

// Terms returns a design file as it is written, in its order and without its
// comments. The file itself is a term without a key.
func Terms(f *File) Term {
	p := &problems{}
	root := parse(f.Source, p)
	if root == nil {
		panic("design: Terms of a file that was not loaded")
	}
	return term("", root)
}

func term(key string, n *node) Term {
	t := Term{Key: key, Text: flow(n)}
	switch n.kind {
	case mapping:
		for _, p := range n.pairs {
			t.Terms = append(t.Terms, term(p.key.text, p.value))
		}
	case list:
		t.Terms = entries(n)
	}
	return t
}

// entries are the items of a list by their ids, none if they have no ids.
func entries(n *node) (all []Term) {
	seen := map[string]bool{}
	for _, item := range n.items {
		id := idOf(item)
		if id == "" || seen[id] {
			return nil
		}
		seen[id] = true
		all = append(all, term(id, item))
	}
	return all
}

// idOf is what an entry of a list is known by: requirements and claims have ids,
// the history of the record has revisions.
func idOf(item *node) string {
	for _, key := range []string{"id", "revision"} {
		if n := item.get(key); n != nil {
			return n.text
		}
	}
	return ""
}

// flow is a node in one line.
func flow(n *node) string {
	var parts []string
	switch n.kind {
	case mapping:
		for _, p := range n.pairs {
			parts = append(parts, p.key.text+": "+flow(p.value))
		}
		return "{" + strings.Join(parts, ", ") + "}"
	case list:
		for _, item := range n.items {
			parts = append(parts, flow(item))
		}
		return "[" + strings.Join(parts, ", ") + "]"
	case null:
		return "null"
	}
	return strings.Join(strings.Fields(n.text), " ")
}

// SameValue reports whether two values say the same thing in different words:
// "85 m" and "0.085 km". Each must be a number with a unit, or both without.
func SameValue(a, b string) bool {
	for _, d := range everyDimension {
		x, f := parseQuantity(a, d)
		y, g := parseQuantity(b, d)
		if f == nil && g == nil && x.unit.of == y.unit.of && sameSize(x.value, y.value) {
			return true
		}
	}
	return false
}

// everyDimension are the dimensions whose units no other one has.
var everyDimension = []*dimension{
	frequency, length, timeSpan, voltage, current, power, resistance, inductance, capacity, admittance, angle,
	seriesR, seriesL, shuntG, shuntC, slowing, fading, size, conductivity, percentage, vswrRatio, level,
}

// sameSize reports whether two values differ by no more than the rounding of
// their change of unit.
func sameSize(a, b float64) bool {
	const rounding = 1e-12
	return math.Abs(a-b) <= rounding*math.Max(math.Abs(a), math.Abs(b))
}
