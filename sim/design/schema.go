package design

import (
	_ "embed"
	"slices"
)

//go:embed schema.json
var schema []byte

// Schema is the JSON Schema (draft 2020-12) of the design file, for editors.
// It knows keys, kinds of value and units; what needs the whole design, such
// as a name that nothing has, is known to Load only.
func Schema() []byte { return slices.Clone(schema) }
