package report

import (
	"math"
	"slices"

	"gonum.org/v1/plot/vg/draw"
	"linewitness/report/drawing"
	"linewitness/report/format"
	"linewitness/report/sheet"
	"linewitness/report/typeset"
	"linewitness/sim/record"
)

// design writes the network of the nominal case as it was modelled.
func (d *document) design() {
	c := d.nominal()
	if c == nil {
		return
	}
	d.b.Need(d.b.Body() * caseRoom)
	d.b.Space(22)
	d.b.Heading("The design as modelled", 120)
	d.network(c.Model)
	d.lengths(c.Model)
	d.constants(c.Model)
	d.lines()
	d.parts("Loads", c.Model.Loads)
	d.parts("Elements", c.Model.Elements)
	d.source(c.Model)
	d.conventions()
}

// network draws the network, band under band.
func (d *document) network(m record.Model) {
	first := d.b.Room() - 24 // the caption stays on the page of the last band
	l := drawing.Lay(m, int(min(first, d.b.Body()-24)/drawing.RowHeight))
	for _, band := range l.Bands {
		d.b.Block(float64(band.Rows)*drawing.RowHeight, func(c draw.Canvas) { l.Draw(c, band) })
		d.b.Space(3)
	}
	d.b.Space(2)
	d.b.Caption(d.figure(), networkFinding(m))
	d.noteNetwork(m)
}

// networkFinding says what the drawing shows, from the model.
func networkFinding(m record.Model) string {
	var length, longest float64
	name := ""
	for _, s := range m.Sections {
		length += s.Length
		if s.Wavelengths > longest {
			longest, name = s.Wavelengths, s.Name
		}
	}
	s := "The network at " + format.SI(m.Frequency, "Hz") + ": " +
		format.Plural(int64(len(m.Sections)), "section") + " of " + format.SI(length, "m") + " in all, " +
		format.Plural(int64(len(m.Junctions)), "junction") + ", " + format.Plural(int64(len(m.Loads)), "load") + "."
	if name != "" {
		s += " The longest section is " + name + ", " + format.Wavelengths(longest) + "."
	}
	if slices.ContainsFunc(m.Elements, func(p record.ModelPart) bool { return p.Ratio != 0 }) {
		s += " The ratio of a transformer is that of its turns, read from left to right."
	}
	return s + " " + drawing.ScaleNote + " Loads end on the return conductor."
}

func right(head string) sheet.Column { return sheet.Column{Head: head, Align: typeset.Right, Grow: 1} }
func left(head string) sheet.Column  { return sheet.Column{Head: head, Grow: 1} }

// lengths writes the table of the sections' lengths in equivalent forms.
func (d *document) lengths(m record.Model) {
	t := sheet.Table{Columns: []sheet.Column{
		left("Section"), left("From, to"), left("Line"), right("As given"), right("Length"), right("Length"),
		right("Wavelengths"), right("Electrical"), right("Delay"), right("Loss, one way"),
	}}
	for _, s := range m.Sections {
		t.Rows = append(t.Rows, []sheet.Cell{
			{Text: s.Name, Bold: true},
			{Text: s.From + ", " + s.To},
			{Text: s.Line},
			{Text: s.Given},
			{Text: format.SI(s.Length, "m")},
			{Text: format.Feet(s.Length)},
			{Text: format.Wavelengths(s.Wavelengths)},
			{Text: format.Electrical(s.Degrees)},
			{Text: format.SI(s.Delay, "s")},
			{Text: format.DB(s.LossDB)},
		})
	}
	d.b.Subheading("Sections: lengths", d.b.Kept(t))
	d.b.Table(t)
}

// constants writes the table of the lines' constants.
func (d *document) constants(m record.Model) {
	t := sheet.Table{Columns: []sheet.Column{
		left("Section"), right(z0), right("Velocity over c"), right("R′"), right("L′"), right("G′"), right("C′"),
	}}
	for _, s := range m.Sections {
		t.Rows = append(t.Rows, []sheet.Cell{
			{Text: s.Name, Bold: true},
			{Text: format.Complex(s.Z0, "Ω")},
			{Text: format.Number(s.VelocityFactor)},
			{Text: format.SI(s.R, "Ω/m")},
			{Text: format.SI(s.L, "H/m")},
			{Text: format.SI(s.G, "S/m")},
			{Text: format.SI(s.C, "F/m")},
		})
	}
	d.b.Subheading("Sections: constants at the design frequency", d.b.Kept(t))
	d.b.Table(t)
}

// parts writes the loads or the elements.
func (d *document) parts(title string, parts []record.ModelPart) {
	if len(parts) == 0 {
		return
	}
	t := sheet.Table{Columns: []sheet.Column{
		left("Name"), left("At"), left("As given"), left("Realised as"),
		right("R"), right("L"), right("C"), right("Impedance"),
	}}
	for _, p := range parts {
		at := p.At
		if p.To != "" {
			at += ", " + p.To
		}
		t.Rows = append(t.Rows, []sheet.Cell{
			{Text: p.Name, Bold: true},
			{Text: at},
			{Text: format.Signed(p.Given)},
			{Text: realised(p)},
			{Text: absent(p.R, "Ω")},
			{Text: absent(p.L, "H")},
			{Text: absent(p.C, "F")},
			{Text: impedance(p)},
		})
	}
	d.b.Subheading(title, d.b.Kept(t))
	d.b.Table(t)
}

// absent prints a part that is not there as a dash.
func absent(v float64, unit string) string {
	if v == 0 {
		v = math.NaN()
	}
	return format.SI(v, unit)
}

// realised says what a part was realised as, and of a transformer what it does
// in the order of its junctions.
func realised(p record.ModelPart) string {
	if p.Ratio == 0 {
		return p.As
	}
	return p.As + ": voltage at " + p.To + " is " + format.Number(p.Ratio) + " times that at " + p.At
}

func impedance(p record.ModelPart) string {
	switch {
	case p.Open:
		return format.Infinite
	case p.Short:
		return "0" + format.Space + "Ω"
	case p.Ratio != 0:
		return format.Missing
	}
	return format.Complex(p.Impedance, "Ω")
}

// source writes the source.
func (d *document) source(m record.Model) {
	s := m.Source
	d.b.Subheading("Source", 50)
	d.b.Fields([]sheet.Field{
		{Label: "At junction", Value: s.At},
		{Label: "Frequency", Value: format.SI(m.Frequency, "Hz")},
		{Label: "As given", Value: format.Signed(s.Given)},
		{Label: "EMF", Value: format.SI(s.EMF, "V") + " peak, " + format.SI(s.EMF/math.Sqrt2, "V") + " rms"},
		{Label: "Impedance", Value: format.Complex(s.Impedance, "Ω")},
		{Label: "Available power", Value: available(s.Available)},
		{Label: "Start", Value: format.Signed(s.Start)},
		{Label: "Stop", Value: orElse(s.Stop, "stays on")},
	})
}

// available prints the available power; an ideal source has no such limit.
func available(w float64) string {
	if w == 0 || math.IsInf(w, 0) {
		return "no limit (ideal source)"
	}
	return format.SI(w, "W")
}

// z0 is the sign of a characteristic impedance.
var z0 = "Z" + sub("0")

// sup and sub mark up superscripts and subscripts.
func sup(s string) string { return string(format.Sup) + s + string(format.End) }
func sub(s string) string { return string(format.Sub) + s + string(format.End) }
