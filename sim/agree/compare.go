package agree

import (
	"math"
	"math/cmplx"
)

// A Field gives the phasors along the sections of a network.
type Field interface {
	Voltage(section int, z float64) complex128 // V at z m from the From end
	Current(section int, z float64) complex128 // A
}

// Samples are the phasors of the time-domain run on one section.
type Samples struct {
	ZV []float64 // m
	V  []complex128
	ZI []float64
	I  []complex128
}

// Result is the comparison of two steady states.
type Result struct {
	Sections []Section
	Voltage  float64 // largest of the sections
	Current  float64
	RMS      float64 // over all points and both kinds
	Expected float64 // largest expected of the sections
	Worst    Place
}

// Place is where the difference is largest.
type Place struct {
	Section int
	At      float64 // m
	Current bool
}

// Section is the comparison on one section.
type Section struct {
	Voltage, Current Kind
}

// Kind is the comparison of the voltages, or of the currents, of a section.
type Kind struct {
	Scale    float64      // largest closed-form amplitude at the points: what errors are relative to
	Found    float64      // largest difference over Scale
	At       float64      // m
	Expected float64      // largest expected difference over Scale
	Exact    []complex128 // closed form at the points
	Allowed  []float64    // expected difference at the points, V or A
}

// negligible is the part of the network's largest amplitude below which a
// section counts as dead, as one behind a short, and is measured against the
// network instead of itself.
const negligible = 1e-6

// rounding is the relative error that arithmetic alone may leave: some 1e5
// steps of 1e-16 each, and as much again in the closed form.
const rounding = 1e-11

// slack is how far above its expected error a difference may be before it is
// unexplained. The grid's part is exact; the settling residual is an estimate
// of a geometric tail.
const slack = 3

// Compare compares the samples of every section with the closed form exact.
// discrete is the closed form of the Equivalent network and waves what that
// was made of; residual is the estimated remaining error of the settling run,
// relative to the section's largest.
func Compare(samples []Samples, exact, discrete Field, waves []Wave, residual float64) Result {
	sizes := make([]Section, len(samples))
	topV, topI := 0.0, 0.0
	for k, s := range samples {
		v := at(s.ZV, k, exact.Voltage)
		i := at(s.ZI, k, exact.Current)
		sizes[k] = Section{Voltage: Kind{Exact: v, Scale: largest(v)}, Current: Kind{Exact: i, Scale: largest(i)}}
		topV, topI = math.Max(topV, sizes[k].Voltage.Scale), math.Max(topI, sizes[k].Current.Scale)
	}
	out := Result{Sections: sizes}
	sum, count := 0.0, 0
	for k := range samples {
		s, sec := samples[k], &out.Sections[k]
		sec.Voltage.Scale = math.Max(sec.Voltage.Scale, negligible*topV)
		sec.Current.Scale = math.Max(sec.Current.Scale, negligible*topI)
		inside := waves[k].EndImpedance / waves[k].Impedance
		dv := at(s.ZV, k, discrete.Voltage)
		di := at(s.ZI, k, discrete.Current)
		for i := range di {
			di[i] *= inside
		}
		sum += sec.Voltage.fill(s.ZV, s.V, dv, residual)
		sum += sec.Current.fill(s.ZI, s.I, di, residual)
		count += len(s.ZV) + len(s.ZI)
		out.take(k, sec)
	}
	if count > 0 {
		out.RMS = math.Sqrt(sum / float64(count))
	}
	return out
}

// fill compares the points of one kind and returns the sum of the squares of
// the relative differences.
func (k *Kind) fill(z []float64, found, discrete []complex128, residual float64) (sum float64) {
	k.Allowed = make([]float64, len(z))
	if k.Scale == 0 {
		return 0
	}
	for i := range z {
		d := cmplx.Abs(found[i]-k.Exact[i]) / k.Scale
		e := cmplx.Abs(discrete[i]-k.Exact[i])/k.Scale + residual + rounding
		k.Allowed[i] = e * k.Scale
		k.Expected = math.Max(k.Expected, e)
		if !(d <= k.Found) || i == 0 { // a NaN counts as the worst
			k.Found, k.At = d, z[i]
		}
		sum += d * d
	}
	return sum
}

// take updates the totals with section number k.
func (r *Result) take(k int, s *Section) {
	worst := math.Max(r.Voltage, r.Current)
	if s.Voltage.Found > worst || k == 0 {
		worst, r.Worst = s.Voltage.Found, Place{k, s.Voltage.At, false}
	}
	if s.Current.Found > worst {
		r.Worst = Place{k, s.Current.At, true}
	}
	r.Voltage = math.Max(r.Voltage, s.Voltage.Found)
	r.Current = math.Max(r.Current, s.Current.Found)
	r.Expected = math.Max(r.Expected, math.Max(s.Voltage.Expected, s.Current.Expected))
}

// Found is the larger of the voltage and current differences.
func (r *Result) Found() float64 { return math.Max(r.Voltage, r.Current) }

// Explained reports whether the difference is what the grid and the settling
// residual must cause, within slack and tail, on every section. The tail is what
// the estimate of the residual may not have seen, relative to the section's largest.
func (r *Result) Explained(tail float64) bool {
	for _, s := range r.Sections {
		if !s.Voltage.explained(tail) || !s.Current.explained(tail) {
			return false
		}
	}
	return true
}

// explained is false for a difference that is not a number.
func (k *Kind) explained(tail float64) bool { return k.Found <= slack*k.Expected+tail }

func at(z []float64, k int, f func(int, float64) complex128) []complex128 {
	out := make([]complex128, len(z))
	for i := range z {
		out[i] = f(k, z[i])
	}
	return out
}

func largest(p []complex128) float64 {
	top := 0.0
	for _, v := range p {
		top = math.Max(top, cmplx.Abs(v))
	}
	return top
}
