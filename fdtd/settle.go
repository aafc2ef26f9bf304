package fdtd

import (
	"context"
	"math"
	"math/cmplx"
	"slices"

	"linewitness/sim/network"
)

// Settling tells how a settling run went.
type Settling struct {
	Settled    bool
	Periods    int     // length of the run
	Time       float64 // s
	LongPath   float64 // s, see LongestPath
	Residual   float64 // estimated remaining error, relative to the section's largest amplitude
	LoopFactor float64 // last measured factor per longest round trip; 1 or more if the changes do not fall, 0 if nothing was left to measure
	Mean       float64 // largest mean, relative likewise, in the last window
	Harmonic   float64 // largest second or third harmonic, relative likewise
	Earliest   float64 // s, no window that begins before this counts
	Passes     int     // windows in a row, up to the last, that passed every test
	Curve      []Comparison
}

// A Comparison is that of two windows of one period.
type Comparison struct {
	Time     float64 // s, end of the later window
	Gap      float64 // s between the windows
	Change   float64 // largest change of a phasor, relative to the section's largest
	Estimate float64 // remaining error, Change rho/(1-rho); +Inf while it does not fall
	Mean     float64 // as of Settling, in the later window
	Harmonic float64
	Passed   bool // the later window passed every test
}

// Settle runs a network from rest to steady state, whatever start its source
// has: the EMF rises over RampPeriods periods and stays.
//
// Steady state is reached when, twice in a row,
//
//   - the window begins no earlier than the ramp and twice the longest path;
//   - the remaining error of every phasor is within the tolerance. With rho
//     the larger of the last two ratios of successive changes (or, where they
//     rise and fall, the ratio of their envelope), it is change rho/(1-rho),
//     the tail of a geometric series. The windows compared
//     are at least a longest round trip apart, since before an echo is back
//     nothing changes;
//   - the mean and the second and third harmonics are within the tolerance:
//     an offset hides from the fundamental.
//
// A run that has not got there after MaxPeriods returns Settled false and what
// it has. The error is that of ctx, or a network that cannot be stepped.
func Settle(ctx context.Context, net *network.Network, g Grid, set Settings) (*Steady, error) {
	m, err := newModel(net, g)
	if err != nil {
		return nil, err
	}
	set = set.withDefaults()
	quiet := net.Source
	quiet.Start = network.Start{Rise: RampPeriods * net.Period()}
	quiet.Stop = nil
	s := &settler{
		run:   m.newRun(ctx, set, newDrive(quiet, g, 0)),
		rec:   newRecorder(ctx, m, set.MaxPoints),
		watch: newWatch(net, set.Tolerance),
	}
	if err := s.settle(); err != nil {
		return nil, err
	}
	out := s.steady()
	out.Spectrum, err = s.spectrum()
	return out, err
}

type settler struct {
	run   *run
	rec   *recorder
	watch *watch
	last  *window
}

// settle runs from window to window until the watch is content.
func (s *settler) settle() error {
	if n := s.run.set.Exactly; n > 0 {
		return s.exactly(n)
	}
	for p := 0; ; {
		next := min(p+s.watch.gap, s.run.set.MaxPeriods)
		for ; p < next-1; p++ {
			if err := s.run.period(nil); err != nil {
				return err
			}
		}
		l := s.run.lanes[0]
		if err := s.run.period(func(n int) { s.rec.sample(l, n) }); err != nil {
			return err
		}
		p++
		prev := s.last
		s.last = s.rec.window()
		if err := s.run.ctx.Err(); err != nil {
			return err
		}
		if s.watch.see(p, prev, s.last) || p >= s.run.set.MaxPeriods {
			return nil
		}
	}
}

// exactly runs n periods and looks at the last.
func (s *settler) exactly(n int) error {
	for range n - 1 {
		if err := s.run.period(nil); err != nil {
			return err
		}
	}
	l := s.run.lanes[0]
	if err := s.run.period(func(n int) { s.rec.sample(l, n) }); err != nil {
		return err
	}
	s.last = s.rec.window()
	s.watch.Periods, s.watch.Time = n, float64(n)*s.watch.period
	s.watch.Mean, s.watch.Harmonic = s.last.mean, s.last.harmonic
	return s.run.ctx.Err()
}

