package sim

import (
	"math"
	"math/cmplx"

	"linewitness/sim/design"
	"linewitness/sim/network"
)

// A quantity is a steady-state quantity in SI units (dB for ratios that are
// stated so, radians for angles) as a function of a witness's state.
type quantity func(*state) float64

// total is the reflection above which rounding cannot tell from a total one.
const total = 1 - 1e-12

// vswrOf is (1+a)/(1-a) of a reflection of size a, +Inf for a total one.
func vswrOf(a float64) float64 {
	if a >= total {
		return math.Inf(1)
	}
	return (1 + a) / (1 - a)
}

// standing is the size of the reflection g at a terminal that the VSWR goes by.
// A standing wave has no direction: where the power flows from To to From, the
// incident wave is the one that g takes for the reflected.
func standing(t terminal, g complex128) float64 {
	a := cmplx.Abs(g)
	if a > 1 && power(t.v, t.i) < 0 {
		return 1 / a
	}
	return a
}

// reflectionAt is (Z - Z0)/(Z + Z0) of the impedance seen along section k at
// an end, written (V - Z0 I)/(V + Z0 I) so that an open end has one too. At
// the To end that is the impedance of what follows.
func reflectionAt(s *state, k, end int, z0 complex128) complex128 {
	t := s.ends[k][end]
	return (t.v - z0*t.i) / (t.v + z0*t.i)
}

// finder finds the parts of a network by name. A name that leads nowhere is a
// mistake of package design.
type finder struct{ net *network.Network }

func (f finder) section(name string) int {
	for k, s := range f.net.Sections {
		if s.Name == name {
			return k
		}
	}
	panic("sim: requirement names a section that the case does not have")
}

func (f finder) junction(name string) int {
	for j, n := range f.net.Junctions {
		if n == name {
			return j
		}
	}
	panic("sim: requirement names a junction that the case does not have")
}

func (f finder) load(name string) int {
	for p, part := range f.net.Parts {
		if part.Kind == network.Load && part.Name == name {
			return p
		}
	}
	panic("sim: requirement names a load that the case does not have")
}

// voltage finds the phasor of a junction, or of a load across it, by name.
func (f finder) voltage(name string) func(*state) complex128 {
	for p, part := range f.net.Parts {
		if part.Kind == network.Load && part.Name == name {
			return func(s *state) complex128 { return s.partVoltage(p) }
		}
	}
	j := f.junction(name)
	return func(s *state) complex128 { return s.junctions[j] }
}

// steady gives the quantity that a requirement limits, or nil if it is not
// one of the steady state.
func (f finder) steady(r design.Requirement) quantity {
	if l := f.law(r); l != nil {
		return l.quantity
	}
	switch r.Quantity {
	case design.Reflection:
		return f.reflected(r)
	case design.SteadyVoltage:
		return f.steadyVoltage(r)
	case design.SteadyCurrent:
		return f.steadyCurrent(r)
	case design.LoadPower:
		b := f.load(r.Load)
		return func(s *state) float64 { return s.partPower(b) }
	case design.Efficiency:
		return f.efficiency(r)
	case design.Phase:
		name := r.At
		if r.Load != "" {
			name = r.Load
		}
		v := f.voltage(name)
		return func(s *state) float64 { return cmplx.Phase(v(s)) }
	case design.PhaseDifference:
		a, b := f.voltage(r.Between[0]), f.voltage(r.Between[1])
		return func(s *state) float64 { return cmplx.Phase(a(s) * cmplx.Conj(b(s))) }
	}
	return nil
}

// reflected is the size of the reflection at the end of a section.
func (f finder) reflected(r design.Requirement) quantity {
	return func(s *state) float64 { return cmplx.Abs(f.reflection(s, r)) }
}

// standing is that size as the VSWR goes by it.
func (f finder) standing(r design.Requirement) quantity {
	k, end := f.section(r.Section), endOf(r.End)
	return func(s *state) float64 { return standing(s.ends[k][end], f.reflection(s, r)) }
}

// endOf is 0 for the From end and 1 for the To end.
func endOf(name string) int {
	if name == "to" {
		return 1
	}
	return 0
}

