package report

import (
	"math"
	"slices"

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
	d.b.Subheading("Feature selective validation", 90)
	if !c.Settling.Settled {
		d.b.Paragraph("The curves are not compared: the time domain reached no steady state.")
		return
	}
	d.b.Paragraph(fidelityFinding(c.Fidelity))
	if !d.proven(c) && faithful(c.Fidelity) {
		d.leave("the table of the feature selective validation")
		return
	}
	meaning := ""
	if c == d.nominal() {
		meaning = "ADM, FDM, GDM: mean difference of amplitude, of feature and of both together, with its word. Grade, spread: how many of the six grades hold 85" + format.Space + "% of the points, counted from the best one and around the fullest one. For the choices see Method."
	}
	if faithful(c.Fidelity) {
		d.b.Table(fidelityPairs(c.Fidelity))
		d.b.Note(trimmed("All three measures of every curve are excellent, with grade 1 and spread 1. " + meaning + notGraded(c.Fidelity)))
		return
	}
	d.b.Table(fidelityTable(c.Fidelity))
	d.b.Note(meaning)
}

func fidelityTable(fs []record.Fidelity) sheet.Table {
	t := sheet.Table{Size: 6.8, Columns: []sheet.Column{
		{Head: "Curve", Grow: 1}, {Head: "Points", Align: rightAlign},
	}}
	for _, name := range []string{"amplitude, ADM", "feature, FDM", "global, GDM"} {
		t.Columns = append(t.Columns, sheet.Column{Head: capital(name), Align: rightAlign}, sheet.Column{Head: "Word", Grow: 0.2}, sheet.Column{Head: "Grade, spread", Grow: 0.1})
	}
	for i := range fs {
		t.Rows = append(t.Rows, fidelityRow(&fs[i]))
	}
	return t
}

// faithful reports whether every curve that could be graded has the best grade
// and spread in all three measures, so that there is nothing to read but values.
func faithful(fs []record.Fidelity) bool {
	graded := false
	for i := range fs {
		f := &fs[i]
		if f.Note != "" {
			continue
		}
		graded = true
		for _, x := range []record.Difference{f.ADM, f.FDM, f.GDM} {
			if x.Word != "excellent" || x.Grade != 1 || x.Spread != 1 {
				return false
			}
		}
	}
	return graded
}

// fidelityPairs has two curves in a row, with values alone.
func fidelityPairs(fs []record.Fidelity) sheet.Table {
	t := sheet.Table{Size: 6.8}
	var cells [][]sheet.Cell
	for i := range fs {
		if f := &fs[i]; f.Note == "" {
			cells = append(cells, sheet.Row(curveName(f), format.Count(int64(f.Points)), format.Measure(f.ADM.Value), format.Measure(f.FDM.Value), format.Measure(f.GDM.Value)))
		}
	}
	number := func(head string) sheet.Column { return sheet.Column{Head: head, Align: rightAlign, Grow: 0.5} }
	block := []sheet.Column{{Head: "Curve", Grow: 1}, number("Points"), number("ADM"), number("FDM"), number("GDM")}
	t.Columns = append(append(slices.Clone(block), sheet.Column{}), block...) // a column keeps the pair apart
	half := (len(cells) + 1) / 2
	for i := range half {
		row := append(slices.Clone(cells[i]), sheet.Cell{})
		if i+half < len(cells) {
			row = append(row, cells[i+half]...)
		}
		t.Rows = append(t.Rows, row)
	}
	return t
}

// notGraded says which curves have no measures, and why.
func notGraded(fs []record.Fidelity) string {
	var reasons casesOf
	for i := range fs {
		if f := &fs[i]; f.Note != "" {
			reasons.add(f.Note, curveName(f))
		}
	}
	s := ""
	for _, why := range reasons.statements {
		s += " Not graded: " + listed(reasons.cases[why]) + " (" + why + ")."
	}
	return s
}

// curveName names a curve.
func curveName(f *record.Fidelity) string { return f.Subject + ", " + f.Curve }

func fidelityRow(f *record.Fidelity) []sheet.Cell {
	row := []sheet.Cell{{Text: curveName(f)}, {Text: format.Count(int64(f.Points))}}
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
	return s + curveName(&f) + ", " + format.Measure(f.GDM.Value) + ", in words " + orElse(f.GDM.Word, "not graded") + "."
}
