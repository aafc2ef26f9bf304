package sheet

import (
	"strings"
	"unicode/utf8"

	"gonum.org/v1/plot/vg/draw"
	"linewitness/report/ink"
	"linewitness/report/typeset"
)

// listingIndent is the room of the line numbers.
const listingIndent = 26.0

// Continued is the sign before the lines on which a line of a listing goes on.
const Continued = "»"

// ListingLine writes a numbered line of a listing in a fixed pitch. Its spaces
// stay as they are; where it is too long it goes on below, indented a little more.
func (b *Book) ListingLine(number, s string) {
	st := ListingStyle
	columns := int((b.Width() - listingIndent) / st.Width("0"))
	for i, part := range broken(s, columns) {
		lead := number
		if i > 0 {
			lead = Continued
		}
		b.Block(st.Size*1.24, func(c draw.Canvas) {
			x, y := c.Min.X.Points(), c.Max.Y.Points()-st.Size*ascender
			st.Of(ink.Soft).Draw(c, x+listingIndent-8, y, lead, typeset.Right)
			b.Draw(c, st, x+listingIndent, y, b.Width()-listingIndent, part)
		})
	}
}

// broken breaks a line of a listing into lines of at most n characters: after a
// space if there is one in the second half, else where it is full. What goes on
// is indented by two more than the line itself, up to a third of the width.
func broken(s string, n int) []string {
	margin := min(len(s)-len(strings.TrimLeft(s, " "))+2, n/3)
	head, tail := cut(s, n)
	lines := []string{head}
	for tail != "" {
		head, tail = cut(tail, n-margin)
		lines = append(lines, strings.Repeat(" ", margin)+head)
	}
	return lines
}

// cut splits s after at most n characters, after a space where one is near.
func cut(s string, n int) (head, tail string) {
	if utf8.RuneCountInString(s) <= n {
		return s, ""
	}
	count, at := 0, 0
	for i, r := range s {
		if count == n {
			if at == 0 {
				at = i
			}
			break
		}
		count++
		if r == ' ' && count > n/2 {
			at = i + 1
		}
	}
	return s[:at], s[at:]
}
