package report

import (
	"math"

	"linewitness/report/format"
	"linewitness/report/sheet"
	"linewitness/sim/record"
)

// fidelity writes the feature selective validation of a case: every curve of
// the time domain against that of the closed form.
func (d *document) fidelity(c *record.Case) {
	if len(c.Fidelity) == 0 {
		return
	}
	t := sheet.Table{Size: 6.8, Columns: []sheet.Column{
		{Head: "Curve", Grow: 1}, {Head: "Points", Align: rightAlign},
	}}
	for _, name := range []string{"amplitude, ADM", "feature, FDM", "global, GDM"} {
		t.Columns = append(t.Columns, sheet.Column{Head: capital(name), Align: rightAlign}, sheet.Column{Head: "Word", Grow: 0.2}, sheet.Column{Head: "Grade, spread", Grow: 0.1})
	}
	for i := range c.Fidelity {
		t.Rows = append(t.Rows, fidelityRow(&c.Fidelity[i]))
	}
	d.b.Subheading("Feature selective validation", 90)
	d.b.Paragraph(fidelityFinding(c.Fidelity))
	d.b.Table(t)
	d.b.Note("ADM, FDM, GDM: mean difference of amplitude, of feature and of both together, with its word. Grade, spread: how many of the six grades hold 85" + format.Space + "% of the points, counted from the best one and around the fullest one. For the choices see Method.")
}

func fidelityRow(f *record.Fidelity) []sheet.Cell {
	row := []sheet.Cell{{Text: f.Subject + ", " + f.Curve}, {Text: format.Count(int64(f.Points))}}
	if f.Note != "" {
		return append(row, sheet.Cell{Text: format.Missing}, sheet.Cell{Text: f.Note, Span: true})
	}
	for _, x := range []record.Difference{f.ADM, f.FDM, f.GDM} {
		row = append(row, sheet.Cell{Text: format.Measure(x.Value)}, sheet.Cell{Text: x.Word}, sheet.Cell{Text: grades(x)})
	}
	return row
}

func grades(x record.Difference) string {
	if x.Grade == 0 {
		return format.Missing
	}
	return format.Count(int64(x.Grade)) + ", " + format.Count(int64(x.Spread))
}

// fidelityFinding names the curve that differs most.
func fidelityFinding(fs []record.Fidelity) string {
	worst, graded := -1, 0
	for i := range fs {
		if v := fs[i].GDM.Value; !math.IsNaN(v) {
			graded++
			if worst < 0 || v > fs[worst].GDM.Value {
				worst = i
			}
		}
	}
	if worst < 0 {
		return "No curve could be graded."
	}
	f := fs[worst]
	s := "The curves of the time domain, against those of the closed form (IEEE Std 1597.1): "
	if graded == 1 {
		s += "that of "
	} else {
		s += "the largest global difference of " + format.Plural(int64(graded), "curve") + " is that of "
	}
	return s + f.Subject + ", " + f.Curve + ", " + format.Measure(f.GDM.Value) + ", in words " + orElse(f.GDM.Word, "not graded") + "."
}
