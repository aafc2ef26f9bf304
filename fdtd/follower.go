package fdtd

import (
	"math"
	"math/cmplx"
	"slices"
)

// A follower watches the junction voltages, and the currents into the parts,
// of a stress run come to their final phasors; after a stop it watches the
// voltages fall.
type follower struct {
	m      *model
	n      int // steps per period
	dt     float64
	step   int
	stop   int            // last step before the source stops, or 0: what comes later does not settle
	turn   []complex128   // e^{-j 2 pi m/N}
	early  []float64      // of each slot: 0.5 where it is an average over the step
	final  [][]complex128 // [lane][slot]
	sample [][]complex128 // likewise, of what is sampled: an average over the step where nothing is stored
	scale  []float64      // of each slot: its final amplitude, or a part of the largest of its kind where it is dead
	ring   [][]float64    // [lane x slots][N] last period
	sum    []complex128   // sliding DFT
	miss   []float64      // squared departure from the final waveform, this period
	dead   []float64      // squared waveform, this period
	top    float64        // largest final amplitude of the junctions
	errors []descent      // of each slot: its largest relative phasor error over the lanes
	worst  float64        // largest such error of the junctions that matter, this period
	paths  []path         // of each junction: that error against time, for a figure
	held   []float64      // [lane x slots] amplitude at the stop
	falls  []descent      // of each junction: what is left of that
}

// deadPart is the part of the largest amplitude of its kind below which a slot
// is measured against that part.
const deadPart = 1e-3

// newFollower follows the junctions, in their order, and then the parts.
func newFollower(m *model, final *Steady, phases []float64) *follower {
	n := m.grid.StepsPerPeriod
	f := &follower{m: m, n: n, dt: m.grid.Step, stop: lastStep(m)}
	for k := range n {
		f.turn = append(f.turn, cmplx.Rect(1, -2*math.Pi*float64(k)/float64(n)))
	}
	ends := f.ends(final)
	for _, p := range phases {
		var row, sample []complex128
		for j, v := range ends {
			v *= cmplx.Rect(1, p)
			row = append(row, v)
			if f.early[j] != 0 {
				x := math.Pi / float64(n)
				v *= cmplx.Rect(math.Cos(x), -x)
			}
			sample = append(sample, v)
		}
		f.final, f.sample = append(f.final, row), append(f.sample, sample)
	}
	junctions := len(final.Junctions)
	f.errors, f.paths, f.falls = make([]descent, len(ends)), make([]path, junctions), make([]descent, junctions)
	for j := range f.paths {
		f.paths[j] = newPath(n)
	}
	all := len(phases) * len(ends)
	f.sum, f.miss, f.dead = make([]complex128, all), make([]float64, all), make([]float64, all)
	f.held = make([]float64, all)
	for range all {
		f.ring = append(f.ring, make([]float64, n))
	}
	return f
}

// ends are the final phasors of the slots; it fills what is known of each.
func (f *follower) ends(final *Steady) []complex128 {
	ends := append([]complex128(nil), final.Junctions...)
	for j := range final.Junctions {
		e := 0.0
		if !f.m.junction.stores[j] {
			e = 0.5
		}
		f.early = append(f.early, e)
	}
	for p := range f.m.net.Parts {
		ends, f.early = append(ends, f.m.partPhasor(final, p)), append(f.early, 0.5)
	}
	f.top = largest(final.Junctions)
	current := largest(ends[len(final.Junctions):])
	for j, v := range ends {
		kind := f.top
		if j >= len(final.Junctions) {
			kind = current
		}
		f.scale = append(f.scale, math.Max(cmplx.Abs(v), deadPart*kind))
	}
	return ends
}

// partPhasor is the final current into part p at its A.
func (m *model) partPhasor(final *Steady, p int) complex128 {
	sum := complex128(0)
	for _, b := range m.net.Parts[p].Branches {
		sum += final.Branches[b] * complex(m.net.Branches[b].Turns(), 0)
	}
	return sum
}

// reserve makes room for one more period, so that look does not allocate.
func (f *follower) reserve() {
	for j := range f.errors {
		f.errors[j] = slices.Grow(f.errors[j], f.n)
	}
	for j := range f.falls {
		f.falls[j] = slices.Grow(f.falls[j], f.n)
	}
}

// value is what slot j of a lane is.
func (f *follower) value(l *lane, j int) float64 {
	if j < len(l.j) {
		return l.j[j]
	}
	return f.m.partCurrent(l, j-len(l.j))
}

