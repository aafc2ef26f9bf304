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
	turn   []complex128   // e^{-j 2 pi m/N}
	final  [][]complex128 // [lane][junction]
	early  []float64      // 0.5 where a junction voltage is an average over the step
	ring   [][]float64    // [lane x junctions][N] last period
	sum    []complex128   // sliding DFT
	miss   []float64      // squared departure from the final waveform, this period
	dead   []float64      // squared waveform, this period
	top    float64        // largest final amplitude
	errors []float64      // after each step from N on: largest relative phasor error over junctions and lanes
}

func newFollower(m *model, final *Steady, phases []float64) *follower {
	n := m.grid.StepsPerPeriod
	f := &follower{n: n, dt: m.grid.Step}
	for k := range n {
		f.turn = append(f.turn, cmplx.Rect(1, -2*math.Pi*float64(k)/float64(n)))
	}
	for _, p := range phases {
		var row []complex128
		for _, v := range final.Junctions {
			row = append(row, v*cmplx.Rect(1, p))
			f.top = math.Max(f.top, cmplx.Abs(v))
		}
		f.final = append(f.final, row)
	}
	for j := range final.Junctions {
		e := 0.0
		if !m.junction.stores[j] {
			e = 0.5
		}
		f.early = append(f.early, e)
	}
	all := len(phases) * len(final.Junctions)
	f.sum, f.miss, f.dead = make([]complex128, all), make([]float64, all), make([]float64, all)
	for range all {
		f.ring = append(f.ring, make([]float64, n))
	}
	return f
}

// reserve makes room for one more period, so that look does not allocate.
func (f *follower) reserve() { f.errors = slices.Grow(f.errors, f.n) }

// look takes in the junction voltages after a step.
func (f *follower) look(lanes []*lane) {
	f.step++
	at := f.step % f.n
	worst := 0.0
	for i, l := range lanes {
		for j, v := range l.j {
			k := i*len(l.j) + j
			old := f.ring[k][at]
			f.ring[k][at] = v
			f.sum[k] += complex(v-old, 0) * f.turn[at]
			end := f.final[i][j]
			// e^{jwt} is the conjugate of turn.
			d := v - real(end)*real(f.turn[at]) - imag(end)*imag(f.turn[at])
			f.miss[k] += d * d
			f.dead[k] += v * v
			worst = math.Max(worst, f.error(k, j, end))
		}
	}
	if f.step >= f.n {
		f.errors = append(f.errors, worst)
	}
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

// settleTime is the start of the first period from which on every junction
// phasor stays within a fraction of its final value, s; NaN if there is none.
func (f *follower) settleTime(fraction float64) float64 {
	last := len(f.errors)
	for last > 0 && f.errors[last-1] <= fraction {
		last--
	}
	if last == len(f.errors) {
		return math.NaN()
	}
	return float64(last) * f.dt
}
