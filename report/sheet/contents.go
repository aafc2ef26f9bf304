package sheet

import (
	"math"

	"gonum.org/v1/plot/vg"
	"linewitness/report/canvas"
	"linewitness/report/format"
	"linewitness/report/ink"
	"linewitness/report/typeset"
)

// An entry is a heading as the contents list it.
type entry struct {
	title string
	level int
	page  int
	top   float64 // of the heading, from the upper edge of its page
}

// units is the height of an entry in the contents, in units that all share; the
// first level has room above it.
func (e entry) units() float64 {
	if e.level == 0 {
		return 1.45
	}
	return 1
}

// Contents takes a page for the list of contents. The list is drawn there when
// the document is written, for only then is it known where everything is: so the
// document is laid out once.
func (b *Book) Contents() {
	if !b.Fresh() {
		b.NewPage()
	}
	b.Heading("Contents", 0)
	b.put(0)
	b.headed = false // the list comes below it
	b.contents, b.contentsTop = b.pdf.PageCount(), b.y-b.gap
	b.NewPage()
}

// listContents draws the contents on their page, with a link to each place.
func (b *Book) listContents() {
	if b.contents == 0 {
		return
	}
	b.pdf.SetPage(b.contents)
	b.cv = canvas.New(b.pdf, b.fonts, 0, 0, b.paper.Width, b.paper.Height)
	l := b.arrange(b.contentsTop - marginBottom)
	for i, column := range l.columns {
		y := b.contentsTop
		for k, e := range column {
			y -= l.unit * e.units()
			if k == 0 { // no room above the first of a column
				y += l.unit * (e.units() - 1)
			}
			b.contentsLine(e, marginLeft+float64(i)*(l.width+contentsGutter), y, l.width, l.size)
		}
	}
	b.fail(b.cv.Close())
	b.cv = nil
}

// contentsLine draws an entry with its baseline at y.
func (b *Book) contentsLine(e entry, x, y, width, size float64) {
	st := BodyStyle.At(size)
	left := x
	if e.level == 0 {
		st = st.In(typeset.Bold).Of(ink.Accent)
	} else {
		left += contentsIndent
	}
	number := format.Count(int64(e.page))
	right := x + width
	room := right - left - BodyStyle.Width("0000")
	title := st.Fit(e.title, room)
	end := left + st.Draw(b.cv, left, y, title, typeset.Left)
	start := right - st.Draw(b.cv, right, y, number, typeset.Right)
	b.leader(end+5, start-5, y)
	link := b.pdf.AddLink()
	b.pdf.SetLink(link, e.top, e.page)
	b.pdf.Link(x, b.paper.Height-y-size, width, size*1.3, link)
}

// leader draws the dots that lead from a title to its page.
func (b *Book) leader(from, to, y float64) {
	if to <= from {
		return
	}
	b.cv.SetColor(ink.Hair)
	b.cv.SetLineWidth(vg.Points(0.6))
	b.cv.SetLineDash([]vg.Length{0.6, 3.4}, 0)
	var p vg.Path
	p.Move(vg.Point{X: vg.Points(from), Y: vg.Points(y)})
	p.Line(vg.Point{X: vg.Points(to), Y: vg.Points(y)})
	b.cv.Stroke(p)
	b.cv.SetLineDash(nil, 0)
}

// The measures of the contents, points.
const (
	contentsIndent = 12.0
	contentsGutter = 22.0
	loose, tight   = 14.0, 9.0 // of the lines
	easy           = 11.0      // of those of one column, which are long
)

// arrangement is how the contents fill their page.
type arrangement struct {
	columns           [][]entry
	unit, width, size float64
}

// arrange puts the entries in one column if they find room there, else in two,
// else only those of the first level, and of those as many as three columns
// hold; the outline of the document has them all.
func (b *Book) arrange(room float64) arrangement {
	var l arrangement
	for _, try := range []struct {
		levels, columns int
		least           float64
	}{{2, 1, easy}, {2, 2, tight}, {2, 3, tight}, {1, 1, tight}, {1, 2, tight}, {1, 3, tight}} {
		var list []entry
		for _, e := range b.entries {
			if e.level < try.levels {
				list = append(list, e)
			}
		}
		var units float64
		l.columns, units = inColumns(list, try.columns)
		l.unit = min(room/units, loose)
		l.width = (b.Width() - contentsGutter*float64(try.columns-1)) / float64(try.columns)
		l.size = min(BodyStyle.Size, l.unit*0.8)
		if l.unit >= try.least {
			return l
		}
	}
	l.unit, l.size = tight, tight*0.8
	for i, c := range l.columns {
		l.columns[i] = c[:min(len(c), int(room/(tight*entry{}.units())))]
	}
	return l
}

// inColumns parts a list into n columns of about equal heights, between chapters
// where one ends nearly there, and returns the height of the highest.
func inColumns(list []entry, n int) (columns [][]entry, units float64) {
	heights := make([]float64, len(list)+1) // of all up to an entry
	for i, e := range list {
		heights[i+1] = heights[i] + e.units()
	}
	from := 0
	for i := range n {
		to := len(list)
		if i < n-1 {
			to = breakNear(list, heights, from, heights[len(list)]*float64(i+1)/float64(n), heights[len(list)]/float64(n))
		}
		columns = append(columns, list[from:to])
		units = max(units, heights[to]-heights[from])
		from = to
	}
	return columns, units
}

// breakNear is where a column ends best that is to end at a height.
func breakNear(list []entry, heights []float64, from int, height, column float64) int {
	const off = 0.12 // of a column, that one may be higher or lower
	best, to := math.Inf(1), from
	for k := from; k <= len(list); k++ {
		away := math.Abs(heights[k] - height)
		if k < len(list) && list[k].level == 0 && away < off*column {
			away -= column
		}
		if away < best {
			best, to = away, k
		}
	}
	return to
}
