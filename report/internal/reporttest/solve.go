package reporttest

import (
	"math"
	"math/cmplx"

	"linewitness/sim/record"
)

// Options shape the made-up part of a case.
type Options struct {
	Error     float64 // size of the difference between the witnesses
	Loop      float64 // amplitude kept per round trip
	Unsettled bool
	MaxPoints int    // points of a profile at most; 0 means 600
	Stop      string // of the source, in words; empty if it stays on
}

// Case returns the network as a solved case, without requirements.
func (n Network) Case(name string, opt Options) record.Case {
	if opt.MaxPoints == 0 {
		opt.MaxPoints = 600
	}
	v := n.solve()
	c := record.Case{Name: name, Verdict: record.Verified, Model: n.Model()}
	c.Phasor = n.steady(v, 1)
	c.FDTD = n.steady(v, complex(1+opt.Error/3, opt.Error/2))
	for _, s := range n.Sections {
		c.Profiles = append(c.Profiles, n.profile(s, v, opt))
	}
	c.Settling = n.settling(opt)
	c.Stress = n.stress(c)
	c.Agreement = n.agreement(c, opt)
	c.Grid = n.grid()
	c.Waveforms = n.waveforms(c, opt)
	c.Spectrum = n.spectrum(v)
	c.Model.Source.Stop = opt.Stop
	n.prove(&c, opt)
	c.Power = n.power(c, v, opt)
	c.SpaceTime, c.Bounces = n.spaceTime(v, n.longest()*n.Frequency), n.bounces()
	if opt.Unsettled {
		c.Verdict = record.Unsettle
	}
	c.Convergence, c.Fidelity = study(&c, opt), fidelity(&c, opt)
	return c
}

// Model returns the network as a record echoes it.
func (n Network) Model() record.Model {
	m := record.Model{Frequency: n.Frequency, Junctions: n.junctions()}
	for _, s := range n.Sections {
		e := n.model(s)
		e.Given = trim(s.Length) + " m"
		_, e.Z0 = n.gamma(s)
		m.Sections = append(m.Sections, e)
	}
	for _, l := range n.Loads {
		m.Loads = append(m.Loads, n.part(l))
	}
	for _, l := range n.Bridges {
		m.Elements = append(m.Elements, n.part(l))
	}
	m.Source = record.ModelSource{
		At: n.At, Given: trim(n.EMF) + " V peak EMF", EMF: n.EMF, R: real(n.Source), Impedance: n.Source,
		Available: n.available(), Start: "abrupt, worst phase",
	}
	return m
}

func (n Network) available() float64 { return n.EMF * n.EMF / (8 * real(n.Source)) }

func (n Network) part(l Load) record.ModelPart {
	p := record.ModelPart{
		Name: l.Name, At: l.At, To: l.To, R: l.R, L: l.L, C: l.C,
		Impedance: n.z(l), Open: l.Open, Short: l.Short, Given: trim(l.R) + " ohm", As: "resistor",
	}
	switch {
	case l.Ratio != 0:
		p.Given, p.As, p.Ratio, p.R, p.Impedance = l.Given, "ideal transformer", l.Ratio, 0, 0
	case l.As != "":
		p.Given, p.As, p.R, p.L, p.C = l.Given, l.As, 0, 0, 0
	case l.Open:
		p.Given, p.As = "open", "exact open"
	case l.Short:
		p.Given, p.As, p.Impedance = "short", "exact short", 0
	case l.L > 0:
		p.Given, p.As = p.Given+" + "+trim(l.L*1e9)+" nH", "series R-L"
	case l.C > 0:
		p.Given, p.As = p.Given+" + "+trim(l.C*1e12)+" pF", "series R-C"
	}
	return p
}

