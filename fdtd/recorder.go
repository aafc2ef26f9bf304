package fdtd

import (
	"context"
	"math"
	"math/cmplx"

	"gonum.org/v1/gonum/dsp/fourier"
	"gonum.org/v1/gonum/floats"
)

// A recorder keeps every recorded point of a lane over one period and turns
// it into phasors by FFT. It is made once for a run.
type recorder struct {
	ctx    context.Context
	m      *model
	vi, wi [][]int // recorded edges and centres of each section
	points int     // of all sections, voltages and currents
	width  int     // points + junctions + companions
	data   []float64
	square [][2]float64 // of each section, the sums of v^2 and w^2 over all its cells and the steps so far
	fft    *fourier.FFT
	seq    []float64
	coef   []complex128
}

// maxSamples bounds the memory of a recorder: points times steps per period.
const maxSamples = 8 << 20

// newRecorder records at most maxPoints voltages and currents a section,
// evenly thinned, and fewer if a period has very many steps.
func newRecorder(ctx context.Context, m *model, maxPoints int) *recorder {
	n := m.grid.StepsPerPeriod
	room := maxSamples / n / (2 * max(1, len(m.grid.Cells)))
	maxPoints = max(2, min(maxPoints, room))
	r := &recorder{ctx: ctx, m: m, fft: fourier.NewFFT(n), seq: make([]float64, n)}
	for _, cells := range m.grid.Cells {
		r.vi = append(r.vi, thin(cells+1, maxPoints))
		r.wi = append(r.wi, thin(cells, maxPoints))
		r.points += len(r.vi[len(r.vi)-1]) + len(r.wi[len(r.wi)-1])
	}
	r.width = r.points + len(m.net.Junctions) + len(m.junction.branches)
	r.data = make([]float64, r.width*n)
	r.square = make([][2]float64, len(m.grid.Cells))
	return r
}

// thin picks at most limit of n indices evenly, the first and the last among
// them.
func thin(n, limit int) []int {
	k := min(n, limit)
	out := make([]int, k)
	for i := range out {
		if k > 1 {
			out[i] = int(math.Round(float64(i) * float64(n-1) / float64(k-1)))
		}
	}
	return out
}

// sample stores the state of the lane after step n of the period, n from 1 to
// N.
func (r *recorder) sample(l *lane, n int) {
	row := r.data[(n-1)*r.width : n*r.width]
	r.addSquares(l, n)
	for k := range l.v {
		v, w := l.v[k], l.w[k]
		for i, at := range r.vi[k] {
			row[i] = v[at]
		}
		row = row[len(r.vi[k]):]
		for i, at := range r.wi[k] {
			row[i] = w[at]
		}
		row = row[len(r.wi[k]):]
	}
	copy(row, l.j)
	copy(row[len(l.j):], l.avg)
}

// addSquares adds the squares of the fields of every cell, recorded or not, and
// starts anew at the first step of a period. An end edge has half a cell.
func (r *recorder) addSquares(l *lane, n int) {
	if n == 1 {
		clear(r.square)
	}
	for k := range l.v {
		v, w := l.v[k], l.w[k]
		from, to := v[0], v[len(v)-1]
		r.square[k][0] += floats.Dot(v, v) - (from*from+to*to)/2
		r.square[k][1] += floats.Dot(w, w)
	}
}

// integrals turns the sums of the squares on section k over a period into the
// integrals of |V|^2, V^2 m, and of |I|^2, A^2 m, along it: the mean of a
// sinusoid's square is half that of its amplitude, over N steps exactly.
func (r *recorder) integrals(k int) (v2, i2 float64) {
	dx := r.m.net.Sections[k].Length / float64(r.m.grid.Cells[k])
	unit := 2 * dx / float64(r.m.grid.StepsPerPeriod)
	z := r.m.z[k]
	return unit * r.square[k][0], unit * r.square[k][1] / (z * z)
}

// A window is what the recorder finds in one period.
type window struct {
	v, w      [][]complex128 // of each section, w in volts
	junctions []complex128
	branches  []complex128 // of each companion, A
	mean      float64      // largest mean over the largest fundamental of its kind on the section
	harmonic  float64      // likewise the largest of the second and third harmonics
}

// window turns the recorded period into phasors.
//
// A sample at step n from the start of the period is at the time n dt for a
// voltage and (n-1/2) dt for a current or an average over the step; the FFT
// counts from n = 1. The average over a step of a sinusoid is cos(x) times
// its value at the half step, x = pi/N.
func (r *recorder) window() *window {
	n := float64(r.m.grid.StepsPerPeriod)
	whole := cmplx.Rect(2/n, -2*math.Pi/n)
	half := cmplx.Rect(2/n, -math.Pi/n)
	average := half / complex(math.Cos(math.Pi/n), 0)
	out := &window{}
	var sizes []impurity
	col := 0
	for k := range r.vi {
		v, vi := r.columns(&col, len(r.vi[k]), whole)
		w, wi := r.columns(&col, len(r.wi[k]), half)
		out.v, out.w = append(out.v, v), append(out.w, w)
		sizes = append(sizes, vi, wi)
	}
	out.judge(sizes)
	for j := range r.m.net.Junctions {
		f := whole
		if !r.m.junction.stores[j] {
			f = average
		}
		p, _ := r.columns(&col, 1, f)
		out.junctions = append(out.junctions, p[0])
	}
	out.branches, _ = r.columns(&col, len(r.m.junction.branches), average)
	return out
}

// judge fills mean and harmonic from what was found on each section.
func (w *window) judge(found []impurity) {
	top := 0.0
	for _, f := range found {
		top = math.Max(top, f.top)
	}
	for _, f := range found {
		if s := scale(f.top, top); s > 0 {
			w.mean = math.Max(w.mean, f.mean/s)
			w.harmonic = math.Max(w.harmonic, f.harmonic/s)
		}
	}
}

// negligible is the part of the network's largest amplitude below which a
// section counts as dead - it lies behind a short, say - and is measured
// against the network instead of itself.
const negligible = 1e-6

// scale is what an error on a section is measured against: the largest
// amplitude there, or a negligible part of the network's.
func scale(section, network float64) float64 {
	return math.Max(section, negligible*network)
}

// An impurity is the largest fundamental, mean and harmonic of some points.
type impurity struct{ top, mean, harmonic float64 }

// columnsPerLook is how many columns are transformed between two looks at the
// context.
const columnsPerLook = 16

// columns transforms the next count columns of the record and multiplies the
// fundamental by f.
func (r *recorder) columns(col *int, count int, f complex128) (p []complex128, found impurity) {
	n := r.m.grid.StepsPerPeriod
	p = make([]complex128, count)
	for i := range p {
		if i%columnsPerLook == 0 && r.ctx.Err() != nil {
			return p, found // of no use; whoever gave ctx looks at it
		}
		for m := range n {
			r.seq[m] = r.data[m*r.width+*col]
		}
		r.coef = r.fft.Coefficients(r.coef, r.seq)
		p[i] = r.coef[1] * f
		found.top = math.Max(found.top, cmplx.Abs(p[i]))
		found.mean = math.Max(found.mean, math.Abs(real(r.coef[0]))/float64(n))
		for h := 2; h <= 3 && h < len(r.coef); h++ {
			found.harmonic = math.Max(found.harmonic, 2*cmplx.Abs(r.coef[h])/float64(n))
		}
		*col++
	}
	return p, found
}

func largest(p []complex128) float64 {
	top := 0.0
	for _, v := range p {
		top = math.Max(top, cmplx.Abs(v))
	}
	return top
}
