package phasor

import (
	"math"
	"math/cmplx"
	"slices"
)

// A Solution is the steady state of a network. All phasors are peak, relative
// to the EMF of the source.
type Solution struct {
	junctions []complex128
	waves     []wave
	branches  []complex128
	source    complex128
}

// Junction is the voltage of junction j, V.
func (s *Solution) Junction(j int) complex128 { return s.junctions[j] }

// Branch is the current of branch b from its A to its B, A; of a transformer
// that into B.
func (s *Solution) Branch(b int) complex128 { return s.branches[b] }

// Source is the current out of the source, A.
func (s *Solution) Source() complex128 { return s.source }

// Line gives the propagation constant, 1/m, and the characteristic impedance,
// ohm, of section k.
func (s *Solution) Line(k int) (gamma, zc complex128) {
	return s.waves[k].gamma, s.waves[k].zc
}

// Voltage is V(z) on section k, z in m from its From end.
func (s *Solution) Voltage(k int, z float64) complex128 {
	p, m := s.waves[k].parts(z)
	return p + m
}

// Current is I(z) on section k, positive from From to To.
func (s *Solution) Current(k int, z float64) complex128 {
	p, m := s.waves[k].parts(z)
	return (p - m) / s.waves[k].zc
}

// An Extreme is the size of a phasor and its place, m from the From end.
type Extreme struct{ Value, At float64 }

// VoltageExtremes gives the largest and the smallest |V| on section k.
func (s *Solution) VoltageExtremes(k int) (largest, smallest Extreme) {
	return s.waves[k].extremes(func(z float64) complex128 { return s.Voltage(k, z) })
}

// CurrentExtremes gives the largest and the smallest |I| on section k.
func (s *Solution) CurrentExtremes(k int) (largest, smallest Extreme) {
	return s.waves[k].extremes(func(z float64) complex128 { return s.Current(k, z) })
}

// scanPerWavelength is how many points a wavelength are looked at before an
// extreme is refined; the extremes lie a quarter wavelength apart.
const scanPerWavelength = 32

// missed is the part of the largest amplitude by which points so far apart may
// miss a crest, 1 - cos(2 pi/64), or a null, sin(2 pi/64), with some to spare.
const (
	missedCrest = 0.006
	missedNull  = 0.11
)

// extremes refines every crest and every null that may be the extreme: with
// loss they differ by less than the points of a scan miss them by.
func (w wave) extremes(f func(float64) complex128) (largest, smallest Extreme) {
	n := int(math.Ceil(scanPerWavelength*math.Abs(imag(w.gamma))*w.length/(2*math.Pi))) + 2
	h := w.length / float64(n)
	size := func(z float64) float64 { return cmplx.Abs(f(z)) }
	scan := make([]float64, n+1)
	for i := range scan {
		scan[i] = size(float64(i) * h)
	}
	top, bottom := slices.Max(scan), slices.Min(scan)
	largest, smallest = Extreme{-1, 0}, Extreme{math.Inf(1), 0}
	for i, v := range scan {
		at := Extreme{v, float64(i) * h}
		if v >= top*(1-missedCrest) && turns(scan, i, 1) {
			if e := w.sharpen(at, h, 1, size); e.Value > largest.Value {
				largest = e
			}
		}
		if v <= bottom+missedNull*top && turns(scan, i, -1) {
			if e := w.sharpen(at, h, -1, size); e.Value < smallest.Value {
				smallest = e
			}
		}
	}
	return largest, smallest
}

// turns reports whether point i is not below (sign 1), or not above (sign -1),
// its neighbours.
func turns(y []float64, i int, sign float64) bool {
	return (i == 0 || sign*y[i] >= sign*y[i-1]) && (i == len(y)-1 || sign*y[i] >= sign*y[i+1])
}

// sharpen moves an extreme found on a grid of step h to its true place by
// golden-section search between its neighbours; sign -1 looks for a minimum.
func (w wave) sharpen(e Extreme, h, sign float64, size func(float64) float64) Extreme {
	const golden = 0.6180339887498949
	a, b := math.Max(0, e.At-h), math.Min(w.length, e.At+h)
	for range 60 {
		c, d := b-golden*(b-a), a+golden*(b-a)
		if sign*size(c) > sign*size(d) {
			b = d
		} else {
			a = c
		}
	}
	z := (a + b) / 2
	if v := size(z); sign*v > sign*e.Value {
		return Extreme{v, z}
	}
	return e
}
