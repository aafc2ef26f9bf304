package sheet

import (
	"gonum.org/v1/plot/vg/draw"
	"linewitness/report/typeset"
)

// A heading waits for the block that it belongs to: only then is it known how
// much room the two take, so that it never stands alone at the foot of a page.
type heading struct {
	text  string
	level int     // 0, 1, or unlisted
	keep  float64 // room below it at least
}

// unlisted is the level of a heading that neither the outline nor the contents
// have.
const unlisted = 2

// Heading writes a heading of the first level, with an entry in the outline, on a
// page that has room for it, for the block that follows and for keep below it.
func (b *Book) Heading(s string, keep float64) { b.headings = append(b.headings, heading{s, 0, keep}) }

// Subheading is a heading of the second level.
func (b *Book) Subheading(s string, keep float64) {
	b.headings = append(b.headings, heading{s, 1, keep})
}

// Label is a heading like those of the second level that neither the outline nor
// the contents have.
func (b *Book) Label(s string, keep float64) {
	b.headings = append(b.headings, heading{s, unlisted, keep})
}

// The measures of headings, points.
const (
	headGap, headRule, headDrop = 16.0, 3.0, 6.0 // above, of the rule, below
	subGap, subDrop             = 11.0, 4.0
)

func (h heading) style() typeset.Style {
	if h.level == 0 {
		return HeadStyle
	}
	return SubheadStyle
}

func (h heading) gap() float64 {
	if h.level == 0 {
		return headGap
	}
	return subGap
}

// height returns the height of a heading, with the room below it and without that
// above it.
func (h heading) height(b *Book) float64 {
	text := float64(len(h.style().Wrap(h.text, b.Width()))) * leadingOf(h.style())
	if h.level == 0 {
		return text + headRule + headDrop
	}
	return text + subDrop
}

// waiting returns the height that the headings take that wait, beyond the gap
// that is to be left anyway.
func (b *Book) waiting() (height float64) {
	for i, h := range b.headings {
		height += h.height(b)
		switch {
		case i > 0:
			height += h.gap()
		case !b.Fresh():
			height += max(h.gap()-b.gap, 0)
		}
	}
	return height
}

// put draws the headings that wait before a block of height next.
func (b *Book) put(next float64) {
	list, need := b.headings, b.waiting()
	for _, h := range list {
		next = max(next, h.keep)
	}
	need += next
	b.headings = nil
	b.land(list[0].level, need)
	if b.Room() < need && !b.Fresh() {
		b.NewPage()
	}
	for _, h := range list {
		b.head(h)
	}
}

// head draws a heading and enters it in the outline.
func (b *Book) head(h heading) {
	b.Space(h.gap())
	if h.level != unlisted {
		b.enter(h.text, h.level)
	}
	for _, line := range h.style().Wrap(h.text, b.Width()) {
		b.Block(leadingOf(h.style()), func(c draw.Canvas) {
			b.Draw(c, h.style(), c.Min.X.Points(), c.Max.Y.Points()-h.style().Size*ascender, b.Width(), line)
		})
	}
	below := subDrop
	if h.level == 0 {
		below = headDrop
		b.Block(headRule, func(c draw.Canvas) {
			rule(c, c.Min.X.Points(), c.Max.X.Points(), c.Min.Y.Points()+1, 0.8)
		})
	}
	b.headed = true
	b.Space(below)
}

// enter puts a heading into the outline and into the contents.
func (b *Book) enter(s string, level int) {
	b.began(s)
	b.pdf.Bookmark(s, level, b.paper.Height-b.y)
	b.entries = append(b.entries, entry{s, level, b.pdf.PageCount(), b.paper.Height - b.y})
}
