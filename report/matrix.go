package report

import (
	"math"
	"slices"
	"strings"

	"linewitness/report/format"
	"linewitness/report/sheet"
	"linewitness/sim/record"
)

// matrixCases is how many cases a table has room for.
const matrixCases = 8

// sideBySide writes the cases beside each other; with one case there is
// nothing to set beside it.
func (d *document) sideBySide() {
	m := merged(&d.r.Matrix)
	if len(m.Cases) < 2 || len(m.Rows) == 0 {
		return
	}
	d.b.Need(d.b.Body() * caseRoom)
	d.b.Space(22)
	d.b.Heading("Cases side by side", 120)
	d.b.Paragraph(matrixFinding(m))
	for _, group := range columnsOf(len(m.Cases), matrixCases) {
		d.b.Table(matrixTable(m, group))
	}
	d.b.Note("In small type: the difference from " + m.Cases[0] + ". Worst, in bold: the least margin of the row or, of a figure without a limit, the farthest from " + m.Cases[0] +
		". A requirement's value without a mark is not judged in that case; a dash: there is none. Amplitudes are peak where nothing else is said.")
}

// columnsOf splits n cases into groups of at most most, as even as can be.
// Each begins with the nominal case, which the others differ from.
func columnsOf(n, most int) [][]int {
	tables := max((n-2)/(most-1)+1, 1)
	var out [][]int
	for k, next := 0, 1; k < tables; k++ {
		group := []int{0}
		end := next + (n-next+tables-k-1)/(tables-k)
		for ; next < min(end, n); next++ {
			group = append(group, next)
		}
		out = append(out, group)
	}
	return out
}

const (
	labelShare = 1.9 // width of the labels over that of a case
	manyCases  = 6   // more take smaller type, for "−135.8 kV" beside its mark
)

func matrixTable(m *record.Matrix, cases []int) sheet.Table {
	t := sheet.Table{Size: 6.8, Columns: []sheet.Column{{Head: "Id"}, {Head: "Requirement or key figure", Share: labelShare}}}
	if len(cases) > manyCases {
		t.Size = 6.4
	}
	for _, k := range cases {
		t.Columns = append(t.Columns, sheet.Column{Head: m.Cases[k], Align: rightAlign, Share: 1})
	}
	for i := range m.Rows {
		r := &m.Rows[i]
		row := []sheet.Cell{{Text: r.ID, Bold: true}, {Text: matrixLabel(r), Note: format.Signed(r.Limit)}}
		for _, k := range cases {
			row = append(row, matrixCell(r, k))
		}
		t.Rows = append(t.Rows, row)
	}
	return t
}

// matrixLabel is the quantity in words and what it is of, whose names stay as
// the design file has them.
func matrixLabel(r *record.MatrixRow) string {
	quantity, subject, _ := strings.Cut(r.Label, ", ")
	return figureName(quantity, subject, r.Unit)
}

// merged puts a key figure that a requirement is about into the row of the
// requirement, where it fills the cases in which that is not judged.
func merged(m *record.Matrix) *record.Matrix {
	out := &record.Matrix{Cases: m.Cases}
	for _, r := range m.Rows {
		r.Cells = slices.Clone(r.Cells)
		k := slices.IndexFunc(out.Rows, func(o record.MatrixRow) bool {
			return r.ID == "" && o.ID != "" && o.Label == r.Label && o.Unit == r.Unit
		})
		if k < 0 {
			out.Rows = append(out.Rows, r)
			continue
		}
		fillCells(out.Rows[k].Cells, r.Cells)
	}
	return out
}

// fillCells fills the cells that are missing; none of those is the worst, for
// the worst has the least margin.
func fillCells(cells, from []record.MatrixCell) {
	for i := range min(len(cells), len(from)) {
		if !cells[i].Present && from[i].Present {
			cells[i] = from[i]
			cells[i].Worst = false
		}
	}
	for i := 1; i < min(len(cells), len(from)); i++ {
		if math.IsNaN(cells[i].Difference) {
			cells[i].Difference = from[i].Difference
		}
	}
}

// matrixCell has a value, the mark of its verdict, and in small type whether it
// is the worst and how far it is from the nominal case.
func matrixCell(r *record.MatrixRow, k int) sheet.Cell {
	if k >= len(r.Cells) || !r.Cells[k].Present {
		return sheet.Cell{Text: format.Missing}
	}
	c := r.Cells[k]
	out := sheet.Cell{Text: unqualified(c.Value, r.Unit), Note: departure(c, r.Unit)}
	if c.Verdict != "" {
		out.Mark = markOfRequirement(c.Verdict)
	}
	if c.Worst && rivals(r) > 1 {
		out.Bold = true
		out.Note = trimmed("worst " + out.Note)
	}
	return out
}

// rivals counts the cells of which one can be the worst: those that are judged,
// or all of a key figure.
func rivals(r *record.MatrixRow) (n int) {
	for _, c := range r.Cells {
		if c.Present && (r.ID == "" || c.Verdict != "") {
			n++
		}
	}
	return n
}

// unqualified prints a value without the qualifier of its unit, which the label has.
func unqualified(v float64, unit string) string {
	if unit == "dBm" {
		return format.Quantity(v, unit)
	}
	return format.Bare(v, unit)
}

// departure prints how far a value is from that of the nominal case.
func departure(c record.MatrixCell, unit string) string {
	const rounded = 1e-9 // of the value: less is the arithmetic of two runs
	switch {
	case math.IsNaN(c.Difference):
		return ""
	case math.Abs(c.Difference) <= rounded*math.Abs(c.Value):
		return "the same"
	}
	return format.Change(c.Difference, unit)
}

// matrixFinding says in which cases the requirements are worst.
func matrixFinding(m *record.Matrix) string {
	worst := make([]int, len(m.Cases))
	judged := 0
	for _, r := range m.Rows {
		k := slices.IndexFunc(r.Cells, func(c record.MatrixCell) bool { return c.Worst })
		if r.ID != "" && k >= 0 && k < len(worst) {
			judged++
			worst[k]++
		}
	}
	if judged == 0 {
		return "Key figures of " + format.Plural(int64(len(m.Cases)), "case") + "; no requirement is judged in any."
	}
	var parts []string
	for _, k := range order(worst) {
		parts = append(parts, format.Count(int64(worst[k]))+format.Space+"in "+m.Cases[k])
	}
	return "Of " + format.Plural(int64(judged), "requirement") + " the least margin is found for " + listed(parts) + "."
}

// order returns the indices of the counts above zero, largest count first.
func order(counts []int) (out []int) {
	for k, n := range counts {
		if n > 0 {
			out = append(out, k)
		}
	}
	slices.SortStableFunc(out, func(a, b int) int { return counts[b] - counts[a] })
	return out
}
