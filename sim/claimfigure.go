package sim

import (
	"math"
	"math/cmplx"

	"linewitness/sim/design"
	"linewitness/sim/slip"
)

// figureOf is the figure that a claim is about, in SI units, of a state.
func figureOf(c design.Claim, s *state) complex128 { return formed(c, rawOf(c, s)) }

// rawOf is what the figure of a claim is taken from: see slip.Reading.
func rawOf(c design.Claim, s *state) complex128 {
	f, r := finder{s.net}, c.Requirement
	switch r.Quantity {
	case design.InputImpedance:
		return f.impedance(s, r)
	case design.Reflection, design.VSWR, design.ReturnLoss:
		g := f.reflection(s, r)
		if r.Quantity == design.VSWR && standing(s.ends[f.section(r.Section)][endOf(r.End)], g) < cmplx.Abs(g) {
			return 1 / g
		}
		return g
	case design.Voltage, design.Phase:
		return f.voltage(r.At + r.Load)(s)
	case design.PhaseDifference:
		return f.voltage(r.Between[0])(s) * cmplx.Conj(f.voltage(r.Between[1])(s))
	case design.Current:
		switch {
		case r.Section != "":
			return s.ends[f.section(r.Section)][endOf(r.End)].i
		case r.Load != "":
			return s.partCurrent(f.load(r.Load))
		}
		return s.source
	}
	return complex(f.steady(r)(s), 0)
}

// formed makes the figure of a claim from what it is taken from.
func formed(c design.Claim, raw complex128) complex128 {
	switch c.Quantity {
	case design.VSWR:
		return complex(vswrOf(cmplx.Abs(raw)), 0)
	case design.ReturnLoss:
		return complex(-20*math.Log10(cmplx.Abs(raw)), 0)
	case design.Phase, design.PhaseDifference:
		// An angle is the same a turn away: it is taken next to the claim.
		claimed := real(c.Value)
		return complex(claimed+math.Remainder(cmplx.Phase(raw)-claimed, 2*pi), 0)
	case design.InputImpedance, design.Reflection, design.Voltage, design.Current:
		if !c.Complex {
			return complex(cmplx.Abs(raw), 0)
		}
	}
	return raw
}

// reading is a claim's right figure as the catalogue of slips takes it.
func (a *assessor) reading(c *claimed) slip.Reading {
	r := slip.Reading{
		Quantity: c.Quantity, Raw: c.found, Steps: a.steps, Both: c.Complex,
		Form: func(v complex128) complex128 { return formed(c.Claim, v) },
	}
	if c.timed != nil {
		return r
	}
	r.Raw = rawOf(c.Claim, a.exact)
	if c.Section != "" {
		k := finder{a.net}.section(c.Section)
		r.Z0 = a.net.Sections[k].At(a.net.Omega()).Impedance(a.net.Omega())
	}
	return r
}

// reflective reports whether a quantity is one of a reflection that a line
// carries.
func reflective(q design.Quantity) bool {
	switch q {
	case design.VSWR, design.Reflection, design.ReturnLoss, design.InputImpedance:
		return true
	}
	return false
}
