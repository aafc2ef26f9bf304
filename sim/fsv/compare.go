package fsv

import (
	"cmp"
	"fmt"
	"math"
)

// A Result is the comparison of two curves. All of its figures are without a
// unit, do not change if the curves change places, and do not depend on a
// factor that both curves have in common.
type Result struct {
	Points        int     // compared
	Ripple        float64 // largest |Lo + Hi| of either curve over the largest |value| of either
	ADM, FDM, GDM Measure // amplitude, feature, global
}

// Compare compares the values y1 at the abscissae x1 with y2 at x2, over the
// range that they share. Abscissae rise; they may differ and need not be even:
// both curves are interpolated to the same evenly spaced points. Curves that
// are zero everywhere match.
//
// The error says what is wrong first: a length, an abscissa that does not rise, a
// value that is not finite, or fewer than 16 points in the shared range.
func Compare(x1, y1, x2, y2 []float64) (Result, error) {
	if err := cmp.Or(checkCurve("first", x1, y1), checkCurve("second", x2, y2)); err != nil {
		return Result{}, err
	}
	if len(x1) == 0 || len(x2) == 0 {
		return Result{}, tooFew(0)
	}
	low := math.Max(x1[0], x2[0])
	high := math.Min(x1[len(x1)-1], x2[len(x2)-1])
	n := points(min(within(x1, low, high), within(x2, low, high)))
	if err := tooFew(n); err != nil {
		return Result{}, err
	}
	return chosen.compare(resample(x1, y1, low, high, n), resample(x2, y2, low, high, n)), nil
}

// Curves compares curves that have their evenly spaced abscissae in common. It
// gives an error for curves of different lengths, of fewer than 16 points or
// with values that are not finite.
func Curves(y1, y2 []float64) (Result, error) { return CurvesAbove(y1, y2, 0) }

// CurvesAbove is Curves without the bins of the Fourier transform that are no
// larger, in both curves, than a part floor of the largest of either. A curve
// that is known to floor only, as a waveform that is near its steady state, has
// no features below it, and what is there would be compared with itself.
func CurvesAbove(y1, y2 []float64, floor float64) (Result, error) {
	if len(y1) != len(y2) {
		return Result{}, fmt.Errorf("the curves have %d and %d points; give their abscissae", len(y1), len(y2))
	}
	if err := cmp.Or(checkValues("first", y1), checkValues("second", y2), tooFew(len(y1))); err != nil {
		return Result{}, err
	}
	n := points(len(y1))
	m := chosen
	m.floor = floor
	return m.compare(thin(y1, n), thin(y2, n)), nil
}

// compare compares two curves of equal length, which it scales.
func (m *method) compare(y1, y2 []float64) Result {
	scale(y1, y2)
	p1, p2 := m.split(y1, y2)
	adm, fdm := m.amplitude(p1, p2), m.feature(p1, p2)
	gdm := make([]float64, len(adm))
	for i := range gdm {
		gdm[i] = math.Hypot(adm[i], fdm[i])
	}
	return Result{
		Points: len(y1),
		Ripple: math.Max(p1.ripple(), p2.ripple()),
		ADM:    newMeasure(adm),
		FDM:    newMeasure(fdm),
		GDM:    newMeasure(gdm),
	}
}

// scale divides both curves by the largest magnitude of either.
func scale(y1, y2 []float64) {
	top := 0.0
	for i := range y1 {
		top = math.Max(top, math.Max(math.Abs(y1[i]), math.Abs(y2[i])))
	}
	if top == 0 {
		return
	}
	for i := range y1 {
		y1[i] /= top
		y2[i] /= top
	}
}

func (p *parts) ripple() float64 {
	top := 0.0
	for i := range p.lo {
		top = math.Max(top, math.Abs(p.lo[i]+p.hi[i]))
	}
	return top
}

// amplitude is ADM at every point.
func (m *method) amplitude(p1, p2 parts) []float64 {
	adm := contrast(p1.lo, p2.lo)
	odm := contrast(p1.dc, p2.dc)
	for i := range adm {
		adm[i] = math.Abs(adm[i])
		if m.offsetTerm {
			o := math.Abs(odm[i])
			adm[i] += o * math.Exp(o)
		}
	}
	return adm
}

// feature is FDM at every point.
func (m *method) feature(p1, p2 parts) []float64 {
	lo := contrast(difference(p1.lo, m.loSpan), difference(p2.lo, m.loSpan))
	hi1, hi2 := difference(p1.hi, m.hiSpan), difference(p2.hi, m.hiSpan)
	hi := contrast(hi1, hi2)
	curvature := contrast(difference(hi1, m.hiSpan), difference(hi2, m.hiSpan))
	for i := range lo {
		lo[i] = 2 * math.Abs(lo[i]/2+hi[i]/6+curvature[i]/7.2)
	}
	return lo
}

// contrast is (|a| - |b|) / <|a| + |b|> at every point; 0 where both are zero
// everywhere.
func contrast(a, b []float64) []float64 {
	out := make([]float64, len(a))
	sum := 0.0
	for i := range a {
		out[i] = math.Abs(a[i]) - math.Abs(b[i])
		sum += math.Abs(a[i]) + math.Abs(b[i])
	}
	if sum == 0 {
		return out
	}
	for i := range out {
		out[i] *= float64(len(a)) / sum
	}
	return out
}

// difference is y(n+span) - y(n-span). The end points stand for those beyond.
func difference(y []float64, span int) []float64 {
	out := make([]float64, len(y))
	last := len(y) - 1
	for i := range out {
		out[i] = y[min(i+span, last)] - y[max(i-span, 0)]
	}
	return out
}
