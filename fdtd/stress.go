package fdtd

import (
	"context"
	"math"

	"linewitness/sim/network"
)

// Stress is what a stress run found.
type Stress struct {
	Grid      Grid
	Worst     bool    // the peaks are the largest over all start phases
	Duration  float64 // s
	Complete  bool    // it ran until the network was at rest in its steady state (or dead, after a stop)
	Sections  []Peaks
	Junctions []Peak // largest |v| of each junction
	Voltage   Peak   // largest |v| anywhere on a section
	Current   Peak   // largest |i|
	Parts     []Peak // largest |i| into each of the network's parts at its A, 0 for an open one
	Source    Peak   // largest |i| out of the source
	// SettleTime is the time from switch-on after which the voltage phasor of
	// a junction, or of every junction for -1, taken over the period that
	// follows, stays within a fraction of its final value; NaN if that was not
	// reached.
	SettleTime func(junction int, fraction float64) float64
	// PartTime is likewise that of the current into a part.
	PartTime func(part int, fraction float64) float64
	// RingDown is the time from the stop of the source after which the voltage
	// phasor of a junction, taken over the period that follows, stays below a
	// fraction of what it was at the stop; NaN if that was not reached, or there
	// is no stop.
	RingDown func(junction int, fraction float64) float64
	// Departures are the departures of the voltage phasors of the junctions from
	// their final values against time.
	Departures []Departure
	// Edge is the rise that a jump of the source was given, s; 0 if it has none.
	Edge    float64
	Traces  Traces
	Map     Map // empty without Settings.Map
	Updates float64
}

// Peaks are the running peaks of one section: the largest |v| and |i| that
// each place saw.
type Peaks struct {
	ZV, V   []float64 // m and V, evenly thinned; the largest of what was thinned out is kept
	ZI, I   []float64
	Voltage Peak
	Current Peak
	// The largest |i| at the two ends, in Current and I too.
	FromCurrent, ToCurrent float64
}

// A Departure is how far the phasor of a junction, taken over the period that
// begins at Time, is from its final value, relative to that; the larger of the
// lanes'.
type Departure struct {
	Time, Error []float64 // s
}

// A Peak is a largest absolute value and when and where it was.
type Peak struct {
	Value   float64
	Section int     // -1 at a junction
	At      float64 // m
	Time    float64 // s
	Phase   float64 // rad, the start phase that gives it as a positive peak
}

// StressRun runs a network from its own start, and through its own stop, and
// keeps the largest |v| and |i| of every place.
//
// A jump of the EMF is given an edge of some steps, see Stress.Edge, unless
// Settings.Sharp is set.
//
// If every start phase is possible (network.Start.Worst) the run carries two
// lanes with the EMF r cos(wt) and r sin(wt). A start at phase p gives
// v = vc cos p - vs sin p, so the largest |v| over all p is hypot(vc, vs) at
// each place and time: no phase is left out and none is scanned.
//
// The run ends when the waveform at every junction has kept to that of the
// steady state, final, for a longest round trip (or Settings.Still), within Settings.Rest of the
// largest - or, after a stop, when it has kept to zero - and at
// MaxPeriods at the latest.
func StressRun(ctx context.Context, net *network.Network, final *Steady, set Settings) (*Stress, error) {
	m, err := newModel(net, final.Grid)
	if err != nil {
		return nil, err
	}
	s := &stresser{m: m, final: final, worst: net.Source.Start.Worst}
	phases := []float64{net.Source.Start.Phase}
	if s.worst {
		phases = []float64{0, -math.Pi / 2} // cos and sin
	}
	source := net.Source
	if !set.Sharp {
		source, s.edge = resolved(net.Source, final.Grid)
	}
	var drives []*drive
	for _, p := range phases {
		drives = append(drives, newDrive(source, final.Grid, p))
	}
	s.run = m.newRun(ctx, set.withDefaults(), drives...)
	s.prepare(phases)
	if err := s.stress(); err != nil {
		return nil, err
	}
	return s.result(), nil
}

type stresser struct {
	m      *model
	run    *run
	final  *Steady
	worst  bool
	peaks  []sectionPeaks
	nodes  []held    // junctions
	ends   [][2]held // of each section, currents
	parts  []held    // network parts, and the source last
	follow *follower
	traces *tracer
	chart  *charter // nil without Settings.Map
	edge   float64
	done   bool
}

func (s *stresser) prepare(phases []float64) {
	for k := range s.m.net.Sections {
		s.peaks = append(s.peaks, newSectionPeaks(s.m.grid.Cells[k]))
	}
	s.nodes = make([]held, len(s.m.net.Junctions))
	s.ends = make([][2]held, len(s.m.net.Sections))
	s.parts = make([]held, len(s.m.net.Parts)+1)
	s.follow = newFollower(s.m, s.final, phases)
	s.traces = newTracer(s.m, len(phases))
	s.chart = newCharter(s.m, s.run.set, len(phases))
}