func (n Network) steady(v map[string]complex128, k complex128) record.Steady {
	v0 := v[n.At] * k
	i0 := (complex(n.EMF, 0)*k - v0) / n.Source
	st := record.Steady{Source: record.SteadySource{
		V: v0, I: i0, Impedance: v0 / i0, Power: power(v0, i0), Available: n.available(),
	}}
	for _, s := range n.Sections {
		st.Sections = append(st.Sections, n.section(s, v[s.From]*k, v[s.To]*k))
	}
	for _, l := range n.Loads {
		lv := v[l.At] * k
		li := lv / n.z(l)
		if l.Open {
			li = 0
		}
		st.Loads = append(st.Loads, record.SteadyLoad{Name: l.Name, V: lv, I: li, Power: power(lv, li)})
	}
	for _, name := range n.junctions() {
		st.Junctions = append(st.Junctions, record.SteadyJunction{Name: name, V: v[name] * k})
	}
	return st
}

func power(v, i complex128) float64 { return real(v*cmplx.Conj(i)) / 2 }

func (n Network) section(s Section, v1, v2 complex128) record.SteadySection {
	_, z0 := n.gamma(s)
	end := func(z float64) record.End {
		v, i := n.along(s, v1, v2, z)
		e := record.End{V: v, I: i, Impedance: v / i}
		e.Reflection = (v - z0*i) / (v + z0*i)
		e.VSWR = math.Inf(1)
		if r := cmplx.Abs(e.Reflection); r < 1 {
			e.VSWR = (1 + r) / (1 - r)
		}
		return e
	}
	out := record.SteadySection{Name: s.Name, From: end(0), To: end(s.Length)}
	out.VoltageMin.Value = math.Inf(1)
	for k := 0; k <= 400; k++ {
		z := s.Length * float64(k) / 400
		v, i := n.along(s, v1, v2, z)
		if a := cmplx.Abs(v); a > out.VoltageMax.Value {
			out.VoltageMax = record.Extreme{Value: a, At: z}
		}
		if a := cmplx.Abs(v); a < out.VoltageMin.Value {
			out.VoltageMin = record.Extreme{Value: a, At: z}
		}
		if a := cmplx.Abs(i); a > out.CurrentMax.Value {
			out.CurrentMax = record.Extreme{Value: a, At: z}
		}
	}
	out.Loss = power(out.From.V, out.From.I) - power(out.To.V, out.To.I)
	return out
}

func (n Network) profile(s Section, v map[string]complex128, opt Options) record.Profile {
	p := record.Profile{Section: s.Name}
	points := min(max(int(40*s.Length*n.Frequency/(s.VF*3e8)), 2), opt.MaxPoints)
	var top, topI float64
	for k := 0; k <= points; k++ {
		z := s.Length * float64(k) / float64(points)
		pv, _ := n.along(s, v[s.From], v[s.To], z)
		top = math.Max(top, cmplx.Abs(pv))
		p.ZV, p.VP = append(p.ZV, z), append(p.VP, pv)
		if k < points {
			zi := z + s.Length/float64(2*points)
			_, pi := n.along(s, v[s.From], v[s.To], zi)
			topI = math.Max(topI, cmplx.Abs(pi))
			p.ZI, p.IP = append(p.ZI, zi), append(p.IP, pi)
		}
	}
	wave := func(z float64) complex128 {
		return cmplx.Rect(0.4+0.5*z/s.Length, 9*z/s.Length) * complex(opt.Error, 0)
	}
	for k, z := range p.ZV {
		p.VF = append(p.VF, p.VP[k]+wave(z)*complex(top, 0))
		p.EV = append(p.EV, top*opt.Error*0.8)
		p.PeakZV = append(p.PeakZV, z)
		p.PeakV = append(p.PeakV, cmplx.Abs(p.VP[k])*(1.05+0.3*math.Exp(-3*z/s.Length)))
	}
	for k, z := range p.ZI {
		p.IF = append(p.IF, p.IP[k]+wave(z)*complex(topI, 0))
		p.EI = append(p.EI, topI*opt.Error*0.8)
		p.PeakZI = append(p.PeakZI, z)
		p.PeakI = append(p.PeakI, cmplx.Abs(p.IP[k])*(1.05+0.2*math.Exp(-2*z/s.Length)))
	}
	return p
}
