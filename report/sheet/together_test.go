package sheet

import (
	"testing"

	"gonum.org/v1/plot/vg/draw"
)

// rowsOf is a table of n rows of one line.
func rowsOf(n int) Table {
	t := Table{Columns: []Column{{Head: "Name", Grow: 1}}}
	for range n {
		t.Rows = append(t.Rows, Row("row"))
	}
	return t
}

// A short table that does not find room goes to the next page whole; of a long
// one as much stays as finds room, and never its last row alone.
func TestTableStaysTogether(t *testing.T) {
	for _, c := range []struct {
		rows  int
		whole bool
	}{{6, true}, {20, false}} {
		b := book()
		table := rowsOf(c.rows)
		step := b.layout(table).height(b.layout(table).wrap(table.Rows[0]))
		b.Block(b.Body()-5*step, func(draw.Canvas) {})
		if got := b.Kept(table) > b.Room(); got != c.whole {
			t.Errorf("%d rows: kept %v of a room of %v", c.rows, b.Kept(table), b.Room())
		}
		b.Table(table)
		head := b.layout(table).headHeight
		left := int((b.Body() - b.Room() - head) / step) // rows on the second page
		if b.Pages() != 2 || (left >= c.rows) != c.whole {
			t.Errorf("%d rows: %d of them on page %d", c.rows, left, b.Pages())
		}
		finish(t, b)
	}
	for rest := 1.0; rest < 6; rest += 0.25 { // whatever finds room, two rows or more go over
		b := book()
		table := rowsOf(30)
		l := b.layout(table)
		step := l.height(l.wrap(table.Rows[0]))
		b.Block(b.Body()-l.headHeight-(30-rest)*step-4, func(draw.Canvas) {})
		b.Table(table)
		if over := (b.Body() - b.Room() - l.headHeight) / step; b.Pages() == 2 && over < 2 {
			t.Errorf("with room for %v rows less, %.1f rows stand on the next page", rest, over)
		}
	}
}
