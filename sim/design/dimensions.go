package design

import (
	"fmt"
	"slices"
	"strings"

	"linewitness/sim/line"
)

// dimensions are what stands under the key of a cross-section. What is read
// goes into the text and the pedigree of the line.
type dimensions struct {
	*fields
	line                      *Line
	ok                        bool // nothing has been refused, nothing is missing
	permittivity, lossTangent float64
	roughness                 float64 // m
}

// material reads what all cross-sections have.
func (d *dimensions) material() {
	d.permittivity = d.factor("permittivity", 1, "air or vacuum")
	d.lossTangent = d.factor("loss_tangent", 0, "a dielectric without loss")
	if d.permittivity < 1 {
		d.refuse("permittivity", "it is relative to vacuum, such as 2.25", "must be at least 1")
	}
	if d.lossTangent < 0 || d.lossTangent >= 1 {
		d.refuse("loss_tangent", "it is the tangent itself, such as 0.0004", "must be from 0 to below 1")
	}
	if d.has("roughness") {
		d.roughness = d.size("roughness")
	} else {
		d.line.assumed("roughness", "0", "smooth conductors")
	}
}

func (d *dimensions) refuse(key, hint, must string) {
	d.ok = false
	d.w.problem(d.node(key).pos, say("%s", hint), "%s %s, not %q", d.name(key), rawText(must), d.node(key).text)
}

// size reads a dimension in m. It is 0 if it may be left away and is.
func (d *dimensions) size(key string) float64 {
	v, ok := d.value(key, size, positive)
	switch {
	case ok:
		d.tell(key, v.Text)
	case d.has(key) || d.table.requires(key):
		d.ok = false
	}
	return v.SI
}

// factor reads a plain number.
func (d *dimensions) factor(key string, without float64, note string) float64 {
	if !d.has(key) {
		d.line.assumed(words(key), fmt.Sprintf("%g", without), note)
		return without
	}
	q, n, ok := d.quantity(key, plain)
	if !ok {
		d.ok = false
		return without
	}
	d.tell(key, n.text)
	return q.value
}

// metal reads a conductivity, or the name of a metal. Without it the conductor
// is copper.
func (d *dimensions) metal(key string) line.Conductor {
	if !d.has(key) {
		copper, _ := line.Metal("copper")
		d.line.assumed(words(key), "copper", fmt.Sprintf("%g MS/m", copper/1e6))
		return line.Conductor{Conductivity: copper, Roughness: d.roughness}
	}
	n := d.scalar(key)
	if n == nil {
		d.ok = false
		return line.Conductor{}
	}
	sigma, named := line.Metal(n.text)
	if named {
		d.tell(key, fmt.Sprintf("%s, %g MS/m", n.text, sigma/1e6))
	} else if isLetter((n.text + " ")[0]) {
		d.ok = false
		d.w.problem(n.pos, didYouMean(n.text, line.MetalNames()), "%s: %q is not a metal with a known conductivity", d.name(key), n.text)
	} else if v, ok := d.value(key, conductivity, positive); ok {
		sigma = v.SI
		d.tell(key, v.Text)
	} else {
		d.ok = false
	}
	return line.Conductor{Conductivity: sigma, Roughness: d.roughness}
}

// second is metal for a conductor that is like the first unless it says so.
func (d *dimensions) second(key string, first line.Conductor) line.Conductor {
	if d.has(key) {
		return d.metal(key)
	}
	d.line.assumed(words(key), "the same", "as the other conductor")
	return first
}

// tell adds a value to the text and the pedigree of the line.
func (d *dimensions) tell(key, text string) {
	d.line.Text += ", " + words(key) + " " + text
	d.line.trace(words(key), text, FromGeometry, "")
}

// words is a key as it is said.
func words(key string) string { return strings.ReplaceAll(key, "_", " ") }

// requires reports whether a key must be given.
func (t *table) requires(name string) bool {
	return slices.ContainsFunc(t.keys, func(k key) bool { return k.name == name && k.required })
}
