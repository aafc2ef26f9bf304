package fdtd

import (
	"context"
	"errors"
	"fmt"
	"math"
	"runtime"
	"testing"

	"linewitness/sim/network"
)

// TestNoAllocation: a time step, its peaks, its records and its map do not
// allocate, be the map that of the voltage or, of a long line, of the envelope.
func TestNoAllocation(t *testing.T) {
	long := matchedLine(40 * wavelength)
	long.Branches[0].R = 200
	for name, net := range map[string]*network.Network{"cascade": lossyCascade(), "long line": long} {
		t.Run(name, func(t *testing.T) { allocations(t, net, net == long) })
	}
}

func allocations(t *testing.T, net *network.Network, envelope bool) {
	net.Source.Start.Worst = true
	m, err := newModel(net, fixedGrid(net, 40))
	if err != nil {
		t.Fatal(err)
	}
	st, err := Settle(context.Background(), net, m.grid, Settings{})
	if err != nil {
		t.Fatal(err)
	}
	set := Settings{Map: true}.withDefaults()
	r := m.newRun(context.Background(), set, newDrive(net.Source, m.grid, 0), newDrive(net.Source, m.grid, -math.Pi/2))
	s := &stresser{m: m, run: r, final: st, worst: true}
	s.prepare([]float64{0, -math.Pi / 2})
	if s.chart.envelope != envelope {
		t.Fatalf("envelope %v, want %v", s.chart.envelope, envelope)
	}
	rec := newRecorder(t.Context(), m, 4096)
	look := func(n int) { s.look(); rec.sample(r.lanes[0], n) }
	defer runtime.GOMAXPROCS(runtime.GOMAXPROCS(1)) // as testing.AllocsPerRun: nobody else allocates
	// Room for the periods below is made at their beginning, as in a run.
	halved := s.chart.every
	for range 300 { // beyond the map of either network
		s.follow.reserve()
		s.traces.reserve()
		var before, after runtime.MemStats
		runtime.ReadMemStats(&before)
		err := r.period(look)
		runtime.ReadMemStats(&after)
		if n := after.Mallocs - before.Mallocs; n != 0 || err != nil {
			t.Fatalf("%d allocations in a period (%v)", n, err)
		}
	}
	if s.chart.end >= r.n || s.chart.every == halved && s.chart.rows < mapRows/2 {
		t.Errorf("the map was not filled: %d rows of %d steps, end %d of %d", s.chart.rows, s.chart.every, s.chart.end, r.n)
	}
}

func TestCancel(t *testing.T) {
	net := lossyCascade()
	ctx, cancel := context.WithCancel(context.Background())
	cancel()
	if _, err := Settle(ctx, net, fixedGrid(net, 40), Settings{}); !errors.Is(err, context.Canceled) {
		t.Errorf("Settle: %v", err)
	}
	st, err := Settle(context.Background(), net, fixedGrid(net, 40), Settings{})
	if err != nil {
		t.Fatal(err)
	}
	if _, err := StressRun(ctx, net, st, Settings{}); !errors.Is(err, context.Canceled) {
		t.Errorf("StressRun: %v", err)
	}
}

// TestNotSettled: a resonator that keeps 0.9998 of its amplitude each round
// trip has not settled after 400 periods, and the measured loop factor tells.
func TestNotSettled(t *testing.T) {
	net := matchedLine(wavelength / 2)
	net.Branches[0].Series = network.Series{}
	net.Source.R = 0
	net.Sections[0].Line.R = 2 * 50 * 1e-4 / (wavelength / 2) // 1e-4 Np one way: alpha = R/(2 z0)
	net.Sections[0].Length *= 1.02                            // not quite resonant, or the phasor would be huge
	g, err := NewGrid(net, 40)
	if err != nil {
		t.Fatal(err)
	}
	st, err := Settle(context.Background(), net, g, Settings{MaxPeriods: 400})
	if err != nil {
		t.Fatal(err)
	}
	s := st.Settling
	if s.Settled || s.Periods != 400 {
		t.Errorf("settled %v after %d periods", s.Settled, s.Periods)
	}
}

