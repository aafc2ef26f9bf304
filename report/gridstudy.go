package report

import (
	"math"

	"linewitness/report/format"
	"linewitness/report/sheet"
	"linewitness/sim/record"
)

// gridStudy writes what the grids make of every figure, and the comparison of
// each with the closed form.
func (d *document) gridStudy(c *record.Case) {
	v := c.Convergence.Distinct()
	if len(v.Studies) == 0 && v.Skipped == "" {
		return
	}
	shown := v
	if !d.proven(c) {
		shown = doubtful(v)
	}
	keep := 110.0
	if len(shown.Studies) == 0 {
		keep = 40
	}
	d.b.Subheading("Grid convergence and validation", keep)
	d.b.Paragraph(gridFinding(v))
	if len(v.Studies) == 0 {
		return
	}
	if len(shown.Studies) < len(v.Studies) {
		d.leave("the tables of grid convergence and validation" + butFor(len(shown.Studies)))
	}
	if v.Skipped == "" && len(shown.Studies) > 0 {
		d.b.Table(gridTable(shown))
		d.b.Note(gridNote(v, c == d.nominal()))
	}
	if !c.Settling.Settled {
		d.b.Paragraph("The errors against the closed form are not judged: the time domain reached no steady state that could be compared.")
		return
	}
	d.b.Paragraph(validationFinding(v))
	if t := validationTable(shown); len(t.Rows) > 0 {
		d.b.Table(t)
		d.b.Note(validationNote(v, c == d.nominal()))
	}
}

// mostGrids is how many grids the table has columns for.
const mostGrids = 3

func gridTable(v *record.Convergence) sheet.Table {
	t := sheet.Table{Size: 6.8, Columns: []sheet.Column{{Head: "Id"}, {Head: "Figure", Grow: 1}, {Head: "in", Align: rightAlign}}}
	heads := []string{"Finest grid", "Second", "Third"}
	for _, h := range heads {
		t.Columns = append(t.Columns, sheet.Column{Head: h, Align: rightAlign})
	}
	t.Columns = append(t.Columns, sheet.Column{Head: "Step to zero", Align: rightAlign}, sheet.Column{Head: "Behaviour"},
		sheet.Column{Head: "Order", Align: rightAlign}, sheet.Column{Head: "Factor", Align: rightAlign},
		sheet.Column{Head: "Index ±", Align: rightAlign}, sheet.Column{Head: "Index, relative", Align: rightAlign})
	for i := range v.Studies {
		t.Rows = append(t.Rows, gridRow(&v.Studies[i]))
	}
	return t
}

func gridRow(s *record.Study) []sheet.Cell {
	scale := studyScale(s, change(s))
	row := []sheet.Cell{{Text: s.ID, Bold: true}, {Text: studyName(s)}, {Text: scale.Unit}}
	for k := range mostGrids {
		text := format.Missing
		if k < len(s.Values) {
			text = scale.Number(s.Values[k])
		}
		row = append(row, sheet.Cell{Text: text})
	}
	doubtful := s.Behaviour == record.Oscillatory || s.Behaviour == record.Diverging
	row = append(row, sheet.Cell{Text: scale.Number(s.Extrapolated)}, sheet.Cell{Text: string(s.Behaviour), Bold: doubtful},
		sheet.Cell{Text: format.Fixed(s.Order, 2)})
	if s.Factor == 0 {
		return append(row, sheet.Cell{Text: format.Missing}, sheet.Cell{Text: format.Missing}, sheet.Cell{Text: format.Missing})
	}
	return append(row, sheet.Cell{Text: format.Short(s.Factor)},
		sheet.Cell{Text: format.Uncertainty(s.GCI, s.Unit)}, sheet.Cell{Text: format.Index(s.GCIPercent)})
}

// change is the change from the finest grid to the next one, 0 where there is
// none or where it is rounding.
func change(s *record.Study) float64 {
	if len(s.Values) < 2 || s.Behaviour == record.GridFree {
		return 0
	}
	return math.Abs(s.Values[0] - s.Values[1])
}

// studyScale is the scale for the values of a figure that differ by step. They
// have four significant digits at least.
func studyScale(s *record.Study, step float64) format.Scale {
	size := math.Abs(s.Phasor)
	for _, x := range s.Values {
		if !(size >= math.Abs(x)) { // NaN too
			size = math.Abs(x)
		}
	}
	if least := size / 100; !(step > 0 && step < least) {
		step = least
	}
	return format.NewScale(size, step, s.Unit)
}

// studyName names a figure in words. Amplitudes are peak where it does not say
// otherwise.
func studyName(s *record.Study) string { return figureName(s.Quantity, s.Subject, s.Unit) }

func figureName(quantity, subject, unit string) string {
	name := words(quantity)
	if subject != "" {
		name += ", " + subject
	}
	if q := format.Qualifier(unit); q != "" {
		name += " (" + q + ")"
	}
	return name
}

// cited is a figure's name with its requirement's id before it.
func cited(s *record.Study) string {
	if s.ID == "" {
		return studyName(s)
	}
	return s.ID + ", " + studyName(s)
}
