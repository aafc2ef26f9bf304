package sim

import (
	"linewitness/sim/design"
	"linewitness/sim/network"
	"linewitness/sim/record"
)

// part echoes a load or an element, and what it was realised as.
func part(net *network.Network, br network.Branch, p design.Part) record.ModelPart {
	return record.ModelPart{
		Name: p.Name, At: p.At, To: p.To, Given: p.Impedance.Text,
		As: realisedAs(br), R: br.R, L: br.L, C: br.C,
		Impedance: br.Impedance(net.Omega()),
		Open:      br.Open, Short: !br.Open && br.Ideal(),
	}
}

// realisedAs names the form of a branch in time.
func realisedAs(br network.Branch) string {
	if br.Open {
		return "exact open"
	}
	if br.Ideal() {
		return "exact short"
	}
	parts := ""
	for _, p := range []struct {
		there bool
		name  string
	}{{br.R > 0, "R"}, {br.L > 0, "L"}, {br.C > 0, "C"}} {
		if p.there {
			if parts != "" {
				parts += "-"
			}
			parts += p.name
		}
	}
	if len(parts) == 1 {
		return parts
	}
	return "series " + parts
}
