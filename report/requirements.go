package report

import (
	"strings"

	"linewitness/report/format"
	"linewitness/report/sheet"
	"linewitness/report/typeset"
	"linewitness/sim/record"
)

// requirements writes the compliance table.
func (d *document) requirements() {
	rows := d.requirementRows()
	d.b.Subheading("Requirements", 60)
	if len(rows) == 0 {
		rests := "on the agreement of the two solutions alone."
		if d.rated() {
			rests = "on the agreement of the two solutions and on the ratings."
		}
		d.b.Paragraph("The design file states no requirement. The verdict then rests " + rests)
		return
	}
	d.b.Table(sheet.Table{Size: 7, Columns: []sheet.Column{
		{Head: "Id"},
		{Head: "Case"},
		{Head: "Quantity, subject", Grow: 1},
		{Head: "Limit"},
		{Head: "Value", Align: typeset.Right},
		{Head: "Uncertainty ±", Align: typeset.Right},
		{Head: "Margin", Align: typeset.Right},
		{Head: "Margin, relative", Align: typeset.Right},
		{Head: "Verdict"},
	}, Rows: rows})
	d.requirementTexts()
	d.b.Note("Values are the worse of the two solutions; voltages and currents are peak. Met: value and uncertainty are inside the limit. " +
		"Missed: outside. Not shown: the uncertainty straddles the limit, or there is no settled value.")
}

func (d *document) requirementRows() [][]sheet.Cell {
	var rows [][]sheet.Cell
	for _, c := range d.r.Cases {
		for _, q := range c.Requirements {
			rows = append(rows, []sheet.Cell{
				{Text: q.ID, Bold: true},
				{Text: c.Name},
				{Text: quantityOf(q)},
				{Text: format.Signed(q.Limit)},
				{Text: format.Quantity(q.Value, q.Unit)},
				{Text: format.Uncertainty(q.Uncertainty, q.Unit)},
				{Text: format.Bare(q.Margin, q.Unit)},
				{Text: relative(q)},
				{Text: string(q.Verdict), Mark: markOfRequirement(q.Verdict), Bold: q.Verdict != record.Met},
			})
		}
	}
	return rows
}

// quantityOf names a requirement's quantity and subject in words.
func quantityOf(q record.Requirement) string {
	s := words(q.Quantity)
	if q.Subject != "" {
		s += ", " + q.Subject
	}
	return s
}

// words spells a name of the design file: "peak_voltage" is "peak voltage",
// and the names that are abbreviations take capitals.
func words(name string) string {
	if name == "vswr" {
		return "VSWR"
	}
	return strings.ReplaceAll(name, "_", " ")
}

// relative returns the margin in dB, or else in percent.
func relative(q record.Requirement) string {
	if q.MarginDB == q.MarginDB { // not NaN
		return format.DB(q.MarginDB)
	}
	return format.Percent(q.MarginPercent / 100)
}

// requirementTexts writes texts and sources, once for each id, and notes.
func (d *document) requirementTexts() {
	seen := map[string]bool{}
	var texts, notes []string
	for _, c := range d.r.Cases {
		for _, q := range c.Requirements {
			s := strings.TrimSpace(strings.TrimSuffix(q.Text, ".") + " " + bracket(q.Source))
			if !seen[q.ID] && s != "" {
				texts = append(texts, q.ID+": "+s+".")
			}
			seen[q.ID] = true
			if q.Note != "" {
				notes = append(notes, q.ID+" in case "+c.Name+": "+strings.TrimSuffix(q.Note, ".")+".")
			}
		}
	}
	d.notes(texts)
	d.notes(notes)
}

// notes writes a few notes as one paragraph, many as a list.
func (d *document) notes(list []string) {
	const few = 12
	if len(list) == 0 {
		return
	}
	if len(list) <= few {
		d.b.Note(strings.Join(list, " "))
		return
	}
	for _, s := range list {
		d.b.Note(s)
	}
}

func bracket(s string) string {
	if s == "" {
		return ""
	}
	return "[" + s + "]"
}
