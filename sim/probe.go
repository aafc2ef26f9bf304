package sim

import (
	"math/cmplx"

	"linewitness/fdtd"
	"linewitness/sim/network"
	"linewitness/sim/record"
)

// phase is the start phase that the waveforms are shown at: the design's own,
// or that of the largest voltage.
func (s *solved) phase() float64 {
	if s.stress.Worst {
		return s.stress.Voltage.Phase
	}
	return s.net.Source.Start.Phase
}

// A probe is a quantity whose waveform is kept.
type probe struct {
	trace             fdtd.Trace
	phasor, found     complex128 // of the closed form and of the time domain
	name, where, unit string
}

// probes are the source, the junctions and the loads.
func (s *solved) probes() []probe {
	t, src, x, f := s.stress.Traces, s.net.Source, s.exact, s.found
	name := s.net.Junctions[src.At]
	out := []probe{
		{t.Junctions[src.At], x.junctions[src.At], f.junctions[src.At], "source voltage", name, "V"},
		{t.Source, x.source, f.source, "source current", name, "A"},
	}
	for j, n := range s.net.Junctions[:s.net.NamedJunctions()] {
		if j != src.At {
			out = append(out, probe{t.Junctions[j], x.junctions[j], f.junctions[j], n + " voltage", n, "V"})
		}
	}
	for p, part := range s.net.Parts {
		if part.Kind == network.Load && !s.net.Branches[part.Branches[0]].Open {
			out = append(out, probe{s.partTrace(p), x.partCurrent(p), f.partCurrent(p), part.Name + " current", part.Name, "A"})
		}
	}
	return out
}

func (s *solved) waveforms() []record.Waveform {
	var out []record.Waveform
	for _, p := range s.probes() {
		out = append(out, s.waveform(p))
	}
	return out
}

// partTrace adds up the traces of the branches that leave a part's A.
func (s *solved) partTrace(p int) fdtd.Trace {
	branches := s.net.Parts[p].Branches
	sum := s.stress.Traces.Branches[branches[0]]
	for _, b := range branches[1:] {
		sum = sum.Plus(s.stress.Traces.Branches[b])
	}
	return sum
}

// shown is a trace at the start phase that is shown. At mixes the lanes; a fixed
// start phase is in its one lane already.
func (s *solved) shown(t fdtd.Trace) (whole, tail []float64) {
	if !s.stress.Worst {
		return t.A, t.Tail
	}
	return t.At(s.phase())
}

// late is its last periods likewise.
func (s *solved) late(t fdtd.Trace) []float64 {
	if !s.stress.Worst {
		return t.Late
	}
	return t.LateAt(s.phase())
}

func (s *solved) waveform(p probe) record.Waveform {
	t, dt := p.trace, s.stress.Traces.Step
	whole, tail := s.shown(t)
	quantity := "voltage"
	if p.unit == "A" {
		quantity = "current"
	}
	return record.Waveform{
		Name: p.name, Where: p.where, Quantity: quantity, Unit: p.unit, Steady: cmplx.Abs(p.phasor),
		Start: (float64(s.stress.Traces.First) - t.Early) * dt, Step: dt, Samples: whole,
		Tail: record.Tail{
			Start: s.startOf(len(tail), t), Step: dt, Samples: tail, Phasor: s.steadyWave(p.phasor, s.startOf(len(tail), t), len(tail)),
		},
	}
}

// startOf is the time of the first of the last n samples of a trace.
func (s *solved) startOf(n int, t fdtd.Trace) float64 {
	return (float64(s.stress.Traces.TailEnd-n+1) - t.Early) * s.stress.Traces.Step
}

// steadyWave is Re(p e^{j(wt + phase)}) at n samples from a start, s, on.
func (s *solved) steadyWave(p complex128, start float64, n int) []float64 {
	out := make([]float64, n)
	for i := range out {
		at := start + float64(i)*s.stress.Traces.Step
		out[i] = real(p * cmplx.Rect(1, s.net.Omega()*at+s.phase()))
	}
	return out
}
