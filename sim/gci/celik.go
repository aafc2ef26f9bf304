package gci

import "math"

// An Estimate is what the published procedure makes of one value on three
// grids. The unit of GCI and Coarser is that of the value.
type Estimate struct {
	Order                float64 // p, observed
	Extrapolated         float64 // phi_ext21, the value at a step of zero
	ApproximateRelative  float64 // e_a21 = |(phi1 - phi2)/phi1|
	ExtrapolatedRelative float64 // e_ext21 = |(phi_ext21 - phi1)/phi_ext21|
	GCI                  float64 // of the finest grid: Factor |e21|/(r21^p - 1)
	Relative             float64 // GCI/|phi1|, what the source calls GCI_fine21
	Coarser              float64 // index of the middle grid: Factor |e32|/(r32^p - 1)
	CoarserRelative      float64 // Coarser/|phi2|
	Asymptotic           float64 // r21^p Relative/CoarserRelative, 1 in the asymptotic range
}

// Factor is the factor of safety for three grids with an observed order
// (Celik et al. 2008).
const Factor = 1.25

// Celik is the procedure of Celik et al. (2008) for three grids with the steps
// h, finest first, and the values phi on them:
//
//	s    = sgn(e32/e21)
//	q(p) = ln[(r21^p - s)/(r32^p - s)]
//	p    = |ln|e32/e21| + q(p)| / ln r21
//	phi_ext21 = (r21^p phi1 - phi2)/(r21^p - 1)
//
// The ratios need not be equal; they must not be rounded: 1.333 for 4/3 moves
// the order in its third decimal. Everything is NaN where the procedure fails:
// a change is zero or not finite, or the iteration for p does not settle.
// A relative figure is NaN where it would be relative to zero.
//
// The procedure does not see divergence: see Study. With an order observed on
// the same three grids Asymptotic is |phi2/phi1| by algebra. It shows that the
// changes are small against the value, and is no further evidence of order.
//
// Celik panics if the steps are not positive, finite and rising.
func Celik(h, phi [3]float64) Estimate {
	checkSteps(h[:])
	e21, e32 := phi[1]-phi[0], phi[2]-phi[1]
	if e21 == 0 || e32 == 0 || !finite(e21) || !finite(e32) {
		return noEstimate()
	}
	a, b := math.Log(h[1]/h[0]), math.Log(h[2]/h[1])
	p := order(e32/e21, a, b)
	growth := math.Expm1(p * a) // r21^p - 1
	est := Estimate{
		Order:               p,
		Extrapolated:        phi[0] - e21/growth,
		ApproximateRelative: relative(e21, phi[0]),
		GCI:                 Factor * math.Abs(e21) / growth,
		Coarser:             Factor * math.Abs(e32) / math.Expm1(p*b),
	}
	est.ExtrapolatedRelative = relative(est.Extrapolated-phi[0], est.Extrapolated)
	est.Relative = relative(est.GCI, phi[0])
	est.CoarserRelative = relative(est.Coarser, phi[1])
	est.Asymptotic = math.Exp(p*a) * est.Relative / est.CoarserRelative
	return est
}

func noEstimate() Estimate {
	n := math.NaN()
	return Estimate{n, n, n, n, n, n, n, n, n}
}

// relative is |x/to|, NaN where to is 0.
func relative(x, to float64) float64 {
	if to == 0 {
		return math.NaN()
	}
	return math.Abs(x / to)
}

// The iteration for the order has settled when it moves by less than
// orderTolerance: the logarithms of ratios near 1 leave some 1e-13. It takes
// one round for equal ratios and some tens for ratios of 1.1 and 3.
const (
	orderTolerance = 1e-12
	maxRounds      = 10000
)

// order solves p = |ln|ratio| + q(p)|/a for the ratio e32/e21 and the
// logarithms a of r21 and b of r32; NaN if it does not settle.
//
// The plain iteration of the source swings ever wider where r32 is above
// r21^2, and may end at a false order. For s = 1 the equation is F(p) = 0 with
//
//	F  = p a - ln(ratio) - q(p)
//	F' = b + [Y(bp) - Y(ap)]/p,  Y(x) = x/(e^x - 1)
//
// and, as Y falls from 1 with a slope of at least -1/2, F' lies between 0 and
// steepest = b + max(0, (a-b)/2). A step of -F/steepest from p = 0 therefore
// comes up to the only root from below and never passes it. With equal ratios
// this is the plain iteration.
func order(ratio, a, b float64) float64 {
	steepest := b + math.Max(0, (a-b)/2)
	p := 0.0
	for range maxRounds {
		step := (math.Abs(math.Log(math.Abs(ratio))+unequal(p, ratio, a, b)) - p*a) / steepest
		p += step
		if math.Abs(step) <= orderTolerance*(1+p) {
			return p
		}
	}
	return math.NaN()
}

// unequal is q(p), which is 0 for equal ratios; at p = 0 its limit.
func unequal(p, ratio, a, b float64) float64 {
	if ratio < 0 {
		return a*p + math.Log1p(math.Exp(-a*p)) - b*p - math.Log1p(math.Exp(-b*p))
	}
	if p == 0 {
		return math.Log(a / b)
	}
	// ln(e^x - 1) as x + ln(1 - e^-x), which does not overflow
	return a*p + math.Log(-math.Expm1(-a*p)) - b*p - math.Log(-math.Expm1(-b*p))
}

func finite(x float64) bool { return !math.IsNaN(x) && !math.IsInf(x, 0) }

// checkSteps panics if the steps are not positive, finite and rising.
func checkSteps(h []float64) {
	last := 0.0
	for _, x := range h {
		if !(x > last) || math.IsInf(x, 1) {
			panic("gci: the steps are not positive, finite and rising from the finest on")
		}
		last = x
	}
}
