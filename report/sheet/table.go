package sheet

import (
	"gonum.org/v1/plot/vg/draw"
	"linewitness/report/ink"
	"linewitness/report/typeset"
)

// A Table is a table with a head that is repeated on every page.
type Table struct {
	Columns []Column
	Rows    [][]Cell
	Size    float64 // of the text, points; 0 means 7.5
}

// A Column is a column of a table.
type Column struct {
	Head  string
	Align typeset.Align // Left or Right
	Face  typeset.Face
	Grow  float64 // share of the width that is left over
	Share float64 // share of the width that the columns without one leave, whatever the cells hold
}

// A Cell is a cell of a table.
type Cell struct {
	Text string
	Note string // in small type below the text
	Mark Mark   // drawn before the text
	Bold bool
	Span bool // the text runs over the rest of the row
}

const (
	cellPad   = 3.2 // at either side of a cell
	rowPad    = 2.2 // above and below the text of a row
	markRoom  = 11  // width that a mark takes before its text
	tableSize = 7.5
	lineStep  = 1.22 // distance of the lines over the size of the text
	noteSize  = 0.84 // of the notes of cells, over that of their text
)

// Row makes cells of texts.
func Row(texts ...string) []Cell {
	cells := make([]Cell, len(texts))
	for i, t := range texts {
		cells[i] = Cell{Text: t}
	}
	return cells
}

// Table writes a table, over as many pages as it needs.
func (b *Book) Table(t Table) {
	l := b.layout(t)
	b.Space(4)
	b.Need(l.kept())
	l.head()
	for i, row := range t.Rows {
		for _, part := range l.split(l.wrap(row)) {
			room := l.height(part)
			if i == len(t.Rows)-2 { // the last row is not left alone
				room += l.height(l.wrap(t.Rows[i+1]))
			}
			if b.Room() < min(room, b.Body()-l.headHeight) && !b.Fresh() {
				b.NewPage()
				l.head()
			}
			l.row(part, i%2 == 1)
		}
	}
	b.Block(1, func(c draw.Canvas) {
		rule(c, c.Min.X.Points(), c.Max.X.Points(), c.Max.Y.Points(), 0.5)
	})
	b.Space(8)
}

// layout is a table with the widths of its columns.
type layout struct {
	b          *Book
	t          Table
	widths     []float64
	headLines  [][]string
	headHeight float64
}

// wrapped is a cell broken into lines.
type wrapped struct {
	Cell
	style typeset.Style
	lines []string
	notes []string // lines of the note
}

func (b *Book) layout(t Table) *layout {
	if t.Size == 0 {
		t.Size = tableSize
	}
	l := &layout{b: b, t: t}
	l.widths = l.fit(b.Width())
	most := 1
	for i, c := range t.Columns {
		lines := l.headStyle().Wrap(c.Head, l.widths[i]-2*cellPad)
		l.headLines = append(l.headLines, lines)
		most = max(most, len(lines))
	}
	l.headHeight = float64(most)*l.lineHeight() + 2*rowPad
	return l
}

func (l *layout) lineHeight() float64 { return l.t.Size * lineStep }

func (l *layout) headStyle() typeset.Style {
	return typeset.Style{Face: typeset.Bold, Size: l.t.Size - 0.3, Color: ink.Accent}
}

func (l *layout) style(i int, c Cell) typeset.Style {
	st := typeset.Style{Face: l.t.Columns[i].Face, Size: l.t.Size, Color: ink.Text}
	if c.Bold {
		st.Face = typeset.Bold
	}
	return st
}

func (l *layout) noteStyle() typeset.Style {
	return typeset.Style{Size: l.t.Size * noteSize, Color: ink.Soft}
}

func (l *layout) wrap(row []Cell) []wrapped {
	out := make([]wrapped, len(row))
	for i, c := range row {
		st := l.style(i, c)
		out[i] = wrapped{Cell: c, style: st, lines: st.Wrap(c.Text, l.room(i, c))}
		if c.Note != "" {
			out[i].notes = l.noteStyle().Wrap(c.Note, l.noteRoom(i, c))
		}
	}
	return out
}

// room returns the width for the text of a cell.
func (l *layout) room(i int, c Cell) float64 {
	w := l.widths[i]
	if c.Span {
		for _, further := range l.widths[i+1:] {
			w += further
		}
	}
	if c.Mark != NoMark {
		w -= markRoom
	}
	return w - 2*cellPad
}

// noteRoom returns the width for the note of a cell, which runs below the mark.
func (l *layout) noteRoom(i int, c Cell) float64 {
	c.Mark = NoMark
	return l.room(i, c)
}

func (l *layout) height(row []wrapped) float64 {
	most := l.lineHeight()
	for _, c := range row {
		most = max(most, float64(len(c.lines))*l.lineHeight()+float64(len(c.notes))*l.lineHeight()*noteSize)
	}
	return most + 2*rowPad
}

// Kept returns the height of the part of a table that is not broken: what a
// heading above it must leave room for.
func (b *Book) Kept(t Table) float64 { return 4 + b.layout(t).kept() }

func (l *layout) kept() float64 { return l.headHeight + l.heightOfFirst(l.together()) }

// together returns how many rows must stand below the head: all of a short
// table, which is not broken.
func (l *layout) together() int {
	const short = 0.19 // of the page
	all := len(l.t.Rows)
	if l.headHeight+l.heightOfFirst(all) <= short*l.b.Body() {
		return all
	}
	return 2
}

// heightOfFirst returns the height of the first n rows, so that a head is not
// left alone at the foot of a page.
func (l *layout) heightOfFirst(n int) float64 {
	var h float64
	for _, row := range l.t.Rows[:min(n, len(l.t.Rows))] {
		h += l.height(l.wrap(row))
	}
	return min(h, l.b.Body()/2)
}

// split cuts a row that is taller than half a page into parts.
func (l *layout) split(row []wrapped) [][]wrapped {
	most := int((l.b.Body()/2 - 2*rowPad) / l.lineHeight())
	var parts [][]wrapped
	for rest := true; rest; {
		part := make([]wrapped, len(row))
		rest = false
		for i, c := range row {
			n := min(most, len(c.lines))
			m := min(most-n, len(c.notes))
			part[i] = wrapped{Cell: c.Cell, style: c.style, lines: c.lines[:n], notes: c.notes[:m]}
			row[i].lines, row[i].notes, row[i].Mark = c.lines[n:], c.notes[m:], NoMark
			rest = rest || len(row[i].lines)+len(row[i].notes) > 0
		}
		parts = append(parts, part)
	}
	return parts
}
