package gci

import (
	"math"

	"linewitness/sim/record"
)

// The constants of Study.
const (
	// FormalOrder is that of the leapfrog scheme and of the trapezoidal rule at
	// its junctions.
	FormalOrder = 2

	// OrderBand is how far the observed order may be from the formal one to
	// count as an order in range. The sources ask for "near" and give no
	// figure that fits all: common practice.
	OrderBand = 0.5

	// CautiousFactor is the factor of safety where no order is observed, or
	// not the formal one (Roache's for two grids).
	CautiousFactor = 3

	// LeastOrder is the lowest order that an index is made with. Below it the
	// index would grow beyond all use (Oberkampf and Roy 2010, from memory).
	LeastOrder = 0.5
)

// A Result says how a value goes with the grid and what is left to an
// infinitely fine one. The unit of Extrapolated and GCI is that of the value.
type Result struct {
	Behaviour            record.Behaviour // empty if a value on three grids is not finite
	Order                float64          // observed; NaN where none is
	Extrapolated         float64          // the value at a step of zero; NaN where that has no meaning
	Factor               float64          // of safety, Factor or CautiousFactor; 0 where none was used
	GCI                  float64          // index of the finest grid, at least the floor; NaN where there is none
	Relative             float64          // GCI/|phi1|; NaN where phi1 is 0
	ApproximateRelative  float64          // e_a21 = |(phi1 - phi2)/phi1|; NaN for one grid
	ExtrapolatedRelative float64          // |(Extrapolated - phi1)/Extrapolated|
	Asymptotic           float64          // r21^p GCI12/GCI23 of relative indices: see Celik
}

// Study is StudyOrder with the FormalOrder.
func Study(h, phi []float64, floor float64) Result { return StudyOrder(h, phi, floor, FormalOrder) }

// StudyOrder judges the values phi on one, two or three grids with the steps
// h, finest first. Changes up to floor, in the unit of phi, are rounding and
// what the settling leaves. formal is the order that the method should have.
//
//	one grid     no index
//	two grids    Factor 3, formal order: GCI = 3 |e21|/(r21^formal - 1)
//	exact        both changes are within the floor, and so is the error
//	oscillatory  the changes differ in sign: as for two grids
//	diverging    the changes do not fall: with the larger of them and the
//	             lowest order, GCI = 3 max(|e21|, |e32|)/(r21^0.5 - 1)
//	converging   p within 0.5 of formal: GCI = 1.25 |e21|/(r21^p - 1)
//	off order    any other p: GCI = 3 |e21|/(r21^p' - 1), p' being p taken
//	             into [0.5, formal]
//
// Changes fall if the equation of the order has a root above 0, which is so if
// |e32/e21| > ln r32/ln r21: for equal ratios if |e21| < |e32|. Changes that
// differ in sign and do not fall are oscillatory, with the index of diverging.
//
// If only the finer change is within the floor, the values have come down to
// the floor and their order cannot be seen: the finer change is noise, with
// its sign. All that is known is that it was no larger than the floor. So the
// value is off order, without an order, and its index is the one that a change
// as large as the floor would give. If only the coarser change is within it,
// the changes grow whatever their signs: diverging.
//
// No index is below the floor: values known to the floor cannot tell more.
//
// Values that are not finite, or a floor that is not, give a Result without an
// index. StudyOrder panics if h and phi differ in length, have no or more than
// three elements, if the steps are not positive, finite and rising, if the
// floor is negative or if formal is not positive.
func StudyOrder(h, phi []float64, floor, formal float64) Result {
	check(h, phi, floor, formal)
	res := noResult(len(h))
	if len(h) == 1 || !allFinite(phi) || !finite(floor) {
		return res
	}
	s := study{floor: floor, formal: formal, e21: phi[1] - phi[0], a: math.Log(h[1] / h[0])}
	if !finite(s.e21) {
		return res
	}
	if len(h) == 2 {
		res.cautious(s.e21, s.a, formal)
	} else {
		s.e32, s.b = phi[2]-phi[1], math.Log(h[2]/h[1])
		if !finite(s.e32) {
			return res
		}
		s.three(&res, [3]float64(h), [3]float64(phi))
	}
	res.GCI = math.Max(res.GCI, floor)
	res.Relative = relative(res.GCI, phi[0])
	res.ApproximateRelative = relative(s.e21, phi[0])
	res.ExtrapolatedRelative = relative(res.Extrapolated-phi[0], res.Extrapolated)
	return res
}