func (f finder) reflection(s *state, r design.Requirement) complex128 {
	k := f.section(r.Section)
	z0 := f.net.Sections[k].At(f.net.Omega()).Impedance(f.net.Omega())
	if r.Reference != nil {
		z0 = complex(r.Reference.SI, 0)
	}
	return reflectionAt(s, k, endOf(r.End), z0)
}

// impedance is V/I at the end of a section, ohm.
func (f finder) impedance(s *state, r design.Requirement) complex128 {
	t := s.ends[f.section(r.Section)][endOf(r.End)]
	return ratio(t.v, t.i)
}

func (f finder) steadyVoltage(r design.Requirement) quantity {
	switch {
	case r.Section != "":
		k := f.section(r.Section)
		return func(s *state) float64 { return s.voltage[k].largest.value }
	case r.At != "":
		j := f.junction(r.At)
		return func(s *state) float64 { return cmplx.Abs(s.junctions[j]) }
	}
	return func(s *state) float64 {
		top := 0.0
		for _, e := range s.voltage {
			top = math.Max(top, e.largest.value)
		}
		for _, v := range s.junctions {
			top = math.Max(top, cmplx.Abs(v))
		}
		return top
	}
}

func (f finder) steadyCurrent(r design.Requirement) quantity {
	switch {
	case r.Section != "":
		k := f.section(r.Section)
		return func(s *state) float64 { return s.current[k].largest.value }
	case r.At != "":
		j := f.junction(r.At)
		return func(s *state) float64 { return s.largestCurrentAt(j) }
	}
	return func(s *state) float64 {
		top := 0.0
		for _, e := range s.current {
			top = math.Max(top, e.largest.value)
		}
		for j := range s.junctions {
			top = math.Max(top, s.largestCurrentAt(j))
		}
		return top
	}
}

// largestCurrentAt is the largest current of anything that ends at junction j.
func (s *state) largestCurrentAt(j int) float64 {
	top := 0.0
	if s.net.Source.At == j {
		top = cmplx.Abs(s.source)
	}
	for p, part := range s.net.Parts {
		i := cmplx.Abs(s.partCurrent(p))
		switch j {
		case part.A:
			top = math.Max(top, i)
		case part.B: // what flows in at A flows out at B, but for a transformer
			top = math.Max(top, i/s.net.Branches[part.Branches[0]].Turns())
		}
	}
	for k, sec := range s.net.Sections {
		for end, at := range []int{sec.From, sec.To} {
			if at == j {
				top = math.Max(top, cmplx.Abs(s.ends[k][end].i))
			}
		}
	}
	return top
}

// efficiency is the power into a load, or into all loads, over the power
// that the source delivers.
func (f finder) efficiency(r design.Requirement) quantity {
	return func(s *state) float64 {
		p := 0.0
		for i, part := range f.net.Parts {
			if part.Kind == network.Load && (r.Load == "" || part.Name == r.Load) {
				p += s.partPower(i)
			}
		}
		return p / s.sourcePower()
	}
}

// loss in dB is, of a section, the power that enters it over the power that
// leaves it; of a load, the available power (for an ideal source the
// delivered power) over the power into the load.
func (f finder) loss(r design.Requirement) *law {
	if r.Section != "" {
		k := f.section(r.Section)
		return powerRatio(
			func(s *state) float64 { in, _ := s.flow(k); return in },
			func(s *state) float64 { _, out := s.flow(k); return out })
	}
	b := f.load(r.Load)
	available := f.net.Source.Available()
	from := func(*state) float64 { return available }
	if math.IsInf(available, 1) {
		from = (*state).sourcePower
	}
	return powerRatio(from, func(s *state) float64 { return s.partPower(b) })
}

// idle is the part of the apparent power at the ends of a section below which a
// power is rounding: nothing goes through.
const idle = 1e-12

// flow is the power that enters section k, W, and the power that leaves it,
// whichever way it flows. It is NaN where nothing goes through, as in a stub
// without loss; what leaves is negative where power enters at both ends.
func (s *state) flow(k int) (in, out float64) {
	e := s.ends[k]
	in, out = power(e[0].v, e[0].i), power(e[1].v, e[1].i)
	if in+out < 0 { // from To to From
		in, out = -out, -in
	}
	if math.Max(in, out) <= idle*(apparent(e[0].v, e[0].i)+apparent(e[1].v, e[1].i)) {
		return math.NaN(), math.NaN()
	}
	return in, out
}
