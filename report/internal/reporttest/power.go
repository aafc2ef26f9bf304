package reporttest

import (
	"math"
	"math/cmplx"

	"linewitness/sim/record"
)

// power audits a case: the phasor witness exactly but for rounding, the time
// domain with the difference that its steady state has.
func (n Network) power(c record.Case, v map[string]complex128, opt Options) record.Power {
	const rounding = 3e-13
	return record.Power{
		Phasor: n.audit(c.Phasor, v, 1, 1e-9, rounding),
		FDTD:   n.audit(c.FDTD, v, math.Pow(cmplx.Abs(complex(1+opt.Error/3, opt.Error/2)), 2), 4*opt.Error, opt.Error),
	}
}

// audit is that of one witness; off is what its losses leave unexplained.
func (n Network) audit(s record.Steady, v map[string]complex128, scale, allowed, off float64) record.PowerAudit {
	a := record.PowerAudit{Available: s.Source.Available, Delivered: s.Source.Power, Allowed: allowed}
	a.Reflected = a.Available - a.Delivered
	if math.IsInf(a.Available, 1) {
		a.Reflected = math.NaN()
	}
	for i, e := range s.Sections {
		p := record.SectionPower{Name: e.Name, In: power(e.From.V, e.From.I), Out: power(e.To.V, e.To.I)}
		p.Dissipated = (p.In - p.Out) * (1 - off)
		p.Stored = scale * n.stored(n.Sections[i], v)
		a.Sections = append(a.Sections, p)
		a.Dissipated += p.Dissipated
		a.Stored += p.Stored
	}
	for _, l := range n.Bridges {
		p := record.PartPower{Name: l.Name}
		if l.Ratio == 0 {
			p.Power = scale * real(n.z(l)) * math.Pow(cmplx.Abs((v[l.At]-v[l.To])/n.z(l)), 2) / 2
		}
		a.Elements = append(a.Elements, p)
		a.Dissipated += p.Power
	}
	for _, l := range s.Loads {
		a.Loads = append(a.Loads, record.PartPower{Name: l.Name, Power: l.Power})
		a.InLoads += l.Power
	}
	a.Balance = off * a.Delivered // a transformer that is not quite ideal leaves more
	a.Relative = math.Abs(a.Balance) / a.Delivered
	a.Closed = a.Relative <= a.Allowed
	a.Q = n.omega() * a.Stored / a.Delivered
	return a
}

// stored is the mean of (L|I|^2 + C|V|^2)/4 along a section times its length.
func (n Network) stored(s Section, v map[string]complex128) (energy float64) {
	const points = 100
	m := n.model(s)
	for k := range points {
		volts, amps := n.along(s, v[s.From], v[s.To], s.Length*(float64(k)+0.5)/points)
		energy += (m.L*math.Pow(cmplx.Abs(amps), 2) + m.C*math.Pow(cmplx.Abs(volts), 2)) / 4 * s.Length / points
	}
	return energy
}
