package recheck

import (
	"math"
	"slices"
	"strings"

	"linewitness/report/result"
)

// item stands in a path for any item of a list.
const item = "[]"

// A place is where a value stands in both results.
type place struct {
	path  []string // keys, and item for an item of a list
	label string   // the path as it is printed
	index int      // of the innermost item of a list
	// What holds the value, outermost first: the document itself is at 0.
	then, now []*result.Node
	table     []pattern // of the rules, for those that look at their neighbours
}

// child is the place of a value inside an object.
func (at *place) child(key string, then, now *result.Node) *place {
	return at.inside(key, strings.TrimPrefix(at.label+"."+key, "."), at.index, then, now)
}

// entry is the place of item i of a list; name is what it is called.
func (at *place) entry(i int, name string, then, now *result.Node) *place {
	return at.inside(item, at.label+"["+name+"]", i, then, now)
}

func (at *place) inside(key, label string, index int, then, now *result.Node) *place {
	return &place{
		path: append(slices.Clip(at.path), key), label: label, index: index, table: at.table,
		then: append(slices.Clip(at.then), then), now: append(slices.Clip(at.now), now),
	}
}

// beside is the number at a path from what holds the value, in the new result if
// it is there: "uncertainty", "../points", "../stress/duration_s".
func (at *place) beside(path string) float64 {
	if v := follow(at.now, path).Float(); !math.IsNaN(v) {
		return v
	}
	return follow(at.then, path).Float()
}

// besideText is the text at such a path.
func (at *place) besideText(path string) string { return follow(at.now, path).String() }

// follow is what stands at a path from the innermost holder; ".." leads to the
// one around it.
func follow(holders []*result.Node, path string) *result.Node {
	last := len(holders) - 1
	keys := strings.Split(path, "/")
	for len(keys) > 0 && keys[0] == ".." {
		keys = keys[1:]
		last--
	}
	if last < 0 {
		return nil
	}
	return holders[last].Get(keys...)
}

// inCase is the case of the new result that the value is in, nil outside.
func (at *place) inCase() *result.Node {
	if len(at.now) < 3 || at.path[0] != "cases" {
		return nil
	}
	return at.now[2]
}

// key is the key after a named one in the path: the name of the section after
// "sections". It is empty if the path has no such key.
func (at *place) key(after string) string {
	i := slices.Index(at.path, after)
	if i < 0 || i+1 >= len(at.path) {
		return ""
	}
	return at.path[i+1]
}

// section is the name of the section that the value is about, or "".
func (at *place) section() string {
	if s := at.key("sections"); s != "" && s != item {
		return s
	}
	return at.besideText("section")
}

// period is one period of the source, s.
func (at *place) period() float64 { return 1 / at.inCase().Float("frequency_hz") }
