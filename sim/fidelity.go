package sim

import (
	"fmt"
	"math"
	"math/cmplx"
	"slices"

	"linewitness/fdtd"
	"linewitness/sim/agree"
	"linewitness/sim/fsv"
	"linewitness/sim/record"
)

// flat is the ripple of a curve, relative to its size, below which feature
// selective validation compares what means nothing: as much as a grid may leave.
const flat = 1e-3

// fidelity compares the curves of the time domain with those of the closed
// form by feature selective validation: the sizes of voltage and current along
// each section, and the last periods of each waveform.
func (s *solved) fidelity() []record.Fidelity {
	var out []record.Fidelity
	for k, w := range s.steady.Sections {
		c := s.compared.Sections[k]
		name := s.net.Sections[k].Name
		out = append(out,
			along(name, "|V| along the section", w.ZV, w.V, &c.Voltage),
			along(name, "|I| along the section", w.ZI, w.I, &c.Current))
	}
	for _, p := range s.probes() {
		out = append(out, s.waveFidelity(p))
	}
	return out
}

// latePeriods is the length of waveform that is compared: with fewer than five
// periods or so all of it would be in the bins that count as mean.
const (
	latePeriods  = fdtd.LatePeriods
	leastPeriods = 8
)

// waveFidelity compares the last periods of a waveform with the steady one of
// the closed form.
func (s *solved) waveFidelity(p probe) record.Fidelity {
	const curve = "waveform, last periods"
	late := s.late(p.trace)
	n := s.stress.Grid.StepsPerPeriod
	count := len(late) / n
	switch {
	case s.net.Source.Stop != nil:
		return without(p.name, curve, "the source has stopped")
	case !s.stress.Complete:
		return without(p.name, curve, "the run ended before the network was at rest")
	case count < leastPeriods:
		return without(p.name, curve, fmt.Sprintf("%d periods were kept; a comparison needs at least %d", count, leastPeriods))
	}
	late = late[len(late)-count*n:]
	start := s.startOf(len(late), p.trace)
	switch d := departure(late, s.steadyWave(p.found, start, len(late))); {
	case math.IsNaN(d), math.IsInf(d, 1):
		return without(p.name, curve, "zero throughout")
	case d > settledWave:
		return without(p.name, curve, fmt.Sprintf("%.2g %% of it is not the steady wave yet: the run ends when the largest voltages are at rest", 100*d))
	}
	r, err := fsv.CurvesAbove(late, s.steadyWave(p.phasor, start, len(late)), waveFloor)
	return compared(p.name, curve, r, err)
}

// settledWave is the departure of a waveform from the steady one of its own
// witness, relative to that, above which its features are those of what is left
// of the start, as those of a small current can be.
const settledWave = 5e-3

// departure is the root mean square of the difference of a waveform from another,
// relative to that of the other; NaN or infinite where the other is nothing.
func departure(wave, from []float64) float64 {
	d, all := 0.0, 0.0
	for i, v := range from {
		d += (wave[i] - v) * (wave[i] - v)
		all += v * v
	}
	return math.Sqrt(d / all)
}

// waveFloor is the part of the largest Fourier bin of a waveform below which
// there are no features: the run ends within half of it of the steady state.
const waveFloor = 2 * atRest

// choices are those of the method, and of what is given to it.
func choices() []string {
	return append(fsv.Choices(), fmt.Sprintf(
		"Of waveforms the last %d periods are compared, without the bins below %.1f %% of the largest in both: the run ends within %.1f %% of the steady state, and a sinusoid has no other features.",
		latePeriods, 100*waveFloor, 100*atRest))
}

// along compares two curves along a section.
func along(subject, curve string, z []float64, found []complex128, k *agree.Kind) record.Fidelity {
	exact := sizes(k.Exact)
	if slices.Max(exact) < k.Scale {
		return without(subject, curve, "next to nothing beside the rest of the network")
	}
	r, err := fsv.Compare(z, sizes(found), z, exact)
	return compared(subject, curve, r, err)
}

// compared writes down a comparison, or why there is none.
func compared(subject, curve string, r fsv.Result, err error) record.Fidelity {
	if err != nil {
		return without(subject, curve, err.Error())
	}
	if r.Ripple < flat {
		return without(subject, curve, fmt.Sprintf("flat within %.1g %%: there are no features to compare", 100*r.Ripple))
	}
	return record.Fidelity{
		Subject: subject, Curve: curve, Points: r.Points,
		ADM: difference(r.ADM), FDM: difference(r.FDM), GDM: difference(r.GDM),
	}
}

func without(subject, curve, why string) record.Fidelity {
	none := record.Difference{Value: math.NaN()}
	return record.Fidelity{Subject: subject, Curve: curve, Note: why, ADM: none, FDM: none, GDM: none}
}

func difference(m fsv.Measure) record.Difference {
	return record.Difference{Value: m.Value, Word: m.Word, Histogram: m.Histogram, Grade: m.Grade, Spread: m.Spread}
}

func sizes(p []complex128) []float64 {
	out := make([]float64, len(p))
	for i, v := range p {
		out[i] = cmplx.Abs(v)
	}
	return out
}
