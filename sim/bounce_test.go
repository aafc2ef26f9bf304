package sim

import (
	"context"
	"fmt"
	"math"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"linewitness/fdtd"
	"linewitness/sim/line"
	"linewitness/sim/network"
	"linewitness/sim/network/networktest"
	"linewitness/sim/record"
)

// bounceTol is the relative tolerance of what follows by a few additions and
// multiplications.
const bounceTol = 1e-12

// plainLine is a section without loss, of a characteristic impedance and a
// velocity.
func plainLine(from, to int, z0, velocity, length float64) network.Section {
	return network.Section{
		Name: fmt.Sprintf("s%d", from), From: from, To: to, Length: length,
		Line: line.Constants{L: z0 / velocity, C: 1 / (z0 * velocity)},
	}
}

func resistor(at int, r float64) network.Branch {
	return network.Branch{A: at, B: network.Ground, Series: network.Series{R: r}}
}

// chainOf is one line between resistances.
func chainOf(rs, z0, rl, velocity, length float64) *network.Network {
	return &network.Network{
		Frequency: velocity / length, Junctions: []string{"generator", "load"},
		Sections: []network.Section{plainLine(0, 1, z0, velocity, length)},
		Branches: []network.Branch{resistor(1, rl)},
		Source:   network.Source{EMF: 1, Series: network.Series{R: rs}},
	}
}

// M.N.O. Sadiku, Elements of Electromagnetics, 7th ed. (Oxford UP, 2017),
// Example 11.8, p.594-598 (read in the source): 12 V switched onto 100 ohm, a
// 50 ohm line of 100 m with u = 1e8 m/s, and 200 ohm. Printed: coefficients 1/3
// and 3/5, waves of 4, 2.4 and 0.8 V, finally 8 V. The further steps are the
// exact sums of the series.
func TestOutsideBounceTable(t *testing.T) {
	b := bounces(chainOf(100, 50, 200, 1e8, 100))
	want := []record.Bounce{
		{Time: 0, Junction: "generator", Step: 4, Voltage: 4},
		{Time: 1e-6, Junction: "load", Section: "s0", Step: 4 + 2.4, Voltage: 6.4},
		{Time: 2e-6, Junction: "generator", Section: "s0", Step: 2.4 + 0.8, Voltage: 7.2},
		{Time: 3e-6, Junction: "load", Section: "s0", Step: 1.28, Voltage: 7.68},
		{Time: 4e-6, Junction: "generator", Section: "s0", Step: 0.64, Voltage: 7.84},
		{Time: 5e-6, Junction: "load", Section: "s0", Step: 0.256, Voltage: 7.936},
		{Time: 6e-6, Junction: "generator", Section: "s0", Step: 0.128, Voltage: 7.968},
		{Time: 7e-6, Junction: "load", Section: "s0", Step: 0.0512, Voltage: 7.9872},
	} // the next, 0.0256 V, is below 0.5 % of 6.4 V
	if len(b.Arrivals) != len(want) {
		t.Fatalf("%d arrivals, want %d: %+v", len(b.Arrivals), len(want), b.Arrivals)
	}
	for i, w := range want {
		g := b.Arrivals[i]
		if g.Junction != w.Junction || g.Section != w.Section || !close12(g.Time, w.Time) || !close12(12*g.Step, w.Step) || !close12(12*g.Voltage, w.Voltage) {
			t.Errorf("arrival %d: %+v for 1 V, want %+v for 12 V", i, g, w)
		}
	}
	if g := b.Coefficients; !close12(g[0].FromRight, 1./3) || !close12(g[1].FromLeft, 3./5) || !math.IsNaN(g[0].FromLeft) || !math.IsNaN(g[1].ThroughRight) {
		t.Errorf("coefficients %+v", g)
	}
	if b.Note != "" {
		t.Errorf("note %q of a line that has nothing to note", b.Note)
	}
}

func close12(got, want float64) bool { return math.Abs(got-want) <= bounceTol*math.Abs(want) }

