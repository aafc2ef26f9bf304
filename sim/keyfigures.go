package sim

import (
	"math"
	"math/cmplx"

	"linewitness/sim/design"
	"linewitness/sim/network"
)

// A keyFigure is a figure of the summary.
type keyFigure struct {
	name, subject, unit string
	of                  design.Requirement // as if it were required, for its spread
	quantity            quantity
}

// keyFigures are the figures of the summary of every case.
func keyFigures(net *network.Network) []keyFigure {
	f := finder{net}
	at := net.Source.At
	seen := func(s *state) complex128 { return ratio(s.junctions[at], s.source) }
	voltage := design.Requirement{Quantity: design.SteadyVoltage}
	current := design.Requirement{Quantity: design.SteadyCurrent}
	efficiency := design.Requirement{Quantity: design.Efficiency}
	none := design.Requirement{At: net.Junctions[at]}
	out := []keyFigure{
		{"source_resistance", "seen by the source", "ohm", none, func(s *state) float64 { return real(seen(s)) }},
		{"source_reactance", "seen by the source", "ohm", none, func(s *state) float64 { return imag(seen(s)) }},
		{"voltage", "source", "V peak", none, func(s *state) float64 { return cmplx.Abs(s.junctions[at]) }},
		{"current", "source", "A peak", none, func(s *state) float64 { return cmplx.Abs(s.source) }},
		{"source_power", "source", "W", none, (*state).sourcePower},
		{"steady_voltage", "whole network", "V peak", voltage, f.steady(voltage)},
		{"steady_current", "whole network", "A peak", current, f.steady(current)},
	}
	if loads := loadsOf(net); len(loads) > 0 {
		out = append(out, keyFigure{"efficiency", "all loads", "%", efficiency, f.steady(efficiency)})
		for _, p := range loads {
			power := design.Requirement{Quantity: design.LoadPower, Load: net.Parts[p].Name}
			out = append(out, keyFigure{"load_power", power.Load, "W", power, f.steady(power)})
		}
	}
	return out
}

// loadsOf are the loads that power can go into: not the open, nor those without
// a resistance.
func loadsOf(net *network.Network) []int {
	var out []int
	for p, part := range net.Parts {
		if part.Kind != network.Load {
			continue
		}
		for _, b := range net.Branches {
			if b.Name == part.Name && b.Kind == part.Kind && !b.Open && b.R > 0 {
				out = append(out, p)
				break
			}
		}
	}
	return out
}

// keyStudies studies the key figures.
func (s *solved) keyStudies() []studied {
	var out []studied
	whole := cmplx.Abs(ratio(s.exact.junctions[s.net.Source.At], s.exact.source))
	for _, k := range keyFigures(s.net) {
		f := studied{
			quantity: k.name, subject: k.subject, scale: scaleFor(k.unit), figure: s.measure(k.of, k.quantity),
		}
		if k.unit == "ohm" && !math.IsInf(whole, 0) { // a part of one impedance
			f.whole = whole
		}
		out = append(out, f)
	}
	return out
}
