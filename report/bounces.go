package report

import (
	"linewitness/report/format"
	"linewitness/report/sheet"
	"linewitness/sim/record"
)

// arrivalRows is how many arrivals the bounce table shows at most.
const arrivalRows = 24

// bounces writes what each junction of a chain does to a wave front, and the
// first arrivals of fronts.
func (d *document) bounces(c *record.Case) {
	b := c.Bounces
	if len(b.Arrivals) == 0 {
		return
	}
	d.b.Subheading("Bounce table", 120)
	d.b.Table(bounceCoefficients(b))
	d.b.Table(bounceArrivals(b))
	note := "For an EMF that steps from nothing to one: what each front adds to the voltage of the junction at which it arrives, in per cent of the EMF, and the voltage there after it."
	if n := len(b.Arrivals) - arrivalRows; n > 0 {
		note += " " + format.Plural(int64(n), "later arrival") + " not listed."
	}
	if b.Note != "" {
		note += " " + capital(b.Note) + "."
	}
	d.b.Note(note)
}

// bounceCoefficients has a row for each junction and the section beyond it.
func bounceCoefficients(b record.Bounces) sheet.Table {
	t := sheet.Table{Columns: []sheet.Column{
		left("Junction"), right("Reflects from the source's side"), right("passes on"), right("reflects from the other side"), right("passes back"),
		left("Section beyond"), right(z0), right("Delay, one way"), right("Left at its end"),
	}}
	for i, q := range b.Coefficients {
		row := []sheet.Cell{
			{Text: q.Junction, Bold: true},
			{Text: format.Number(q.FromLeft)},
			{Text: format.Number(q.ThroughRight)},
			{Text: format.Number(q.FromRight)},
			{Text: format.Number(q.ThroughLeft)},
		}
		if i < len(b.Sections) {
			s := b.Sections[i]
			row = append(row, sheet.Row(s.Section, format.SI(s.Z0, "Ω"), format.SI(s.Delay, "s"), format.Percent(s.Kept))...)
		} else {
			row = append(row, sheet.Row(format.Missing, format.Missing, format.Missing, format.Missing)...)
		}
		t.Rows = append(t.Rows, row)
	}
	return t
}

// bounceArrivals lists the arrivals in the order of time, down the left half of
// the table and then down the right one.
func bounceArrivals(b record.Bounces) sheet.Table {
	half := []sheet.Column{left("Arrival"), left("Junction"), left("Along"), right("Adds"), right("Voltage after")}
	t := sheet.Table{Columns: append(append([]sheet.Column{}, half...), half...)}
	n := min(len(b.Arrivals), arrivalRows)
	rows := (n + 1) / 2
	cells := func(i int) []sheet.Cell {
		if i >= n {
			return sheet.Row("", "", "", "", "")
		}
		a := b.Arrivals[i]
		return sheet.Row(format.SI(a.Time, "s"), a.Junction, orElse(a.Section, "source"), format.Percent(a.Step), format.Percent(a.Voltage))
	}
	for i := range rows {
		t.Rows = append(t.Rows, append(cells(i), cells(i+rows)...))
	}
	return t
}
