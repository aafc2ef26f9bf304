package reporttest

import (
	"math"
	"math/cmplx"

	"linewitness/sim/record"
)

// study makes up the grid study of a case: what its requirements are about
// first, then key figures, with every behaviour among them.
func study(c *record.Case, opt Options) record.Convergence {
	v := record.Convergence{Grids: []record.StudyGrid{
		{StepsPerPeriod: 192, Cells: 4816, Step: 53.09e-12}, {StepsPerPeriod: 96, Cells: 2408, Step: 106.2e-12}, {StepsPerPeriod: 48, Cells: 1204, Step: 212.4e-12},
	}}
	for _, q := range c.Requirements {
		s := record.Study{ID: q.ID, Quantity: q.Quantity, Subject: q.Subject, Unit: q.Unit, Phasor: q.Value}
		switch q.Quantity {
		case "peak_voltage", "peak_current", "settle_time", "overshoot":
			v.Studies = append(v.Studies, twoGrids(s, q.Uncertainty))
		default:
			v.Studies = append(v.Studies, onGrids(s, len(v.Studies), opt.Error))
		}
	}
	for _, s := range keyStudies(c.Phasor) {
		v.Studies = append(v.Studies, onGrids(s, len(v.Studies), opt.Error))
	}
	if c.Verdict == record.Unsettle {
		v = record.Convergence{Grids: v.Grids[:1], Skipped: "no steady state was reached on the finest grid"}
	}
	return v
}

func keyStudies(p record.Steady) []record.Study {
	var loads, volts, amps float64
	for _, l := range p.Loads {
		loads += l.Power
	}
	for _, s := range p.Sections {
		volts, amps = math.Max(volts, s.VoltageMax.Value), math.Max(amps, s.CurrentMax.Value)
	}
	return []record.Study{
		{Quantity: "source_resistance", Subject: "source", Unit: "ohm", Phasor: real(p.Source.Impedance)},
		{Quantity: "source_reactance", Subject: "source", Unit: "ohm", Phasor: imag(p.Source.Impedance)},
		{Quantity: "voltage", Subject: "source", Unit: "V peak", Phasor: cmplx.Abs(p.Source.V)},
		{Quantity: "source_power", Subject: "source", Unit: "W", Phasor: p.Source.Power},
		{Quantity: "load_power", Subject: "all loads", Unit: "W", Phasor: loads},
		{Quantity: "efficiency", Subject: "loads over source", Unit: "%", Phasor: 100 * loads / p.Source.Power},
		{Quantity: "steady_voltage", Subject: "whole network", Unit: "V peak", Phasor: volts},
		{Quantity: "steady_current", Subject: "whole network", Unit: "A peak", Phasor: amps},
	}
}

// onGrids gives a figure values on three grids whose changes go as the
// behaviour at the k-th place of a cycle does.
func onGrids(s record.Study, k int, size float64) record.Study {
	kinds := []record.Behaviour{
		record.Converging, record.Converging, record.GridFree, record.Converging, record.OffOrder,
		record.Converging, record.Oscillatory, record.Converging, record.Diverging,
	}
	s.Behaviour, s.Order, s.Extrapolated = kinds[k%len(kinds)], math.NaN(), math.NaN()
	d, ratio := s.Phasor*size/3, 4+0.1*math.Sin(float64(3*k))
	switch s.Behaviour {
	case record.OffOrder:
		ratio = 2.3
	case record.Oscillatory:
		ratio = -3
	case record.Diverging:
		ratio = 0.5
	case record.GridFree:
		d = 0
	}
	first := s.Phasor * (1 + size/9)
	s.Values = []float64{first, first + d, first + d + ratio*d}
	s.Factor = 3
	switch s.Behaviour {
	case record.Converging:
		s.Factor = 1.25
		fallthrough
	case record.OffOrder:
		s.Order = math.Log2(ratio)
		s.Extrapolated = first - d/(ratio-1)
		s.GCI = s.Factor * math.Abs(d) / (ratio - 1)
	case record.GridFree:
		s.Factor, s.Extrapolated = 0, first
	default:
		s.GCI = s.Factor * math.Abs(d)
	}
	s.GCIPercent = 100 * s.GCI / math.Abs(first)
	return compared(s, size)
}

// compared adds the comparison with the closed form.
func compared(s record.Study, size float64) record.Study {
	s.Error = s.Values[0] - s.Phasor
	s.Grid = math.Max(s.GCI, math.Abs(s.Phasor)*size/7)
	s.Settling = math.Abs(s.Phasor) * 2.5e-6
	s.Rounding = math.Abs(s.Phasor) * 3e-14
	s.Uncertainty = s.Grid + s.Settling + s.Form + s.Rounding
	s.Explained = math.Abs(s.Error) <= s.Uncertainty
	return s
}

// twoGrids is a figure that only the stress run has.
func twoGrids(s record.Study, u float64) record.Study {
	v, nan := s.Phasor, math.NaN()
	s.Phasor, s.Error, s.Order, s.Extrapolated = nan, nan, nan, nan
	s.Values, s.Behaviour, s.Factor = []float64{v, v - u/3}, record.TwoGrids, 3
	s.GCI, s.GCIPercent, s.Grid, s.Uncertainty, s.Explained = u, 100*u/v, u, u, true
	return s
}
