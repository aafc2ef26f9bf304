package figure

import (
	"math"

	"gonum.org/v1/plot/vg"
)

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
