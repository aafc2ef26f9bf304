package design

// A node is a piece of the file as the walker sees it. Unlike the parser's
// nodes it has no tags, anchors or aliases, and no key twice.
type node struct {
	kind  nodeKind
	text  string // of a scalar, unquoted
	plain bool   // a scalar written without quotes
	pos   Pos
	pairs []pair  // of a mapping, in file order
	items []*node // of a list
}

type pair struct{ key, value *node }

type nodeKind int

const (
	scalar nodeKind = iota
	null
	mapping
	list
	refused // an alias; told already, so what it stands for is not missed
)

// String names the kind as diagnostics do.
func (k nodeKind) String() string {
	return [...]string{"a value", "nothing", "a mapping", "a list", "an alias"}[k]
}

// get returns the value of a key, or nil.
func (n *node) get(key string) *node {
	for _, p := range n.pairs {
		if p.key.text == key {
			return p.value
		}
	}
	return nil
}

// keys lists the keys of a mapping.
func (n *node) keys() (keys []string) {
	for _, p := range n.pairs {
		keys = append(keys, p.key.text)
	}
	return keys
}

// end is the place of the last node inside n.
func (n *node) end() Pos {
	switch {
	case len(n.pairs) > 0:
		return n.pairs[len(n.pairs)-1].value.end()
	case len(n.items) > 0:
		return n.items[len(n.items)-1].end()
	default:
		return n.pos
	}
}
