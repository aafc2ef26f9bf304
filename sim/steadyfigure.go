package sim

import (
	"math"

	"linewitness/sim/design"
)

// steadyValues fills a judgement of the steady state, or of its change from
// another case.
func (s *solved) steadyValues(j *judgement, all map[string]*solved) {
	f := s.steadyFigure(j.req)
	if j.req.RelativeTo != "" {
		ref := all[j.req.RelativeTo]
		f = s.relativeTo(f, ref.reference(j.req), j.req)
		if !ref.steady.Settling.Settled {
			j.note = "case " + ref.name + " did not settle"
		}
	}
	if angular(j.req.Quantity) {
		f = s.near(f, j.centre())
	}
	j.take(f)
	if j.req.Quantity == design.Loss && j.req.Section != "" && math.IsNaN(f.at(closedForm)) {
		j.note = "power enters at both ends, or none goes through"
	}
}

// steadyFigure is the figure that a requirement of the steady state limits.
func (s *solved) steadyFigure(r design.Requirement) *measured {
	l := finder{s.net}.law(r)
	if l == nil {
		return s.measure(r, finder{s.net}.steady(r))
	}
	var parts []*measured
	for _, q := range l.parts {
		parts = append(parts, s.measure(r, q))
	}
	return s.compose(l.of, l.falls, parts...)
}

// reference is that figure in a case that others are compared with. One that
// did not settle has no steady state to compare with.
func (s *solved) reference(r design.Requirement) *measured {
	f := s.steadyFigure(r)
	if !s.steady.Settling.Settled {
		nothing := math.Inf(1)
		f.residual = nothing
		f.spread = func() float64 { return nothing }
	}
	return f
}

// relativeTo makes the change of a figure from its reference: an angle's
// difference, a power's or a voltage's ratio in dB.
func (s *solved) relativeTo(f, ref *measured, r design.Requirement) *measured {
	up := []bool{false, true}
	switch r.Quantity {
	case design.Phase:
		return s.apart(f, ref)
	case design.LoadPower:
		return s.compose(inDecibels(10), up, f, ref)
	default:
		return s.compose(inDecibels(20), up, f, ref)
	}
}

// take makes a figure of the steady state the one that is judged.
func (j *judgement) take(f *measured) {
	j.figure = f
	add := func(v view, method string) {
		low, high := f.bounds(v)
		j.values = append(j.values, witnessed{f.at(v), low, high, method})
	}
	j.values = nil
	add(closedForm, byPhasor)
	add(fdtdView(0), byFDTD)
}

// spreadOf is the uncertainty of a quantity, the larger of the two
// witnesses'. An angle is followed from its own value, so that it does not
// jump by a turn.
func (s *solved) spreadOf(r design.Requirement, q quantity, b *budget) float64 {
	if r.Section == "" && r.At == "" { // the largest anywhere cannot move further than its parts
		switch r.Quantity {
		case design.SteadyVoltage:
			return b.largest().v
		case design.SteadyCurrent:
			return b.largest().i
		}
	}
	worst := 0.0
	for _, w := range []*state{s.exact, s.found} {
		f := q
		if angular(r.Quantity) {
			base := q(w)
			f = func(st *state) float64 { return base + math.Remainder(q(st)-base, 2*pi) }
		}
		worst = math.Max(worst, b.spread(w, f))
	}
	return worst
}

func angular(q design.Quantity) bool {
	return q == design.Phase || q == design.PhaseDifference
}

// centre is the middle of the window of an angle, so that a value just
// outside it is not a turn away; 0 with one limit only.
func (j *judgement) centre() float64 {
	if j.min != nil && j.max != nil {
		return (j.min.SI + j.max.SI) / 2
	}
	return 0
}
