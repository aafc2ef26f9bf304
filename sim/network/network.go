package network

import (
	"math"

	"linewitness/sim/line"
)

// Ground is the index of the return conductor, where the voltage is zero.
const Ground = -1

// A Network is one case of a design as both witnesses see it.
type Network struct {
	Frequency float64  // Hz
	Junctions []string // names; a junction is known by its index
	Named     int      // how many of them, the first, the design names; 0 means all. The others lie inside parts
	Sections  []Section
	Branches  []Branch
	Parts     []Part // what the design calls a load or an element; the witnesses use them only to add up the current into a part
	Source    Source
}

// NamedJunctions is how many junctions, the first, the design names.
func (n *Network) NamedJunctions() int {
	if n.Named == 0 {
		return len(n.Junctions)
	}
	return n.Named
}

// A Part is a load or an element of the design, made of one branch or of
// several. The current from A into it is that of the Branches added up, each
// of which leaves A; an open part has none.
type Part struct {
	Name     string
	Kind     Kind
	A, B     int
	Branches []int
}

// Omega is the angular frequency of the source, rad/s.
func (n *Network) Omega() float64 { return 2 * math.Pi * n.Frequency }

// Period is the period of the source, s.
func (n *Network) Period() float64 { return 1 / n.Frequency }

// A Section is a piece of uniform line between two junctions. With dispersion,
// Line holds the constants of the highest frequencies.
type Section struct {
	Name       string
	From, To   int     // junctions
	Length     float64 // m
	Line       line.Constants
	Dispersion line.Dispersion
}

// At gives the constants of the section at an angular frequency.
func (s Section) At(omega float64) line.Constants { return s.Dispersion.At(s.Line, omega) }

// Delay is the one-way delay of the section, Length sqrt(LC), s. It is the
// delay of a wave front: nothing arrives sooner.
func (s Section) Delay() float64 { return s.Length * math.Sqrt(s.Line.L*s.Line.C) }

// Series is a series combination of lumped parts. A zero is a part that is
// not there: with R, L and C all zero the combination is an exact short.
type Series struct {
	R float64 // ohm
	L float64 // H
	C float64 // F
}

// Ideal reports whether the combination has no impedance at any frequency.
func (s Series) Ideal() bool { return s.R == 0 && s.L == 0 && s.C == 0 }

// Impedance is R + jwL + 1/(jwC), ohm, with the absent parts left out.
func (s Series) Impedance(omega float64) complex128 {
	x := omega * s.L
	if s.C > 0 {
		x -= 1 / (omega * s.C)
	}
	return complex(s.R, x)
}

// Kind says what a part is for.
type Kind int

// The kinds of part.
const (
	Load    Kind = iota // power into it is reported
	Element             // a lumped part that is not a load
)

// A Branch is a lumped series combination from junction A to junction B, or
// to the return conductor if B is Ground. An Open branch carries no current.
//
// A branch with a Ratio n that is not 0 is an ideal transformer with n turns on
// the side of B for each on the side of A, and nothing else:
//
//	VB = n VA,  IA = n I
//
// where I, the current of the branch, flows into B, and IA out of A.
type Branch struct {
	Name  string
	Kind  Kind
	A, B  int
	Open  bool
	Ratio float64
	Series
}

// Turns is Ratio, or 1 for a branch that is no transformer: the branch law is
// Turns VA - VB = Z I, and Turns I leaves A.
func (b Branch) Turns() float64 {
	if b.Ratio == 0 {
		return 1
	}
	return b.Ratio
}

// A Source is an EMF behind a series combination, from the return conductor
// to the junction At. In time
//
//	e(t) = EMF r(t) cos(wt + phase)
//
// where r rises from 0 to 1 as Start says and falls to 0 as Stop says.
type Source struct {
	At  int
	EMF float64 // V, peak
	Series
	Start Start
	Stop  *Stop // nil: the source stays on
}

// Available is the available power |EMF|^2/(8 R), W, or +Inf if R is zero.
func (s Source) Available() float64 { return s.EMF * s.EMF / (8 * s.R) }

// StartJumps reports whether the EMF jumps at the start: abrupt, and not at a
// zero of the carrier.
func (s Source) StartJumps() bool {
	return s.Start.Rise == 0 && (s.Start.Worst || math.Abs(math.Cos(s.Start.Phase)) > 1e-9)
}

// Jumps reports whether the EMF jumps, at the start or at an abrupt stop.
func (s Source) Jumps() bool {
	return s.StartJumps() || s.Stop != nil && s.Stop.Fall == 0
}

// Start is how the source is switched on at t = 0.
type Start struct {
	Rise  float64 // s, raised-cosine rise; 0 is an abrupt start
	Phase float64 // rad
	Worst bool    // every phase is possible; Phase is not used
}

// Stop is how the source is switched off.
type Stop struct {
	At   float64 // s
	Fall float64 // s, raised-cosine fall; 0 is an abrupt stop
}

// Profile is r(t), the envelope of the source: 0 before t = 0, then
// (1 - cos(pi t/Rise))/2 up to 1, and the same way down from Stop.At.
// An abrupt start gives r(0) = 0: a source that jumps at t = 0 has not yet
// jumped, so that the average of its first step is half its height.
func (s Source) Profile(t float64) float64 {
	if t <= 0 {
		return 0
	}
	r := rise(t, s.Start.Rise)
	if s.Stop != nil && t > s.Stop.At {
		r *= 1 - rise(t-s.Stop.At, s.Stop.Fall)
	}
	return r
}

func rise(t, width float64) float64 {
	if t >= width {
		return 1
	}
	return (1 - math.Cos(math.Pi*t/width)) / 2
}
