package sim

import (
	"context"
	"math"
	"slices"

	"linewitness/fdtd"
	"linewitness/sim/network"
	"linewitness/sim/record"
)

// caseRecord writes down a solved case; the claims are cut short if ctx ends.
func (s *solved) caseRecord(ctx context.Context, reqs []record.Requirement, studies []record.Study) record.Case {
	c := record.Case{
		Name:         s.name,
		Model:        s.model(),
		Phasor:       s.steadyRecord(s.exact),
		FDTD:         s.steadyRecord(s.found),
		Settling:     s.settlingRecord(),
		Stress:       s.stressRecord(),
		Agreement:    s.agreementRecord(),
		Grid:         gridRecord(s.net, s.steady.Grid),
		Requirements: reqs,
		Convergence:  s.convergence(studies),
		Profiles:     s.profiles(),
		Waveforms:    s.waveforms(),
		SpaceTime:    s.spaceTime(),
		Bounces:      bounces(s.net),
		Spectrum: record.Spectrum{
			Where:     s.net.Junctions[s.net.Source.At],
			Periods:   s.steady.Spectrum.Periods,
			Frequency: s.steady.Spectrum.Frequency,
			Amplitude: s.steady.Spectrum.Amplitude,
		},
	}
	c.Grid.Updates = s.steady.Updates + s.stress.Updates
	for _, again := range []*fdtd.Stress{s.sharp, s.second} {
		if again != nil {
			c.Grid.Updates += again.Updates
		}
	}
	for _, again := range s.coarser {
		c.Grid.Updates += again.Updates
	}
	for k := range c.Grid.Sections {
		c.Grid.Sections[k].Points = len(s.steady.Sections[k].ZV)
	}
	c.Power = s.power()
	c.Claims = s.claims(ctx)
	c.Fidelity = s.fidelity()
	c.Ratings = s.ratings()
	c.Verdict = s.verdict(&c)
	c.Warnings = append(s.warnings(&c), exceeded(c.Ratings)...)
	return c
}

// verdict is the worst of settling, agreement, validation, requirements,
// ratings and claims.
func (s *solved) verdict(c *record.Case) record.Verdict {
	switch {
	case !s.steady.Settling.Settled:
		return record.Unsettle
	case !(s.compared.Found() <= s.design.Grid.Agreement) || !s.compared.Explained(s.tail()) || unexplained(c.Convergence.Studies) > 0, open(c.Power):
		return record.Disagree
	}
	var all []record.RequirementVerdict
	for _, r := range c.Requirements {
		all = append(all, r.Verdict)
	}
	for _, r := range c.Ratings {
		if !r.Advisory {
			all = append(all, r.Verdict)
		}
	}
	claimed := func(v record.ClaimVerdict) bool {
		return slices.ContainsFunc(c.Claims, func(c record.Claim) bool { return c.Verdict == v })
	}
	switch {
	case slices.Contains(all, record.MissedReq):
		return record.Missed
	case claimed(record.Contradicted):
		return record.Doubted
	case slices.Contains(all, record.NotShownReq), claimed(record.ClaimOpen):
		return record.NotShown
	}
	return record.Verified
}

// open reports whether a power balance does not close. One that was not made
// does not count.
func open(p record.Power) bool {
	return p.Phasor.Delivered != 0 && !p.Phasor.Closed || p.FDTD.Delivered != 0 && !p.FDTD.Closed
}

func (s *solved) steadyRecord(st *state) record.Steady {
	src := s.net.Source
	v := st.junctions[src.At]
	out := record.Steady{Source: record.SteadySource{
		V: v, I: st.source, Impedance: ratio(v, st.source),
		Power: st.sourcePower(), Available: src.Available(),
	}}
	for k, sec := range s.net.Sections {
		z0 := sec.At(s.net.Omega()).Impedance(s.net.Omega())
		out.Sections = append(out.Sections, record.SteadySection{
			Name: sec.Name,
			From: st.end(k, 0, z0), To: st.end(k, 1, z0),
			VoltageMax: record.Extreme{Value: st.voltage[k].largest.value, At: st.voltage[k].largest.at},
			VoltageMin: record.Extreme{Value: st.voltage[k].smallest.value, At: st.voltage[k].smallest.at},
			CurrentMax: record.Extreme{Value: st.current[k].largest.value, At: st.current[k].largest.at},
			Loss:       st.sectionLoss(k),
		})
	}
	for p, part := range s.net.Parts {
		if part.Kind == network.Load {
			out.Loads = append(out.Loads, record.SteadyLoad{
				Name: part.Name, V: st.partVoltage(p), I: st.partCurrent(p), Power: st.partPower(p),
			})
		}
	}
	for j, name := range s.net.Junctions[:s.net.NamedJunctions()] {
		out.Junctions = append(out.Junctions, record.SteadyJunction{Name: name, V: st.junctions[j]})
	}
	return out
}

