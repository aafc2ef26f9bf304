package report

import (
	"math"
	"math/cmplx"

	"linewitness/report/figure"
	"linewitness/report/format"
	"linewitness/report/ink"
)

// A phaseTrack is the phase of the voltage along one section, unwrapped, in
// degrees.
type phaseTrack struct {
	l            *locus
	phasor, fdtd []float64 // NaN where there is no voltage
	apart        float64   // largest difference where the voltage is not near a null
}

// newPhaseTrack unwraps the phases of both witnesses.
func newPhaseTrack(l *locus) *phaseTrack {
	t := &phaseTrack{l: l}
	t.phasor = l.unwrapped(l.profile.VP)
	t.fdtd = l.unwrapped(l.profile.VF)
	const null = 0.05 // of the section's largest voltage: below, a small difference turns the phase a lot
	floor := null * largestOf(magnitudes(l.profile.VP))
	for i := range min(len(l.profile.VP), len(l.profile.VF)) {
		if p, f := l.profile.VP[i], l.profile.VF[i]; cmplx.Abs(p) > floor && finiteC(p) && finiteC(f) {
			t.apart = max(t.apart, math.Abs(cmplx.Phase(f/p))*180/math.Pi)
		}
	}
	return t
}

// unwrapped returns the phase of the voltages at the voltage points, in degrees.
// What is unwrapped is the phase relative to the wave that carries the power:
// the other wave is smaller and never turns it by a quarter, so that points far
// apart do no harm.
func (l *locus) unwrapped(vs []complex128) []float64 {
	const null = 0.005 // of the largest voltage: below, the phase is that of the error
	floor := null * largestOf(magnitudes(vs))
	beta := imag(l.gamma)
	if l.turned {
		beta = -beta
	}
	out := make([]float64, min(len(vs), len(l.profile.ZV)))
	last := math.NaN()
	for i := range out {
		out[i] = math.NaN()
		if !finiteC(vs[i]) || cmplx.Abs(vs[i]) <= floor {
			continue
		}
		carried := beta * l.profile.ZV[i]
		phase := cmplx.Phase(vs[i] * cmplx.Rect(1, math.Remainder(carried, 2*math.Pi)))
		if !math.IsNaN(last) {
			phase = last + math.Remainder(phase-last, 2*math.Pi)
		}
		last = phase
		out[i] = (phase - carried) * 180 / math.Pi
	}
	return out
}

// ends returns the first and the last finite value.
func ends(ys []float64) (first, last float64, ok bool) {
	first, last = math.NaN(), math.NaN()
	for _, y := range ys {
		if math.IsNaN(y) {
			continue
		}
		if math.IsNaN(first) {
			first = y
		}
		last = y
	}
	return first, last, !math.IsNaN(first)
}

// panel draws the phase against the distance from the From end.
func (t *phaseTrack) panel() *figure.Panel {
	lo, hi := math.Inf(1), math.Inf(-1)
	for _, y := range append(append([]float64{}, t.phasor...), t.fdtd...) {
		if !math.IsNaN(y) {
			lo, hi = min(lo, y), max(hi, y)
		}
	}
	air := max(0.08*(hi-lo), 2) // degrees
	m := t.l.section
	p := figure.New(m.Name, "phase of V (°)", figure.Axis{Label: "distance", Unit: "m", Max: m.Length}, figure.Axis{Min: lo - air, Max: hi + air})
	p.Second("λ", m.Wavelengths/m.Length)
	if lo > hi {
		p.Say(nothingFinite)
		return p
	}
	p.Line(t.l.profile.ZV, t.phasor, ink.PhasorLine)
	p.Line(t.l.profile.ZV, t.fdtd, ink.FDTDLine)
	return p
}

// finding says by how much the phase turns along the section.
func (t *phaseTrack) finding() string {
	first, last, ok := ends(t.phasor)
	if !ok {
		return "V has no phase"
	}
	m := t.l.section
	return "V turns by " + format.Electrical(last-first) + " from " + m.From + " to " + m.To + " over " + format.Electrical(m.Degrees) + " of line, the solutions within " +
		format.Digits(t.apart, 2) + "°"
}
