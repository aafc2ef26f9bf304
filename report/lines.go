package report

import (
	"math"
	"slices"

	"linewitness/report/format"
	"linewitness/report/sheet"
	"linewitness/sim/record"
)

// lineKind is a kind of line, and the cases that have it so in its label.
type lineKind struct {
	record.ModelLine
	label string
}

// lineKinds returns the kinds of line of all cases, each once: those of the
// nominal case under their names, and what a case has otherwise with the name
// of that case. A value that needs confirmation must not hide in a case.
func (d *document) lineKinds() []lineKind {
	var out []lineKind
	for i, c := range d.r.Cases {
		for _, l := range c.Model.Lines {
			if slices.ContainsFunc(out, func(k lineKind) bool { return sameLine(k.ModelLine, l) }) {
				continue
			}
			label := l.Name
			if i > 0 {
				label += " (case " + c.Name + ")"
			}
			out = append(out, lineKind{l, label})
		}
	}
	return out
}

// sameLine compares what was given: a case at another frequency has the same
// line with a residual that differs by rounding.
func sameLine(a, b record.ModelLine) bool {
	return a.Name == b.Name && a.Text == b.Text && a.Model == b.Model &&
		slices.Equal(a.Pedigree, b.Pedigree) && slices.Equal(a.Fit, b.Fit)
}

// dispersive reports whether a line's constants change with frequency.
func dispersive(l record.ModelLine) bool { return l.Model == "dispersive" }

// lines writes the kinds of line: their data, where those come from, and the
// fits of loss tables.
func (d *document) lines() {
	kinds := d.lineKinds()
	if len(kinds) == 0 {
		return
	}
	d.b.Subheading("Kinds of line", 70)
	d.b.Table(kindTable(kinds))
	d.b.Note(kindNote(kinds))
	d.pedigree(kinds)
	for _, k := range kinds {
		d.fit(k)
	}
}

func kindTable(kinds []lineKind) sheet.Table {
	field := slices.ContainsFunc(kinds, func(k lineKind) bool { return k.FieldPerVolt > 0 })
	t := sheet.Table{Columns: []sheet.Column{
		left("Line"),
		{Head: "Data as given", Grow: 4},
		left("Model"),
		right("Residual, series"), right("Residual, shunt"),
	}}
	if field {
		t.Columns = append(t.Columns, right("Field at the inner conductor for 1 V"))
	}
	for _, k := range kinds {
		row := []sheet.Cell{
			{Text: k.label, Bold: true},
			{Text: format.Signed(k.Text)},
			{Text: k.Model},
			{Text: residual(k.SeriesResidual)},
			{Text: residual(k.ShuntResidual)},
		}
		if field {
			row = append(row, sheet.Cell{Text: absent(k.FieldPerVolt, "V/m")})
		}
		t.Rows = append(t.Rows, row)
	}
	return t
}

// residual prints how far a rational form is from its law; a form that is not
// there has none.
func residual(v float64) string {
	if v == 0 {
		v = math.NaN()
	}
	return format.Percent(v)
}

// kindNote says what the columns of the table mean, as far as it has them.
func kindNote(kinds []lineKind) string {
	s := "Constant: R′, L′, G′, C′ of the design frequency hold at every frequency. "
	if slices.ContainsFunc(kinds, func(k lineKind) bool { return dispersive(k.ModelLine) }) {
		s += "Dispersive: loss and delay change with frequency; the closed form uses the exact law, the time domain a rational form of it. " +
			"Residual: how far that form is from the law, relative to it, at worst from a tenth to ten times the design frequency; series for the conductors, shunt for the dielectric."
	}
	return trimmed(s)
}

// fit writes the loss table of a line beside its fit.
func (d *document) fit(k lineKind) {
	if len(k.Fit) == 0 {
		return
	}
	t := sheet.Table{Columns: []sheet.Column{
		right("Frequency"), {Head: "As given", Grow: 2}, right("Given, per 100 m"), right("Fitted, per 100 m"), right("Residual"),
	}}
	for _, p := range k.Fit {
		t.Rows = append(t.Rows, []sheet.Cell{
			{Text: format.SI(p.Frequency, "Hz")},
			{Text: p.Text},
			{Text: lossOf100(p.Given)},
			{Text: lossOf100(p.Fitted)},
			{Text: format.Percent(fitResidual(p))},
		})
	}
	d.b.Subheading("Loss table of "+k.label+" and its fit", 70)
	d.b.Table(t)
	d.b.Note(fitFinding(k.Fit))
}

// lossOf100 prints a loss in dB/m as that of 100 m, the unit of data sheets.
func lossOf100(v float64) string { return format.Digits(100*v, 4) + format.Space + "dB" }

func fitResidual(p record.FitPoint) float64 {
	if p.Given == 0 {
		return math.NaN()
	}
	return p.Fitted/p.Given - 1
}

// fitFinding says how well the fit follows the table.
func fitFinding(points []record.FitPoint) string {
	var residuals []float64
	for _, p := range points {
		residuals = append(residuals, fitResidual(p))
	}
	s := "The fit is a = k" + sub("1") + "√f + k" + sub("2") + "f, conductors and dielectric, neither negative."
	if i := largestAt(residuals); i >= 0 {
		s += " Its largest residual is " + format.Percent(residuals[i]) + ", at " + format.SI(points[i].Frequency, "Hz") + "."
	}
	return s
}
