package report

import (
	"slices"

	"linewitness/report/format"
	"linewitness/report/sheet"
	"linewitness/sim/record"
)

// origins says in words where a piece of data comes from.
var origins = map[string]string{
	"measured":  "measured",
	"datasheet": "data sheet",
	"catalogue": "cable table",
	"geometry":  "from dimensions",
	"assumed":   "assumed",
	"given":     "design file",
}

// unconfirmed reports whether somebody has yet to answer for a piece of data:
// the cable table is from memory, and a default is nobody's statement.
func unconfirmed(p record.Pedigree) bool { return p.Kind == "catalogue" || p.Kind == "assumed" }

// originOf says where a piece of data comes from, and whether that needs
// confirmation.
func originOf(p record.Pedigree) string {
	s := orElse(origins[p.Kind], p.Kind)
	if unconfirmed(p) {
		s += ", needs confirmation"
	}
	return s
}

// pedigree writes where the data of the lines come from.
func (d *document) pedigree(kinds []lineKind) {
	t := sheet.Table{Columns: []sheet.Column{
		left("Line"), {Head: "Data", Grow: 3}, left("Origin"), left("Note"),
	}}
	flagged := false
	for _, k := range kinds {
		t.Rows = append(t.Rows, pedigreeRows(k)...)
		flagged = flagged || slices.ContainsFunc(k.Pedigree, unconfirmed)
	}
	if len(t.Rows) == 0 {
		return
	}
	d.b.Subheading("Where the data of the lines come from", d.b.Kept(t))
	d.b.Table(t)
	note := "Design file: it gives the value and does not say where that comes from."
	if flagged {
		note += " A flag marks what needs confirmation: values of the cable table are nominal and from memory, to be replaced by the sheet of the cable in hand; assumed values are defaults of the program."
	}
	d.b.Note(note)
}

// pedigreeRows returns the rows of one line, one for each origin and note.
func pedigreeRows(k lineKind) [][]sheet.Cell {
	var rows [][]sheet.Cell
	for i, p := range gathered(k.Pedigree) {
		row := []sheet.Cell{{}, {Text: format.Signed(p.Text)}, {Text: originOf(p)}, {Text: p.Note}}
		if i == 0 {
			row[0] = sheet.Cell{Text: k.label, Bold: true}
		}
		if unconfirmed(p) {
			row[2].Mark, row[2].Bold = sheet.Confirm, true
		}
		rows = append(rows, row)
	}
	return rows
}

// gathered joins what has the same origin and note: "z0 50 ohm; velocity factor
// 0.66". What is given several times, such as the loss of a table, is named once.
func gathered(ps []record.Pedigree) []record.Pedigree {
	var out []record.Pedigree
	last := "" // what the last text of out is of
	for _, p := range ps {
		i := slices.IndexFunc(out, func(o record.Pedigree) bool { return o.Kind == p.Kind && o.Note == p.Note })
		switch what := p.What + " "; {
		case i < 0:
			p.Text = what + p.Text
			out = append(out, p)
		case last == p.What && i == len(out)-1:
			out[i].Text += "; " + p.Text
		default:
			out[i].Text += "; " + what + p.Text
		}
		last = p.What
	}
	return out
}
