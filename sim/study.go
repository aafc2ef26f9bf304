package sim

import (
	"math"

	"linewitness/fdtd"
	"linewitness/sim/gci"
	"linewitness/sim/record"
)

// A studied is a figure to be studied on the grids.
type studied struct {
	id, quantity, subject string
	scale                 scale
	figure                *measured
	spread                float64 // of a figure of the time domain only: its uncertainty, SI
	whole                 float64 // what per cents are of, in the unit; 0 for the value itself
}

// residualSlack is how many times too small the estimate of what the settling
// leaves may be: as of package agree.
const residualSlack = 3

// trusted is the part of the settling tolerance that is added to the estimate: below
// it a slow tail can hide behind faster modes. Without it one random network in some
// hundreds passed its uncertainty, by 2 %.
const trusted = 0.001

// leftover is how far the settling run may be from steady state, relative to the
// largest of each section: its estimate with the slack, and what its mean and its
// harmonics show of a tail that the estimate does not see.
func (s *solved) leftover() float64 {
	return residualSlack*s.steady.Settling.Residual + s.tail()
}

// tail is the part of that which the estimate may not have seen.
func (s *solved) tail() float64 {
	g := s.steady.Settling
	return trusted*s.design.Grid.SettleTolerance + g.Mean + g.Harmonic
}

// arithmetic is the relative error that rounding may leave in a phasor, and
// what the crest of a wave through the points of a grid may miss.
const arithmetic = 1e-9

// settlingFloor is the part of what the settling leaves that may differ from
// grid to grid, since all run for the same time: changes below it are no changes.
const settlingFloor = 0.1

// study compares what the grids make of a figure, and that with the closed
// form, in the sense of ASME V&V 20: the error of the finest grid against the
// uncertainty that grid, settling, rational forms and rounding give it.
//
// The part of the grid is the larger of the index and of what the dispersion
// formulas predict, with the factor of safety of an index. The prediction was never
// passed at the points of a grid (see package agree); the factor is for crests,
// which lie between them.
func (s *solved) study(f studied) record.Study {
	out := record.Study{ID: f.id, Quantity: f.quantity, Subject: f.subject, Unit: f.scale.unit, Phasor: math.NaN()}
	if f.figure.pick != nil {
		s.studyRun(&out, f)
		return out
	}
	at := func(v view) float64 { return f.scale.from(f.figure.at(v)) }
	finest := at(fdtdView(0))
	per := s.sensitivity(f, at)
	out.Settling, out.Rounding = per*f.figure.residual, arithmetic*(per+math.Abs(finest))
	for level := range f.figure.levels {
		out.Values = append(out.Values, at(fdtdView(level)))
	}
	s.index(&out, f, out.Rounding+settlingFloor*out.Settling)
	if f.figure.difference {
		out.GCI, out.GCIPercent, out.Factor = math.NaN(), math.NaN(), 0
	}
	out.Phasor = at(closedForm)
	out.Form = atLeast(math.Abs(at(limitOfGrids)-out.Phasor), 0)
	out.Grid = atLeast(out.GCI, atLeast(gci.Factor*math.Abs(at(gridPredicted)-at(limitOfGrids)), 0))
	out.Error = finest - out.Phasor
	out.Uncertainty = out.Grid + out.Settling + out.Form + out.Rounding
	// A figure that is infinite for one of the witnesses (the impedance of an open
	// end) has no error; the comparison along the sections has it.
	if math.IsInf(out.Error, 0) {
		out.Error = math.NaN()
	}
	out.Explained = !(math.Abs(out.Error) > out.Uncertainty)
	s.studyParts(&out, f)
	return out
}

// studyParts leaves the verdict on a figure that its uncertainty bends, as a level
// is bent, to what it is made of.
func (s *solved) studyParts(out *record.Study, f studied) {
	var reach float64
	switch c := f.figure.composed; {
	case c != nil:
		out.Explained, reach = c.explained()
		reach = f.scale.from(reach)
	case f.scale.unit == "dBm":
		watts := f.figure.study()
		out.Explained = watts.Explained
		at := f.figure.at(fdtdView(0))
		reach = math.Max(f.scale.from(at+watts.Uncertainty)-f.scale.from(at), f.scale.from(at)-f.scale.from(at-watts.Uncertainty))
	default:
		return
	}
	out.Uncertainty = math.Max(out.Uncertainty, reach)
}

// sensitivity is the change of a figure, in its unit, for a relative error of
// the phasors of 1, from a small one.
func (s *solved) sensitivity(f studied, at func(view) float64) float64 {
	const small = 1e-6
	d := f.figure.moved(small)
	base := f.figure.at(fdtdView(0))
	up, down := f.scale.from(base+d)-at(fdtdView(0)), at(fdtdView(0))-f.scale.from(base-d)
	return atLeast(math.Abs(up), math.Abs(down)) / small
}

// atLeast is the larger of two numbers; one that is NaN does not count.
func atLeast(a, b float64) float64 {
	if math.IsNaN(a) || a < b {
		return b
	}
	return a
}

// index fills the grid convergence index from the values.
func (s *solved) index(out *record.Study, f studied, floor float64) {
	var h []float64
	for i := range out.Values {
		h = append(h, math.Pow(2, float64(i)))
	}
	if math.IsNaN(floor) || math.IsInf(floor, 0) {
		floor = 0
	}
	g := gci.Study(h, out.Values, floor)
	out.Behaviour, out.Order, out.Extrapolated = g.Behaviour, g.Order, g.Extrapolated
	out.Factor, out.GCI, out.GCIPercent = g.Factor, g.GCI, 100*g.Relative
	switch {
	case f.scale.unit == "dB", f.scale.unit == "dBm", f.scale.unit == "deg":
		out.GCIPercent = math.NaN() // no natural zero
	case f.whole > 0:
		out.GCIPercent = 100 * g.GCI / f.whole
	}
}

// studyRun studies a figure of the stress runs, which are made on two grids. A
// source that jumps is compared with its bare jump on both.
func (s *solved) studyRun(out *record.Study, f studied) {
	last := s.stress
	if s.sharp != nil {
		last = s.sharp
		out.Subject += ", bare jump"
	}
	for _, run := range []*fdtd.Stress{last, s.second} {
		out.Values = append(out.Values, f.scale.from(f.figure.pick(run)))
	}
	floor := 0.0
	if f.scale.unit == "s" { // a time is found to a step
		floor = s.second.Grid.Step
	}
	s.index(out, f, floor)
	out.Error = math.NaN()
	out.Uncertainty = f.scale.from(f.spread) - f.scale.from(0)
	out.Settling = atRest * math.Abs(out.Values[0])
	out.Grid = atLeast(out.Uncertainty-out.Settling, 0)
	out.Explained = true
}

// agreementFigure is the largest difference of the witnesses as a figure, on
// each grid at its own points.
func (s *solved) agreementFigure() *measured {
	found := []float64{s.compared.Found()}
	for i, c := range s.coarser {
		r := compareOn(s.coarseGrids[i], c, 0)
		found = append(found, r.Found())
	}
	return s.studying(&measured{
		difference: true,
		residual:   s.leftover(),
		levels:     len(found),
		at: func(v view) float64 {
			if v < 0 {
				return math.NaN()
			}
			return found[v]
		},
		spread: func() float64 { return 0 },
		moved:  func(e float64) float64 { return e },
	})
}
