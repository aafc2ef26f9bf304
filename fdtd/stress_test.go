package fdtd

import (
	"context"
	"math"
	"math/cmplx"
	"slices"
	"testing"

	"linewitness/sim/network"
)

// restDefault is the default of Settings.Rest.
const restDefault = 1e-3

// matchedLine is a line of 50 ohm, matched at both ends, at Courant number 1.
func matchedLine(length float64) *network.Network {
	return &network.Network{
		Frequency: testFrequency, Junctions: []string{"a", "b"},
		Sections: []network.Section{{Name: "line", From: 0, To: 1, Length: length, Line: air(50)}},
		Branches: []network.Branch{{Name: "load", A: 1, B: network.Ground, Series: network.Series{R: 50}}},
		Source:   network.Source{EMF: 2000, Series: network.Series{R: 50}},
	}
}

func stressed(t testing.TB, net *network.Network, g Grid) *Stress {
	t.Helper()
	_, s := bothRuns(t, net, g)
	return s
}

// bothRuns are the settling run and the stress run of a network.
func bothRuns(t testing.TB, net *network.Network, g Grid) (*Steady, *Stress) {
	t.Helper()
	st, err := Settle(context.Background(), net, g, Settings{})
	if err != nil {
		t.Fatal(err)
	}
	s, err := StressRun(context.Background(), net, st, Settings{})
	if err != nil {
		t.Fatal(err)
	}
	return st, s
}

// TestNoFalseOvershoot: an averaged source that had already jumped at t = 0
// would launch one sample of exactly twice the wave, and a perfectly matched
// line would seem to overshoot by 100 %. Abrupt cosine, matched: the peak is
// half the EMF.
func TestNoFalseOvershoot(t *testing.T) {
	net := matchedLine(1.5 * wavelength)
	s := stressed(t, net, fixedGrid(net, 40))
	for name, p := range map[string]float64{"voltage": s.Voltage.Value, "current x 50 ohm": s.Current.Value * 50} {
		if math.Abs(p-1000) > 1e-9*1000 { // rounding
			t.Errorf("peak %s %.6f V, want 1000", name, p)
		}
	}
}

// TestWorstPhase: the largest |v| over all start phases from the two lanes is
// the largest over a scan of single runs.
func TestWorstPhase(t *testing.T) {
	net := lossyCascade()
	g := fixedGrid(net, 40)
	net.Source.Start.Worst = true
	both := stressed(t, net, g)
	net.Source.Start.Worst = false
	scan := 0.0
	const phases = 24
	for i := range phases {
		net.Source.Start.Phase = 2 * math.Pi * float64(i) / phases
		scan = math.Max(scan, stressed(t, net, g).Voltage.Value)
	}
	// A scan of n phases, two of which are opposite, misses by at most
	// 1 - cos(pi/n).
	if miss := 1 - scan/both.Voltage.Value; miss < -1e-12 || miss > 1-math.Cos(math.Pi/phases) {
		t.Errorf("scan gives %.6f V, the pair %.6f V", scan, both.Voltage.Value)
	}
	net.Source.Start.Phase = both.Voltage.Phase
	if one := stressed(t, net, g).Voltage; math.Abs(one.Value/both.Voltage.Value-1) > 1e-12 || one.Time != both.Voltage.Time || one.At != both.Voltage.At {
		t.Errorf("at the worst phase: %+v, the pair: %+v", one, both.Voltage)
	}
}

// TestFullReflectionDoubles: an open end doubles the wave, and a step onto it
// through a matched source stays below that (common practice).
func TestFullReflectionDoubles(t *testing.T) {
	net := matchedLine(2 * wavelength)
	net.Branches = nil
	s := stressed(t, net, fixedGrid(net, 40))
	if v := s.Junctions[1].Value; math.Abs(v-2000) > 2000*1e-9 {
		t.Errorf("open end peaks at %.6f V, want 2000", v)
	}
}

