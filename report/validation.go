package report

import (
	"math"

	"linewitness/report/format"
	"linewitness/report/sheet"
	"linewitness/report/typeset"
	"linewitness/sim/record"
)

const rightAlign = typeset.Right

// validationTable has the figures that both witnesses give.
func validationTable(v *record.Convergence) sheet.Table {
	t := sheet.Table{Size: 6.8, Columns: []sheet.Column{{Head: "Id"}, {Head: "Figure", Grow: 1}, {Head: "in", Align: rightAlign}}}
	number := func(heads ...string) {
		for _, h := range heads {
			t.Columns = append(t.Columns, sheet.Column{Head: h, Align: rightAlign})
		}
	}
	number("Time domain", "Closed form")
	t.Columns = append(t.Columns, sheet.Column{Head: "E and u in", Align: rightAlign})
	number("Error E", "u", "u of grid", "u of settling", "u of form", "u of rounding", "|E|/u")
	t.Columns = append(t.Columns, sheet.Column{Head: "Error"})
	for i := range v.Studies {
		if s := &v.Studies[i]; !math.IsNaN(s.Phasor) {
			t.Rows = append(t.Rows, validationRow(s))
		}
	}
	return t
}

func validationRow(s *record.Study) []sheet.Cell {
	value := studyScale(s, max(math.Abs(s.Error), s.Uncertainty/10))
	size := math.Abs(s.Error)
	if !(size >= s.Uncertainty) { // NaN too
		size = s.Uncertainty
	}
	e := format.ErrorScale(size, s.Unit)
	finest := math.NaN()
	if len(s.Values) > 0 {
		finest = s.Values[0]
	}
	row := []sheet.Cell{{Text: s.ID, Bold: true}, {Text: studyName(s)}, {Text: value.Unit}, {Text: value.Number(finest)}, {Text: value.Number(s.Phasor)}, {Text: e.Unit}}
	for _, x := range []float64{s.Error, s.Uncertainty, s.Grid, s.Settling, s.Form, s.Rounding} {
		row = append(row, sheet.Cell{Text: e.Number(x)})
	}
	row = append(row, sheet.Cell{Text: format.Ratio(s.Ratio())})
	if math.IsInf(s.Phasor, 0) {
		return append(row, sheet.Cell{Text: "not finite"})
	}
	if s.Explained {
		return append(row, sheet.Cell{Text: "explained", Mark: sheet.Holds})
	}
	return append(row, sheet.Cell{Text: "not explained", Mark: sheet.Differs, Bold: true})
}
