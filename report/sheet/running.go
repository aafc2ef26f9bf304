package sheet

import (
	"strings"

	"gonum.org/v1/plot/vg"
	"linewitness/report/canvas"
	"linewitness/report/format"
	"linewitness/report/ink"
	"linewitness/report/typeset"
)

var runningStyle = typeset.Style{Face: typeset.Sans, Size: 7.5, Color: ink.Soft}

// running draws the header and the footer of a page. It comes last because
// only then is the number of pages known: the alias that gofpdf offers for it
// misses the font subset and prints boxes.
func (b *Book) running(page, total int) {
	c := canvas.New(b.pdf, b.fonts, 0, 0, b.paper.Width, b.paper.Height)
	left, right := marginLeft, b.paper.Width-marginRight
	top, foot := b.paper.Height-headerDrop, footerRise
	if page > 1 { // the first page carries the title itself
		runningStyle.Draw(c, left, top, runningStyle.Fit(b.meta.Header, right-left), typeset.Left)
		rule(c, left, right, top-4, 0.4)
	}
	pages := "page " + format.Count(int64(page)) + " of " + format.Count(int64(total))
	room := right - left - runningStyle.Width(pages) - 12
	rule(c, left, right, foot+10, 0.4)
	runningStyle.Draw(c, left, foot, runningStyle.Fit(b.identity(), room), typeset.Left)
	runningStyle.Draw(c, right, foot, pages, typeset.Right)
	b.fail(c.Close())
}

// identity names the document and its revision.
func (b *Book) identity() string {
	var parts []string
	if b.meta.Number != "" {
		parts = append(parts, b.meta.Number)
	} else {
		parts = append(parts, "no document number")
	}
	if b.meta.Revision != "" {
		parts = append(parts, "revision "+b.meta.Revision)
	} else {
		parts = append(parts, "no revision")
	}
	return strings.Join(parts, ", ")
}

// rule draws a horizontal line.
func rule(c vg.Canvas, x0, x1, y, width float64) {
	c.SetColor(ink.Accent)
	c.SetLineWidth(vg.Points(width))
	c.SetLineDash(nil, 0)
	var p vg.Path
	p.Move(vg.Point{X: vg.Points(x0), Y: vg.Points(y)})
	p.Line(vg.Point{X: vg.Points(x1), Y: vg.Points(y)})
	c.Stroke(p)
}