// TestBurst: after a stop the network comes to rest at zero, and the run waits
// for the echoes.
func TestBurst(t *testing.T) {
	net := matchedLine(3 * wavelength)
	net.Branches[0].R = 200
	net.Source.R = 20
	net.Source.Start.Rise = 2 / testFrequency
	net.Source.Stop = &network.Stop{At: 30 / testFrequency, Fall: 1 / testFrequency}
	g := fixedGrid(net, 40)
	s := stressed(t, net, g)
	if !s.Complete {
		t.Fatal("the run did not come to rest")
	}
	a := s.Traces.Junctions[1].A
	last := a[len(a)-g.StepsPerPeriod:]
	for _, v := range last {
		if math.Abs(v) > restDefault*s.Voltage.Value*2 {
			t.Fatalf("still %.3g V at the end", v)
		}
	}
	if end := float64(s.Traces.TailEnd) * g.Step; math.Abs(end-net.Source.Stop.At) > g.Step {
		t.Errorf("the tail ends at %.4g s, want at the stop", end)
	}
	if at := s.SettleTime(-1, 0.01) * testFrequency; !(at > 6 && at < 29) {
		t.Errorf("settled after %.2f periods, want before the stop at 30", at)
	}
	if at := s.SettleTime(-1, 1e-9); !math.IsNaN(at) {
		t.Errorf("settled to 1e-9 after %g s: the burst is too short for that", at)
	}
}

// TestSettleTime: on a line with a matched source the load voltage is there
// after one delay: the first period that begins then is a steady one.
func TestSettleTime(t *testing.T) {
	net := matchedLine(4 * wavelength)
	net.Branches[0].R = 150
	g := fixedGrid(net, 40)
	s := stressed(t, net, g)
	if at := s.SettleTime(1, 0.01); math.Abs(at*testFrequency-4) > 0.2 { // the edge of the start lasts six steps of 40
		t.Errorf("load settled after %.3f periods, want 4", at*testFrequency)
	}
	if at := s.SettleTime(0, 0.01); math.Abs(at*testFrequency-8) > 0.2 {
		t.Errorf("source settled after %.3f periods, want 8", at*testFrequency)
	}
	if at := s.SettleTime(-1, 0.01); at != s.SettleTime(0, 0.01) {
		t.Errorf("the network settled after %.3g s", at)
	}
}

func TestDescent(t *testing.T) {
	var d descent
	for i, e := range []float64{0.5, 1, 0.3, 0.6, 0.1, 0.2, 0.05} {
		d = d.push(i+1, e)
	}
	for _, tt := range []struct {
		level float64
		want  int
	}{{2, 0}, {0.9, 2}, {0.55, 4}, {0.25, 4}, {0.15, 6}, {0.04, 7}} {
		if got := d.last(tt.level); got != tt.want {
			t.Errorf("last above %g: %d, want %d", tt.level, got, tt.want)
		}
	}
}

// TestTracesAgreeWithPhasor: the tail of the stress run is the phasor's own
// waveform, which ties times, phases and half steps together.
func TestTracesAgreeWithPhasor(t *testing.T) {
	net := lossyCascade()
	net.Source.Start = network.Start{Rise: 3 / testFrequency, Phase: 0.7}
	g := fixedGrid(net, 60)
	st, s := bothRuns(t, net, g)
	check := func(what string, tr Trace, p complex128) {
		start := float64(s.Traces.TailEnd-len(tr.Tail)+1) - tr.Early
		for i, v := range tr.Tail {
			at := (start + float64(i)) * g.Step
			want := real(p * cmplx.Rect(1, net.Omega()*at+0.7))
			if d := math.Abs(v - want); d > 2*restDefault*cmplx.Abs(p) { // at rest, and the largest is elsewhere
				t.Fatalf("%s at sample %d: %.6g, want %.6g", what, i, v, want)
			}
		}
	}
	check("load voltage", s.Traces.Junctions[2], st.Junctions[2])
	check("load current", s.Traces.Branches[0], st.Branches[0])
	check("source current", s.Traces.Source, st.Source)
}

