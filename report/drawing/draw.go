package drawing

import (
	"strings"

	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
	"linewitness/report/format"
	"linewitness/report/ink"
	"linewitness/report/typeset"
	"linewitness/sim/record"
)

const mm = 72 / 25.4

// The measures of the drawing, in points.
const (
	leadWidth = 31 * mm // the column of the source
	tailWidth = 7 * mm  // room at the right for the mark of a continued band
	maxCell   = 64 * mm
	wireDrop  = 7.6 * mm // from the upper edge of a row to its wire
	lanePitch = 1.6 * mm
	textGap   = 1.5 * mm // between a label and what is beside it

	nodeDrop    = 2.9 * mm // from a wire to the base of its junction's name
	nodeDropLow = 3.8 * mm // likewise below a transformer
)

// RowHeight is the height of a row of a band.
const RowHeight = 12 * mm

var (
	nameStyle  = typeset.Style{Face: typeset.Bold, Size: 6.8, Color: ink.Text}
	valueStyle = typeset.Style{Face: typeset.Sans, Size: 6.5, Color: ink.Text}
	nodeStyle  = typeset.Style{Face: typeset.Italic, Size: 6.8, Color: ink.Accent}
	wireStyle  = draw.LineStyle{Color: ink.Text, Width: 0.6}
)

// pen draws one band.
type pen struct {
	c      draw.Canvas
	band   *Band
	x0, y0 float64 // of column 0 and of the wire of row 0
	cell   float64 // width of a column
	labels []vg.Rectangle
}

// Draw draws a band on c, which is at least Rows times RowHeight high, and
// returns the rectangles of its labels.
func (l *Layout) Draw(c draw.Canvas, b *Band) []vg.Rectangle {
	room := c.Size().X.Points() - leadWidth - tailWidth
	p := &pen{
		c: c, band: b,
		x0:   c.Min.X.Points() + leadWidth,
		y0:   c.Max.Y.Points() - wireDrop,
		cell: min(room/float64(l.Columns), maxCell),
	}
	p.lead()
	for _, w := range b.wires {
		p.wire(w)
	}
	for _, n := range b.nodes {
		p.node(n)
	}
	return p.labels
}

func (p *pen) x(col int) float64 { return p.x0 + float64(col)*p.cell }
func (p *pen) y(row int) float64 { return p.y0 - float64(row)*RowHeight }

// line draws a line through points given as x, y pairs.
func (p *pen) line(st draw.LineStyle, xy ...float64) {
	var path vg.Path
	for i := 0; i < len(xy); i += 2 {
		at := vg.Point{X: vg.Points(xy[i]), Y: vg.Points(xy[i+1])}
		if i == 0 {
			path.Move(at)
		} else {
			path.Line(at)
		}
	}
	p.c.SetLineStyle(st)
	p.c.Stroke(path)
}

// label writes a text into a room and notes its rectangle.
func (p *pen) label(st typeset.Style, x, y, room float64, s string) {
	s = st.Fit(s, room)
	if s == "" {
		return
	}
	w := st.Draw(p.c, x, y, s, typeset.Left)
	p.labels = append(p.labels, vg.Rectangle{
		Min: vg.Point{X: vg.Points(x), Y: vg.Points(y - 0.2*st.Size)},
		Max: vg.Point{X: vg.Points(x + w), Y: vg.Points(y + 0.75*st.Size)},
	})
}

// wire draws what runs through a row.
func (p *pen) wire(w *wire) {
	x, y := p.x(w.from.col), p.y(w.row)
	if w.row > w.from.row { // down from the junction to its own row
		p.line(wireStyle, x, p.y(w.from.row), x, y)
	}
	right := p.x(w.to)
	switch {
	case w.part != nil:
		p.part(w.part, x, y)
	case w.child != nil:
		p.edge(w, x, right, y)
	case w.way.known:
		right -= float64(w.way.lane) * lanePitch
		p.edge(w, x, right, y)
		p.up(w.way, right, y)
	default:
		right -= p.cell * 0.3
		p.edge(w, x, right, y)
		p.arrow(right, y, w.close)
	}
}

