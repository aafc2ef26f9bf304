package syntax

import (
	"maps"
	"slices"
)

// A Value is one of Null, Bool, Number, Name, String, Array, Dict, Ref and
// *Stream (7.3).
type Value any

type (
	// Null is the null object.
	Null struct{}
	// Bool is true or false.
	Bool bool
	// Number is an integer or a real number as it is spelled.
	Number string
	// Name is a name without its solidus, decoded.
	Name string
	// String is a string, decoded.
	String string
	// Array is a list of values.
	Array []Value
	// Dict is a dictionary; it is shared when copied, as maps are.
	Dict map[Name]Value
	// Ref is a reference to an indirect object of generation 0.
	Ref int
)

// A Stream is a dictionary and data, as they are stored.
type Stream struct {
	Dict Dict
	Data []byte
}

// Keys returns the keys of d in order.
func (d Dict) Keys() []Name { return slices.Sorted(maps.Keys(d)) }
