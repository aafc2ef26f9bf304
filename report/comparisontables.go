package report

import (
	"math"
	"math/cmplx"

	"linewitness/report/format"
	"linewitness/report/sheet"
	"linewitness/sim/record"
)

// longestTerm is how many characters of a term are shown.
const longestTerm = 160

// changeTable writes what changed in the design.
func (d *comparison) changeTable(most int) {
	d.b.Subheading("What changed in the design", 40)
	if d.c.Echo != "" {
		d.b.Note(d.c.Echo)
	}
	if len(d.changes) == 0 {
		d.b.Paragraph("Nothing.")
		return
	}
	t := sheet.Table{Size: 7, Columns: []sheet.Column{{Head: ""}, {Head: "Term", Grow: 1}, {Head: "Old", Grow: 2}, {Head: "New", Grow: 2}}}
	for i := range d.changes[:most] {
		c := &d.changes[i]
		t.Rows = append(t.Rows, []sheet.Cell{
			{Text: string(c.Kind)}, {Text: c.Where(), Bold: true}, {Text: termText(c.Old, c.OldSI, c.Unit)}, {Text: termText(c.New, c.NewSI, c.Unit)},
		})
	}
	d.b.Table(summedUp(t, len(d.changes)-most))
}

// termText is a term, with what it means where that is not in its words.
func termText(text string, si float64, unit string) string {
	switch {
	case text == "":
		return format.Missing
	case unit != "":
		return text + ", " + format.SI(si, unit)
	}
	if runes := []rune(text); len(runes) > longestTerm {
		return string(runes[:longestTerm-1]) + "…"
	}
	return text
}

// summedUp adds a row that counts the rows left out.
func summedUp(t sheet.Table, more int) sheet.Table {
	if more > 0 {
		t.Rows = append(t.Rows, []sheet.Cell{{Text: "and " + format.Count(int64(more)) + " more, see the JSON form", Span: true}})
	}
	return t
}

// effectTable writes what became of what is judged.
func (d *comparison) effectTable(most int) {
	d.b.Subheading("What that did to requirements, ratings and claims", 40)
	if len(d.effects) == 0 {
		d.b.Paragraph("Nothing beyond the uncertainties.")
		return
	}
	t := sheet.Table{Size: 7, Columns: []sheet.Column{
		{Head: "Case"},
		{Head: "Id"},
		{Head: "Quantity, subject", Grow: 1},
		{Head: "Limit"},
		right("Old value"), right("New value"), right("Old margin"), right("New margin"),
		{Head: "Verdict"},
		{Head: ""},
	}}
	for _, e := range d.effects[:most] {
		t.Rows = append(t.Rows, []sheet.Cell{
			{Text: e.name},
			{Text: e.ID, Bold: true},
			{Text: figureName(e.Quantity, e.Subject, "")},
			{Text: format.Signed(limits(e.Old, e.New))},
			{Text: figureText(e.Old)},
			{Text: figureText(e.New)},
			{Text: marginText(e.Old)},
			{Text: marginText(e.New)},
			verdictCell(e.Effect),
			{Text: string(e.Direction), Bold: e.Direction == record.Worse},
		})
	}
	d.b.Table(summedUp(t, len(d.effects)-most))
}

// figureTable writes the key figures that moved.
func (d *comparison) figureTable(most int) {
	if len(d.figures) == 0 {
		return
	}
	d.b.Subheading("Key figures that moved", 40)
	t := sheet.Table{Size: 7, Columns: []sheet.Column{{Head: "Case"}, {Head: "Figure", Grow: 1}, right("Old"), right("New"), right("Change")}}
	for _, e := range d.figures[:most] {
		t.Rows = append(t.Rows, []sheet.Cell{
			{Text: e.name}, {Text: figureName(e.Quantity, e.Subject, "")}, {Text: figureText(e.Old)}, {Text: figureText(e.New)}, {Text: changeText(e.Effect)},
		})
	}
	d.b.Table(summedUp(t, len(d.figures)-most))
}

// limits is the limit in words, both where it has changed.
func limits(old, now *record.Figure) string {
	switch {
	case old == nil:
		return now.Limit
	case now == nil || old.Limit == now.Limit:
		return old.Limit
	}
	return now.Limit + ", was " + old.Limit
}

func figureText(f *record.Figure) string {
	switch {
	case f == nil || cmplx.IsNaN(f.Value):
		return format.Missing
	case f.Complex:
		return format.Phasor(f.Value, f.Unit)
	}
	return format.Quantity(real(f.Value), f.Unit)
}

func marginText(f *record.Figure) string {
	if f == nil || math.IsNaN(f.Margin) {
		return format.Missing
	}
	return format.Bare(f.Margin, f.Unit)
}

// changeText is the difference of two figures in one unit.
func changeText(e *record.Effect) string {
	if e.Old == nil || e.New == nil || e.Old.Unit != e.New.Unit || cmplx.IsNaN(e.New.Value-e.Old.Value) {
		return format.Missing
	}
	return format.Change(real(e.New.Value-e.Old.Value), e.New.Unit)
}

// verdictCell has both verdicts where they differ, and the mark of the new one.
func verdictCell(e *record.Effect) sheet.Cell {
	switch {
	case e.New == nil:
		return sheet.Cell{Text: "was " + e.Old.Verdict}
	case e.Old == nil || e.Old.Verdict == e.New.Verdict:
		return sheet.Cell{Text: e.New.Verdict, Mark: markOfJudged(e)}
	}
	return sheet.Cell{Text: e.New.Verdict, Mark: markOfJudged(e), Bold: true, Note: "was " + e.Old.Verdict}
}

func markOfJudged(e *record.Effect) sheet.Mark {
	if e.Kind == record.ClaimEffect {
		return markOfClaim(record.ClaimVerdict(e.New.Verdict))
	}
	return markOfRequirement(record.RequirementVerdict(e.New.Verdict))
}
