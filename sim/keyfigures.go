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

// keyFigures are the figures of the summary of every case; powered names the
// loads that take up power in any case.
func keyFigures(net *network.Network, powered map[string]bool) []keyFigure {
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
	var loads []keyFigure
	for _, part := range net.Parts {
		if part.Kind == network.Load && powered[part.Name] {
			power := design.Requirement{Quantity: design.LoadPower, Load: part.Name}
			loads = append(loads, keyFigure{"load_power", power.Load, "W", power, f.steady(power)})
		}
	}
	if len(loads) > 0 {
		out = append(out, keyFigure{"efficiency", "all loads", "%", efficiency, f.steady(efficiency)})
	}
	return append(out, loads...)
}

// powered are the names of the loads that power can go into in any of the
// networks: a load that is shorted in one case takes none there, which is a
// figure too, and one that is nothing but a short has none to tell.
func powered(nets ...*network.Network) map[string]bool {
	out := map[string]bool{}
	for _, net := range nets {
		for _, b := range net.Branches {
			if b.Kind == network.Load && !b.Open && b.R > 0 {
				out[b.Name] = true
			}
		}
	}
	return out
}

// keyStudies studies the key figures.
func (s *solved) keyStudies() []studied {
	var out []studied
	whole := cmplx.Abs(ratio(s.exact.junctions[s.net.Source.At], s.exact.source))
	for _, k := range keyFigures(s.net, s.powered) {
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
