package design

import (
	"errors"
	"fmt"

	"linewitness/sim/line"
)

// A shape is a kind of cross-section.
type shape struct {
	name  string // in texts
	table *table
	make  func(d *dimensions) (line.Geometry, error)
	// keys says under which key the field of a GeometryError stands.
	keys map[string]string
}

// shapes are the cross-sections by the key they stand under.
var shapes = map[string]shape{
	"coax": {"coaxial line", coaxTable, func(d *dimensions) (line.Geometry, error) {
		inner := d.metal("conductivity")
		return line.Coax{
			Inner: d.size("inner_diameter") / 2, Outer: d.size("outer_diameter") / 2, Wall: d.size("wall"),
			Permittivity: d.permittivity, LossTangent: d.lossTangent,
			InnerMetal: inner, OuterMetal: d.second("outer_conductivity", inner),
		}.Geometry()
	}, map[string]string{"Inner": "inner_diameter", "Outer": "outer_diameter", "Wall": "wall"}},
	"two_wire": {"two-wire line", twoWireTable, func(d *dimensions) (line.Geometry, error) {
		return line.TwoWire{
			Diameter: d.size("diameter"), Spacing: d.size("spacing"),
			Permittivity: d.permittivity, LossTangent: d.lossTangent, Metal: d.metal("conductivity"),
		}.Geometry()
	}, map[string]string{"Diameter": "diameter", "Spacing": "spacing"}},
	"wire_over_ground": {"wire over ground", wireOverGroundTable, func(d *dimensions) (line.Geometry, error) {
		wire := d.metal("conductivity")
		return line.WireOverGround{
			Radius: d.size("diameter") / 2, Height: d.size("height"),
			Permittivity: d.permittivity, LossTangent: d.lossTangent,
			Metal: wire, Ground: d.second("ground_conductivity", wire),
		}.Geometry()
	}, map[string]string{"Radius": "diameter", "Height": "height"}},
	"microstrip": {"microstrip", microstripTable, func(d *dimensions) (line.Geometry, error) {
		return line.Microstrip{
			Width: d.size("width"), Height: d.size("height"), Thickness: d.size("thickness"),
			Permittivity: d.permittivity, LossTangent: d.lossTangent, Metal: d.metal("conductivity"),
		}.Geometry()
	}, map[string]string{"Width": "width", "Height": "height", "Thickness": "thickness"}},
	"stripline": {"stripline", striplineTable, func(d *dimensions) (line.Geometry, error) {
		return line.Stripline{
			Width: d.size("width"), Spacing: d.size("ground_spacing"), Thickness: d.size("thickness"),
			Permittivity: d.permittivity, LossTangent: d.lossTangent, Metal: d.metal("conductivity"),
		}.Geometry()
	}, map[string]string{"Width": "width", "Spacing": "ground_spacing", "Thickness": "thickness"}},
}

// geometry reads a line that is given by its dimensions.
func (f *fields) geometry(l *Line) (known, bool) {
	d, key := f.dimensions(l)
	if d == nil {
		return known{}, false
	}
	l.Text = shapes[key].name
	d.material()
	g, err := shapes[key].make(d)
	if !d.ok {
		return known{}, false
	}
	if err != nil {
		d.impossible(err, shapes[key].keys)
		return known{}, false
	}
	l.trace("z0", fmt.Sprintf("%.5g ohm", g.Z0), FromGeometry, "worked out, of perfect conductors")
	l.trace("velocity factor", fmt.Sprintf("%.4g", g.VelocityFactor), FromGeometry, "worked out, of perfect conductors")
	if key == "coax" {
		l.FieldPerVolt = g.PeakField
	}
	l.Warnings = append(l.Warnings, g.Warnings...)
	ref, freq := f.w.reference(), f.w.design.Source.Frequency.SI
	if ref == 0 || freq == 0 {
		return known{}, false
	}
	l.Warnings = append(l.Warnings, g.WarningsAt(freq)...)
	return known{g.At(ref), g.Conductor(ref), g.Dielectric(ref)}, true
}

// dimensions finds the shape under geometry. It returns nil if there is none.
func (f *fields) dimensions(l *Line) (*dimensions, string) {
	n := f.node("geometry")
	if n == nil {
		return nil, ""
	}
	in := f.w.fields(n, f.at["geometry"].key.pos, "the geometry of "+f.what, geometryTable)
	if in == nil {
		return nil, ""
	}
	key := in.firstOf(geometryTable.names())
	if in.node(key) == nil {
		return nil, ""
	}
	own := f.w.fields(in.node(key), in.at[key].key.pos, key+" of "+f.what, shapes[key].table)
	if own == nil {
		return nil, ""
	}
	return &dimensions{fields: own, line: l, ok: true}, key
}

// impossible tells of dimensions that make no line, at the one at fault.
func (d *dimensions) impossible(err error, keys map[string]string) {
	pos := d.pos
	var bad *line.GeometryError
	if errors.As(err, &bad) {
		if n := d.node(keys[bad.Field]); n != nil {
			pos = n.pos
		}
	}
	d.w.problem(pos, noHint, "%s makes no line: %s", d.what, rawText(err.Error()))
}
