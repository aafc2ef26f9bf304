package sheet

import (
	"gonum.org/v1/plot/vg/draw"
	"linewitness/report/ink"
	"linewitness/report/typeset"
)

// Overline writes the small line above a title.
func (b *Book) Overline(s string) {
	b.lines(NoteStyle.In(typeset.Bold), s)
	b.Space(3)
}

// Title writes the title of the document.
func (b *Book) Title(s string) {
	b.enter("Summary", 0) // an outline must begin with its first level
	const most = 4        // lines; the listing of the design file has the rest
	for _, line := range First(TitleStyle.Wrap(s, b.Width()), most) {
		b.lines(TitleStyle, line)
	}
	b.Block(4, func(c draw.Canvas) {
		rule(c, c.Min.X.Points(), c.Max.X.Points(), c.Min.Y.Points(), 1.4)
	})
	b.Space(6)
}

// A Field is a labelled value. Two fields share a line unless one is wide.
type Field struct {
	Label, Value string
	Face         typeset.Face
	Wide         bool
	Lines        int // of the value at most; 0 means twelve
}

// FieldLabel is the width of the labels.
const FieldLabel = 108.0

const fieldLines = 12 // at most; the listing of the design file has the rest

// lines breaks the value of a field into lines.
func (f Field) lines(room float64) []string {
	most := fieldLines
	if f.Lines > 0 {
		most = min(f.Lines, fieldLines)
	}
	return First(fieldStyle(f).Wrap(f.Value, room), most)
}

// First returns the first n lines, with an ellipsis if there are more.
func First(lines []string, n int) []string {
	if len(lines) <= n {
		return lines
	}
	return append(lines[:n-1:n-1], "…")
}

// Fields writes labelled values. A few lines of them are not parted by the foot
// of a page.
func (b *Book) Fields(fields []Field) {
	const few = 8
	if len(fields) <= few {
		b.Need(b.fieldsHeight(fields))
	}
	for i := 0; i < len(fields); {
		if !fields[i].Wide && i+1 < len(fields) && !fields[i+1].Wide {
			b.fieldRow(fields[i:i+2], b.Width()/2)
			i += 2
			continue
		}
		b.fieldRow(fields[i:i+1], b.Width())
		i++
	}
}

// fieldsHeight returns the height of fields with a line to each.
func (b *Book) fieldsHeight(fields []Field) (h float64) {
	for _, f := range fields {
		n := len(f.lines(b.Width() - FieldLabel - 6))
		if f.Wide {
			h += float64(n)*leadingOf(BodyStyle) + 2
		} else { // two to a line
			h += (float64(n)*leadingOf(BodyStyle) + 2) / 2
		}
	}
	return h
}

func (b *Book) fieldRow(fields []Field, width float64) {
	room := width - FieldLabel - 6
	var values [][]string
	most := 1
	for _, f := range fields {
		values = append(values, f.lines(room))
		most = max(most, len(values[len(values)-1]))
	}
	b.Block(float64(most)*leadingOf(BodyStyle)+2, func(c draw.Canvas) {
		for i, f := range fields {
			x, y := c.Min.X.Points()+float64(i)*width, c.Max.Y.Points()-BodyStyle.Size*ascender
			b.Draw(c, NoteStyle, x, y, FieldLabel-4, f.Label)
			for k, line := range values[i] {
				b.Draw(c, fieldStyle(f), x+FieldLabel, y-float64(k)*leadingOf(BodyStyle), room, line)
			}
		}
	})
}

func fieldStyle(f Field) typeset.Style {
	st := typeset.Style{Face: f.Face, Size: BodyStyle.Size, Color: ink.Text}
	if f.Face == typeset.Mono {
		st.Size -= 0.8
	}
	return st
}
