package design

import (
	"strings"
	"unicode"
	"unicode/utf8"
)

// The longest texts of a record, in characters: what fits its title block,
// and what fits a page beside the rest.
const longestLine, longestText = 200, 4000

// walkHeader reads what is not part of the network.
func (w *walker) walkHeader(f *fields) {
	if v, n, ok := f.number("format"); ok && v != 1 {
		w.problem(n.pos, say("this program reads format: 1"), "format %q is not known", n.text)
	}
	if c := f.oneOf("convention", Engineering.String(), Physics.String()); c == Physics.String() {
		w.design.Convention = Physics
	}
	w.design.Grid = Grid{CellsPerWavelength: 40, SettleTolerance: 1e-4, Agreement: 0.005, MaxPeriods: 20000}
	if n := f.node("grid"); n != nil {
		w.walkGrid(w.fields(n, f.at["grid"].key.pos, "the grid", gridTable))
	}
	if n := f.node("record"); n != nil {
		w.walkRecord(w.fields(n, f.at["record"].key.pos, "the record", recordTable))
	}
}

func (w *walker) walkRecord(f *fields) {
	if f == nil {
		return
	}
	w.design.Record = Record{
		Title: f.line("title"), Number: f.line("number"), Revision: f.line("revision"),
		Purpose:    f.prose("purpose"),
		PreparedBy: f.line("prepared_by"), CheckedBy: f.line("checked_by"), ApprovedBy: f.line("approved_by"),
		Notes: f.prose("notes"), Date: f.date("date"), History: f.history("history"),
	}
	for _, key := range []string{"title", "number"} {
		f.filled(key, "the record is filed under it")
	}
}

// line reads a text that is printed on one line.
func (f *fields) line(key string) string {
	s := f.limited(key, longestLine)
	if i := strings.IndexFunc(s, unicode.IsControl); i >= 0 {
		f.w.problem(f.node(key).pos, say("write it on one line, without control characters"), "%s is more than a line of text", f.name(key))
	}
	return s
}

// prose reads a text that may have paragraphs.
func (f *fields) prose(key string) string {
	s := f.limited(key, longestText)
	control := func(c rune) bool { return unicode.IsControl(c) && c != '\n' && c != '\t' }
	if i := strings.IndexFunc(s, control); i >= 0 {
		f.w.problem(f.node(key).pos, say("write plain text"), "%s holds a control character", f.name(key))
	}
	return s
}

func (f *fields) limited(key string, longest int) string {
	s := f.text(key)
	if n := utf8.RuneCountInString(s); n > longest {
		f.w.problem(f.node(key).pos, say("at most %d fit the record", longest), "%s has %d characters", f.name(key), n)
	}
	return s
}

func (w *walker) walkGrid(f *fields) {
	if f == nil {
		return
	}
	g := &w.design.Grid
	if v, n, ok := f.number("cells_per_wavelength"); ok {
		if v < 8 || v > 1e5 {
			w.problem(n.pos, say("below 8 a wave is not resolved; 40 is the default"), "%s must be from 8 to 100000, not %q", f.name("cells_per_wavelength"), n.text)
		}
		g.CellsPerWavelength = v
	}
	if v, n, ok := f.number("max_periods"); ok {
		if v < 10 || v > 1e7 || v != float64(int(v)) {
			w.problem(n.pos, say("20000 is the default"), "%s must be a whole number from 10 to 10000000, not %q", f.name("max_periods"), n.text)
		}
		g.MaxPeriods = int(v)
	}
	if q, n, ok := f.quantity("settle_tolerance", fraction); ok {
		if q.value < 1e-9 || q.value > 0.1 { // below, only rounding is left
			w.problem(n.pos, say("1e-4 is the default"), "%s must be from 1e-9 to 0.1, not %q", f.name("settle_tolerance"), n.text)
		}
		g.SettleTolerance = q.value
	}
	if q, n, ok := f.quantity("agreement", percentage); ok {
		if q.value <= 0 || q.value > 0.1 {
			w.problem(n.pos, say("0.5 %% is the default"), "%s must be above 0 and at most 10 %%, not %q", f.name("agreement"), n.text)
		}
		g.Agreement = q.value
	}
}
