package report

import (
	"slices"
	"strings"

	"linewitness/report/format"
	"linewitness/report/ink"
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

// toConfirm names on the cover what the record rests on and nobody has
// confirmed.
func (d *document) toConfirm() {
	var parts []string
	said := map[string]bool{}
	for _, k := range d.lineKinds() {
		s := confirmations(k.Pedigree)
		if key := k.Name + ":" + s; s != "" && !said[key] { // a case may have it again
			said[key] = true
			parts = append(parts, "Line "+k.label+": "+s)
		}
	}
	if len(parts) == 0 {
		return
	}
	d.b.Space(4)
	d.b.Verdict(sheet.Confirm, ink.Doubt, "To be confirmed:", strings.Join(parts, ". ")+". The tables of the design as modelled have each value.")
}

// confirmations lists what of a line needs confirmation, by origin.
func confirmations(ps []record.Pedigree) string {
	var groups []string
	for _, g := range []struct{ kind, words string }{
		{"catalogue", "from the cable table (nominal, from memory; to be replaced by the sheet of the cable in hand)"},
		{"assumed", "assumed"},
	} {
		var whats []string
		for _, p := range ps {
			if p.Kind == g.kind && !slices.Contains(whats, p.What) {
				whats = append(whats, p.What)
			}
		}
		if len(whats) > 0 {
			groups = append(groups, strings.Join(whats, ", ")+" "+g.words)
		}
	}
	return strings.Join(groups, "; ")
}
