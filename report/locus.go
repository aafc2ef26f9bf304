package report

import (
	"math"
	"math/cmplx"

	"linewitness/sim/record"
)

// A locus is the reflection coefficient along one section, taken against its own
// characteristic impedance and looking the way in which the power goes: what
// comes first is the end that faces the generator.
type locus struct {
	section      record.ModelSection
	turned       bool       // the power goes from the To end to the From end
	near, far    complex128 // phasor, at the end toward the generator and at the other
	nearF, farF  complex128 // time domain
	gamma        complex128
	profile      record.Profile
	nearAt, fars string // junctions
}

// newLocus returns nil where the record has no state of the section.
func newLocus(c *record.Case, m record.ModelSection) *locus {
	p, f := sectionState(c.Phasor, m.Name), sectionState(c.FDTD, m.Name)
	if p == nil || f == nil {
		return nil
	}
	l := &locus{section: m, gamma: propagation(m, c.Model.Frequency), nearAt: m.From, fars: m.To}
	l.near, l.far, l.nearF, l.farF = p.From.Reflection, p.To.Reflection, f.From.Reflection, f.To.Reflection
	for _, q := range c.Profiles {
		if q.Section == m.Name {
			l.profile = q
		}
	}
	// |near| |far| above 1: with the power against the section's direction the
	// coefficient is the reciprocal of what the wave meets.
	if cmplx.Abs(l.near)*cmplx.Abs(l.far) > 1 {
		l.turned = true
		l.near, l.far, l.nearF, l.farF = 1/l.far, 1/l.near, 1/l.farF, 1/l.nearF
		l.nearAt, l.fars = m.To, m.From
	}
	return l
}

// shown reports whether there is a curve to draw.
func (l *locus) shown() bool {
	const most = 1.5 // beyond it nothing of the curve is on the chart
	return finiteC(l.far) && finiteC(l.near) && cmplx.Abs(l.far) < most && cmplx.Abs(l.near) < most && finiteC(l.gamma) && l.section.Length > 0
}

// turns is how often the coefficient goes round along the section.
func (l *locus) turns() float64 { return imag(l.gamma) * l.section.Length / math.Pi }

// manyTurns is the number of turns from which on only the first and the last are
// drawn.
const manyTurns = 3

// along returns the phasor's coefficient at distances from the far end: it is
// that of the end times exp(-2 gamma s).
func (l *locus) along(from, to float64) []complex128 {
	const perTurn = 90
	steps := int(math.Ceil((to-from)*imag(l.gamma)/math.Pi*perTurn)) + 1
	out := make([]complex128, 0, steps+1)
	for k := range steps + 1 {
		s := from + (to-from)*float64(k)/float64(steps)
		out = append(out, l.far*cmplx.Exp(-2*l.gamma*complex(s, 0)))
	}
	return out
}

// lines returns the curve, or its first and last turn with the radii between
// which the others are.
func (l *locus) lines() (lines [][]complex128, ring [2]float64) {
	length := l.section.Length
	if !(l.turns() > manyTurns) {
		return [][]complex128{l.along(0, length)}, ring
	}
	turn := length / l.turns()
	first, last := l.along(0, turn), l.along(length-turn, length)
	return [][]complex128{first, last}, [2]float64{cmplx.Abs(last[0]), cmplx.Abs(first[len(first)-1])}
}

// dots returns the coefficient of the time domain at about so many voltage
// points a turn, on the turns that are drawn, and its largest distance from the
// phasor's.
func (l *locus) dots() (dots []complex128, apart float64) {
	const perTurn = 14
	p, turn := l.profile, l.section.Length/max(l.turns(), 1e-9)
	add := func(g, exact complex128, draw bool) {
		if !finiteC(g) || cmplx.Abs(g) > 1.5 {
			return
		}
		if draw {
			dots = append(dots, g)
		}
		if finiteC(exact) {
			apart = max(apart, cmplx.Abs(g-exact))
		}
	}
	add(l.farF, l.far, true)
	last := math.Inf(-1)
	for i, z := range p.ZV {
		s := l.section.Length - z
		if l.turned {
			s = z
		}
		shown := l.turns() <= manyTurns || s <= turn || s >= l.section.Length-turn
		draw := shown && math.Abs(z-last) >= turn/perTurn
		if draw {
			last = z
		}
		add(l.coefficient(p.VF, p.IF, i), l.coefficient(p.VP, p.IP, i), draw)
	}
	add(l.nearF, l.near, true)
	return dots, apart
}

// coefficient is that at the i-th voltage point.
func (l *locus) coefficient(v, i []complex128, k int) complex128 {
	if k >= len(v) {
		return cmplx.NaN()
	}
	z0i := l.section.Z0 * between(l.profile.ZI, i, l.gamma, l.profile.ZV[k])
	if l.turned {
		z0i = -z0i
	}
	return (v[k] - z0i) / (v[k] + z0i)
}