// TestRestBehindATransformer: a junction where no section ends has averages
// for samples; the follower must know, or the network never comes to rest.
func TestRestBehindATransformer(t *testing.T) {
	net := matchedLine(1.3 * wavelength)
	net.Branches[0].R = 120
	net.Junctions = append(net.Junctions, "inside", "primary")
	net.Branches = append(net.Branches,
		network.Branch{A: 1, B: 2, Series: network.Series{R: 20, L: 50e-9}},
		network.Branch{A: 2, B: network.Ground, Series: network.Series{R: 80}},
		network.Branch{A: 3, B: 0, Ratio: 2},
	)
	net.Source.At = 3
	net.Source.Start = network.Start{Rise: 3 / testFrequency, Worst: true}
	s := stressed(t, net, fixedGrid(net, 40))
	if !s.Complete || s.Duration*testFrequency > 40 {
		t.Errorf("complete %v after %.1f periods", s.Complete, s.Duration*testFrequency)
	}
	for j := range net.Junctions {
		if at := s.SettleTime(j, 0.01); !(at*testFrequency < 20) {
			t.Errorf("junction %s settled after %.2f periods", net.Junctions[j], at*testFrequency)
		}
	}
}

// TestNoOvershootOfAJump: on a matched line without loss nothing can exceed
// half the EMF, whatever the Courant numbers and the cells; the ripple of a jump
// that no grid carries would read a fifth more.
func TestNoOvershootOfAJump(t *testing.T) {
	net := matchedLine(4.3 * wavelength)
	net.Junctions = append(net.Junctions, "c")
	net.Sections = append(net.Sections, network.Section{From: 1, To: 2, Length: 1.31 * wavelength, Line: air(50)})
	net.Branches[0].A = 2
	for _, cells := range []float64{20, 40, 100} {
		g, err := NewGrid(net, cells)
		if err != nil {
			t.Fatal(err)
		}
		s := stressed(t, net, g)
		if v := s.Voltage.Value; v < 995 || v > 1005 {
			t.Errorf("%g cells, Courant %v: peak %.1f V, want 1000", cells, g.Courant, v)
		}
		if s.Edge <= 0 {
			t.Error("the edge is not told")
		}
	}
}

// TestPeakCurrentAtTheEnds: the running peak of a section's current takes in
// its ends, half a cell beyond the outer cells; in steady state it is the
// closed form's.
func TestPeakCurrentAtTheEnds(t *testing.T) {
	for _, net := range []*network.Network{lossyCascade(), dispersiveCascade()} {
		net.Source.Start = network.Start{Rise: 200 / testFrequency, Worst: true}
		g := fixedGrid(net, 48)
		st, s := bothRuns(t, net, g)
		for k, q := range s.Sections {
			for end, pair := range [][2]float64{{q.FromCurrent, cmplx.Abs(st.Sections[k].IFrom)}, {q.ToCurrent, cmplx.Abs(st.Sections[k].ITo)}} {
				// A rise of 200 periods overshoots by a few parts in a thousand.
				if d := pair[0]/pair[1] - 1; math.Abs(d) > 0.01 {
					t.Errorf("section %d end %d: peak %.5g A, steady %.5g A", k, end, pair[0], pair[1])
				}
			}
		}
	}
}

// TestStill: a run goes on at rest for as long as it is asked to, and its last
// periods are kept: the tail is their end.
func TestStill(t *testing.T) {
	net := lossyCascade()
	net.Source.Start = network.Start{Rise: 3 / testFrequency, Phase: 0.7}
	g := fixedGrid(net, 60)
	st := settled(t, net, g, 1e-8)
	run := func(still int) *Stress {
		s, err := StressRun(context.Background(), net, st, Settings{Still: still})
		if err != nil {
			t.Fatal(err)
		}
		return s
	}
	short, long := run(0), run(LatePeriods)
	if d := (long.Duration - short.Duration) * testFrequency; d < 5 || d > LatePeriods {
		t.Errorf("%.1f periods more", d)
	}
	for _, tr := range append(long.Traces.Junctions, long.Traces.Source) {
		if n := len(tr.Late); n != LatePeriods*60 {
			t.Fatalf("%d samples kept", n)
		}
		if !slices.Equal(tr.Late[len(tr.Late)-len(tr.Tail):], tr.Tail) || !slices.Equal(tr.A[len(tr.A)-len(tr.Late):], tr.Late) {
			t.Error("the last periods are not the end of the whole")
		}
	}
	if rows := ringRows(60, traceSamples); rows != TailPeriods*60 {
		t.Errorf("%d rows of a run without room", rows)
	}
}