// TestLoopFactor: on one line the loop factor is |Gs Gl| e^{-2 alpha l}, here
// without loss (1/3)(1/2).
func TestLoopFactor(t *testing.T) {
	net := matchedLine(5 * wavelength)
	net.Source.R, net.Branches[0].R = 100, 150
	st, err := Settle(context.Background(), net, fixedGrid(net, 40), Settings{})
	if err != nil {
		t.Fatal(err)
	}
	// Each change is taken relative to the amplitude then, which still moves.
	const tolerance = 1e-3
	if got := st.Settling.LoopFactor; math.Abs(got-1.0/6) > tolerance/6 {
		t.Errorf("loop factor %.6f, want 1/6", got)
	}
}

// TestLoopFactorOfAShortLine: a round trip of 0.4 periods, between the
// comparisons a period apart, keeps its own part of the amplitude.
func TestLoopFactorOfAShortLine(t *testing.T) {
	net := matchedLine(wavelength / 5)
	net.Source.R, net.Branches[0].R = 2, 1000
	st, err := Settle(context.Background(), net, fixedGrid(net, 100), Settings{})
	if err != nil {
		t.Fatal(err)
	}
	want := math.Abs((2 - 50.) / (2 + 50) * (1000 - 50) / (1000 + 50))
	const tolerance = 0.02 // the mode is off the frequency, and turns
	if got := st.Settling.LoopFactor; math.Abs(got-want) > tolerance {
		t.Errorf("loop factor %.4f, want %.4f", got, want)
	}
}

// TestPlateau: with one branch of a tee open, the source voltage stands still
// for a branch's round trip at a time, at levels far from the final one. A
// comparison of neighbouring periods would take the first for steady.
func TestPlateau(t *testing.T) {
	branch := 10 * wavelength
	net := &network.Network{
		Frequency: testFrequency, Junctions: []string{"a", "tee", "b", "open"},
		Sections: []network.Section{
			{From: 0, To: 1, Length: wavelength, Line: air(50)},
			{From: 1, To: 2, Length: branch, Line: air(50)},
			{From: 1, To: 3, Length: branch + wavelength/8, Line: air(50)},
		},
		Branches: []network.Branch{{A: 2, B: network.Ground, Series: network.Series{R: 50}}},
		Source:   network.Source{EMF: 2, Series: network.Series{R: 50}},
	}
	g := fixedGrid(net, 40)
	st, err := Settle(context.Background(), net, g, Settings{})
	if err != nil {
		t.Fatal(err)
	}
	fine := settled(t, net, g, 1e-10)
	for j, v := range st.Junctions {
		if d := v - fine.Junctions[j]; math.Hypot(real(d), imag(d)) > 2e-4 { // twice the tolerance
			t.Errorf("junction %s: %v, finally %v", net.Junctions[j], v, fine.Junctions[j])
		}
	}
	// The trap is real: right after the ramp neighbouring periods agree.
	m, err := newModel(net, g)
	if err != nil {
		t.Fatal(err)
	}
	src := net.Source
	src.Start.Rise = 2 / testFrequency
	r := m.newRun(context.Background(), Settings{}, newDrive(src, g, 0))
	rec := newRecorder(t.Context(), m, 4096)
	var seen []complex128
	for range 19 { // 2 for the ramp, 4 there and back, and on to just before the far echo at 22.25 + 2
		if err := r.period(func(n int) { rec.sample(r.lanes[0], n) }); err != nil {
			t.Fatal(err)
		}
		seen = append(seen, rec.window().junctions[0])
	}
	n := len(seen)
	still, off := seen[n-1]-seen[n-2], seen[n-1]-fine.Junctions[0]
	if math.Hypot(real(still), imag(still)) > 1e-9 || math.Hypot(real(off), imag(off)) < 0.05 {
		t.Errorf("no plateau to be fooled by: change %v, error %v", still, off)
	}
}

