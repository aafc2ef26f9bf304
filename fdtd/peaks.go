package fdtd

import "math"

// sectionPeaks are the running peaks of one section, in volts both.
type sectionPeaks struct{ v, w runningPeak }

func newSectionPeaks(cells int) sectionPeaks {
	return sectionPeaks{
		v: runningPeak{square: make([]float64, cells+1)},
		w: runningPeak{square: make([]float64, cells)},
	}
}

// A runningPeak keeps the largest square that each place has seen, and all
// about the largest of them.
type runningPeak struct {
	square []float64
	best   held
}

// held is the largest amplitude so far, with the two lanes' values then.
type held struct {
	square float64
	a, b   float64
	index  int
	step   int
}

func (h *held) see(a, b float64, index, step int) {
	if q := a*a + b*b; q > h.square {
		*h = held{q, a, b, index, step}
	}
}

// pair takes in two lanes: hypot(a, b) is the amplitude over all phases.
func (p *runningPeak) pair(a, b []float64, step int) {
	sq := p.square
	a, b = a[:len(sq)], b[:len(sq)]
	for i, was := range sq {
		if q := a[i]*a[i] + b[i]*b[i]; q > was {
			sq[i] = q
			p.best.see(a[i], b[i], i, step)
		}
	}
}

// single takes in one lane.
func (p *runningPeak) single(a []float64, step int) {
	sq := p.square
	a = a[:len(sq)]
	for i, was := range sq {
		if q := a[i] * a[i]; q > was {
			sq[i] = q
			p.best.see(a[i], 0, i, step)
		}
	}
}

// peak gives the held value in units of the caller: cells of dx, shifted by
// some cells, steps of dt, early by some steps.
func (h held) peak(section int, dx, shift, dt, early, unit float64) Peak {
	return Peak{
		Value:   math.Sqrt(h.square) * unit,
		Section: section,
		At:      (float64(h.index) + shift) * dx,
		Time:    (float64(h.step) - early) * dt,
		// v = a cos p - b sin p is largest at this p.
		Phase: math.Atan2(-h.b, h.a),
	}
}

// envelopePoints is how many places of a running peak are kept.
const envelopePoints = 2048

// envelope gives the running peak at no more than envelopePoints places, each
// the largest of those it stands for.
func (p *runningPeak) envelope(dx, shift, unit float64) (z, peak []float64) {
	n := len(p.square)
	k := min(n, envelopePoints)
	for i := range k {
		lo, hi := i*n/k, (i+1)*n/k
		at := lo
		for j := lo; j < hi; j++ {
			if p.square[j] > p.square[at] {
				at = j
			}
		}
		z = append(z, (float64(at)+shift)*dx)
		peak = append(peak, math.Sqrt(p.square[at])*unit)
	}
	return z, peak
}
