package sim

import (
	"math"
	"sync"

	"linewitness/fdtd"
	"linewitness/sim/design"
	"linewitness/sim/record"
)

// A measured is a figure of the steady state, in SI units.
type measured struct {
	at       func(view) float64         // what a view makes of it
	spread   func() float64             // how far it is likely off, see likely
	moved    func(e float64) float64    // how far it moves for errors of all phasors of e, relative to the largest of their kind
	study    func() record.Study        // on the grids, in SI units
	residual float64                    // what the settling run leaves of it at most, see leftover
	levels   int                        // how many grids have it
	composed *composed                  // what it is made of, if its uncertainty is that of its parts
	pick     func(*fdtd.Stress) float64 // of the time domain only: then the fields above are not there

	// difference is set for a figure that is a difference of the witnesses
	// itself: it is known as it is on its grid, and falls to nothing with it.
	difference bool
}

// measure makes a figure of a quantity. A requirement's fields tell what else
// is to be known of it.
func (s *solved) measure(r design.Requirement, q quantity) *measured {
	return s.studying(&measured{
		at:       func(v view) float64 { return q(s.view(v)) },
		spread:   func() float64 { return s.spreadOf(r, q, s.likely()) },
		moved:    func(e float64) float64 { return s.spreadOf(r, q, s.budget(e)) },
		residual: s.leftover(),
		levels:   len(s.levels),
	})
}

// studying lets a figure be studied by its own case.
func (s *solved) studying(m *measured) *measured {
	m.study = sync.OnceValue(func() record.Study { return s.study(studied{scale: asItIs, figure: m}) })
	return m
}

// uncertainty is how far the figure may be off: what is likely, or what the
// study finds, whichever is larger.
func (m *measured) uncertainty() float64 {
	return math.Max(m.spread(), m.study().Uncertainty)
}

// bounds are the least and the largest value that a figure may have, going by
// what a view makes of it.
func (m *measured) bounds(v view) (low, high float64) {
	if m.composed != nil {
		return m.composed.bounds(v, (*measured).uncertainty)
	}
	at := m.at(v)
	if math.IsInf(at, 0) {
		return at, at
	}
	u := m.uncertainty()
	return at - u, at + u
}

// apart makes the difference of an angle from its reference.
func (s *solved) apart(m, ref *measured) *measured {
	return s.studying(&measured{
		at:       func(v view) float64 { return math.Remainder(m.at(v)-ref.at(v), 2*pi) },
		spread:   func() float64 { return m.spread() + ref.spread() },
		moved:    func(e float64) float64 { return m.moved(e) + ref.moved(e) },
		residual: math.Max(m.residual, ref.residual),
		levels:   min(m.levels, ref.levels),
	})
}

// near makes an angle whose closed form is within half a turn of centre, and the
// rest within half a turn of that.
func (s *solved) near(m *measured, centre float64) *measured {
	exact := centre + math.Remainder(m.at(closedForm)-centre, 2*pi)
	out := *m
	out.at = func(v view) float64 { return exact + math.Remainder(m.at(v)-exact, 2*pi) }
	return s.studying(&out)
}