func TestLongestPath(t *testing.T) {
	sec := func(a, b int, wl float64) network.Section {
		return network.Section{From: a, To: b, Length: wl * wavelength, Line: air(50)}
	}
	for _, tt := range []struct {
		name string
		n    int
		secs []network.Section
		want float64 // wavelengths
	}{
		{"line", 2, []network.Section{sec(0, 1, 3)}, 3},
		{"cascade", 3, []network.Section{sec(0, 1, 3), sec(2, 1, 1)}, 4},
		{"tree: between two branch ends", 4, []network.Section{sec(0, 1, 1), sec(1, 2, 5), sec(1, 3, 4)}, 9},
		{"parallel", 2, []network.Section{sec(0, 1, 3), sec(0, 1, 2)}, 5},
		{"ring", 3, []network.Section{sec(0, 1, 1), sec(1, 2, 1), sec(2, 0, 1)}, 3},
	} {
		net := &network.Network{Frequency: testFrequency, Junctions: make([]string, tt.n), Sections: tt.secs}
		if got := LongestPath(net) * testFrequency; math.Abs(got-tt.want) > 1e-9 {
			t.Errorf("%s: %.4f wavelengths, want %g", tt.name, got, tt.want)
		}
	}
}

func TestThin(t *testing.T) {
	for _, tt := range []struct {
		n, limit int
		want     string
	}{{3, 9, "[0 1 2]"}, {9, 3, "[0 4 8]"}, {10, 4, "[0 3 6 9]"}, {1, 4, "[0]"}} {
		if got := fmt.Sprint(thin(tt.n, tt.limit)); got != tt.want {
			t.Errorf("thin(%d, %d) = %s, want %s", tt.n, tt.limit, got, tt.want)
		}
	}
}

// TestGridLimits: cells per wavelength on every section, Courant numbers in
// (0, 1], refinement keeps them.
func TestGridLimits(t *testing.T) {
	net := lossyCascade()
	net.Sections[2].Length = 0.011 // a thirtieth of a wavelength in the cable / 6
	for _, cells := range []float64{8, 20, 40, 97.3} {
		g, err := NewGrid(net, cells)
		if err != nil {
			t.Fatal(err)
		}
		f := g.Refine(2)
		for k := range net.Sections {
			if c := g.CellsPerWavelength(net, k); c < cells*(1-1e-6) {
				t.Errorf("section %d: %.3f cells per wavelength, want %g", k, c, cells)
			}
			if g.Courant[k] <= 0 || g.Courant[k] > 1 || f.Courant[k] != g.Courant[k] || f.Cells[k] != 4*g.Cells[k] {
				t.Errorf("section %d: Courant %v, cells %d; refined %v, %d", k, g.Courant[k], g.Cells[k], f.Courant[k], f.Cells[k])
			}
		}
	}
	net.Sections[2].Length = 1e-9
	if _, err := NewGrid(net, 20); !errors.Is(err, ErrShortSection) {
		t.Errorf("a section of a nanometre: %v", err)
	}
}

// TestStepNumbers: an FFT of a length with a large prime factor costs that many
// times more; the steps per period have none.
func TestStepNumbers(t *testing.T) {
	for _, lo := range []int{8, 40, 41, 997, 5003, 65537, 799530} {
		all := stepNumbers(lo)
		if len(all) == 0 || len(all) > 2*candidates {
			t.Fatalf("from %d: %d numbers", lo, len(all))
		}
		for _, n := range all {
			if n < lo || !smooth(n) {
				t.Errorf("from %d: %d", lo, n)
			}
		}
	}
	if smooth(37) || smooth(2*41) || !smooth(31*31*2) || !smooth(49) {
		t.Error("smooth does not tell numbers apart")
	}
}
