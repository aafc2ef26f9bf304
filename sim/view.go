package sim

import (
	"math"
	"math/cmplx"
)

// A view names one of the steady states of a case.
type view int

// The views. Those of the time domain, finest grid first, are fdtdView(0) and
// on.
const (
	closedForm    view = -1 // the phasor witness
	gridPredicted view = -2 // what the finest grid makes of it, by the dispersion formulas
	limitOfGrids  view = -3 // what a grid without a step would: the rational forms alone
)

func fdtdView(level int) view { return view(level) }

// view gives the steady state of a view.
func (s *solved) view(v view) *state {
	switch v {
	case closedForm:
		return s.exact
	case gridPredicted:
		return s.predicted
	case limitOfGrids:
		return s.limit
	}
	return s.levels[v]
}

// state is the steady state that a grid must make, in the form of a state. The
// currents inside a section are those of the wave on the grid, which differ from
// those at its ends by the half cells there.
func (g *gridding) state(s *solved) *state {
	out := phasorState(s.net, g.discrete)
	for k, w := range g.waves {
		inside := cmplx.Abs(w.EndImpedance / w.Impedance)
		e := &out.current[k]
		e.largest.value *= inside
		e.smallest.value *= inside
		for _, end := range out.ends[k] {
			e.largest.value = math.Max(e.largest.value, cmplx.Abs(end.i))
		}
	}
	return out
}

// views fills the states that are predicted rather than found.
func (s *solved) views() {
	s.predicted = s.grid.state(s)
	s.limit = s.grid.limit.state(s)
}