// up draws the way of an edge that closes a loop into its far junction.
func (p *pen) up(w way, x, y float64) {
	top := p.y(w.end.row)
	if w.lane == 0 {
		p.line(wireStyle, x, y, x, top)
		return
	}
	slant := float64(w.lane) * lanePitch
	p.line(wireStyle, x, y, x, top-slant, p.x(w.end.col), top)
}

// arrow ends an edge with the name of the junction that it leads to.
func (p *pen) arrow(x, y float64, name string) {
	p.line(wireStyle, x, y, x+6, y)
	p.line(wireStyle, x+3, y+2, x+6, y, x+3, y-2)
	p.label(nodeStyle, x+8, y-2.2, p.cell*0.3-8-textGap, name)
}

// edge draws a section as a double line, an element as its symbol, with its
// name and its length or value above.
func (p *pen) edge(w *wire, x, right, y float64) {
	e, room := w.via, right-x-2*textGap-lanes*lanePitch
	if e.section != nil {
		p.section(e.section, x, right, y)
		p.label(nameStyle, x+textGap, y+3.9*mm, room, e.section.Name)
		p.label(valueStyle, x+textGap, y+1.3*mm, room, lengths(e.section, room))
		return
	}
	list, middle := signs(e.part), (x+right)/2
	p.line(wireStyle, x, y, middle-half(list), y)
	p.line(wireStyle, middle+half(list), y, right, y)
	p.row(list, middle, y)
	given := e.part.Given
	if e.part.Ratio != 0 && w.turned() {
		given = turnedRatio(given)
	}
	p.value(e.part, given, x, y, room)
}

// turnedRatio is a ratio read from its other side: "4:1" for "1:4".
func turnedRatio(s string) string {
	a, b, ok := strings.Cut(s, ":")
	if !ok {
		return "1:(" + s + ")"
	}
	return strings.TrimSpace(b) + ":" + strings.TrimSpace(a)
}

// value writes the name and the value of a part above its symbol. A combination
// whose value finds no room says what it is; the table has its value.
func (p *pen) value(part *record.ModelPart, given string, x, y, room float64) {
	given = format.Signed(typeset.Clean(given))
	if combined(part) && valueStyle.Width(given) > room {
		given = part.As
	}
	p.label(nameStyle, x+textGap, y+4.7*mm, room, part.Name)
	p.label(valueStyle, x+textGap, y+2.1*mm, room, given)
}

// combined reports whether a part is more than a series combination.
func combined(part *record.ModelPart) bool { return strings.HasPrefix(part.As, "combination") }

// part draws a load or an element to the return conductor.
func (p *pen) part(part *record.ModelPart, x, y float64) {
	p.value(part, part.Given, x, y, p.cell-2*textGap-lanes*lanePitch)
	list, middle := signs(part), x+p.cell*0.45
	end := middle + half(list) + 2.6*mm
	switch {
	case part.Open:
		p.line(wireStyle, x, y, middle, y)
		p.ring(middle+1.4, y, 1.4)
		return
	case part.Short:
		p.line(wireStyle, x, y, end, y)
	default:
		p.line(wireStyle, x, y, middle-half(list), y)
		p.line(wireStyle, middle+half(list), y, end, y)
		p.row(list, middle, y)
	}
	p.ground(end, y, 1)
}

// node draws a junction and its name, below the wire.
func (p *pen) node(n *node) {
	x, y := p.x(n.col), p.y(n.row)
	p.line(planeStyle, x, y+0.6*mm, x, y+planeRise)
	if n.end {
		p.ring(x, y, 2.2)
	} else {
		p.dot(x, y, 2.2)
	}
	room := p.cell - 2*textGap - lanes*lanePitch
	if n.on > 0 {
		p.flag(x, y, n)
		room = p.cell*flagAt - 2*textGap - lanePitch
	}
	if n.col == 0 && p.band.Index > 0 {
		return // the lead has the name already
	}
	if p.x(n.col)+room > p.c.Max.X.Points() {
		room = p.c.Max.X.Points() - x - textGap
	}
	drop := nodeDrop
	if n.windings { // which reach down to where the name would be
		drop = nodeDropLow
	}
	p.label(nodeStyle, x+textGap, y-drop, room, n.name)
}
