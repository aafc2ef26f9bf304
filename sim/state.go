package sim

import (
	"math"
	"math/cmplx"

	"linewitness/fdtd"
	"linewitness/phasor"
	"linewitness/sim/agree"
	"linewitness/sim/network"
)

const pi = math.Pi

// A state is one witness's steady state in the one form in which quantities
// are taken from it: the terminal phasors, and the extremes along sections.
type state struct {
	net       *network.Network
	junctions []complex128
	branches  []complex128
	source    complex128
	ends      []endPair
	voltage   []extremes // of each section
	current   []extremes
}

// endPair is a section's two ends, the From end first.
type endPair [2]terminal

type terminal struct{ v, i complex128 }

type extremes struct{ largest, smallest extreme }

type extreme struct{ value, at float64 }

// phasorState takes the closed form.
func phasorState(net *network.Network, s *phasor.Solution) *state {
	out := &state{net: net, source: s.Source()}
	for j := range net.Junctions {
		out.junctions = append(out.junctions, s.Junction(j))
	}
	for b := range net.Branches {
		out.branches = append(out.branches, s.Branch(b))
	}
	for k, sec := range net.Sections {
		out.ends = append(out.ends, endPair{
			{s.Voltage(k, 0), s.Current(k, 0)},
			{s.Voltage(k, sec.Length), s.Current(k, sec.Length)},
		})
		out.voltage = append(out.voltage, closedExtremes(s.VoltageExtremes(k)))
		out.current = append(out.current, closedExtremes(s.CurrentExtremes(k)))
	}
	out.chop()
	return out
}

func closedExtremes(largest, smallest phasor.Extreme) extremes {
	return extremes{extreme(extreme{largest.Value, largest.At}), extreme{smallest.Value, smallest.At}}
}

// fdtdState takes the time-domain steady state; waves are how sinusoids travel
// on its grid.
func fdtdState(net *network.Network, s *fdtd.Steady, waves []agree.Wave) *state {
	out := &state{net: net, junctions: s.Junctions, branches: s.Branches, source: s.Source}
	for _, w := range s.Sections {
		out.ends = append(out.ends, endPair{{w.VFrom, w.IFrom}, {w.VTo, w.ITo}})
		k := len(out.ends) - 1
		l := net.Sections[k].Length
		gamma := waves[k].Exponent / complex(l, 0)
		out.voltage = append(out.voltage, gridExtremes(w.ZV, w.V, gamma, l))
		// The ends carry the current of the half cells too: another wave than
		// that between the centres, which goes on up to them.
		i := gridExtremes(w.ZI, w.I, gamma, l)
		i.take(extreme{cmplx.Abs(w.IFrom), 0})
		i.take(extreme{cmplx.Abs(w.ITo), l})
		out.current = append(out.current, i)
	}
	out.chop()
	return out
}

// dust is the part of a section's largest amplitude below which a phasor at
// its end is rounding: the current of an open end, the voltage of a short.
const dust = 1e-12

// dead is the part of the network's largest amplitude that a section must have
// to be more than rounding itself: -240 dB.
const dead = 1e-12

// chop makes an exact zero of what is only rounding.
func (s *state) chop() {
	top := make([]float64, len(s.junctions))
	cut := func(p *complex128, largest float64) {
		if cmplx.Abs(*p) <= dust*largest {
			*p = 0
		}
	}
	topV, topI := 0.0, 0.0
	for k := range s.net.Sections {
		topV = math.Max(topV, s.voltage[k].largest.value)
		topI = math.Max(topI, s.current[k].largest.value)
	}
	for k, sec := range s.net.Sections {
		v := math.Max(s.voltage[k].largest.value, dead*topV)
		i := math.Max(s.current[k].largest.value, dead*topI)
		for e, j := range []int{sec.From, sec.To} {
			top[j] = math.Max(top[j], v)
			cut(&s.ends[k][e].v, v)
			cut(&s.ends[k][e].i, i)
		}
	}
	for j := range s.junctions {
		cut(&s.junctions[j], top[j])
	}
	for b := range s.branches {
		cut(&s.branches[b], dead*topI)
	}
}

// ratio is the impedance v/i, infinite at an open end. Where there is neither
// voltage nor current there is no impedance: it is NaN.
func ratio(v, i complex128) complex128 {
	switch {
	case i != 0:
		return v / i
	case v != 0:
		return cmplx.Inf()
	}
	return cmplx.NaN()
}

// partVoltage is VA - VB of a part.
func (s *state) partVoltage(p int) complex128 {
	part := s.net.Parts[p]
	v := s.junctions[part.A]
	if part.B != network.Ground {
		v -= s.junctions[part.B]
	}
	return v
}

// partCurrent is the current from A into a part.
func (s *state) partCurrent(p int) complex128 {
	sum := complex128(0)
	for _, b := range s.net.Parts[p].Branches {
		sum += s.branches[b] * complex(s.net.Branches[b].Turns(), 0)
	}
	return sum
}

// power is Re(V I*)/2, W, for peak phasors.
func power(v, i complex128) float64 { return real(v*cmplx.Conj(i)) / 2 }

func (s *state) partPower(p int) float64 { return power(s.partVoltage(p), s.partCurrent(p)) }

// sourcePower is the power that the source delivers, W.
func (s *state) sourcePower() float64 {
	return power(s.junctions[s.net.Source.At], s.source)
}

// sectionLoss is the power that goes into a section and does not come out, W.
func (s *state) sectionLoss(k int) float64 {
	e := s.ends[k]
	return power(e[0].v, e[0].i) - power(e[1].v, e[1].i)
}
