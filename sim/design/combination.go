package design

import (
	"slices"
	"strings"
)

// How far a combination of parts may go. Each leaf is an unknown of both
// solvers, and nobody can check a drawing with more.
const deepestCombination, mostLeaves = 8, 64

// A combiner reads the combination of one part.
type combiner struct {
	*walker
	what   string // the part, for diagnostics
	leaves int
}

// combination reads what stands under series or parallel.
func (f *fields) combination(key string) Impedance {
	n := f.node(key)
	if n == nil {
		return Impedance{}
	}
	c := &combiner{f.w, f.what, 0}
	tree, text := c.members(f.at[key], 1)
	z := Impedance{Pos: n.pos, Text: text, Kind: Combination, Tree: tree}
	if tree.leaf() {
		z = Impedance{Pos: n.pos, Text: text, Kind: SeriesParts, R: tree.R, L: tree.L, C: tree.C}
	}
	return z
}

// members reads a list of members, or r, l and c as the short form of one.
func (c *combiner) members(p pair, depth int) (Node, string) {
	key, n := p.key.text, p.value
	what := key + " of " + c.what
	if depth > deepestCombination {
		c.problem(p.key.pos, say("work some of it out by hand"), "%s nests combinations more than %d levels deep", c.what, deepestCombination)
		return Node{}, ""
	}
	if n.kind == mapping {
		return c.short(c.fields(n, p.key.pos, what, lumpedTable), key)
	}
	if !c.isKind(n, what, list) {
		return Node{}, ""
	}
	if len(n.items) == 0 {
		c.problem(n.pos, say("list parts: [{r: 300 ohm}, {l: 2 uH, q: 150}]"), "%s is an empty list", what)
		return Node{}, ""
	}
	var nodes []Node
	var texts []string
	for _, item := range n.items {
		node, text := c.member(item, depth)
		nodes, texts = append(nodes, node), append(texts, text)
	}
	return combined(key, nodes, texts)
}

// member reads one entry of a list.
func (c *combiner) member(n *node, depth int) (Node, string) {
	f := c.fields(n, n.pos, "a member of "+c.what, memberTable)
	switch {
	case f == nil:
		return Node{}, ""
	case f.has("series"):
		return bracketed(c.members(f.at["series"], depth+1))
	case f.has("parallel"):
		return bracketed(c.members(f.at["parallel"], depth+1))
	default:
		return c.series(f)
	}
}

// bracketed puts the text of a combination in brackets.
func bracketed(n Node, text string) (Node, string) {
	if n.leaf() {
		return n, text
	}
	return n, "(" + text + ")"
}

// series is a leaf.
func (c *combiner) series(f *fields) (Node, string) {
	x := f.lumps()
	z := f.inSeries(x)
	leaf := Node{R: z.R, L: z.L, C: z.C}
	c.count(f, leaf, x.ok)
	return leaf, z.Text
}

// short reads the short form, {r: .., l: .., c: ..}.
func (c *combiner) short(f *fields, key string) (Node, string) {
	if f == nil {
		return Node{}, ""
	}
	if key == "series" {
		return c.series(f)
	}
	x := f.lumps()
	var nodes []Node
	var texts []string
	for _, m := range []struct {
		of   Value
		leaf Node
		loss string
	}{
		{x.r, Node{R: x.r.SI}, ""},
		{x.l, Node{R: x.loss, L: x.l.SI}, x.lossText},
		{x.c, Node{R: x.loss, C: x.c.SI}, x.lossText},
	} {
		if m.of.Text != "" {
			c.count(f, m.leaf, x.ok)
			nodes, texts = append(nodes, m.leaf), append(texts, m.of.Text+m.loss)
		}
	}
	if len(nodes) == 0 {
		return Node{}, "" // told already
	}
	return combined(key, nodes, texts)
}

// count counts a leaf and refuses one that is a piece of wire: of two in
// parallel nobody could say how the current divides.
func (c *combiner) count(f *fields, leaf Node, ok bool) {
	c.leaves++
	switch {
	case c.leaves == mostLeaves+1:
		c.problem(f.pos, say("work some of it out by hand"), "%s combines more than %d parts", c.what, mostLeaves)
	case ok && leaf.R == 0 && leaf.L == 0 && leaf.C == 0:
		c.problem(f.pos, say("delete it; a short circuit is impedance: short"), "%s has no impedance", f.what)
	}
}

// combined makes a node of its members. One alone is not a combination.
func combined(key string, nodes []Node, texts []string) (Node, string) {
	switch {
	case len(nodes) == 1:
		return nodes[0], texts[0]
	case key == "series":
		return Node{Series: nodes}, strings.Join(texts, ", ")
	default:
		return Node{Parallel: nodes}, strings.Join(texts, " || ")
	}
}

// leaf reports a node that is not divided further.
func (n Node) leaf() bool { return n.Series == nil && n.Parallel == nil }

// resistive reports whether any part of a node takes energy away.
func (n Node) resistive() bool {
	resistive := func(m Node) bool { return m.resistive() }
	return n.R > 0 || slices.ContainsFunc(n.Series, resistive) || slices.ContainsFunc(n.Parallel, resistive)
}
