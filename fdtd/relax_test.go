package fdtd

import (
	"math/rand/v2"
	"testing"
)

// TestRelaxBlocks compares the fast kernel with the slow loop, bit for bit
// where neither fuses a multiply with an add: for few and many blocks, with a
// guard after each array.
func TestRelaxBlocks(t *testing.T) {
	// On a platform whose compiler fuses, one rounding of numbers of size 1.
	const tolerance = 4e-16
	random := rand.New(rand.NewPCG(3, 4))
	fill := func(x []float64) {
		for i := range x {
			x[i] = random.Float64() - 0.5
		}
	}
	for cells := 1; cells <= 41; cells++ {
		r := &relaxation{}
		fill(r.p[:])
		fill(r.b[:])
		g := r.newAfterglow(cells)
		fill(g.j)
		fill(g.u)
		const guard = 77
		all := [][]float64{g.j, g.sum, g.u}
		for i, x := range all {
			all[i] = append(x, guard, guard, guard, guard)
		}
		g = afterglow{j: all[0][:len(g.j)], sum: all[1][:len(g.sum)], u: all[2][:len(g.u)]}
		slow := afterglow{j: append([]float64(nil), g.j...), sum: append([]float64(nil), g.sum...), u: append([]float64(nil), g.u...)}
		for range 3 {
			relaxBlocks(&g, &r.p, &r.b)
			relaxSlow(&slow, &r.p, &r.b)
		}
		for i := range g.j {
			if d := g.j[i] - slow.j[i]; d > tolerance || d < -tolerance {
				t.Fatalf("%d cells: pole %d is %v, want %v", cells, i, g.j[i], slow.j[i])
			}
		}
		for i := range g.sum {
			if d := g.sum[i] - slow.sum[i]; d > 10*tolerance || d < -10*tolerance {
				t.Fatalf("%d cells: sum %d is %v, want %v", cells, i, g.sum[i], slow.sum[i])
			}
		}
		for i, x := range all {
			for _, v := range x[len(x)-4:] {
				if v != guard {
					t.Fatalf("%d cells: array %d written past its end", cells, i)
				}
			}
		}
	}
}

// TestAdvanceCurrents compares the fast update of currents and their
// relaxation with the slow one, for every remainder of a block.
func TestAdvanceCurrents(t *testing.T) {
	const tolerance = 4e-15 // some roundings of numbers of size 1
	random := rand.New(rand.NewPCG(5, 6))
	fill := func(x []float64) {
		for i := range x {
			x[i] = random.Float64() - 0.5
		}
	}
	for cells := 1; cells <= 41; cells++ {
		r := &relaxation{}
		fill(r.p[:])
		fill(r.b[:])
		c := newCoefs(0.9, 0.1, 0.02)
		g, v, w := r.newAfterglow(cells), make([]float64, cells+1), make([]float64, cells+4)
		fill(g.j)
		fill(g.sum)
		fill(v)
		fill(w)
		slow := afterglow{j: append([]float64(nil), g.j...), sum: append([]float64(nil), g.sum...), u: make([]float64, len(g.u))}
		ws := append([]float64(nil), w...)
		for range 3 {
			advanceCurrents(v, w[:cells], &c, r, &g)
			currentsSlow(v, ws[:cells], &c, &slow)
			relaxSlow(&slow, &r.p, &r.b)
		}
		for i := range w {
			if d := w[i] - ws[i]; d > tolerance || d < -tolerance {
				t.Fatalf("%d cells: w[%d] is %v, want %v", cells, i, w[i], ws[i])
			}
		}
		for i := range cells {
			if d := g.sum[i] - slow.sum[i]; d > tolerance || d < -tolerance {
				t.Fatalf("%d cells: sum %d is %v, want %v", cells, i, g.sum[i], slow.sum[i])
			}
		}
	}
}
