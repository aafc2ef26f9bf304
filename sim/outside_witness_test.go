package sim_test

import (
	"context"
	"math"
	"math/cmplx"
	"testing"

	"linewitness/fdtd"
	"linewitness/phasor"
	"linewitness/sim/agree"
	"linewitness/sim/line"
	"linewitness/sim/network"
)

// A reading is what can be read at the terminals of a solved network.
type reading struct {
	sections  []terminals
	junctions []complex128
	branches  []complex128
	source    complex128
	exact     *phasor.Solution // for places along a line; nil if read in the time domain
}

// terminals are the two ends of one section.
type terminals struct {
	vFrom, iFrom, vTo, iTo complex128
	lag                    float64 // rad by which V at the To end lags, turns counted
}

func (e terminals) zFrom() complex128 { return e.vFrom / e.iFrom }
func (e terminals) zTo() complex128   { return e.vTo / e.iTo }

// A reader solves a network. The closed form, the time domain, and the closed
// form of the grid's equivalent lines are three of them.
type reader func(t *testing.T, net *network.Network) reading

func readPhasor(t *testing.T, net *network.Network) reading {
	t.Helper()
	s, err := phasor.Solve(net)
	if err != nil {
		t.Fatalf("phasor: %v", err)
	}
	return readSolution(net, s)
}

func readSolution(net *network.Network, s *phasor.Solution) reading {
	r := reading{source: s.Source(), exact: s}
	for k, sec := range net.Sections {
		const points = 400 // far less than half a turn from one to the next on these lines
		var v []complex128
		for i := range points + 1 {
			v = append(v, s.Voltage(k, sec.Length*float64(i)/points))
		}
		r.sections = append(r.sections, terminals{
			v[0], s.Current(k, 0), v[points], s.Current(k, sec.Length), lag(v),
		})
	}
	for j := range net.Junctions {
		r.junctions = append(r.junctions, s.Junction(j))
	}
	for b := range net.Branches {
		r.branches = append(r.branches, s.Branch(b))
	}
	return r
}

// lag adds up the phase lag from each phasor to the next.
func lag(v []complex128) float64 {
	sum := 0.0
	for i := 1; i < len(v); i++ {
		sum -= cmplx.Phase(v[i] / v[i-1])
	}
	return sum
}

// cellsPerWavelength is the grid of the time-domain readings.
const cellsPerWavelength = 60

// settledTo is the tolerance of their settling runs.
const settledTo = 1e-7

func readFDTD(t *testing.T, net *network.Network) reading {
	t.Helper()
	st, err := fdtd.Settle(context.Background(), net, gridOf(t, net), fdtd.Settings{Tolerance: settledTo})
	if err != nil {
		t.Fatalf("settle: %v", err)
	}
	if !st.Settling.Settled {
		t.Fatalf("not settled after %d periods", st.Settling.Periods)
	}
	r := reading{junctions: st.Junctions, branches: st.Branches, source: st.Source}
	for _, s := range st.Sections {
		r.sections = append(r.sections, terminals{s.VFrom, s.IFrom, s.VTo, s.ITo, lag(s.V)})
	}
	return r
}

// readEquivalent gives what the time domain must read on its grid: the closed
// form with the grid's own propagation exponents and impedances.
func readEquivalent(t *testing.T, net *network.Network) reading {
	t.Helper()
	g := gridOf(t, net)
	var waves []agree.Wave
	for k := range net.Sections {
		waves = append(waves, agree.Wave(g.Numerical(net, k)))
	}
	r := readPhasor(t, agree.Equivalent(net, waves))
	r.exact = nil
	return r
}

func gridOf(t *testing.T, net *network.Network) fdtd.Grid {
	t.Helper()
	g, err := fdtd.NewGrid(net, cellsPerWavelength)
	if err != nil {
		t.Fatalf("grid: %v", err)
	}
	return g
}

// lossless is the line of characteristic impedance z0, ohm, and velocity v, m/s.
func lossless(z0, v float64) line.Constants { return line.Constants{L: z0 / v, C: 1 / (z0 * v)} }

// series realises an impedance at the frequency f as R and L or R and C.
func series(z complex128, f float64) network.Series {
	s := network.Series{R: real(z)}
	switch x := imag(z); {
	case x > 0:
		s.L = x / (2 * math.Pi * f)
	case x < 0:
		s.C = -1 / (2 * math.Pi * f * x)
	}
	return s
}

// A builder puts a network together, junction 0 first. Its source is an EMF
// of 1 V behind a resistance at junction 0.
type builder struct{ network.Network }

func build(f, sourceR float64) *builder {
	b := &builder{network.Network{Frequency: f, Junctions: []string{"0"}}}
	b.Source = network.Source{EMF: 1, Series: network.Series{R: sourceR}}
	return b
}

func (b *builder) junction(j int) int {
	for len(b.Junctions) <= j {
		b.Junctions = append(b.Junctions, string(rune('0'+len(b.Junctions))))
	}
	return j
}

// section adds a line between two junctions.
func (b *builder) section(from, to int, k line.Constants, length float64) *builder {
	b.Sections = append(b.Sections, network.Section{
		Name: string(rune('A' + len(b.Sections))), From: b.junction(from), To: b.junction(to), Length: length, Line: k,
	})
	return b
}

// load adds an impedance from a junction to the return conductor.
func (b *builder) load(at int, z complex128) *builder {
	return b.part(network.Load, at, network.Ground, z)
}

// element adds an impedance between two junctions.
func (b *builder) element(from, to int, z complex128) *builder {
	return b.part(network.Element, from, b.junction(to), z)
}

func (b *builder) part(kind network.Kind, from, to int, z complex128) *builder {
	b.Branches = append(b.Branches, network.Branch{
		Name: string(rune('a' + len(b.Branches))), Kind: kind, A: b.junction(from), B: to, Series: series(z, b.Frequency),
	})
	return b
}

// open leaves a junction open.
func (b *builder) open(at int) *builder {
	b.load(at, 0)
	b.Branches[len(b.Branches)-1].Open = true
	return b
}

// loaded is one line with a load at its end, fed through its own impedance.
func loaded(f float64, k line.Constants, length float64, z complex128) *network.Network {
	r := math.Sqrt(k.L / k.C)
	return &build(f, r).section(0, 1, k, length).load(1, z).Network
}

// gamma is the voltage reflection coefficient of z on a line of impedance z0.
func gamma(z complex128, z0 float64) complex128 {
	return (z - complex(z0, 0)) / (z + complex(z0, 0))
}

// swr is the standing-wave ratio of a reflection coefficient.
func swr(g complex128) float64 { return (1 + cmplx.Abs(g)) / (1 - cmplx.Abs(g)) }

// degrees is the phase of z in degrees.
func degrees(z complex128) float64 { return cmplx.Phase(z) * 180 / math.Pi }
