package design

import (
	_ "embed"
	"slices"
)

//go:embed starter.yaml
var starter []byte

// Starter is a commented design file to begin from. It loads as it is.
func Starter() []byte { return slices.Clone(starter) }
