package sim

import (
	"cmp"
	"math"
	"slices"

	"linewitness/sim/record"
)

// matrix sets the cases of a record side by side: a row for every requirement,
// in the order of ids, and for every key figure.
func matrix(cases []record.Case, ids []string) record.Matrix {
	var out record.Matrix
	rows := newRowSet()
	for i, c := range cases {
		out.Cases = append(out.Cases, c.Name)
		for _, r := range c.Requirements {
			row := rows.row(r.ID+" "+r.Subject, record.MatrixRow{
				ID: r.ID, Label: labelled(r.Quantity, r.Subject), Unit: r.Unit, Limit: r.Limit,
			})
			row.fill(i, record.MatrixCell{Present: true, Value: r.Value, Verdict: r.Verdict}, r.Margin)
		}
	}
	slices.SortStableFunc(rows.all, func(a, b *row) int { return cmp.Compare(slices.Index(ids, a.ID), slices.Index(ids, b.ID)) })
	for i, c := range cases {
		for _, s := range c.Convergence.Studies {
			if s.ID != "" {
				continue
			}
			row := rows.row(" "+s.Quantity+" "+s.Subject, record.MatrixRow{Label: labelled(s.Quantity, s.Subject), Unit: s.Unit})
			row.fill(i, record.MatrixCell{Present: true, Value: s.Phasor}, math.NaN())
		}
	}
	for _, r := range rows.all {
		r.finish(len(cases))
		out.Rows = append(out.Rows, r.MatrixRow)
	}
	return out
}

func labelled(quantity, subject string) string {
	if subject == "" {
		return quantity
	}
	return quantity + ", " + subject
}

// A rowSet keeps rows by a key, in the order in which they come.
type rowSet struct {
	all []*row
	by  map[string]*row
}

func newRowSet() *rowSet { return &rowSet{by: map[string]*row{}} }

func (s *rowSet) row(key string, r record.MatrixRow) *row {
	if s.by[key] == nil {
		s.by[key] = &row{MatrixRow: r}
		s.all = append(s.all, s.by[key])
	}
	return s.by[key]
}

// A row is being filled; margins are those of its cells, NaN without a limit.
type row struct {
	record.MatrixRow
	margins []float64
}

func (r *row) fill(i int, c record.MatrixCell, margin float64) {
	r.extend(i + 1)
	r.Cells[i], r.margins[i] = c, margin
}

func (r *row) extend(n int) {
	for len(r.Cells) < n {
		r.Cells = append(r.Cells, record.MatrixCell{Difference: math.NaN()})
		r.margins = append(r.margins, math.NaN())
	}
}

// finish fills what the cells are among each other: the differences from the
// nominal design, which is the first case, and the worst.
func (r *row) finish(cases int) {
	r.extend(cases)
	nominal := r.Cells[0]
	worst, badness := -1, math.Inf(-1)
	for i := range r.Cells {
		c := &r.Cells[i]
		c.Difference = math.NaN()
		if i > 0 && c.Present && nominal.Present {
			c.Difference = c.Value - nominal.Value
			if r.Unit == "deg" {
				c.Difference = math.Remainder(c.Difference, 360)
			}
		}
		bad := -r.margins[i]
		if math.IsNaN(bad) && r.Limit == "" {
			bad = math.Abs(c.Difference)
		}
		if bad > badness {
			worst, badness = i, bad
		}
	}
	if worst >= 0 && cases > 1 {
		r.Cells[worst].Worst = true
	}
}
