package sheet

import (
	"image/color"

	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
	"linewitness/report/ink"
	"linewitness/report/typeset"
)

// head draws the head of the table.
func (l *layout) head() {
	l.b.Block(l.headHeight, func(c draw.Canvas) {
		fill(c, c.Rectangle, ink.Panel)
		rule(c, c.Min.X.Points(), c.Max.X.Points(), c.Max.Y.Points(), 0.5)
		x := c.Min.X.Points()
		for i, lines := range l.headLines {
			// Heads stand on the lower edge, next to their numbers.
			drop := l.headHeight - 2*rowPad - float64(len(lines))*l.lineHeight()
			l.text(c, x, drop, l.lineHeight(), l.widths[i], l.t.Columns[i].Align, l.headStyle(), lines)
			x += l.widths[i]
		}
	})
}

// row draws a row.
func (l *layout) row(row []wrapped, shaded bool) {
	l.b.Block(l.height(row), func(c draw.Canvas) {
		if shaded {
			fill(c, c.Rectangle, ink.Zebra)
		}
		x := c.Min.X.Points()
		for i, cell := range row {
			at := x
			if cell.Mark != NoMark {
				middle := c.Max.Y.Points() - rowPad - l.lineHeight()/2
				cell.Mark.Draw(c, x+l.markIndent(i, cell)+cellPad+l.t.Size*0.45, middle, l.t.Size*0.95)
				at += markRoom
			}
			l.text(c, at, 0, l.lineHeight(), l.room(i, cell.Cell)+2*cellPad, l.t.Columns[i].Align, cell.style, cell.lines)
			l.text(c, x, float64(len(cell.lines))*l.lineHeight(), l.lineHeight()*noteSize, l.noteRoom(i, cell.Cell)+2*cellPad, l.t.Columns[i].Align, l.noteStyle(), cell.notes)
			x += l.widths[i]
		}
	})
}

// markIndent is how far from the left of a cell its mark stands: at the left,
// or before a text that is set to the right.
func (l *layout) markIndent(i int, c wrapped) float64 {
	if l.t.Columns[i].Align != typeset.Right {
		return 0
	}
	return max(l.room(i, c.Cell)-c.style.Width(c.lines[0]), 0)
}

// text draws the lines of a cell that starts at x, drop below its upper edge.
// Its baselines are step apart.
func (l *layout) text(c draw.Canvas, x, drop, step, width float64, align typeset.Align, st typeset.Style, lines []string) {
	y := c.Max.Y.Points() - rowPad - drop - st.Size*0.92
	for _, line := range lines {
		room := width - 2*cellPad
		at := x + cellPad
		if align == typeset.Right {
			at += room - st.Width(line)
		}
		l.b.Draw(c, st, at, y, room, line)
		y -= step
	}
}

func fill(c vg.Canvas, r vg.Rectangle, clr color.Color) {
	c.SetColor(clr)
	c.Fill(r.Path())
}
