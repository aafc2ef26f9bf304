package fdtd

import (
	"context"
	"math"
	"testing"

	"pgregory.net/rapid"

	"linewitness/sim/network"
	"linewitness/sim/network/networktest"
)

// mapTol is the tolerance of a map where the scheme is exact, relative to the
// EMF: some thousand additions.
const mapTol = 1e-11

// charted makes a stress run with its map.
func charted(t testing.TB, net *network.Network, g Grid, set Settings) *Stress {
	t.Helper()
	st, err := Settle(context.Background(), net, g, Settings{})
	if err != nil {
		t.Fatal(err)
	}
	set.Map = true
	s, err := StressRun(context.Background(), net, st, set)
	if err != nil {
		t.Fatal(err)
	}
	return s
}

// checkShape checks what every map has.
func checkShape(t testing.TB, net *network.Network, s *Stress) {
	t.Helper()
	m := s.Map
	if len(m.T) == 0 || len(m.T) > mapRows || len(m.Z) > mapPlaces || len(m.A) != len(m.T) {
		t.Fatalf("%d times, %d rows, %d places", len(m.T), len(m.A), len(m.Z))
	}
	length := 0.0
	for _, leg := range m.Path {
		length += net.Sections[leg.Section].Length
	}
	const rounding = 1e-12 // of a sum of some lengths
	if m.Z[0] != 0 || math.Abs(m.Z[len(m.Z)-1]-length) > rounding*length {
		t.Errorf("from %g to %g m, the path has %g m", m.Z[0], m.Z[len(m.Z)-1], length)
	}
	for i := 1; i < len(m.Z); i++ {
		if m.Z[i] <= m.Z[i-1] {
			t.Fatalf("place %d at %g m, after %g m", i, m.Z[i], m.Z[i-1])
		}
	}
	for i, row := range m.A {
		if len(row) != len(m.Z) {
			t.Fatalf("row %d has %d places of %d", i, len(row), len(m.Z))
		}
		if i > 0 && math.Abs((m.T[i]-m.T[i-1])/(m.T[1]-m.T[0])-1) > 1e-9 {
			t.Errorf("rows %g and %g s", m.T[i-1], m.T[i])
		}
	}
	if end := m.T[len(m.T)-1]; end > s.Duration*(1+1e-12) {
		t.Errorf("the map ends at %g s, the run at %g s", end, s.Duration)
	}
}

// TestMapMatched: on a matched line without loss the voltage is half the EMF,
// as it was one delay ago, at every place and time; the scheme is exact there.
// The map of two lanes at a start phase is that.
func TestMapMatched(t *testing.T) {
	const phase = 0.7
	for _, reversed := range []bool{false, true} {
		net := matchedLine(2.5 * wavelength)
		if reversed {
			net.Sections[0].From, net.Sections[0].To = 1, 0
		}
		net.Source.Start = network.Start{Worst: true, Rise: 2 / testFrequency}
		s := charted(t, net, fixedGrid(net, 40), Settings{})
		checkShape(t, net, s)
		if s.Map.Envelope || s.Map.Path[0].Reversed != reversed {
			t.Fatalf("envelope %v, path %v", s.Map.Envelope, s.Map.Path)
		}
		v := s.Map.At(phase)
		for i, at := range s.Map.T {
			for p, z := range s.Map.Z {
				ago := at - net.Sections[0].Delay()*z/net.Sections[0].Length
				want := net.Source.EMF / 2 * net.Source.Profile(ago) * math.Cos(net.Omega()*ago+phase)
				if math.Abs(v[i][p]-want) > mapTol*net.Source.EMF {
					t.Fatalf("at %.4g m, %.4g s: %.12g V, want %.12g", z, at, v[i][p], want)
				}
			}
		}
	}
}

