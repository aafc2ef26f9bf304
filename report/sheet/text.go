package sheet

import (
	"image/color"
	"math"
	"strings"

	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
	"linewitness/report/ink"
	"linewitness/report/typeset"
)

// The styles of running text.
var (
	TitleStyle   = typeset.Style{Face: typeset.Bold, Size: 17, Color: ink.Accent}
	HeadStyle    = typeset.Style{Face: typeset.Bold, Size: 12, Color: ink.Accent}
	SubheadStyle = typeset.Style{Face: typeset.Bold, Size: 9.5, Color: ink.Accent}
	BodyStyle    = typeset.Style{Face: typeset.Sans, Size: 8.5, Color: ink.Text}
	CaptionStyle = typeset.Style{Face: typeset.Sans, Size: 7.5, Color: ink.Text}
	NoteStyle    = typeset.Style{Face: typeset.Sans, Size: 7.5, Color: ink.Soft}
	ListingStyle = typeset.Style{Face: typeset.Mono, Size: 7, Color: ink.Text}
)

const (
	leading  = 1.28 // distance of baselines over font size
	ascender = 0.80 // from the upper edge of a line to its baseline, likewise
)

// leadingOf returns the distance of the baselines of a style.
func leadingOf(st typeset.Style) float64 { return st.Size * leading }

// Paragraph writes a paragraph of running text.
func (b *Book) Paragraph(s string) {
	b.Space(4)
	b.lines(BodyStyle, s)
	b.Space(4)
}

// Note writes a paragraph in the smaller secondary style; an empty one is
// nothing.
func (b *Book) Note(s string) {
	if s == "" {
		return
	}
	b.Space(3)
	b.lines(NoteStyle, s)
	b.Space(4)
}

// Item writes a paragraph with a bullet.
func (b *Book) Item(s string) {
	const indent = 10
	b.Space(2.5)
	b.hanging(BodyStyle, "•", indent, s)
}

// Step writes a paragraph with its number in an ordered list before it.
func (b *Book) Step(number, s string) {
	const indent = 14 // as of Verdict
	b.Space(2.5)
	b.hanging(BodyStyle, number, indent, s)
}

// Term writes a paragraph with a bold term before it.
func (b *Book) Term(term, s string) {
	const indent = 118
	b.Space(3)
	b.hanging(BodyStyle, term, indent, s)
}

func (b *Book) hanging(st typeset.Style, lead string, indent float64, s string) {
	first := true
	lines := st.Wrap(s, b.Width()-indent)
	for i, line := range lines {
		b.keep(i, len(lines), leadingOf(st))
		b.Block(leadingOf(st), func(c draw.Canvas) {
			x, y := c.Min.X.Points(), c.Max.Y.Points()-st.Size*ascender
			if first {
				face := st.In(typeset.Bold)
				face.Draw(c, x, y, face.Fit(lead, indent-4), typeset.Left)
				first = false
			}
			b.Draw(c, st, x+indent, y, b.Width()-indent, line)
		})
	}
}

// Caption writes the finding under a figure: a bold label and its text.
func (b *Book) Caption(label, s string) {
	b.Space(captionRise)
	b.labelled(CaptionStyle, label, s)
	b.Space(9)
}

// CaptionHeight returns the height that Caption takes.
func (b *Book) CaptionHeight(label, s string) float64 {
	_, lines := labelLines(CaptionStyle, label, s, b.Width())
	return captionRise + float64(len(lines))*leadingOf(CaptionStyle)
}

// captionRise is the room between a figure and its caption.
const captionRise = 3.0

// labelGap is the room between a bold label and its text.
const labelGap = 5

// labelLines breaks a text whose first line begins after a bold label.
func labelLines(st typeset.Style, label, s string, width float64) (indent float64, lines []string) {
	indent = st.In(typeset.Bold).Width(label) + labelGap
	lines = st.Wrap(s, width-indent)
	if len(lines) == 1 {
		return indent, lines
	}
	rest := strings.TrimPrefix(s[len(lines[0]):], " ")
	return indent, append(lines[:1:1], st.Wrap(rest, width)...)
}

func (b *Book) labelled(st typeset.Style, label, s string) {
	indent, lines := labelLines(st, label, s, b.Width())
	for i, line := range lines {
		b.Block(leadingOf(st), func(c draw.Canvas) {
			x, y := c.Min.X.Points(), c.Max.Y.Points()-st.Size*ascender
			room := b.Width()
			if i == 0 {
				st.In(typeset.Bold).Of(ink.Accent).Draw(c, x, y, label, typeset.Left)
				x, room = x+indent, room-indent
			}
			b.Draw(c, st, x, y, room, line)
		})
	}
}

// lines writes wrapped text. No line of it stands alone at the foot or at the
// head of a page.
func (b *Book) lines(st typeset.Style, s string) { b.linesBefore(st, s, 0) }

// linesBefore is lines before something of height h that stays with the end of
// the text.
func (b *Book) linesBefore(st typeset.Style, s string, h float64) {
	lines := st.Wrap(s, b.Width())
	for i, line := range lines {
		b.keep(i, len(lines), leadingOf(st))
		if h > 0 && i >= len(lines)-2 {
			b.Need(float64(len(lines)-i)*leadingOf(st) + h)
		}
		b.Block(leadingOf(st), func(c draw.Canvas) {
			b.Draw(c, st, c.Min.X.Points(), c.Max.Y.Points()-st.Size*ascender, b.Width(), line)
		})
	}
}

// keep makes room for two lines where the first or the last but one of a
// paragraph of n lines is to be written.
func (b *Book) keep(i, n int, height float64) {
	if n > 1 && (i == 0 || i == n-2) {
		b.Need(2 * height)
	}
}

// Draw sets a line of text in a room and counts it if it is too wide for it.
func (b *Book) Draw(c vg.Canvas, st typeset.Style, x, y, room float64, s string) {
	const slack = 0.05 // rounding of the sum of advances, points
	if st.Draw(c, x, y, s, typeset.Left) > room+slack {
		b.Overfull++
	}
}

// Verdict writes a paragraph that begins with a mark and a word.
func (b *Book) Verdict(m Mark, clr color.Color, word, s string) {
	b.VerdictOf(math.MaxInt, m, clr, word, s)
}

// VerdictOf is Verdict with so many lines at most.
func (b *Book) VerdictOf(most int, m Mark, clr color.Color, word, s string) {
	const indent = 14
	st := BodyStyle
	lead := st.In(typeset.Bold).At(10).Of(clr)
	first := indent + lead.Width(word) + labelGap
	lines := st.Wrap(s, b.Width()-first)
	if len(lines) > 1 {
		rest := strings.TrimPrefix(s[len(lines[0]):], " ")
		lines = append(lines[:1:1], st.Wrap(rest, b.Width()-indent)...)
	}
	lines = First(lines, most)
	for i, line := range lines {
		b.keep(i, len(lines), leadingOf(st))
		b.Block(leadingOf(st), func(c draw.Canvas) {
			x, y := c.Min.X.Points(), c.Max.Y.Points()-st.Size*ascender
			at := x + indent
			if i == 0 {
				m.Draw(c, x+5, y+3, 10)
				lead.Draw(c, at, y, word, typeset.Left)
				at = x + first
			}
			b.Draw(c, st, at, y, b.Width()-(at-x), line)
		})
	}
	b.Space(6)
}
