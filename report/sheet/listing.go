package sheet

import (
	"unicode/utf8"

	"gonum.org/v1/plot/vg/draw"
	"linewitness/report/ink"
	"linewitness/report/typeset"
)

// listingIndent is the room of the line numbers.
const listingIndent = 26.0

// ListingLine writes a numbered line of a listing in a fixed pitch, breaking
// it where it is too long. Its spaces stay as they are.
func (b *Book) ListingLine(number, s string) {
	st := ListingStyle
	columns := int((b.Width() - listingIndent) / st.Width("0"))
	for first := true; first || s != ""; first = false {
		var part string
		part, s = cut(s, columns)
		b.Block(st.Size*1.24, func(c draw.Canvas) {
			x, y := c.Min.X.Points(), c.Max.Y.Points()-st.Size*ascender
			if first {
				st.Of(ink.Soft).Draw(c, x+listingIndent-8, y, number, typeset.Right)
			}
			b.Draw(c, st, x+listingIndent, y, b.Width()-listingIndent, part)
		})
	}
}

// cut splits s after n characters.
func cut(s string, n int) (head, tail string) {
	if utf8.RuneCountInString(s) <= n {
		return s, ""
	}
	count := 0
	for i := range s {
		if count == n {
			return s[:i], s[i:]
		}
		count++
	}
	return s, ""
}

// Equation writes an equation, indented.
func (b *Book) Equation(s string) {
	const indent = 16
	st := BodyStyle.In(typeset.Italic)
	b.Space(3)
	for _, line := range st.Wrap(s, b.Width()-indent) {
		b.Block(leadingOf(st)*1.15, func(c draw.Canvas) {
			b.Draw(c, st, c.Min.X.Points()+indent, c.Max.Y.Points()-st.Size, b.Width()-indent, line)
		})
	}
	b.Space(5)
}
