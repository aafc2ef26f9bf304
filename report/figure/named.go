package figure

import (
	"math"

	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
	"linewitness/report/ink"
	"linewitness/report/typeset"
)

// A Curve is a curve that carries its name.
type Curve struct {
	Name  string
	X, Y  []float64
	Style draw.LineStyle
}

// Curves draws curves and writes the name of each beside it, at the place where
// it hides least of the others. A dot on the curve says where it belongs.
func (pn *Panel) Curves(curves []Curve) {
	for _, v := range curves {
		pn.Line(v.X, v.Y, v.Style)
	}
	pn.over = append(pn.over, inData(func(c draw.Canvas, x, y func(float64) vg.Length) {
		n := &namer{c: c, taken: newRaster(c.Rectangle)}
		for _, r := range pn.tags {
			n.taken.block(r)
		}
		for i, v := range curves {
			n.points = append(n.points, n.taken.curve(i, pn.paths(v.X, v.Y, x, y)))
		}
		for i, v := range curves {
			n.name(i, v)
		}
	}))
}

// A Mark is an upright line with a label at its head.
type Mark struct {
	At    float64
	Label string
}

// markRows is how many labels of marks may stand one above the other.
const markRows = 3

// Marks draws upright lines, ascending, with their labels at the head of the
// panel, in as many rows as they need to stand clear of each other. A label
// that finds no room in markRows rows is left out; its line is not.
func (pn *Panel) Marks(marks []Mark, style draw.LineStyle) {
	at := func(m Mark, x func(float64) vg.Length) vg.Length { return x(pn.x.at(m.At)) }
	pn.p.Add(inData(func(c draw.Canvas, x, _ func(float64) vg.Length) {
		for _, m := range marks {
			if finite(m.At) {
				c.StrokeLine2(style, at(m, x), c.Min.Y, at(m, x), c.Max.Y)
			}
		}
	}))
	pn.over = append(pn.over, inData(func(c draw.Canvas, x, _ func(float64) vg.Length) {
		var end [markRows]float64
		for _, m := range marks {
			if !finite(m.At) || m.Label == "" {
				continue
			}
			left, w := at(m, x).Points()+2, tagStyle.Width(m.Label)
			if left+w > c.Max.X.Points()-2 {
				left = at(m, x).Points() - 2 - w
			}
			for row := range end {
				if left > end[row] {
					tagAt(c, left, c.Max.Y.Points()-tagStyle.Size-float64(row)*TagHeight, m.Label, style)
					end[row] = left + w + 4
					pn.tags = append(pn.tags, tagBox(left, c.Max.Y.Points()-tagStyle.Size-float64(row)*TagHeight, m.Label))
					break
				}
			}
		}
	}))
}

// namer places the names of curves.
type namer struct {
	c      draw.Canvas
	taken  *raster
	points [][]vg.Point // along each curve, inside the panel
}

// The cost of a place for a name, by what it hides: a cell of another curve, of
// its own, and of another name.
const (
	hidesOther = 4
	hidesOwn   = 1
	hidesName  = 400
)

// name writes the name of the i-th curve where that costs least.
func (n *namer) name(i int, v Curve) {
	const tries, gap = 60, 3.5
	w, h := tagStyle.Width(v.Name), tagStyle.Size
	least, at, from := math.Inf(1), vg.Rectangle{}, vg.Point{}
	points := n.points[i]
	step := max(len(points)/tries, 1)
	for k := step / 2; k < len(points); k += step {
		p := points[k]
		for _, d := range [][2]float64{{gap, gap - 1}, {gap, -gap - h + 1}, {-gap - w, gap - 1}, {-gap - w, -gap - h + 1}} {
			corner := p.Add(vg.Point{X: vg.Points(d[0]), Y: vg.Points(d[1])})
			box := vg.Rectangle{Min: corner, Max: corner.Add(vg.Point{X: vg.Points(w), Y: vg.Points(h)})}
			if !within(box, n.c.Rectangle) {
				continue
			}
			if cost := n.taken.cost(i, box) + n.taken.cost(i, around(p)); cost < least {
				least, at, from = cost, box, p
			}
		}
	}
	if math.IsInf(least, 1) {
		return // no part of the curve is in the panel, or the name is too long
	}
	n.c.SetColor(v.Style.Color)
	n.c.Fill(circle(from, vg.Points(1.2)))
	n.c.SetColor(ink.White)
	n.c.Fill(at.Path())
	tagStyle.Of(v.Style.Color).Draw(n.c, at.Min.X.Points(), at.Min.Y.Points()+1.3, v.Name, typeset.Left)
	n.taken.block(at)
}

