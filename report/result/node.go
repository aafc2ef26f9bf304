package result

import (
	"math"
	"slices"
)

// Kind says what a node is.
type Kind int

// The kinds.
const (
	Null Kind = iota
	Bool
	Number
	Text
	Object
	List
)

// A Node is a value of a document.
type Node struct {
	Kind  Kind
	Text  string // of a text; of any other plain value as it stands in the document
	Value float64
	Keys  []string // of an object, in the order of the document
	Nodes []*Node  // the values of Keys, or the items of a list
}

// Get follows keys into objects. It returns nil where one is not there; nil has
// no keys either.
func (n *Node) Get(keys ...string) *Node {
	for _, key := range keys {
		if n == nil || n.Kind != Object {
			return nil
		}
		i := slices.Index(n.Keys, key)
		if i < 0 {
			return nil
		}
		n = n.Nodes[i]
	}
	return n
}

// Float returns the number at the end of keys, NaN where there is none.
func (n *Node) Float(keys ...string) float64 {
	n = n.Get(keys...)
	if n == nil || n.Kind != Number {
		return math.NaN()
	}
	return n.Value
}

// String returns the text at the end of keys, "" where there is none.
func (n *Node) String(keys ...string) string {
	n = n.Get(keys...)
	if n == nil || n.Kind != Text {
		return ""
	}
	return n.Text
}

// IsComplex reports whether a node is a complex number.
func (n *Node) IsComplex() bool {
	return n != nil && n.Kind == Object && slices.Equal(n.Keys, complexKeys) &&
		n.Nodes[0].Kind == Number && n.Nodes[1].Kind == Number
}

var complexKeys = []string{"re", "im"}

// Complex returns a complex or a plain number, NaN for anything else.
func (n *Node) Complex() complex128 {
	switch {
	case n.IsComplex():
		return complex(n.Nodes[0].Value, n.Nodes[1].Value)
	case n != nil && n.Kind == Number:
		return complex(n.Value, 0)
	}
	return complex(math.NaN(), 0)
}

// Items returns the items of a list, none for anything else.
func (n *Node) Items() []*Node {
	if n == nil || n.Kind != List {
		return nil
	}
	return n.Nodes
}