// stress runs period by period until the network is at rest.
func (s *stresser) stress() error {
	trip := max(1, periods(2*LongestPath(s.m.net), s.m.net.Period()))
	stop := -1
	if st := s.m.net.Source.Stop; st != nil {
		stop = periods(st.At+st.Fall, s.m.net.Period())
	}
	start := periods(s.m.net.Source.Start.Rise, s.m.net.Period())
	still := trip + 1
	if stop < 0 {
		still = max(still, s.run.set.Still)
	}
	quiet := 0
	for p := 1; p <= s.run.set.MaxPeriods; p++ {
		s.follow.reserve()
		s.traces.reserve()
		if err := s.run.period(func(int) { s.look() }); err != nil {
			return err
		}
		rest, phasor := s.follow.rest(stop >= 0 && p > stop)
		quiet++
		if rest > s.run.set.Rest || stop < 0 && s.run.set.Phasor > 0 && phasor > s.run.set.Phasor {
			quiet = 0
		}
		if quiet >= still && p >= max(start, stop)+trip+1 {
			s.done = true
			break
		}
	}
	return nil
}

// look takes in the state after one step.
func (s *stresser) look() {
	a := s.run.lanes[0]
	b := a
	if s.worst {
		b = s.run.lanes[1]
	}
	n := s.run.n
	for k := range s.peaks {
		p := &s.peaks[k]
		if s.worst {
			p.v.pair(a.v[k], b.v[k], n)
			p.w.pair(a.w[k], b.w[k], n)
		} else {
			p.v.single(a.v[k], n)
			p.w.single(a.w[k], n)
		}
	}
	s.lumped(a, b, n)
	s.follow.look(s.run.lanes)
	s.traces.look(s.run.lanes, n)
	s.chart.look(s.run.lanes, n)
}

// addEnds takes the peaks of the currents at the ends of section k into its
// peaks.
func (q *Peaks) addEnds(ends [2]held, k int, dx float64, g Grid) {
	gain := averageGain(g.StepsPerPeriod)
	from := ends[0].peak(k, dx, 0, g.Step, 0.5, gain)
	to := ends[1].peak(k, dx, 0, g.Step, 0.5, gain)
	q.FromCurrent, q.ToCurrent = from.Value, to.Value
	for _, p := range []Peak{from, to} {
		if p.Value > q.Current.Value {
			q.Current = p
		}
	}
	q.ZI = append(append([]float64{from.At}, q.ZI...), float64(g.Cells[k])*dx)
	q.I = append(append([]float64{from.Value}, q.I...), to.Value)
}

// lumped takes in the junction voltages and the branch currents.
func (s *stresser) lumped(a, b *lane, n int) {
	second := 0.0
	if s.worst {
		second = 1
	}
	for j := range s.nodes {
		s.nodes[j].see(a.j[j], second*b.j[j], j, n)
	}
	for k := range s.ends {
		for e := range s.ends[k] {
			s.ends[k][e].see(a.end[k][e], second*b.end[k][e], e*s.m.grid.Cells[k], n)
		}
	}
	for p := range s.m.net.Parts {
		s.parts[p].see(s.m.partCurrent(a, p), second*s.m.partCurrent(b, p), p, n)
	}
	src := s.m.source
	s.parts[len(s.parts)-1].see(a.avg[src], second*b.avg[src], 0, n)
}

// partCurrent is the average current over the last step into part p at its A.
func (m *model) partCurrent(l *lane, p int) float64 {
	sum := 0.0
	for _, b := range m.net.Parts[p].Branches {
		if at := m.branch[b]; at >= 0 {
			sum += l.avg[at] * m.junction.branches[at].turns
		}
	}
	return sum
}

func (s *stresser) result() *Stress {
	net, g := s.m.net, s.m.grid
	out := &Stress{
		Grid: g, Worst: s.worst, Complete: s.done,
		Duration:   float64(s.run.n) * g.Step,
		Traces:     s.traces.traces(),
		Map:        s.chart.chart(),
		Updates:    s.run.updates,
		SettleTime: s.follow.settleTime,
		PartTime:   s.follow.partTime,
		RingDown:   s.follow.ringDown,
		Departures: s.follow.departures(),
		Edge:       s.edge,
	}
	for k, p := range s.peaks {
		dx := net.Sections[k].Length / float64(g.Cells[k])
		q := Peaks{
			Voltage: p.v.best.peak(k, dx, 0, g.Step, 0, 1),
			Current: p.w.best.peak(k, dx, 0.5, g.Step, 0.5, 1/s.m.z[k]),
		}
		q.ZV, q.V = p.v.envelope(dx, 0, 1)
		q.ZI, q.I = p.w.envelope(dx, 0.5, 1/s.m.z[k])
		q.addEnds(s.ends[k], k, dx, g)
		out.Sections = append(out.Sections, q)
		if q.Voltage.Value > out.Voltage.Value {
			out.Voltage = q.Voltage
		}
		if q.Current.Value > out.Current.Value {
			out.Current = q.Current
		}
	}
	gain := averageGain(g.StepsPerPeriod)
	for j := range s.nodes {
		early, unit := 0.0, 1.0
		if !s.m.junction.stores[j] {
			early, unit = 0.5, gain
		}
		out.Junctions = append(out.Junctions, s.nodes[j].peak(-1, 0, 0, g.Step, early, unit))
	}
	for p := range net.Parts {
		out.Parts = append(out.Parts, s.parts[p].peak(-1, 0, 0, g.Step, 0.5, gain))
	}
	out.Source = s.parts[len(s.parts)-1].peak(-1, 0, 0, g.Step, 0.5, gain)
	return out
}
