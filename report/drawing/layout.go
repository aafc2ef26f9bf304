package drawing

import (
	"linewitness/sim/record"
)

// cell is a place of the grid; column 0 holds the junction a band starts from.
type cell struct{ col, row int }

// node is a junction in its place.
type node struct {
	name string
	cell
	end  bool // an open end
	on   int  // band that continues it, or 0
	low  int  // row of its lowest branch
	used bool // a branch runs in its own row

	windings bool // that branch is a transformer
}

// wire is what runs from a junction through a row: an edge to another
// junction, a part, or an edge that closes a loop.
type wire struct {
	item
	from cell // the junction it branches off
	row  int
	to   int // column of the far end
	way  way // for an edge that closes a loop
}

// turned reports whether an edge is drawn from its B to its A.
func (w *wire) turned() bool {
	far := w.close
	if w.child != nil {
		far = w.child.name
	}
	return far == w.via.a && w.via.a != w.via.b
}

// way is how an edge that closes a loop reaches its far junction.
type way struct {
	known bool // false: it ends in an arrow with the name of the junction
	end   cell
	lane  int // 0: up the column itself; 1, 2: to the left of it
}

// Band is one piece of the drawing.
type Band struct {
	Lead   string // the junction it starts from
	Index  int    // 0 is the source's
	Tied   bool   // false: no way leads here from the source
	Rows   int
	Source *record.ModelSource
	nodes  []*node
	wires  []*wire
}

// Layout is a network laid out.
type Layout struct {
	Columns int
	Bands   []*Band
}

// rest is what a later band has to draw.
type rest struct {
	v     *vertex
	items []item
	tied  bool
}

// maxColumns is the most columns whose labels are legible across a page.
const maxColumns = 5

// Lay lays out a network in bands of at most maxRows rows.
func Lay(m record.Model, maxRows int) *Layout {
	trees := forest(m)
	l := &Layout{Columns: 2}
	for _, v := range trees {
		l.Columns = min(max(l.Columns, v.depth), maxColumns)
	}
	p := placer{columns: l.Columns, rows: max(maxRows, 2)}
	for i, v := range trees {
		p.queue = append(p.queue, rest{v: v, items: v.items, tied: i == 0})
	}
	for i := 0; i < len(p.queue); i++ {
		b := p.band(i, p.queue[i])
		if i == 0 {
			b.Source = &m.Source
		}
		l.Bands = append(l.Bands, b)
	}
	return l
}

// placer fills bands and queues what finds no room.
type placer struct {
	columns, rows int
	queue         []rest
	cur           *Band
}

func (p *placer) band(index int, r rest) *Band {
	p.cur = &Band{Lead: r.v.name, Index: index, Tied: r.tied}
	p.cur.Rows = p.place(r.v, r.items, cell{})
	p.cur.route()
	return p.cur
}

// place puts v and what branches off it, the first branch in v's own row, and
// returns the next free row.
func (p *placer) place(v *vertex, items []item, at cell) int {
	n := &node{name: v.name, cell: at, end: v.open, low: at.row}
	p.cur.nodes = append(p.cur.nodes, n)
	row := at.row
	for i, it := range items {
		if row >= p.rows || !p.fits(it, at.col) {
			n.on = len(p.queue)
			p.queue = append(p.queue, rest{v: v, items: items[i:], tied: p.cur.Tied})
			break
		}
		n.low, n.used = row, true
		if row == at.row && it.via != nil && it.via.part != nil {
			n.windings = it.via.part.Ratio != 0
		}
		w := &wire{item: it, from: at, row: row, to: at.col + 1}
		p.cur.wires = append(p.cur.wires, w)
		if it.child != nil {
			row = p.place(it.child, it.child.items, cell{at.col + 1, row})
		} else {
			row++
		}
	}
	return max(row, at.row+1)
}

// fits reports whether a branch off a junction in column col finds its columns
// in the band. Subtrees leave the last column to the parts at their ends.
func (p *placer) fits(it item, col int) bool {
	if it.child != nil && len(it.child.items) > 0 {
		return col+1 < p.columns
	}
	return col < p.columns
}

// lanes is how many edges that close loops can pass a column at its left.
const lanes = 2

// route finds the ways of the edges that close loops.
func (b *Band) route() {
	taken := map[cell][]int{} // rows of a column (and lane) in use, by their far junction's row
	for _, w := range b.wires {
		if w.close == "" {
			continue
		}
		far := b.find(w.close)
		if far == nil || far.col <= w.from.col {
			continue
		}
		for lane := 0; lane <= lanes && !w.way.known; lane++ {
			if b.free(far, w.row, lane, taken) {
				w.way = way{known: true, end: far.cell, lane: lane}
				w.to = far.col
				for r := far.row; r <= w.row; r++ {
					at := cell{far.col*(lanes+1) + lane, r}
					taken[at] = append(taken[at], far.row)
				}
			}
		}
	}
}

// free reports whether an edge can run up from row to the junction far.
func (b *Band) free(far *node, row, lane int, taken map[cell][]int) bool {
	for r := far.row; r <= row; r++ {
		for _, other := range taken[cell{far.col*(lanes+1) + lane, r}] {
			if other != far.row {
				return false
			}
		}
	}
	if lane > 0 {
		return true
	}
	for _, n := range b.nodes {
		if n != far && n.col == far.col && n.row >= far.row && n.row <= row {
			return false
		}
	}
	return far.low <= row
}

func (b *Band) find(name string) *node {
	for _, n := range b.nodes {
		if n.name == name {
			return n
		}
	}
	return nil
}
