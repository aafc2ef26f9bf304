package fdtd

import (
	"errors"

	"gonum.org/v1/gonum/mat"

	"linewitness/sim/network"
)

// errJunctions says that the junction equations have no solution; a design
// that passed its checks cannot come to that.
var errJunctions = errors.New("fdtd: the lumped parts form a loop without impedance, or a junction hangs in the air")

// A junctionSystem is Kirchhoff's law at all junctions over one step,
//
//	sum over section ends [C dx/2 (v1-v0)/dt + G dx/2 (v1+v0)/2 + I out]
//	  + sum over branches [i out] = 0
//
// for the unknowns v1, the voltages at the end of the step, and the currents
// of the ideal branches. A junction where no section ends stores nothing; its
// unknown is the average voltage over the step instead, for which the law
// holds without memory (v1 itself would ring for ever).
//
// The matrix falls apart into blocks that no branch joins; each is inverted
// once, and a step multiplies by the inverses.
type junctionSystem struct {
	stores   []bool    // a section ends here
	keep     []float64 // C dx/(2 dt) - G dx/4 summed, S: what v0 brings along
	branches []companion
	blocks   []block
	unknowns int
}

// A block is a set of unknowns and the inverse of its part of the matrix.
type block struct {
	index []int
	inv   []float64 // row-major
}

// half is the factor of an unknown voltage in the average over the step: the
// average of v0 and v1, or the unknown itself where nothing is stored.
func (s *junctionSystem) half(j int) float64 {
	if s.stores[j] {
		return 0.5
	}
	return 1
}

// average is the voltage of a junction averaged over the step, from the
// unknown x and the voltage v0 before the step.
func (s *junctionSystem) average(j int, x, v0 []float64) float64 {
	if j == network.Ground {
		return 0
	}
	if s.stores[j] {
		return (x[j] + v0[j]) / 2
	}
	return x[j]
}

// newJunctionSystem builds and inverts the system of n junctions; add and
// keep are the storage of the section ends, and branches ends with the source.
func newJunctionSystem(stores []bool, add, keep []float64, branches []companion) (*junctionSystem, error) {
	n := len(stores)
	s := &junctionSystem{stores: stores, keep: keep, branches: branches, unknowns: n}
	for b := range s.branches {
		if s.branches[b].ideal {
			s.branches[b].slot = s.unknowns
			s.unknowns++
		}
	}
	a := mat.NewDense(s.unknowns, s.unknowns, nil)
	plus := func(i, j int, v float64) { a.Set(i, j, a.At(i, j)+v) }
	for j := range n {
		plus(j, j, add[j])
	}
	for _, c := range s.branches {
		if c.ideal {
			s.stampIdeal(plus, c)
		} else {
			s.stamp(plus, c)
		}
	}
	return s, s.invert(a)
}

// stamp enters a branch with an impedance.
func (s *junctionSystem) stamp(plus func(i, j int, v float64), c companion) {
	ya := c.y * s.half(c.a)
	plus(c.a, c.a, ya)
	if c.b != network.Ground {
		yb := c.y * s.half(c.b)
		plus(c.b, c.b, yb)
		plus(c.a, c.b, -yb)
		plus(c.b, c.a, -ya)
	}
}

// stampIdeal enters a branch without impedance: its current is an unknown,
// its voltage a constraint. Between junctions that store the constraint is on
// v1, else on the averages.
func (s *junctionSystem) stampIdeal(plus func(i, j int, v float64), c companion) {
	wa, wb := 1.0, 1.0
	if s.onAverage(c) {
		wa = s.half(c.a)
		if c.b != network.Ground {
			wb = s.half(c.b)
		}
	}
	plus(c.a, c.slot, c.turns)
	plus(c.slot, c.a, c.turns*wa)
	if c.b != network.Ground {
		plus(c.b, c.slot, -1)
		plus(c.slot, c.b, -wb)
	}
}

// onAverage reports whether an ideal branch constrains average voltages.
func (s *junctionSystem) onAverage(c companion) bool {
	return !s.stores[c.a] || c.b != network.Ground && !s.stores[c.b]
}

// invert finds the blocks of a and their inverses.
func (s *junctionSystem) invert(a *mat.Dense) error {
	for _, index := range components(a) {
		m := len(index)
		sub := mat.NewDense(m, m, nil)
		for i, r := range index {
			for j, c := range index {
				sub.Set(i, j, a.At(r, c))
			}
		}
		var inv mat.Dense
		if err := inv.Inverse(sub); err != nil {
			var cond mat.Condition
			if !errors.As(err, &cond) || float64(cond) > 1e15 {
				return errJunctions
			}
		}
		b := block{index: index}
		for i := range m {
			for j := range m {
				b.inv = append(b.inv, inv.At(i, j))
			}
		}
		s.blocks = append(s.blocks, b)
	}
	return nil
}

// components are the sets of unknowns that the matrix couples, in order.
func components(a *mat.Dense) [][]int {
	n, _ := a.Dims()
	seen := make([]bool, n)
	var all [][]int
	for start := range n {
		if seen[start] {
			continue
		}
		seen[start] = true
		set := []int{start}
		for k := 0; k < len(set); k++ {
			for j := range n {
				if !seen[j] && (a.At(set[k], j) != 0 || a.At(j, set[k]) != 0) {
					seen[j] = true
					set = append(set, j)
				}
			}
		}
		all = append(all, set)
	}
	return all
}

// solve multiplies rhs by the inverse matrix into x.
func (s *junctionSystem) solve(x, rhs []float64) {
	for i := range s.blocks {
		b := &s.blocks[i]
		m := len(b.index)
		for r, row := range b.index {
			sum := 0.0
			for c, v := range b.inv[r*m : r*m+m] {
				sum += v * rhs[b.index[c]]
			}
			x[row] = sum
		}
	}
}
