package recheck

import (
	"math"
	"slices"
	"strings"

	"linewitness/report/result"
)

// Compare compares the result of a record with that of a new run, both read by
// package result.
func Compare(then, now *result.Node) *Outcome {
	c := &comparison{out: &Outcome{}}
	c.value(&place{table: patterns}, then, now)
	slices.Sort(c.out.Unruled)
	c.out.Unruled = slices.Compact(c.out.Unruled)
	return c.out
}

// A comparison walks through two results side by side.
type comparison struct{ out *Outcome }

func (c *comparison) value(at *place, then, now *result.Node) {
	switch {
	case isNumber(then) && isNumber(now):
		c.count(at, then, now, numbers)
	case then.Kind != now.Kind:
		c.lost(at, then, "it is of another kind")
	case then.Kind == result.Object:
		c.object(at, then, now)
	case then.Kind == result.List:
		c.list(at, then, now)
	default:
		c.count(at, then, now, texts)
	}
}

// named are the keys whose values have names of the design as their keys. A key
// that is missing there is a part of the design; elsewhere it is one of the format,
// which later versions add to.
var named = []string{"cases", "lines", "sections", "loads", "junctions", "elements", "ring_down"}

func (c *comparison) object(at *place, then, now *result.Node) {
	for i, key := range then.Keys {
		inner := at.child(key, then, now)
		if other := now.Get(key); other != nil {
			c.value(inner, then.Nodes[i], other)
			continue
		}
		c.lost(inner, then.Nodes[i], "the new result does not have it")
	}
	names := len(at.path) > 0 && slices.Contains(named, at.path[len(at.path)-1])
	for i, key := range now.Keys {
		if then.Get(key) == nil {
			c.gained(at.child(key, then, now), now.Nodes[i], !names)
		}
	}
}

func (c *comparison) list(at *place, then, now *result.Node) {
	name := entryNames(at, then, now)
	others := map[string]int{}
	for k, n := range now.Nodes {
		others[name(k, n)] = k
	}
	for i, n := range then.Nodes {
		called := name(i, n)
		inner := at.entry(i, called, then, now)
		k, ok := others[called]
		if !ok {
			c.lost(inner, n, "the new result does not have it")
			continue
		}
		delete(others, called)
		c.value(inner, n, now.Nodes[k])
	}
	for k, n := range now.Nodes {
		if called := name(k, n); others[called] == k && has(others, called) {
			c.gained(at.entry(k, called, then, now), n, false)
		}
	}
}

func has(m map[string]int, key string) bool { _, ok := m[key]; return ok }

// count compares one value and books it.
func (c *comparison) count(at *place, then, now *result.Node, compare func(*place, *rule, *result.Node, *result.Node) verdict) {
	r := ruleFor(at.table, at.path)
	v := compare(at, r, then, now)
	d := Difference{Path: at.label, Then: printedValue(then), Now: printedValue(now), Change: v.change, Allowed: v.allowed}
	if r == nil {
		if len(c.out.Unruled) < Most {
			c.out.Unruled = append(c.out.Unruled, strings.Join(at.path, "."))
		}
		d.Why = "no rule for it: compared digit by digit"
	} else {
		d.Why = r.why
	}
	if v.status != Same && r != nil && r.class.said {
		c.say(d)
		return
	}
	c.book(then, v.status)
	if v.status == Different {
		c.differ(d)
	}
	if v.status != Same {
		c.largest(d)
	}
}

// book counts a value, and so both parts of a complex number.
func (c *comparison) book(n *result.Node, s Status) {
	switch {
	case n.IsComplex():
		c.out.Numbers.add(s)
		c.out.Numbers.add(s)
	case isNumber(n):
		c.out.Numbers.add(s)
	default:
		c.out.Texts.add(s)
	}
}

func (c *comparison) largest(d Difference) {
	r := d.Ratio()
	if !math.IsNaN(r) && (c.out.Largest == nil || r > c.out.Largest.Ratio()) {
		c.out.Largest = &d
	}
}

// lost books a value of the record, with all that is in it, that has nothing to
// be compared with.
func (c *comparison) lost(at *place, then *result.Node, why string) {
	c.differ(Difference{
		Path: at.label, Then: printedValue(then), Now: none, Change: math.NaN(), Allowed: math.NaN(), Why: why,
	})
	c.bookAll(then)
}

func (c *comparison) bookAll(n *result.Node) {
	if !isNumber(n) && (n.Kind == result.Object || n.Kind == result.List) {
		if len(n.Nodes) == 0 {
			c.out.Texts.add(Different)
		}
		for _, inner := range n.Nodes {
			c.bookAll(inner)
		}
		return
	}
	c.book(n, Different)
}

// gained books a value that only the new result has. A new key of the format is
// no fault of the record.
func (c *comparison) gained(at *place, now *result.Node, ofFormat bool) {
	d := Difference{
		Path: at.label, Then: none, Now: printedValue(now), Change: math.NaN(), Allowed: math.NaN(),
		Why: "the record does not have it",
	}
	if ofFormat {
		c.say(d)
		return
	}
	c.out.Texts.add(Different)
	c.differ(d)
}

func (c *comparison) differ(d Difference) {
	if len(c.out.Differences) == Most {
		c.out.Further++
		return
	}
	c.out.Differences = append(c.out.Differences, d)
}

func (c *comparison) say(d Difference) {
	if len(c.out.Said) < Most {
		c.out.Said = append(c.out.Said, d)
	}
}