// A study is what the changes are judged by.
type study struct {
	e21, e32 float64 // changes
	a, b     float64 // ln r21, ln r32
	floor    float64
	formal   float64
}

// three fills in all that three grids tell.
func (s *study) three(res *Result, h, phi [3]float64) {
	fine, coarse := math.Abs(s.e21), math.Abs(s.e32)
	falls := coarse*s.a > fine*s.b
	switch {
	case fine <= s.floor && coarse <= s.floor:
		res.Behaviour, res.Extrapolated, res.GCI = record.GridFree, phi[0], s.floor
	case fine <= s.floor:
		res.Behaviour, res.Extrapolated = record.OffOrder, phi[0]
		res.cautious(s.floor, s.a, s.limited(s.least(coarse)))
	case coarse > s.floor && math.Signbit(s.e21) != math.Signbit(s.e32):
		res.Behaviour = record.Oscillatory
		if falls {
			res.cautious(fine, s.a, s.formal)
		} else {
			res.cautious(math.Max(fine, coarse), s.a, s.limited(0))
		}
	case coarse <= s.floor || !falls:
		res.Behaviour = record.Diverging
		res.cautious(math.Max(fine, coarse), s.a, s.limited(0))
	default:
		s.observed(res, Celik(h, phi))
	}
}

// observed takes over the estimate of changes that fall.
func (s *study) observed(res *Result, est Estimate) {
	res.Order, res.Asymptotic = est.Order, est.Asymptotic
	if est.Order >= LeastOrder {
		res.Extrapolated = est.Extrapolated
	}
	if math.Abs(est.Order-s.formal) <= OrderBand {
		res.Behaviour, res.Factor, res.GCI = record.Converging, Factor, est.GCI
		return
	}
	res.Behaviour = record.OffOrder
	res.cautious(s.e21, s.a, s.limited(est.Order))
}

// least is the order that a finer change as large as the floor would show; 0
// if that would not have fallen.
func (s *study) least(coarse float64) float64 {
	if coarse*s.a <= s.floor*s.b {
		return 0
	}
	return order(coarse/s.floor, s.a, s.b)
}

// limited takes an order into [LeastOrder, formal]; one that was not found is
// the lowest.
func (s *study) limited(p float64) float64 {
	if math.IsNaN(p) {
		p = 0
	}
	return math.Min(math.Max(p, LeastOrder), s.formal)
}

// cautious gives the index for a change and an order that was not observed, or
// not in range; a is ln r21.
func (r *Result) cautious(change, a, p float64) {
	r.Factor = CautiousFactor
	r.GCI = CautiousFactor * math.Abs(change) / math.Expm1(p*a)
}

// noResult is what is known before the values are looked at.
func noResult(grids int) Result {
	n := math.NaN()
	b := [...]record.Behaviour{record.OneGrid, record.TwoGrids, ""}[grids-1]
	return Result{b, n, n, 0, n, n, n, n, n}
}

func check(h, phi []float64, floor, formal float64) {
	if len(h) != len(phi) {
		panic("gci: the steps and the values differ in number")
	}
	if len(h) < 1 || len(h) > 3 {
		panic("gci: not one, two or three grids")
	}
	checkSteps(h)
	if floor < 0 {
		panic("gci: negative floor")
	}
	if !(formal > 0) {
		panic("gci: the formal order is not positive")
	}
}

func allFinite(x []float64) bool {
	for _, v := range x {
		if !finite(v) {
			return false
		}
	}
	return true
}
