package report

import (
	"math"

	"linewitness/report/format"
	"linewitness/report/sheet"
	"linewitness/sim/record"
)

// power writes where the power goes, by both witnesses.
func (d *document) power(c *record.Case) {
	p := c.Power
	if !audited(p.Phasor) && !audited(p.FDTD) {
		return
	}
	d.b.Subheading("Power: where it goes", 110)
	if c == d.nominal() {
		d.b.Note("Every power is Re(V I*)/2 at a place, or a loss worked out from the currents and voltages that cause it. " +
			"None is a difference of forward and reflected waves, which is not the power where the characteristic impedance is complex.")
	}
	d.b.Table(d.balance(c))
	if t := powerTable(c); len(t.Rows) > 0 {
		d.b.Table(t)
	}
	if !d.whole(c) {
		d.leave("the power flow")
		return
	}
	d.powerFlow(c)
}

// audited reports whether a record holds an audit.
func audited(a record.PowerAudit) bool {
	return a.Delivered != 0 || len(a.Sections)+len(a.Elements)+len(a.Loads) > 0
}

// balance is the table of what goes in and what is accounted for.
func (d *document) balance(c *record.Case) sheet.Table {
	near := noise(c)
	t := sheet.Table{Size: 7, Columns: []sheet.Column{
		left("Solution"), right("Available"), right("Delivered"), right("Reflected"), right("Dissipated"), right("In loads"),
		right("Left over"), right("of delivered"), right("Allowed"), left("Balance"), right("Energy stored"), right("Q = ωW/P"),
	}}
	for _, w := range []struct {
		name string
		a    record.PowerAudit
	}{{"Phasor", c.Power.Phasor}, {timeDomain(c), c.Power.FDTD}} {
		if !audited(w.a) {
			continue
		}
		mark, word := sheet.Fails, "not closed"
		if w.a.Closed {
			mark, word = sheet.Holds, "closed"
		}
		if w.name != "Phasor" && !c.Settling.Settled {
			mark, word = sheet.Open, "not judged"
			w.a.Q = math.NaN()
		}
		t.Rows = append(t.Rows, []sheet.Cell{
			{Text: w.name, Bold: true},
			{Text: availablePower(w.a)},
			{Text: format.SI(w.a.Delivered, "W")},
			{Text: format.SI(near.power(w.a.Reflected), "W")},
			{Text: format.SI(near.power(w.a.Dissipated), "W")},
			{Text: format.SI(near.power(w.a.InLoads), "W")},
			{Text: format.SI(near.power(w.a.Balance), "W")},
			{Text: format.Percent(w.a.Relative)},
			{Text: format.Percent(w.a.Allowed)},
			{Text: word, Mark: mark},
			{Text: format.SI(w.a.Stored, "J")},
			{Text: format.Number(w.a.Q)},
		})
	}
	return t
}

// availablePower prints the available power, of which an ideal source has no
// limit.
func availablePower(a record.PowerAudit) string {
	if math.IsInf(a.Available, 1) {
		return "no limit"
	}
	return format.SI(a.Available, "W")
}

// powerTable is the table of sections, elements and loads.
func powerTable(c *record.Case) sheet.Table {
	p, f := c.Power.Phasor, c.Power.FDTD
	whole, of := wholePower(p)
	near := noise(c)
	watts := func(w float64) string { return format.SI(near.power(w), "W") }
	t := sheet.Table{Size: 7, Columns: []sheet.Column{
		left("Section, element or load"), right("Phasor: in"), right("out"), right("taken up"),
		right(timeDomain(c) + ": in"), right("out"), right("taken up"), right("Part of " + of),
	}}
	for i, s := range p.Sections {
		o := sectionPower(f.Sections, i)
		t.Rows = append(t.Rows, []sheet.Cell{
			{Text: s.Name, Bold: true},
			{Text: watts(s.In)},
			{Text: watts(s.Out)},
			{Text: watts(s.Dissipated)},
			{Text: watts(o.In)},
			{Text: watts(o.Out)},
			{Text: watts(o.Dissipated)},
			{Text: format.Percent(near.power(s.Dissipated) / whole)},
		})
	}
	rows := func(kind string, parts, others []record.PartPower) {
		for i, s := range parts {
			o := math.NaN()
			if i < len(others) {
				o = others[i].Power
			}
			t.Rows = append(t.Rows, []sheet.Cell{
				{Text: s.Name + " (" + kind + ")", Bold: true},
				{},
				{},
				{Text: watts(s.Power)},
				{},
				{},
				{Text: watts(o)},
				{Text: format.Percent(near.power(s.Power) / whole)},
			})
		}
	}
	rows("element", p.Elements, f.Elements)
	rows("load", p.Loads, f.Loads)
	return t
}

// sectionPower returns the i-th section, NaN throughout if there is none.
func sectionPower(list []record.SectionPower, i int) record.SectionPower {
	if i < len(list) {
		return list[i]
	}
	nan := math.NaN()
	return record.SectionPower{In: nan, Out: nan, Dissipated: nan, Stored: nan}
}

// wholePower returns what the parts are parts of: the available power, or what
// an ideal source delivers.
func wholePower(a record.PowerAudit) (w float64, name string) {
	if a.Available > 0 && !math.IsInf(a.Available, 0) {
		return a.Available, "available"
	}
	return a.Delivered, "delivered"
}