// TestMapFront: nothing is there before the front, which a step later is.
func TestMapFront(t *testing.T) {
	net := lossyCascade()
	net.Source.L = 0
	g := fixedGrid(net, 60)
	s := charted(t, net, g, Settings{Sharp: true})
	checkShape(t, net, s)
	if len(s.Map.Path) != 2 || s.Map.Path[0].Section != 0 || s.Map.Path[1].Section != 1 {
		t.Fatalf("path %v, want sections 0 and 1", s.Map.Path)
	}
	for p, z := range s.Map.Z {
		first := -1
		for i := range s.Map.T {
			if s.Map.A[i][p] != 0 {
				first = i
				break
			}
		}
		// On the grid a front moves a cell a step: at Courant numbers below 1 it
		// is ahead by less than a step a section.
		delay := 0.0
		for _, leg := range s.Map.Path {
			sec := net.Sections[leg.Section]
			part := math.Min(1, z/sec.Length)
			delay += part * sec.Delay()
			if z -= part * sec.Length; z <= 0 {
				break
			}
		}
		row := s.Map.T[1] - s.Map.T[0]
		if at := s.Map.T[first]; at < delay-row || at > delay+row+2*g.Step {
			t.Errorf("place %d: first voltage at %.4g s, the front comes at %.4g s", p, at, delay)
		}
	}
}

// TestMapSuperposition: the lanes of every start phase, mixed, give the map of a
// run at one phase.
func TestMapSuperposition(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		net := networktest.Draw(t)
		phase := rapid.Float64Range(-math.Pi, math.Pi).Draw(t, "start phase")
		g, err := NewGrid(net, 12)
		if err != nil {
			t.Fatal(err)
		}
		st := &Steady{Grid: g, Junctions: make([]complex128, len(net.Junctions)), Branches: make([]complex128, len(net.Branches))}
		set := Settings{Map: true, MaxPeriods: 4}
		run := func(start network.Start) *Stress {
			net.Source.Start = start
			s, err := StressRun(context.Background(), net, st, set)
			if err != nil {
				t.Fatal(err)
			}
			return s
		}
		both, one := run(network.Start{Worst: true}), run(network.Start{Phase: phase})
		got := both.Map.At(phase)
		if len(both.Map.T) != len(one.Map.T) || both.Map.Envelope || one.Map.B != nil {
			t.Fatalf("%d and %d rows", len(both.Map.T), len(one.Map.T))
		}
		for i, row := range one.Map.A {
			for p, want := range row {
				if math.Abs(got[i][p]-want) > mapTol*net.Source.EMF {
					t.Fatalf("row %d, place %d: %.12g V, want %.12g", i, p, got[i][p], want)
				}
			}
		}
	})
}

// TestMapEnvelope: a line of 170 wavelengths is drawn by its envelope, whose
// last row is the crest of the standing wave at every place, since each stands
// for more than half a wavelength: half the EMF and a reflection coefficient of
// a half, with one lane and with two. The steady state is there after one round
// trip, the source being matched.
func TestMapEnvelope(t *testing.T) {
	for _, worst := range []bool{false, true} {
		net := matchedLine(170 * wavelength)
		net.Branches[0].R = 150
		net.Source.Start = network.Start{Worst: worst, Phase: 0.3}
		s := charted(t, net, fixedGrid(net, 12), Settings{})
		checkShape(t, net, s)
		m := s.Map
		if !m.Envelope || !m.Crests || m.B != nil || len(m.T) < mapRows/2 || len(m.Z) != mapPlaces {
			t.Fatalf("envelope %v, %d rows, %d places", m.Envelope, len(m.T), len(m.Z))
		}
		top := 1.5 * net.Source.EMF / 2
		for p, v := range m.A[len(m.A)-1] {
			if math.Abs(v/top-1) > 1e-9 { // rounding
				t.Errorf("worst %v, place %d: %.9g V, want %.9g", worst, p, v, top)
			}
		}
		// Half way through the first passage the wave is alone: half the EMF behind
		// the front, nothing before it.
		trip := net.Sections[0].Delay()
		for i, at := range m.T {
			row := m.T[1] - m.T[0]
			for p, z := range m.Z {
				arrives := trip * z / net.Sections[0].Length
				want := net.Source.EMF / 2
				switch {
				case at+2*row < arrives:
					want = 0
				case at-2*row < arrives || at+2*row > 2*trip-arrives:
					continue
				}
				if math.Abs(m.A[i][p]-want) > 1e-9*net.Source.EMF { // rounding
					t.Fatalf("worst %v, at %.4g m, %.4g s: %.9g V, want %.9g", worst, z, at, m.A[i][p], want)
				}
			}
		}
	}
}

