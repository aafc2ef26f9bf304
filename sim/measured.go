package sim

import (
	"math"

	"linewitness/fdtd"
	"linewitness/sim/agree"
	"linewitness/sim/design"
)

// A measured is a figure of the steady state, in SI units.
type measured struct {
	at     func(view) float64           // what a view makes of it
	spread func(size errorSize) float64 // how far it may be off for errors of the phasors of that size
	levels int                          // how many grids have it
	// difference is set for a figure that is a difference of the witnesses
	// itself: it is known as it is on its grid, and falls to nothing with it.
	difference bool
	pick       func(run *fdtd.Stress) float64 // of the time domain only: then the fields above are not there
}

// An errorSize is the error of the phasors of one kind on a section, relative
// to the largest of them.
type errorSize func(*agree.Kind) float64

// foundOrExpected is the size of the errors that the witnesses show, or must
// have.
func foundOrExpected(k *agree.Kind) float64 { return math.Max(k.Found, k.Expected) }

// uniform is the same error everywhere.
func uniform(e float64) errorSize { return func(*agree.Kind) float64 { return e } }

// measure makes a figure of a quantity. A requirement's fields tell what else
// is to be known of it.
func (s *solved) measure(r design.Requirement, q quantity) *measured {
	return &measured{
		at:     func(v view) float64 { return q(s.view(v)) },
		spread: func(size errorSize) float64 { return s.spreadOf(r, q, budgetOf(s.net, &s.compared, size)) },
		levels: len(s.levels),
	}
}

// relativeTo makes the change of a figure from its reference.
func (m *measured) relativeTo(ref *measured, r design.Requirement) *measured {
	return &measured{
		at: func(v view) float64 { return relative(r, m.at(v), ref.at(v)) },
		spread: func(size errorSize) float64 {
			return relativeSpread(r, m.at(closedForm), m.spread(size)) + relativeSpread(r, ref.at(closedForm), ref.spread(size))
		},
		levels: min(m.levels, ref.levels),
	}
}

// near makes an angle that is within half a turn of centre.
func (m *measured) near(centre float64) *measured {
	out := *m
	out.at = func(v view) float64 { return centre + math.Remainder(m.at(v)-centre, 2*pi) }
	return &out
}