// The same, Example 11.9, p.601-602 (read in the source): 4 V behind 25 ohm, a
// 75 ohm line of 60 m with u = 3e7 m/s, and 100 ohm. Printed: coefficients -1/2
// and 1/7, 3 V sent out, and at the generator current waves that come and go of
// -5.714 and -2.857 (from 4 us), 0.4082 and 0.2041 (8 us), -0.0292 and -0.0146 mA
// (12 us).
func TestOutsideBounceCurrents(t *testing.T) {
	l, why := newLattice(newFrontView(chainOf(25, 75, 100, 3e7, 60)))
	if why != "" {
		t.Fatal(why)
	}
	c := l.coefficients()
	if g, back := c[0].FromRight, c[1].FromLeft; !close12(g, -0.5) || !close12(back, 1./7) {
		t.Errorf("coefficients %g and %g", g, back)
	}
	type wave struct{ at, arriving, leaving, half float64 } // us, mA
	printed := []wave{{4, -5.714, -2.857, 5e-4}, {8, 0.4082, 0.2041, 5e-5}, {12, -0.0292, -0.0146, 5e-5}}
	all := l.arrivals(10, 0)
	if !close12(4*all[0].Step, 3) {
		t.Errorf("sent out %g V, want 3", 4*all[0].Step)
	}
	for i, w := range printed {
		a := all[2*i+2]
		arriving := 4 * a.Step / (1 + c[0].FromRight) // V, on its way back
		if !close12(a.Time*1e6, w.at) || math.Abs(-1e3*arriving/75-w.arriving) > w.half || math.Abs(1e3*c[0].FromRight*arriving/75-w.leaving) > w.half {
			t.Errorf("at %g us %g V come back, want %+v", a.Time*1e6, arriving, w)
		}
	}
}

// drawChain draws a chain of lines without loss between resistances, each a
// whole number of steps of 1 ns long.
func drawChain(t *rapid.T) *network.Network {
	const steps = 64
	ohm := func(what string) float64 { return rapid.Float64Range(5, 500).Draw(t, what) }
	n := rapid.IntRange(1, 4).Draw(t, "sections")
	net := &network.Network{Frequency: 1e9 / steps, Source: network.Source{EMF: 1}}
	for k := range n + 1 {
		net.Junctions = append(net.Junctions, fmt.Sprintf("j%d", k))
		if k == n || rapid.Bool().Draw(t, "shunt") {
			net.Branches = append(net.Branches, resistor(k, ohm("shunt ohm")))
		}
	}
	for k := range n {
		cells := rapid.IntRange(1, 6).Draw(t, "cells")
		s := plainLine(k, k+1, ohm("z0"), 2e8, 0.2*float64(cells))
		if rapid.Bool().Draw(t, "turned") {
			s.From, s.To = s.To, s.From
		}
		net.Sections = append(net.Sections, s)
	}
	if rapid.IntRange(0, 4).Draw(t, "ideal source") > 0 {
		net.Source.R = ohm("source ohm")
	}
	return net
}

// TestBouncesAgainstRun: at Courant number 1 the time-domain witness is exact on
// lines without loss, so every junction of a chain has the sum of the EMF's
// cosine, begun at each arrival, times the step of it.
func TestBouncesAgainstRun(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		net := drawChain(t)
		const step, periods = 1e-9, 1
		g := fdtd.Grid{StepsPerPeriod: int(math.Round(1 / (net.Frequency * step))), Step: step}
		for _, s := range net.Sections {
			g.Cells, g.Courant = append(g.Cells, int(math.Round(s.Delay()/step))), append(g.Courant, 1)
		}
		still := &fdtd.Steady{Grid: g, Junctions: make([]complex128, len(net.Junctions)), Branches: make([]complex128, len(net.Branches))}
		run, err := fdtd.StressRun(context.Background(), net, still, fdtd.Settings{Sharp: true, MaxPeriods: periods})
		if err != nil {
			t.Fatal(err)
		}
		l, why := newLattice(newFrontView(net))
		if why != "" {
			t.Fatal(why)
		}
		const all = 600 // more than 64 steps can bring: at most one from each side of four sections a step
		steps := l.arrivals(all, 1e-15)
		for j, name := range net.Junctions {
			for i, v := range run.Traces.Junctions[j].A {
				n, want := i+run.Traces.First, 0.0
				for _, b := range steps {
					if at := n - int(math.Round(b.Time/step)); b.Junction == name && at > 0 {
						want += b.Step * math.Cos(2*math.Pi*float64(at)/float64(g.StepsPerPeriod))
					}
				}
				if math.Abs(v-want) > 1e-10 { // of 1 V: some thousand additions
					t.Fatalf("%s, step %d: %.12g V, want %.12g", name, n, v, want)
				}
			}
		}
	})
}