// TestMapBounded: whatever the network and the run, the map has its bounded
// size, and rows enough to be looked at; without being asked for it is not
// there.
func TestMapBounded(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		units := rapid.IntRange(1, 1<<24).Draw(t, "steps")
		first, last := strides(units, mapRows-1)
		if first < 1 || first > last || units > last*(mapRows-1) {
			t.Fatalf("%d steps: stride %d, at last %d", units, first, last)
		}
		if units >= 8*mapRows && units < last*(mapRows-1)*3/4 {
			t.Fatalf("%d steps: only %d rows", units, units/last)
		}
	})
	net := matchedLine(wavelength)
	if s := stressed(t, net, fixedGrid(net, 40)); len(s.Map.T) != 0 || len(s.Map.Path) != 0 {
		t.Error("a map that was not asked for")
	}
}

// TestMapLobes: a standing wave is shown by its lobes, down to its smallest
// amplitude, until they are too narrow; then by its crests. The reflection
// coefficient is 7/9.
func TestMapLobes(t *testing.T) {
	for _, tt := range []struct {
		wavelengths float64
		crests      bool
	}{{15, false}, {30, true}} {
		net := matchedLine(tt.wavelengths * wavelength)
		net.Branches[0].R = 400
		s := charted(t, net, fixedGrid(net, 40), Settings{MaxPeriods: 190})
		checkShape(t, net, s)
		m, top := s.Map, net.Source.EMF/2*(1+7./9)
		if !m.Envelope || m.Crests != tt.crests || len(m.T) < mapRows/3 {
			t.Fatalf("%g wavelengths: envelope %v, crests %v, %d rows", tt.wavelengths, m.Envelope, m.Crests, len(m.T))
		}
		smallest, largest := math.Inf(1), 0.0
		for _, v := range m.A[len(m.A)-1] {
			smallest, largest = math.Min(smallest, v), math.Max(largest, v)
		}
		if math.Abs(largest/top-1) > 1e-9 { // rounding
			t.Errorf("%g wavelengths: largest %.9g V, want %.9g", tt.wavelengths, largest, top)
		}
		switch {
		case tt.crests && smallest < largest*(1-1e-9): // rounding
			t.Errorf("%g wavelengths: crests from %.6g to %.6g V", tt.wavelengths, smallest, largest)
		case !tt.crests && smallest > 0.2*top: // 1/8 at the very place
			t.Errorf("%g wavelengths: smallest %.6g V of %.6g", tt.wavelengths, smallest, top)
		}
	}
}

func TestMainPath(t *testing.T) {
	sec := func(a, b int, wl float64) network.Section {
		return network.Section{From: a, To: b, Length: wl * wavelength, Line: air(50)}
	}
	choke := []network.Branch{{A: 1, B: 2, Series: network.Series{L: 1e-6}}}
	for _, tt := range []struct {
		name     string
		n        int
		secs     []network.Section
		branches []network.Branch
		want     []Leg
	}{
		{"line", 2, []network.Section{sec(1, 0, 1)}, nil, []Leg{{0, true}}},
		{"tree", 4, []network.Section{sec(0, 1, 1), sec(1, 2, 2), sec(3, 1, 3)}, nil, []Leg{{0, false}, {2, true}}},
		{"ring: the shortest left out", 4, []network.Section{sec(0, 1, 1), sec(1, 2, 2), sec(2, 3, 3), sec(3, 0, 4)}, nil, []Leg{{3, true}, {2, true}, {1, true}}},
		{"parallel: the longer", 2, []network.Section{sec(0, 1, 2), sec(0, 1, 3)}, nil, []Leg{{1, false}}},
		{"over a choke", 4, []network.Section{sec(0, 1, 1), sec(2, 3, 1)}, choke, []Leg{{0, false}, {1, false}}},
		{"none", 1, nil, nil, nil},
	} {
		net := &network.Network{Frequency: testFrequency, Junctions: make([]string, tt.n), Sections: tt.secs, Branches: tt.branches}
		got := MainPath(net)
		if len(got) != len(tt.want) {
			t.Errorf("%s: %v, want %v", tt.name, got, tt.want)
			continue
		}
		for i := range got {
			if got[i] != tt.want[i] {
				t.Errorf("%s: %v, want %v", tt.name, got, tt.want)
				break
			}
		}
	}
}
