package design

import "slices"

// The mappings of lines and sections.
var (
	lineTable = &table{
		def: "line",
		keys: may("z0", "velocity_factor", "permittivity", "delay", "capacitance", "loss",
			"r", "l", "g", "c", "cable", "geometry", "model", "rating"),
		choices: []choice{lineChoice, velocityChoice},
	}
	lineChoice = choice{required: true, forms: []form{
		{keys: []string{"z0", "velocity_factor", "permittivity", "delay", "capacitance", "loss"}, need: []string{"z0"}},
		{keys: []string{"r", "l", "g", "c"}, need: []string{"l", "c"}},
		{keys: []string{"cable"}},
		{keys: []string{"geometry"}},
	}}
	// The capacitance is not among them: beside another it is a check.
	velocityChoice = choice{forms: []form{
		{keys: []string{"velocity_factor"}}, {keys: []string{"permittivity"}}, {keys: []string{"delay"}},
	}}

	lossTable      = &table{def: "loss", keys: append(must("at", "attenuation"), may("dielectric_share")...)}
	lossPointTable = &table{def: "loss_point", keys: must("at", "attenuation")}
	ratingTable    = &table{
		def: "rating", keys: may("voltage", "current", "margin"),
		choices: []choice{{required: true, forms: []form{{keys: []string{"voltage", "current", "margin"}}}}},
	}
	sectionTable = &table{def: "section", keys: append(must("from", "to", "length", "line"), may("rating")...)}
)

// The mappings of the dimensions of a line.
var (
	geometryTable = &table{
		def: "geometry", keys: may("coax", "two_wire", "wire_over_ground", "microstrip", "stripline"),
		choices: []choice{{required: true, forms: []form{
			{keys: []string{"coax"}},
			{keys: []string{"two_wire"}},
			{keys: []string{"wire_over_ground"}},
			{keys: []string{"microstrip"}},
			{keys: []string{"stripline"}},
		}}},
	}
	coaxTable           = shapeOf("coax", must("inner_diameter", "outer_diameter"), "wall", "outer_conductivity")
	twoWireTable        = shapeOf("two_wire", must("diameter", "spacing"))
	wireOverGroundTable = shapeOf("wire_over_ground", must("diameter", "height"), "ground_conductivity")
	microstripTable     = shapeOf("microstrip", must("width", "height"), "thickness")
	striplineTable      = shapeOf("stripline", must("width", "ground_spacing"), "thickness")
)

// shapeOf makes the table of a shape from its dimensions and what it has
// beside the material that all have.
func shapeOf(def string, dimensions []key, more ...string) *table {
	material := may("permittivity", "loss_tangent", "conductivity")
	return &table{def: def, keys: slices.Concat(dimensions, material, may(more...), may("roughness"))}
}
