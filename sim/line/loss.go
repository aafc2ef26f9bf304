package line

import (
	"fmt"
	"math"
)

// A LossPoint is a row of a datasheet's loss table.
type LossPoint struct {
	F           float64 // Hz
	Attenuation float64 // Np/m
}

// A LossFit is a loss table taken as the sum of a conductor and a dielectric
// loss, with the residual at each point. FitLoss makes it.
type LossFit struct {
	K1, K2    float64 // Np/m at 1 Hz: a = K1 sqrt(f) + K2 f
	Points    []LossPoint
	Residuals []float64 // (fit - table)/table at each point
}

// FitLoss fits a = k1 sqrt(f) + k2 f, k1 and k2 not below 0, to the points of
// a loss table in order of rising frequency. It minimises the sum of the
// squares of the relative errors: a datasheet gives each value to the same few
// digits, and absolute errors would let the highest frequencies decide alone.
// One point gives a conductor loss.
func FitLoss(points []LossPoint) (LossFit, error) {
	if err := checkLoss(points); err != nil {
		return LossFit{}, err
	}
	fit := LossFit{Points: append([]LossPoint(nil), points...)}
	fit.K1, fit.K2 = twoTerms(points)
	for _, p := range points {
		fit.Residuals = append(fit.Residuals, fit.Attenuation(p.F)/p.Attenuation-1)
	}
	return fit, nil
}

func checkLoss(points []LossPoint) error {
	if len(points) == 0 {
		return fmt.Errorf("the loss table has no points")
	}
	for i, p := range points {
		switch {
		case !(p.F > 0) || math.IsInf(p.F, 1):
			return fmt.Errorf("point %d: the frequency must be above 0", i+1)
		case !(p.Attenuation > 0) || math.IsInf(p.Attenuation, 1):
			return fmt.Errorf("point %d: the attenuation must be above 0", i+1)
		case i > 0 && p.F <= points[i-1].F:
			return fmt.Errorf("point %d: the frequency does not rise; list the points with rising frequency", i+1)
		}
	}
	return nil
}

// twoTerms solves the least squares problem. With two unknowns the
// non-negative solution is the free one if that has no negative term, and else
// the better of the two with a single term.
func twoTerms(points []LossPoint) (k1, k2 float64) {
	// The columns x = sqrt(f)/a and y = f/a against ones; frequencies over the
	// highest and attenuations over the last, so that the numbers are of one
	// size.
	top, unit := points[len(points)-1].F, points[len(points)-1].Attenuation
	var xx, xy, yy, x1, y1 float64
	for _, p := range points {
		x, y := math.Sqrt(p.F/top)*unit/p.Attenuation, p.F/top*unit/p.Attenuation
		xx, xy, yy, x1, y1 = xx+x*x, xy+x*y, yy+y*y, x1+x, y1+y
	}
	unit1, unit2 := unit/math.Sqrt(top), unit/top
	if d := xx*yy - xy*xy; len(points) > 1 && d > 0 {
		a, b := (x1*yy-y1*xy)/d, (y1*xx-x1*xy)/d
		if a >= 0 && b >= 0 {
			return a * unit1, b * unit2
		}
	}
	// A single term lowers the sum of squares by x1^2/xx or y1^2/yy.
	if len(points) == 1 || x1*x1/xx >= y1*y1/yy {
		return x1 / xx * unit1, 0
	}
	return 0, y1 / yy * unit2
}

// Conductor is K1 sqrt(f), the loss in the conductors at f in Hz, Np/m.
func (l LossFit) Conductor(f float64) float64 { return l.K1 * math.Sqrt(f) }

// Dielectric is K2 f, the loss in the dielectric at f in Hz, Np/m.
func (l LossFit) Dielectric(f float64) float64 { return l.K2 * f }

// Attenuation is the fitted attenuation at f in Hz, Np/m.
func (l LossFit) Attenuation(f float64) float64 { return l.Conductor(f) + l.Dielectric(f) }

// Nominal is the line of the given impedance and velocity factor with this
// loss, quoted at f in Hz.
func (l LossFit) Nominal(z0, velocityFactor, f float64) Nominal {
	a := l.Attenuation(f)
	return Nominal{z0, velocityFactor, f, a, l.Dielectric(f) / a}
}

// Worst gives the point with the largest residual.
func (l LossFit) Worst() (p LossPoint, residual float64) {
	for i, r := range l.Residuals {
		if i == 0 || math.Abs(r) > math.Abs(residual) {
			p, residual = l.Points[i], r
		}
	}
	return p, residual
}

// poorFit is the residual that is worth a warning: datasheets round to some
// per cent, and a fit that is further off has another law.
const poorFit = 0.05

// WarningsAt tells what to know of the loss at f in Hz: a fit that is poor,
// and a frequency outside of the table.
func (l LossFit) WarningsAt(f float64) []string {
	var out []string
	if p, r := l.Worst(); math.Abs(r) > poorFit {
		out = append(out, fmt.Sprintf("the two-term fit of the loss is %+.1f %% off the table at %s MHz", 100*r, megahertz(p.F)))
	}
	low, high := l.Points[0].F, l.Points[len(l.Points)-1].F
	switch {
	case f >= low && f <= high:
	case low == high:
		out = append(out, fmt.Sprintf("the loss is known at %s MHz only: at %s MHz it is that times the square root of the frequency", megahertz(low), megahertz(f)))
	default:
		out = append(out, fmt.Sprintf("%s MHz is outside of the loss table, %s to %s MHz: the loss is extrapolated", megahertz(f), megahertz(low), megahertz(high)))
	}
	return out
}

func megahertz(f float64) string { return fmt.Sprintf("%.6g", f/1e6) }
