package sim

import (
	"math"
	"math/cmplx"

	"linewitness/phasor"
	"linewitness/sim/network"
)

// shortState is the state of a solution with the largest values along sections
// found in a short way: a slip is tried some hundred times a claim.
func shortState(net *network.Network, s *phasor.Solution) *state {
	out := &state{net: net, source: s.Source()}
	for j := range net.Junctions {
		out.junctions = append(out.junctions, s.Junction(j))
	}
	for b := range net.Branches {
		out.branches = append(out.branches, s.Branch(b))
	}
	for k, sec := range net.Sections {
		l := sec.Length
		out.ends = append(out.ends, endPair{
			{s.Voltage(k, 0), s.Current(k, 0)},
			{s.Voltage(k, l), s.Current(k, l)},
		})
		gamma, _ := s.Line(k)
		half := pi / math.Abs(imag(gamma))
		out.voltage = append(out.voltage, shortCrest(l, half, func(z float64) complex128 { return s.Voltage(k, z) }))
		out.current = append(out.current, shortCrest(l, half, func(z float64) complex128 { return s.Current(k, z) }))
	}
	out.chop()
	return out
}

// crestPoints is how many points half a wavelength are looked at. A parabola
// through three of them misses a crest by a few 1e-5 of it, far
// below any tolerance.
const crestPoints = 32

// shortCrest is the largest |p| on a section of length l. The crests of a standing
// wave are half a wavelength apart and lie on the sum of two exponentials, one
// falling and one rising, so that the first or the last of them is the largest.
func shortCrest(l, half float64, p func(float64) complex128) extremes {
	starts, span := []float64{0}, l
	if l > 2*half {
		starts, span = []float64{0, l - half}, half
	}
	n := int(math.Ceil(crestPoints*span/half)) + 2
	top := 0.0
	for _, start := range starts {
		sq := make([]float64, n+1)
		for i := range sq {
			v := cmplx.Abs(p(start + span*float64(i)/float64(n)))
			sq[i] = v * v
		}
		for i, v := range sq {
			top = math.Max(top, v)
			if i == 0 || i == n {
				continue
			}
			// A crest beside an end of the line is no point's own: the vertex of
			// the parabola counts wherever it lies among the three points.
			bend, slope := sq[i-1]-2*v+sq[i+1], sq[i-1]-sq[i+1]
			if bend < 0 && math.Abs(slope) <= -2*bend {
				top = math.Max(top, v-slope*slope/(8*bend))
			}
		}
	}
	return extremes{largest: extreme{value: math.Sqrt(top)}}
}