// around is the neighbourhood of a point in which other curves would make it
// doubtful which one a name belongs to.
func around(p vg.Point) vg.Rectangle {
	const reach = 5
	d := vg.Point{X: reach, Y: reach}
	return vg.Rectangle{Min: p.Sub(d), Max: p.Add(d)}
}

func within(r, area vg.Rectangle) bool {
	return r.Min.X >= area.Min.X && r.Max.X <= area.Max.X && r.Min.Y >= area.Min.Y && r.Max.Y <= area.Max.Y
}

// A raster says which curves pass through the cells of a panel.
type raster struct {
	area          vg.Rectangle
	columns, rows int
	cells         []uint32 // a bit a curve, and nameBit
}

const (
	rasterCell = 2.0     // points
	nameBit    = 1 << 31 // a name stands there
)

func newRaster(area vg.Rectangle) *raster {
	r := &raster{area: area}
	r.columns = int(area.Size().X.Points()/rasterCell) + 1
	r.rows = int(area.Size().Y.Points()/rasterCell) + 1
	r.cells = make([]uint32, r.columns*r.rows)
	return r
}

// cell returns the cell of a point; ok is false outside the panel.
func (r *raster) cell(p vg.Point) (column, row int, ok bool) {
	x, y := (p.X - r.area.Min.X).Points(), (p.Y - r.area.Min.Y).Points()
	if !(x >= 0 && y >= 0 && p.X <= r.area.Max.X && p.Y <= r.area.Max.Y) {
		return 0, 0, false
	}
	return int(x / rasterCell), int(y / rasterCell), true
}

// curve enters the i-th curve and returns points a cell apart along it.
func (r *raster) curve(i int, paths []vg.Path) []vg.Point {
	var out []vg.Point
	for _, path := range paths {
		for k := 1; k < len(path); k++ {
			from, to := path[k-1].Pos, path[k].Pos
			d := to.Sub(from)
			steps := int(math.Min(math.Hypot(d.X.Points(), d.Y.Points())/rasterCell, 1e4)) + 1
			for s := range steps {
				p := from.Add(d.Scale(vg.Length(s) / vg.Length(steps)))
				if column, row, ok := r.cell(p); ok {
					r.cells[row*r.columns+column] |= 1 << min(i, 30)
					out = append(out, p)
				}
			}
		}
	}
	return out
}

// each calls f for the cells of a box.
func (r *raster) each(box vg.Rectangle, f func(cell *uint32)) {
	index := func(v, origin vg.Length, n int) int {
		return min(max(int((v-origin).Points()/rasterCell), 0), n-1)
	}
	for row := index(box.Min.Y, r.area.Min.Y, r.rows); row <= index(box.Max.Y, r.area.Min.Y, r.rows); row++ {
		for column := index(box.Min.X, r.area.Min.X, r.columns); column <= index(box.Max.X, r.area.Min.X, r.columns); column++ {
			f(&r.cells[row*r.columns+column])
		}
	}
}

func (r *raster) cost(i int, box vg.Rectangle) (cost float64) {
	own := uint32(1) << min(i, 30)
	r.each(box, func(cell *uint32) {
		switch v := *cell; {
		case v&nameBit != 0:
			cost += hidesName
		case v&^own != 0:
			cost += hidesOther
		case v != 0:
			cost += hidesOwn
		}
	})
	return cost
}

func (r *raster) block(box vg.Rectangle) {
	r.each(box, func(cell *uint32) { *cell |= nameBit })
}
