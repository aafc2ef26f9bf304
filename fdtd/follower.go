package fdtd

import (
	"math"
	"math/cmplx"
	"slices"
)

// A follower watches the junction voltages of a stress run come to their
// final phasors.
type follower struct {
	n      int // steps per period
	dt     float64
	step   int
	stop   int            // last step before the source stops, or 0: what comes later does not settle
	turn   []complex128   // e^{-j 2 pi m/N}
	final  [][]complex128 // [lane][junction]
	sample [][]complex128 // likewise, of what is sampled: an average over the step where nothing is stored
	early  []float64      // 0.5 where a junction voltage is an average over the step
	ring   [][]float64    // [lane x junctions][N] last period
	sum    []complex128   // sliding DFT
	miss   []float64      // squared departure from the final waveform, this period
	dead   []float64      // squared waveform, this period
	top    float64        // largest final amplitude
	errors []descent      // of each junction: its largest relative phasor error over the lanes
}

func newFollower(m *model, final *Steady, phases []float64) *follower {
	n := m.grid.StepsPerPeriod
	f := &follower{n: n, dt: m.grid.Step, stop: lastStep(m)}
	for k := range n {
		f.turn = append(f.turn, cmplx.Rect(1, -2*math.Pi*float64(k)/float64(n)))
	}
	x := math.Pi / float64(n)
	for _, p := range phases {
		var row, sample []complex128
		for j, v := range final.Junctions {
			v *= cmplx.Rect(1, p)
			row = append(row, v)
			if !m.junction.stores[j] {
				v *= cmplx.Rect(math.Cos(x), -x)
			}
			sample = append(sample, v)
			f.top = math.Max(f.top, cmplx.Abs(v))
		}
		f.final, f.sample = append(f.final, row), append(f.sample, sample)
	}
	for j := range final.Junctions {
		e := 0.0
		if !m.junction.stores[j] {
			e = 0.5
		}
		f.early = append(f.early, e)
	}
	f.errors = make([]descent, len(final.Junctions))
	all := len(phases) * len(final.Junctions)
	f.sum, f.miss, f.dead = make([]complex128, all), make([]float64, all), make([]float64, all)
	for range all {
		f.ring = append(f.ring, make([]float64, n))
	}
	return f
}

// reserve makes room for one more period, so that look does not allocate.
func (f *follower) reserve() {
	for j := range f.errors {
		f.errors[j] = slices.Grow(f.errors[j], f.n)
	}
}

// look takes in the junction voltages after a step.
func (f *follower) look(lanes []*lane) {
	f.step++
	at := f.step % f.n
	for j := range f.errors {
		worst := 0.0
		for i, l := range lanes {
			worst = math.Max(worst, f.take(l.j[j], i, j, at))
		}
		if f.step >= f.n && (f.stop == 0 || f.step <= f.stop) {
			f.errors[j] = f.errors[j].push(f.step-f.n+1, worst)
		}
	}
}

// take moves the sliding period of junction j in lane i on to v and returns
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
	s := math.Max(cmplx.Abs(end), 1e-3*f.top)
	if s == 0 {
		return 0
	}
	return cmplx.Abs(p-end) / s
}

// rest is how far the period just ended was from the steady waveform, or from
// zero if dead is set, as an amplitude relative to the largest; it starts the
// next period.
func (f *follower) rest(dead bool) float64 {
	worst := 0.0
	for k := range f.miss {
		d := f.miss[k]
		if dead {
			d = f.dead[k]
		}
		worst = math.Max(worst, d)
		f.miss[k], f.dead[k] = 0, 0
	}
	if f.top == 0 {
		return 0
	}
	return math.Sqrt(2*worst/float64(f.n)) / f.top
}

// settleTime is the start of the first period from which on the phasor of
// junction j, or of every junction if j is -1, stays within a fraction of its
// final value, s; NaN if there is none.
func (f *follower) settleTime(j int, fraction float64) float64 {
	last := 0
	for i, e := range f.errors {
		if j == -1 || j == i {
			last = max(last, e.last(fraction))
		}
	}
	end := f.step
	if f.stop > 0 {
		end = min(end, f.stop)
	}
	if end < f.n || last >= end-f.n+1 {
		return math.NaN()
	}
	return float64(last) * f.dt
}

// A descent keeps, of a sequence of errors, the last step at which it was
// above any given level, to within descentStep of the level: a list of steps
// with ever smaller errors.
type descent []struct {
	step  int
	error float64
}

const descentStep = 1e-3

func (d descent) push(step int, e float64) descent {
	n := len(d)
	for n > 0 && d[n-1].error <= e*(1+descentStep) {
		n--
	}
	return append(d[:n], struct {
		step  int
		error float64
	}{step, e})
}

// last is the last step at which the error was above level, 0 if none.
func (d descent) last(level float64) int {
	for i := len(d) - 1; i >= 0; i-- {
		if d[i].error > level {
			return d[i].step
		}
	}
	return 0
}