// look takes in the state after a step.
func (f *follower) look(lanes []*lane) {
	f.step++
	at := f.step % f.n
	for j := range f.errors {
		worst := 0.0
		for i, l := range lanes {
			worst = math.Max(worst, f.take(f.value(l, j), i, j, at))
		}
		switch {
		case f.step < f.n: // no whole period yet
		case f.stop == 0 || f.step <= f.stop:
			f.note(j, worst)
		case j < len(f.falls):
			f.falls[j] = f.falls[j].push(f.step-f.n+1, f.left(len(lanes), j))
		}
	}
	if f.step == f.stop {
		for k := range f.sum {
			f.held[k] = cmplx.Abs(f.sum[k])
		}
	}
}

// note keeps the error of slot j.
func (f *follower) note(j int, e float64) {
	begin := f.step - f.n + 1
	f.errors[j] = f.errors[j].push(begin, e)
	if j >= len(f.paths) {
		return
	}
	f.paths[j].see(begin, e)
	if f.scale[j] >= mattering*f.top {
		f.worst = math.Max(f.worst, e)
	}
}

// mattering is the part of the largest amplitude from which on a junction is
// waited for.
const mattering = 0.1

// left is the part of its amplitude at the stop that junction j has, the
// larger of the lanes'.
func (f *follower) left(lanes, j int) float64 {
	worst := 0.0
	for i := range lanes {
		if k := i*len(f.errors) + j; f.held[k] > 0 {
			worst = math.Max(worst, cmplx.Abs(f.sum[k])/f.held[k])
		}
	}
	return worst
}

// take moves the sliding period of slot j in lane i on to v and returns
// its error.
func (f *follower) take(v float64, i, j, at int) float64 {
	k := i*len(f.errors) + j
	old := f.ring[k][at]
	f.ring[k][at] = v
	f.sum[k] += complex(v-old, 0) * f.turn[at]
	// e^{jwt} is the conjugate of turn.
	end := f.sample[i][j]
	d := v - real(end)*real(f.turn[at]) - imag(end)*imag(f.turn[at])
	f.miss[k] += d * d
	f.dead[k] += v * v
	return f.error(k, j, f.final[i][j])
}

// error is the departure of the sliding phasor of slot k from its end value,
// relative to it (or to a part of the largest where it is dead).
func (f *follower) error(k, j int, end complex128) float64 {
	p := f.sum[k] * complex(2/float64(f.n), 0)
	if f.early[j] != 0 {
		x := math.Pi / float64(f.n)
		p *= cmplx.Rect(1/math.Cos(x), x)
	}
	if f.scale[j] == 0 {
		return 0
	}
	return cmplx.Abs(p-end) / f.scale[j]
}

// rest is how far the period just ended was from the steady waveform at the
// junctions, or from zero if dead is set, as an amplitude relative to the
// largest, and the largest phasor error of those that matter; it starts the next
// period.
func (f *follower) rest(dead bool) (waveform, phasor float64) {
	worst := 0.0
	for k := range f.miss {
		d := f.miss[k]
		if dead {
			d = f.dead[k]
		}
		if k%len(f.errors) < len(f.paths) {
			worst = math.Max(worst, d)
		}
		f.miss[k], f.dead[k] = 0, 0
	}
	phasor = f.worst
	f.worst = 0
	if f.top == 0 {
		return 0, phasor
	}
	return math.Sqrt(2*worst/float64(f.n)) / f.top, phasor
}

// settleTime is the start of the first period from which on the phasor of
// junction j, or of every junction if j is -1, stays within a fraction of its
// final value, s; NaN if there is none.
func (f *follower) settleTime(j int, fraction float64) float64 {
	last := 0
	for i := range f.paths {
		if j == -1 || j == i {
			last = max(last, f.errors[i].last(fraction))
		}
	}
	return f.shown(last)
}

// partTime is likewise that of the current into part p.
func (f *follower) partTime(p int, fraction float64) float64 {
	return f.shown(f.errors[len(f.paths)+p].last(fraction))
}

// shown turns the last step outside into a time, NaN if the run, or the
// source, ended before it had kept inside for a period.
func (f *follower) shown(last int) float64 {
	end := f.step
	if f.stop > 0 {
		end = min(end, f.stop)
	}
	if end < f.n || last >= end-f.n+1 {
		return math.NaN()
	}
	return float64(last) * f.dt
}

// ringDown is the time from the stop after which junction j stays below a
// fraction of its amplitude at the stop, s; NaN if the source does not stop, the
// junction was dead, or the run ended before.
func (f *follower) ringDown(j int, fraction float64) float64 {
	last := f.falls[j].last(fraction)
	if f.stop < f.n || f.step < f.stop+f.n || f.scale[j] <= deadPart*f.top || last >= f.step-f.n+1 {
		return math.NaN()
	}
	return math.Max(0, float64(last-f.stop)) * f.dt
}
