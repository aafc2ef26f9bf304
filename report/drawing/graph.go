package drawing

import (
	"slices"

	"linewitness/sim/record"
)

// edge is a section or an element between two junctions.
type edge struct {
	a, b    string
	section *record.ModelSection
	part    *record.ModelPart
}

// far returns the end of e that is not from.
func (e *edge) far(from string) string {
	if e.a == from {
		return e.b
	}
	return e.a
}

// vertex is a junction in the depth-first tree.
type vertex struct {
	name  string
	items []item // what branches off, in the order of the rows
	depth int    // longest way down, in columns
	open  bool   // nothing but one edge ends here
}

// item is what branches off a junction: a subtree, an edge that closes a loop
// with a junction below, or a part to the return conductor.
type item struct {
	via   *edge
	child *vertex           // the subtree at the far end of via
	close string            // or the junction where via closes a loop
	part  *record.ModelPart // or the part
}

// forest returns the depth-first trees of the network: that of the source
// first, then any that is not tied to it.
func forest(m record.Model) []*vertex {
	b := builder{source: m.Source.At, at: map[string][]*edge{}, parts: map[string][]*record.ModelPart{}, seen: map[string]*vertex{}, used: map[*edge]bool{}}
	b.collect(m)
	roots := []*vertex{b.visit(m.Source.At)}
	for _, j := range m.Junctions {
		if b.seen[j] == nil {
			roots = append(roots, b.visit(j))
		}
	}
	for _, v := range b.seen {
		v.arrange()
	}
	return roots
}

// builder holds what the search has found so far.
type builder struct {
	source string
	at     map[string][]*edge
	parts  map[string][]*record.ModelPart
	seen   map[string]*vertex
	used   map[*edge]bool
}

func (b *builder) collect(m record.Model) {
	add := func(e *edge) {
		b.at[e.a] = append(b.at[e.a], e)
		if e.a != e.b {
			b.at[e.b] = append(b.at[e.b], e)
		}
	}
	for i := range m.Sections {
		s := &m.Sections[i]
		add(&edge{a: s.From, b: s.To, section: s})
	}
	for _, list := range [][]record.ModelPart{m.Loads, m.Elements} {
		for i := range list {
			p := &list[i]
			if p.To != "" {
				add(&edge{a: p.At, b: p.To, part: p})
			} else {
				b.parts[p.At] = append(b.parts[p.At], p)
			}
		}
	}
}

// visit searches depth first, so that every edge that is not in the tree
// closes a loop between a junction and one above it.
func (b *builder) visit(name string) *vertex {
	v := &vertex{name: name, open: name != b.source && len(b.at[name])+len(b.parts[name]) == 1}
	b.seen[name] = v
	for _, e := range b.at[name] {
		if b.used[e] {
			continue
		}
		b.used[e] = true
		far := e.far(name)
		if above := b.seen[far]; above != nil {
			above.items = append(above.items, item{via: e, close: name})
			continue
		}
		child := b.visit(far)
		v.items = append(v.items, item{via: e, child: child})
		v.depth = max(v.depth, child.depth+1)
	}
	for _, p := range b.parts[name] {
		v.items = append(v.items, item{part: p})
		v.depth = max(v.depth, 1)
	}
	return v
}

// arrange puts the deepest subtree first, then the others, the parts, and
// last the edges that close a loop: their way up is free then.
func (v *vertex) arrange() {
	rank := func(it item) int {
		switch {
		case it.child != nil:
			return -it.child.depth
		case it.part != nil:
			return 1
		}
		return 2
	}
	slices.SortStableFunc(v.items, func(a, b item) int { return rank(a) - rank(b) })
}
