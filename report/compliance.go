package report

import (
	"slices"
	"strings"

	"linewitness/report/format"
	"linewitness/report/sheet"
	"linewitness/sim/record"
)

// compliance writes every requirement in every case that it is judged in, and
// every rating.
func (d *document) compliance() {
	d.b.Heading("Compliance", 120)
	d.b.Paragraph(d.complianceFinding())
	if t := d.complianceTable(); len(t.Rows) > 0 {
		d.b.Table(t)
		d.notes(d.requirementNotes())
		d.b.Note("Values are the worse of the two solutions, with the uncertainty towards the limit; voltages and currents are peak. Margin: in the unit, and in dB or in per cent of the limit where that has a meaning. " +
			"Met: value and uncertainty are inside the limit. Missed: outside. Not shown: the uncertainty straddles the limit, or there is no settled value." + d.sourceless())
	}
	d.ratings()
	d.fullHistory()
}

// complianceFinding counts the verdicts and names the cases that were judged.
func (d *document) complianceFinding() string {
	var t tally
	ids, cases := map[string]bool{}, 0
	for _, c := range d.r.Cases {
		for _, q := range c.Requirements {
			ids[q.ID] = true
			t.add(q.Verdict)
		}
		if len(c.Requirements) > 0 {
			cases++
		}
	}
	if len(ids) == 0 {
		rests := "on the agreement of the two solutions alone."
		if d.rated() {
			rests = "on the agreement of the two solutions and on the ratings."
		}
		return "The design file states no requirement. The verdict then rests " + rests
	}
	return format.Plural(int64(len(ids)), "requirement") + ", judged " + format.Plural(int64(t.met+t.missed+t.open), "time") + " in " +
		format.Plural(int64(cases), "case") + ": " + t.String() + "."
}

// complianceTable has the requirements in the order of the design file, each with
// its cases below each other.
func (d *document) complianceTable() sheet.Table {
	t := sheet.Table{Size: 6.8, Columns: []sheet.Column{
		{Head: "Id"},
		{Head: "Requirement", Grow: 1},
		{Head: "Case"},
		{Head: "Limit"},
		{Head: "Value", Align: rightAlign},
		{Head: "Uncertainty ±", Align: rightAlign},
		{Head: "Margin", Align: rightAlign},
		{Head: "Verdict"},
	}}
	sourced := d.sourced()
	if sourced {
		t.Columns = append(t.Columns, sheet.Column{Head: "Source"})
	}
	for _, id := range d.requirementIDs() {
		first := true
		for _, c := range d.r.Cases {
			for i := range c.Requirements {
				if q := &c.Requirements[i]; q.ID == id {
					t.Rows = append(t.Rows, complianceRow(q, c.Name, first, sourced))
					first = false
				}
			}
		}
	}
	return t
}

// complianceRow is a requirement in one case; the first of them has its text.
func complianceRow(q *record.Requirement, name string, first, sourced bool) []sheet.Cell {
	what := sheet.Cell{}
	if first {
		what = sheet.Cell{Text: orElse(strings.TrimSuffix(q.Text, "."), quantityOf(*q))}
		if q.Text != "" {
			what.Note = quantityOf(*q)
		}
	}
	row := []sheet.Cell{
		{Text: q.ID, Bold: true},
		what,
		{Text: name},
		{Text: format.Signed(q.Limit)},
		{Text: format.Quantity(q.Value, q.Unit)},
		{Text: format.Uncertainty(q.Uncertainty, q.Unit)},
		{Text: marginOf(q)},
		{Text: string(q.Verdict), Mark: markOfRequirement(q.Verdict), Bold: q.Verdict != record.Met},
	}
	if sourced {
		source := sheet.Cell{}
		if first {
			source.Text = orElse(q.Source, format.Missing)
		}
		row = append(row, source)
	}
	return row
}

// requirementIDs are the ids of all cases, each once, in the order of the design
// file, which the table of the cases side by side has.
func (d *document) requirementIDs() []string {
	var ids []string
	add := func(id string) {
		if id != "" && !slices.Contains(ids, id) {
			ids = append(ids, id)
		}
	}
	for _, r := range d.r.Matrix.Rows {
		add(r.ID)
	}
	for _, c := range d.r.Cases {
		for _, q := range c.Requirements {
			add(q.ID)
		}
	}
	return ids
}

// sourced reports whether any requirement says where it is from.
func (d *document) sourced() bool {
	return slices.ContainsFunc(d.r.Cases, func(c record.Case) bool {
		return slices.ContainsFunc(c.Requirements, func(q record.Requirement) bool { return q.Source != "" })
	})
}

// sourceless says that no source is given where the table has no column for it.
func (d *document) sourceless() string {
	if d.sourced() {
		return ""
	}
	return " The design file names no source of the requirements."
}

// requirementNotes are what the judgement adds, such as why something is not
// shown.
func (d *document) requirementNotes() []string {
	var list casesOf
	for _, c := range d.r.Cases {
		for _, q := range c.Requirements {
			if q.Note != "" {
				list.add(q.ID+": "+strings.TrimSuffix(q.Note, "."), c.Name)
			}
		}
	}
	var out []string
	for _, s := range list.statements {
		out = append(out, s+" (in "+among(list.cases[s], mostNames)+").")
	}
	return out
}
