package main

import (
	"fmt"
	"io"
	"math"
	"math/cmplx"
	"strings"

	"linewitness/report/format"
	"linewitness/sim/record"
)

// writeComparison writes what changed and what that did.
func writeComparison(w io.Writer, c *record.Comparison) {
	fmt.Fprintf(w, "%s: %s\n\n", sideHeading(&c.New), turned(string(c.Old.Verdict), string(c.New.Verdict)))
	writeTable(w, [][]string{sideRow("old", &c.Old), sideRow("new", &c.New)})
	writeChanges(w, c)
	for i := range c.Cases {
		writeCaseEffect(w, &c.Cases[i])
	}
}

func sideHeading(s *record.Side) string {
	return heading(record.Design{Title: s.Title, Number: s.Number, Revision: s.Revision, File: s.File})
}

func sideRow(which string, s *record.Side) []string {
	return []string{which, s.File, s.Kind, sideHeading(s)}
}

// turned is what became of a word: one if it is the same, "none" for what is not
// there.
func turned(old, now string) string {
	if old == now {
		return now
	}
	return orNone(old) + " -> " + orNone(now)
}

func orNone(s string) string {
	if s == "" {
		return "none"
	}
	return s
}

func writeChanges(w io.Writer, c *record.Comparison) {
	fmt.Fprintf(w, "\nin the design: %s\n", counted(len(c.Changes), "change"))
	if c.Echo != "" {
		fmt.Fprintln(w, "  "+c.Echo)
	}
	var rows [][]string
	for i := range c.Changes {
		k := &c.Changes[i]
		rows = append(rows, []string{string(k.Kind), k.Where(), termChange(k)})
	}
	writeTable(w, rows)
}

// termChange is the old and the new text of a term, with what they mean where that is
// not in their words.
func termChange(k *record.Change) string {
	old, now := k.Old, k.New
	if k.Unit != "" {
		old, now = old+", "+inSI(k.OldSI, k.Unit), now+", "+inSI(k.NewSI, k.Unit)
	}
	switch k.Kind {
	case record.AddedTerm:
		return now
	case record.RemovedTerm:
		return old
	}
	return old + " -> " + now
}

// writeCaseEffect writes what is not as before in a case, and counts the rest.
func writeCaseEffect(w io.Writer, c *record.CaseEffect) {
	fmt.Fprintf(w, "\n%s: %s\n", c.Name, turned(string(c.Old), string(c.New)))
	judged := [][]string{{"id", "quantity", "value", "limit", "margin", "verdict", ""}}
	figures := [][]string{{"key figure", "value", "change"}}
	before, alone := 0, 0
	for i := range c.Effects {
		e := &c.Effects[i]
		switch {
		case e.Kind == record.FigureEffect && (c.Old == "" || c.New == ""):
			alone++
		case !e.Matters():
			before++
		case e.Kind == record.FigureEffect:
			figures = append(figures, []string{effectName(e), valueChange(e), difference(e)})
		default:
			judged = append(judged, []string{
				orNone(e.ID), effectName(e), valueChange(e), of(e, limitText), of(e, marginText), of(e, verdictText), string(e.Direction),
			})
		}
	}
	for _, rows := range [][][]string{judged, figures} {
		if len(rows) > 1 {
			writeTable(w, rows)
		}
	}
	if before > 0 {
		fmt.Fprintf(w, "  as before: %s\n", counted(before, "figure"))
	}
	if alone > 0 {
		fmt.Fprintf(w, "  with nothing to compare: %s, in --json\n", counted(alone, "key figure"))
	}
}

func effectName(e *record.Effect) string { return strings.TrimSpace(e.Quantity + " " + e.Subject) }

func valueChange(e *record.Effect) string { return of(e, valueText) }

// of is the text of a figure in both designs.
func of(e *record.Effect, text func(*record.Figure) string) string {
	return turned(text(e.Old), text(e.New))
}

func valueText(f *record.Figure) string {
	switch {
	case f == nil:
		return ""
	case f.Complex && !cmplx.IsNaN(f.Value):
		return typeable.Replace(format.Phasor(f.Value, f.Unit))
	}
	return inUnit(real(f.Value), f.Unit)
}

func limitText(f *record.Figure) string {
	if f == nil {
		return ""
	}
	return f.Limit
}

func marginText(f *record.Figure) string {
	if f == nil {
		return ""
	}
	return inUnit(f.Margin, differenceUnit(f.Unit))
}

func verdictText(f *record.Figure) string {
	if f == nil {
		return ""
	}
	return f.Verdict
}

// difference is that of two key figures in one unit.
func difference(e *record.Effect) string {
	if e.Old == nil || e.New == nil || e.Old.Unit != e.New.Unit || math.IsNaN(real(e.New.Value-e.Old.Value)) {
		return string(e.Direction)
	}
	return typeable.Replace(format.Change(real(e.New.Value-e.Old.Value), e.New.Unit))
}