func (s *state) end(k, e int, z0 complex128) record.End {
	t := s.ends[k][e]
	g := reflectionAt(s, k, e, z0)
	return record.End{V: t.v, I: t.i, Impedance: ratio(t.v, t.i), Reflection: g, VSWR: vswrOf(standing(t, g))}
}

func (s *solved) stressRecord() record.Stress {
	st := s.stress
	out := record.Stress{
		Profile: s.design.Source.Start.Text, Duration: st.Duration, Worst: st.Worst,
		Voltage: s.peakRecord(st.Voltage), Current: s.peakRecord(st.Current),
	}
	out.Voltage.Uncertainty = s.stressed(func(t *fdtd.Stress) float64 { return t.Voltage.Value }).spread
	out.Current.Uncertainty = s.stressed(func(t *fdtd.Stress) float64 { return t.Current.Value }).spread
	steady := 0.0
	for k, p := range st.Sections {
		top := s.exact.voltage[k].largest.value
		steady = math.Max(steady, top)
		out.Sections = append(out.Sections, record.StressSection{
			Name:    s.net.Sections[k].Name,
			Voltage: p.Voltage.Value, VoltageAt: p.Voltage.At, VoltageTime: p.Voltage.Time,
			Current: p.Current.Value, CurrentAt: p.Current.At, CurrentTime: p.Current.Time,
			SteadyVoltage:      top,
			VoltageUncertainty: s.stressed(func(t *fdtd.Stress) float64 { return t.Sections[k].Voltage.Value }).spread,
			CurrentUncertainty: s.stressed(func(t *fdtd.Stress) float64 { return t.Sections[k].Current.Value }).spread,
		})
	}
	out.Overshot = st.Voltage.Value/steady - 1
	return out
}

func (s *solved) peakRecord(p fdtd.Peak) record.Peak {
	phase := p.Phase
	if !s.stress.Worst {
		phase = s.net.Source.Start.Phase
	}
	name := ""
	if p.Section >= 0 {
		name = s.net.Sections[p.Section].Name
	}
	return record.Peak{Value: p.Value, Section: name, At: p.At, Time: p.Time, Phase: phase * 180 / pi}
}

func (s *solved) agreementRecord() record.Agreement {
	a := &s.compared
	out := record.Agreement{
		Voltage: a.Voltage, Current: a.Current, RMS: a.RMS, Expected: a.Expected,
		Limit: s.design.Grid.Agreement,
		Worst: record.WorstPlace{Section: s.net.Sections[a.Worst.Section].Name, At: a.Worst.At, Quantity: "voltage"},
	}
	if a.Worst.Current {
		out.Worst.Quantity = "current"
	}
	for k, sec := range a.Sections {
		out.Sections = append(out.Sections, record.AgreementSection{
			Name:    s.net.Sections[k].Name,
			Voltage: sec.Voltage.Found, ExpectedVoltage: sec.Voltage.Expected,
			VoltageAt: sec.Voltage.At, VoltageScale: sec.Voltage.Scale,
			Current: sec.Current.Found, ExpectedCurrent: sec.Current.Expected,
			CurrentAt: sec.Current.At, CurrentMax: sec.Current.Scale,
		})
	}
	return out
}

func gridRecord(net *network.Network, g fdtd.Grid) record.Grid {
	out := record.Grid{StepsPerPeriod: g.StepsPerPeriod, Step: g.Step}
	for k, s := range net.Sections {
		exact := s.At(net.Omega()).Propagation(net.Omega()) * complex(s.Length, 0)
		out.Sections = append(out.Sections, record.GridSection{
			Name: s.Name, Cells: g.Cells[k], Cell: s.Length / float64(g.Cells[k]),
			Courant: g.Courant[k], CellsPerWavelength: g.CellsPerWavelength(net, k),
			PhaseErrorDegrees: imag(g.Numerical(net, k).Exponent-exact) * 180 / pi,
		})
	}
	return out
}

func (s *solved) profiles() []record.Profile {
	var out []record.Profile
	for k, w := range s.steady.Sections {
		c, p := s.compared.Sections[k], s.stress.Sections[k]
		out = append(out, record.Profile{
			Section: s.net.Sections[k].Name,
			ZV:      w.ZV, ZI: w.ZI, VF: w.V, IF: w.I,
			VP: c.Voltage.Exact, IP: c.Current.Exact,
			EV: c.Voltage.Allowed, EI: c.Current.Allowed,
			PeakZV: p.ZV, PeakV: p.V, PeakZI: p.ZI, PeakI: p.I,
		})
	}
	return out
}
