package fdtd

import (
	"math"
	"slices"
)

// Traces are the waveforms of a stress run at all junctions and branches.
type Traces struct {
	Step  float64 // s; sample i of a voltage is at (First + i) Step
	First int     // 1
	// Whole is from switch-on on, Full false if the run was longer than it.
	Junctions []Trace
	Branches  []Trace // at the middle of a step: sample i is at (First + i - 1/2) Step
	Source    Trace   // likewise, the current out of the source
	Full      bool
	TailEnd   int // step of the last sample of every tail: the end of the run, or the stop
}

// averageGain is what turns the average of a sinusoid over a step into its
// value in the middle of the step, 1/cos(pi/N). What is recorded as an average
// is multiplied by it: exact at the source frequency, and of second order in
// the step for all else.
func averageGain(steps int) float64 { return 1 / math.Cos(math.Pi/float64(steps)) }

// A Trace is one quantity in each lane: A the only or the cosine lane, B the
// sine lane or nil.
type Trace struct {
	A, B        []float64
	Tail, TailB []float64 // the last periods, at most TailPeriods of them
	Late, LateB []float64 // likewise, at most LatePeriods of them, or fewer where they would be too many samples
	Early       float64   // steps by which a sample lies before its step
}

// Plus adds two traces of one run, sample by sample.
func (t Trace) Plus(u Trace) Trace {
	add := func(a, b []float64) []float64 {
		if a == nil {
			return nil
		}
		out := make([]float64, len(a))
		for i := range a {
			out[i] = a[i] + b[i]
		}
		return out
	}
	return Trace{
		A: add(t.A, u.A), B: add(t.B, u.B), Early: t.Early,
		Tail: add(t.Tail, u.Tail), TailB: add(t.TailB, u.TailB),
		Late: add(t.Late, u.Late), LateB: add(t.LateB, u.LateB),
	}
}

// At gives the waveform for a start phase p: A cos p - B sin p.
func (t Trace) At(p float64) (whole, tail []float64) {
	return mix(t.A, t.B, p), mix(t.Tail, t.TailB, p)
}

// LateAt gives its last periods likewise.
func (t Trace) LateAt(p float64) []float64 { return mix(t.Late, t.LateB, p) }

func mix(a, b []float64, p float64) []float64 {
	if b == nil {
		return a
	}
	sin, cos := math.Sincos(p)
	out := make([]float64, len(a))
	for i := range a {
		out[i] = a[i]*cos - b[i]*sin
	}
	return out
}

// TailPeriods is how many last periods a trace keeps whatever its length.
const TailPeriods = 3

// LatePeriods is how many it keeps if all traces of a run have room for them.
const LatePeriods = 16

// ringRows is how many steps of the last periods are kept, for so many numbers a
// step.
func ringRows(steps, row int) int {
	return steps * max(TailPeriods, min(LatePeriods, traceSamples/(steps*row)))
}

// traceSamples bounds the samples of all traces of a run: 16 MiB.
const traceSamples = 2 << 20

// A tracer keeps junction voltages and companion currents, sample by sample
// up to a bound and the last periods in a ring.
type tracer struct {
	m     *model
	width int
	limit int
	whole []float64 // [step][lane][width]
	ring  []float64
	rows  int // of the ring
	step  int
	lanes int
	stop  int       // step at which the ring is frozen, or 0
	row   []float64 // scratch
}

func newTracer(m *model, lanes int) *tracer {
	t := &tracer{m: m, lanes: lanes, width: len(m.net.Junctions) + len(m.junction.branches)}
	t.rows = ringRows(m.grid.StepsPerPeriod, t.width*lanes)
	t.limit = max(t.rows, traceSamples/(t.width*lanes))
	t.ring = make([]float64, t.rows*t.width*lanes)
	t.row = make([]float64, t.width*lanes)
	t.stop = lastStep(m)
	return t
}

// lastStep is the last step before the source stops, at least 1, or 0 if it
// does not stop.
func lastStep(m *model) int {
	s := m.net.Source.Stop
	if s == nil {
		return 0
	}
	return max(1, int(math.Min(s.At/m.grid.Step, math.MaxInt32)))
}

// reserve makes room for one more period, so that look does not allocate.
func (t *tracer) reserve() {
	if t.step < t.limit {
		t.whole = slices.Grow(t.whole, t.m.grid.StepsPerPeriod*len(t.row))
	}
}

// look takes in the state after step n.
func (t *tracer) look(lanes []*lane, n int) {
	t.step = n
	for i, l := range lanes {
		at := t.row[i*t.width:]
		copy(at, l.j)
		copy(at[len(l.j):], l.avg)
	}
	if t.stop == 0 || n <= t.stop { // the tail is that before the stop
		copy(t.ring[(n-1)%t.rows*len(t.row):], t.row)
	}
	if n <= t.limit {
		t.whole = append(t.whole, t.row...)
	}
}

func (t *tracer) traces() Traces {
	out := Traces{Step: t.m.grid.Step, First: 1, Full: t.step <= t.limit, TailEnd: t.tailEnd()}
	nj := len(t.m.net.Junctions)
	for j := range nj {
		early, gain := 0.0, 1.0
		if !t.m.junction.stores[j] {
			early, gain = 0.5, averageGain(t.m.grid.StepsPerPeriod)
		}
		out.Junctions = append(out.Junctions, t.column(j, gain, early))
	}
	gain := averageGain(t.m.grid.StepsPerPeriod)
	for _, at := range t.m.branch {
		c := nj + at
		if at < 0 {
			c = -1
		}
		out.Branches = append(out.Branches, t.column(c, gain, 0.5))
	}
	out.Source = t.column(nj+t.m.source, -gain, 0.5)
	return out
}

// tailEnd is the step of the last sample in the ring.
func (t *tracer) tailEnd() int {
	if t.stop > 0 {
		return min(t.step, t.stop)
	}
	return t.step
}

// column takes one quantity out of the record, times gain; column -1 is always
// zero.
func (t *tracer) column(c int, gain, early float64) Trace {
	steps := min(t.step, t.limit)
	out := Trace{Early: early}
	pick := func(from []float64, row, lane int) float64 {
		if c < 0 {
			return 0
		}
		return gain * from[(row*t.lanes+lane)*t.width+c]
	}
	end := t.tailEnd()
	late := min(t.rows, end)
	tail := min(late, TailPeriods*t.m.grid.StepsPerPeriod)
	for lane := range t.lanes {
		whole := make([]float64, steps)
		for i := range whole {
			whole[i] = pick(t.whole, i, lane)
		}
		last := make([]float64, late)
		for i := range last {
			last[i] = pick(t.ring, (end-late+i)%t.rows, lane)
		}
		if lane == 0 {
			out.A, out.Late, out.Tail = whole, last, last[late-tail:]
		} else {
			out.B, out.LateB, out.TailB = whole, last, last[late-tail:]
		}
	}
	return out
}
