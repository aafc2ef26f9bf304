package report

import (
	"slices"

	"linewitness/sim/record"
)

// limits writes where the model ends.
func (d *document) limits() {
	d.b.Heading("Limits of validity", 60)
	for _, s := range d.validity() {
		d.b.Item(s)
	}
	d.b.Subheading("What this record does not cover", 60)
	for _, s := range d.uncovered() {
		d.b.Item(s)
	}
}

// validity says where the model of this record ends.
func (d *document) validity() []string {
	m := d.models()
	out := []string{
		"The agreement of the two solutions does not check the input. A wrong length, velocity factor or load gives two solutions that agree on the wrong design. The tables of the design as modelled repeat every value in equivalent forms; compare them with drawings, data sheets and measurements.",
		"The lines are uniform and carry one mode; connectors, bends, supports and changes of cross-section are in the model only where the design file puts a section or an element for them.",
	}
	if len(m.constant) > 0 || len(m.dispersive) == 0 {
		out = append(out, m.say(m.constant, "The constants R′, L′, G′, C′ of a constant line")+" hold at the design frequency. Steady values at that frequency are exact to the agreement; transients contain other frequencies, for which real lines have other losses and delays: their fronts are less steep.")
	}
	if len(m.dispersive) > 0 {
		out = append(out, m.say(m.dispersive, "The two laws of a dispersive line")+" are those of solid smooth conductors much thicker than the skin depth and of one loss tangent; roughness counts as it is at the design frequency. Where the skin depth nears the thickness of a conductor, and far from the frequencies at which the loss was given, a real line differs. From a tenth to ten times the design frequency the time domain follows the laws within the residual in the table of the kinds of line; beyond, less closely.")
	}
	return append(out, "The jump of an abrupt start or stop is given an edge of a few steps of the grid; the peak is that of this edge, and its uncertainty reaches to the peak of the jump itself. A real source rises in a finite time.")
}

// uncovered lists what this record leaves out.
func (d *document) uncovered() []string {
	m := d.models()
	var out []string
	switch {
	case len(m.dispersive) == 0:
		out = append(out, "loss and delay that change with frequency (skin effect, dielectric loss), for every line of this record has the constant model;")
	case len(m.constant) > 0:
		out = append(out, "loss and delay that change with frequency on the lines with the constant model: "+among(m.constant, mostNames)+";")
	}
	if len(m.dispersive) > 0 {
		out = append(out, "on dispersive lines, what the two laws leave out: conductors thinner than a few skin depths, plating and braid, resonances and steps of the dielectric;")
	}
	if d.has(func(p record.ModelPart) bool { return p.Ratio != 0 }) {
		out = append(out, "leakage, magnetising current, loss and saturation of transformers, which are ideal here;")
	}
	return append(out,
		"loads and parts at other frequencies than as the R, L and C that they were realised as: a complex value, a table or a measured file is used at the design frequency alone;",
		"temperature rise, of conductors, dielectrics or parts;",
		"corona, multipactor and flashover: the record gives voltages, and fields where it knows them, not whether a gap withstands them;",
		"loads and parts that are nonlinear or change with time, such as arcs while they burn, plasma, or a protective gap;",
		"coupling between lines, radiation, and currents on the outside of cables;",
		"modes other than the transmission-line mode;",
		"the control loops of a transmitter: level control, fold-back and trip circuits.",
	)
}

// has reports whether any case has a load or an element of a sort.
func (d *document) has(sort func(record.ModelPart) bool) bool {
	return slices.ContainsFunc(d.r.Cases, func(c record.Case) bool {
		return slices.ContainsFunc(c.Model.Loads, sort) || slices.ContainsFunc(c.Model.Elements, sort)
	})
}
