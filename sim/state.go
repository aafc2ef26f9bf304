package sim

import (
	"math"
	"math/cmplx"

	"linewitness/fdtd"
	"linewitness/phasor"
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

// fdtdState takes the time-domain steady state.
func fdtdState(net *network.Network, s *fdtd.Steady) *state {
	out := &state{net: net, junctions: s.Junctions, branches: s.Branches, source: s.Source}
	for _, w := range s.Sections {
		out.ends = append(out.ends, endPair{{w.VFrom, w.IFrom}, {w.VTo, w.ITo}})
		k := len(out.ends) - 1
		l := net.Sections[k].Length
		beta := imag(net.Sections[k].At(net.Omega()).Propagation(net.Omega()))
		out.voltage = append(out.voltage, gridExtremes(w.ZV, w.V, beta, l))
		// The ends carry the current of the half cells too: another wave than
		// that between the centres, which goes on up to them.
		i := gridExtremes(w.ZI, w.I, beta, l)
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

// gridExtremes finds the extremes of |p| between the points of a grid. The
// square of a standing wave with the phase constant beta is A + B cos 2 beta x +
// C sin 2 beta x (times what the loss does, which is little from point to
// point), so three points of it tell the rest.
func gridExtremes(z []float64, p []complex128, beta, length float64) extremes {
	sq := make([]float64, len(p))
	for i, v := range p {
		sq[i] = real(v)*real(v) + imag(v)*imag(v)
	}
	// Loss, or the place of the points between the crests, decides which crest
	// is the largest: all are looked at.
	out := extremes{extreme{-1, 0}, extreme{math.Inf(1), 0}}
	for i := range sq {
		if turns(sq, i, 1) {
			out.take(crest(z, sq, i, 2*beta, length, 1))
		}
		if turns(sq, i, -1) {
			out.take(crest(z, sq, i, 2*beta, length, -1))
		}
	}
	return out
}

// take takes in a value.
func (e *extremes) take(v extreme) {
	if v.value > e.largest.value {
		e.largest = v
	}
	if v.value < e.smallest.value {
		e.smallest = v
	}
}

// turns reports whether point i is not below (sign 1), or not above (sign -1),
// its neighbours.
func turns(sq []float64, i int, sign float64) bool {
	return (i == 0 || sign*sq[i] >= sign*sq[i-1]) && (i == len(sq)-1 || sign*sq[i] >= sign*sq[i+1])
}

// widest is the phase of the squared wave, rad, that three points may span for
// it to be drawn through them.
const widest = 2.5

// crest is the largest (sign 1) or smallest (sign -1) value of the wave through
// three points, next to point i: between its neighbours, of the first and the
// last point between the other neighbour and the end of the section. On a record that was thinned too
// far, or that has fewer points, it is point i itself.
func crest(z, sq []float64, i int, kappa, length, sign float64) extreme {
	at := extreme{math.Sqrt(sq[i]), z[i]}
	if len(sq) < 3 {
		return at
	}
	m := min(max(i, 1), len(sq)-2) // the middle of the three
	x0, x1 := z[m-1]-z[m], z[m+1]-z[m]
	if kappa*(x1-x0) > widest {
		return at
	}
	// sq - sq[m] = B (cos kx - 1) + C sin kx at the two neighbours.
	s0, c0 := math.Sincos(kappa * x0)
	s1, c1 := math.Sincos(kappa * x1)
	d0, d1 := sq[m-1]-sq[m], sq[m+1]-sq[m]
	det := (c0-1)*s1 - (c1-1)*s0
	if det == 0 {
		return at
	}
	b, c := (d0*s1-d1*s0)/det, ((c0-1)*d1-(c1-1)*d0)/det
	lo, hi := x0, x1
	switch i {
	case 0:
		lo, hi = -z[m], 0
	case len(sq) - 1:
		lo, hi = 0, length-z[m]
	}
	x := math.Atan2(sign*c, sign*b) / kappa
	x = math.Max(lo, math.Min(hi, x))
	sin, cos := math.Sincos(kappa * x)
	v := sq[m] + b*(cos-1) + c*sin
	if !(sign*v > sign*sq[i]) {
		return at
	}
	return extreme{math.Sqrt(math.Max(0, v)), z[m] + x}
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
