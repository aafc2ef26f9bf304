package design

import "time"

// mostRevisions bounds the revision history: what fits a page.
const mostRevisions = 50

// history reads the revision history, oldest first.
func (f *fields) history(key string) (out []Revision) {
	n := f.node(key)
	if n == nil {
		return nil
	}
	rows, _ := f.rows(key, n, revisionTable, mostRevisions)
	for _, row := range rows {
		r := Revision{Revision: row.line("revision"), Date: row.date("date"), By: row.line("by"), Text: row.prose("text")}
		row.filled("revision", "a revision is known by it")
		row.filled("text", "say what changed")
		out = append(out, r)
	}
	return out
}

// date reads a day, year-month-day. One form only, so that a reader in twenty
// years does not take the day for the month.
func (f *fields) date(key string) string {
	s := f.line(key)
	if n := f.node(key); n != nil && n.kind == scalar {
		if _, err := time.Parse(time.DateOnly, n.text); err != nil {
			f.w.problem(n.pos, say("write year-month-day, 2026-03-31"), "%s is not a date: %q", f.name(key), n.text)
		}
	}
	return s
}

// filled tells of a text that is there and empty; why says what it is for.
func (f *fields) filled(key, why string) {
	if n := f.node(key); n != nil && n.kind == scalar && n.text == "" {
		f.w.problem(n.pos, say("%s", rawText(why)), "%s is empty", f.name(key))
	}
}