// TestBouncesToTheEnd: a step ends in the divider of the resistances.
func TestBouncesToTheEnd(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		net := drawChain(t)
		g := 0.0
		for _, b := range net.Branches {
			g += 1 / b.R
		}
		want := 1 / (1 + net.Source.R*g)
		l, _ := newLattice(newFrontView(net))
		const smallest = 1e-9
		all := l.arrivals(200000, smallest)
		if len(all) == 200000 {
			t.Skip("rings for too long")
		}
		last := map[string]float64{}
		for _, b := range all {
			last[b.Junction] = b.Voltage
		}
		for name, v := range last {
			if math.Abs(v-want) > 1e-4 { // what the waves below smallest would have added, with a loop factor of up to 0.999
				t.Errorf("%s: %.9g V in the end, want %.9g", name, v, want)
			}
		}
	})
}

// TestBouncesTold: the table has its bounded length, is in the order of time,
// leaves out what is small, and its voltages take in what it leaves out.
func TestBouncesTold(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		net := drawChain(t)
		b := bounces(net)
		l, _ := newLattice(newFrontView(net))
		sum, top := map[string]float64{}, 0.0
		all := l.arrivals(mostEvents, smallestWave)
		for _, a := range all {
			top = math.Max(top, math.Abs(a.Step))
		}
		next := 0
		for _, a := range all {
			sum[a.Junction] += a.Step
			if math.Abs(a.Step) < leastStep*top || next == len(b.Arrivals) {
				continue
			}
			got := b.Arrivals[next]
			if next++; got != a || math.Abs(got.Voltage-sum[a.Junction]) > 1e-9 || next > 1 && got.Time < b.Arrivals[next-2].Time {
				t.Fatalf("arrival %d: %+v, want %+v", next-1, got, a)
			}
		}
		if next != len(b.Arrivals) || next > mostArrivals || next == 0 {
			t.Errorf("%d arrivals, %d of them there", len(b.Arrivals), next)
		}
	})
}

// TestNoBounces: anything but a chain from the source has no table, and the note
// says why.
func TestNoBounces(t *testing.T) {
	net := func(n int, parts []network.Branch, sections ...network.Section) *network.Network {
		out := chainOf(50, 50, 50, 2e8, 1)
		out.Junctions = strings.Split("a b c d", " ")[:n]
		out.Sections, out.Branches = sections, parts
		return out
	}
	sec := func(a, b int) network.Section { return plainLine(a, b, 50, 2e8, 1) }
	choke := network.Branch{A: 0, B: 2, Series: network.Series{L: 1e-6}}
	for _, tt := range []struct {
		net  *network.Network
		want string
	}{
		{net(4, nil, sec(0, 1), sec(1, 2), sec(1, 3)), "branches at b"},
		{net(3, nil, sec(0, 1), sec(1, 2), sec(2, 0)), "source is not at an end"},
		{net(3, nil, sec(1, 0), sec(0, 2)), "source is not at an end"},
		{net(3, []network.Branch{choke}, sec(0, 1), sec(1, 2)), "a part lies between a and c"},
		{net(3, []network.Branch{choke}, sec(1, 2)), "source is not at an end"},
		{net(3, []network.Branch{{Name: "balun", A: 1, B: 2, Ratio: 2}}, sec(0, 1)), "balun is a transformer"},
	} {
		b := bounces(tt.net)
		if len(b.Arrivals)+len(b.Coefficients)+len(b.Sections) > 0 || !strings.Contains(b.Note, tt.want) {
			t.Errorf("%+v, want none, since %q", b, tt.want)
		}
	}
}

// TestBouncesOfAny: every network has a table or a reason, and no number of it is
// infinite.
func TestBouncesOfAny(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		net := rapid.SampledFrom([]func(*rapid.T) *network.Network{
			networktest.Draw, networktest.DrawDispersive, networktest.DrawTransformer,
		}).Draw(t, "kind")(t)
		b := bounces(net)
		if len(b.Coefficients) == 0 && b.Note == "" {
			t.Fatal("no table and no reason")
		}
		for _, a := range b.Arrivals {
			if math.IsNaN(a.Step+a.Voltage) || math.IsInf(a.Step+a.Voltage, 0) {
				t.Fatalf("%+v", a)
			}
		}
		for _, s := range b.Sections {
			if !(s.Kept > 0 && s.Kept <= 1) {
				t.Fatalf("%+v", s)
			}
		}
	})
}