// A watch judges the windows of a settling run.
type watch struct {
	Settling
	period    float64
	tolerance float64
	earliest  int // periods before which no window may begin
	trip      int // longest round trip in periods
	gap       int // periods between windows
	seen      int // windows since the gap was last changed
	at        int
	changes   []float64 // with the present gap
}

// windowsPerGap is how many windows are compared before the gap is doubled: a
// slow decay changes too little from one round trip to the next, and looking
// costs time.
const windowsPerGap = 24

// passesNeeded is how many windows in a row must pass.
const passesNeeded = 2

// rounding is the change below which only rounding is left.
const rounding = 1e-11

func newWatch(net *network.Network, tolerance float64) *watch {
	path := LongestPath(net)
	w := &watch{period: net.Period(), tolerance: tolerance}
	w.LongPath = path
	w.earliest = RampPeriods + periods(2*path, w.period)
	w.Earliest = float64(w.earliest) * w.period
	w.trip = max(1, periods(2*path, w.period))
	w.gap = w.trip
	return w
}

// see takes in the window that ends with period p and reports whether steady
// state is shown.
func (w *watch) see(p int, prev, now *window) bool {
	w.Periods, w.Time = p, float64(p)*w.period
	w.Mean, w.Harmonic = now.mean, now.harmonic
	if prev == nil {
		w.at = p
		return false
	}
	c := Comparison{
		Time: w.Time, Gap: float64(p-w.at) * w.period,
		Change: change(prev, now), Estimate: math.Inf(1),
		Mean: now.mean, Harmonic: now.harmonic,
	}
	// While the ramp rises the changes are those of the ramp, and how they
	// fall says nothing of how the network decays.
	if w.at > RampPeriods {
		w.changes = append(w.changes, c.Change)
		c.Estimate = w.estimate()
	}
	w.at = p
	w.Residual = c.Estimate
	c.Passed = p-1 >= w.earliest && c.Estimate <= w.tolerance && now.mean <= w.tolerance && now.harmonic <= w.tolerance
	w.Curve = append(w.Curve, c)
	if c.Passed {
		w.Passes++
	} else {
		w.Passes = 0
	}
	w.Settled = w.Passes >= passesNeeded
	if w.seen++; w.seen == windowsPerGap {
		w.gap, w.seen, w.changes = 2*w.gap, 0, nil
	}
	return w.Settled
}

// estimate is the remaining error from the last changes, and sets the loop
// factor.
func (w *watch) estimate() float64 {
	n := len(w.changes)
	last := w.changes[n-1]
	if last <= rounding {
		return last
	}
	if n < 3 {
		return math.Inf(1)
	}
	rho := math.Max(last/w.changes[n-2], w.changes[n-2]/w.changes[n-3])
	if rho >= 1 {
		last, rho = w.envelope()
	}
	w.LoopFactor = math.Pow(rho, 2*w.LongPath/(float64(w.gap)*w.period))
	if rho >= 1 {
		return math.Inf(1)
	}
	return last * rho / (1 - rho)
}

// envelopeWindows is how many changes each half of an envelope takes in.
const envelopeWindows = 4

// envelope is the largest of the last changes, and the factor per window by
// which such largest changes fall: two modes that beat make the changes rise
// and fall while the envelope decays.
func (w *watch) envelope() (top, rho float64) {
	n := len(w.changes)
	if n < 2*envelopeWindows {
		return w.changes[n-1], 1
	}
	top = slices.Max(w.changes[n-envelopeWindows:])
	before := slices.Max(w.changes[n-2*envelopeWindows : n-envelopeWindows])
	return top, math.Pow(top/before, 1.0/envelopeWindows)
}

// change is the largest change of a phasor between two windows, relative to
// the largest amplitude of its kind on the section.
func change(a, b *window) float64 {
	top := 0.0
	for k := range b.v {
		top = math.Max(top, math.Max(largest(b.v[k]), largest(b.w[k])))
	}
	worst := 0.0
	compare := func(x, y []complex128, s float64) {
		for i := range y {
			if s > 0 {
				worst = math.Max(worst, cmplx.Abs(y[i]-x[i])/s)
			}
		}
	}
	for k := range b.v {
		compare(a.v[k], b.v[k], scale(largest(b.v[k]), top))
		compare(a.w[k], b.w[k], scale(largest(b.w[k]), top))
	}
	compare(a.junctions, b.junctions, largest(b.junctions))
	compare(a.branches, b.branches, largest(b.branches))
	return worst
}
