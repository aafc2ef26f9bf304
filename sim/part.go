package sim

import (
	"fmt"
	"strings"

	"linewitness/sim/design"
	"linewitness/sim/network"
	"linewitness/sim/record"
)

// part echoes a load or an element, and what it was realised as.
func part(net *network.Network, p int, d design.Part) record.ModelPart {
	out := record.ModelPart{Name: d.Name, At: d.At, To: d.To, Given: d.Impedance.Text, Ratio: d.Ratio}
	br := net.Branches[net.Parts[p].Branches[0]]
	switch {
	case d.Impedance.Kind == design.Combination:
		out.As = fmt.Sprintf("combination of %d", leaves(d.Impedance.Tree))
		out.Impedance = treeImpedance(d.Impedance.Tree, net.Omega())
	case d.Ratio != 0:
		out.Given, out.As = d.RatioText, "ideal transformer"
	default:
		out.As = realisedAs(br)
		out.R, out.L, out.C = br.R, br.L, br.C
		out.Impedance = br.Impedance(net.Omega())
		out.Open, out.Short = br.Open, !br.Open && br.Ideal()
	}
	return out
}

// realisedAs names the form of a branch in time.
func realisedAs(br network.Branch) string {
	if br.Open {
		return "exact open"
	}
	if br.Ideal() {
		return "exact short"
	}
	var parts []string
	for _, p := range []struct {
		size float64
		name string
	}{{br.R, "R"}, {br.L, "L"}, {br.C, "C"}} {
		if p.size > 0 {
			parts = append(parts, p.name)
		}
	}
	if len(parts) == 1 {
		return parts[0]
	}
	return "series " + strings.Join(parts, "-")
}

// leaves counts the leaves of a combination.
func leaves(n design.Node) int {
	if len(n.Series)+len(n.Parallel) == 0 {
		return 1
	}
	count := 0
	for _, c := range append(append([]design.Node(nil), n.Series...), n.Parallel...) {
		count += leaves(c)
	}
	return count
}

// treeImpedance is the impedance of a combination, ohm; infinite for a
// parallel resonance without loss.
func treeImpedance(n design.Node, omega float64) complex128 {
	switch {
	case len(n.Parallel) > 0:
		y := complex128(0)
		for _, c := range n.Parallel {
			y += 1 / treeImpedance(c, omega)
		}
		return ratio(1, y)
	case len(n.Series) > 0:
		z := complex128(0)
		for _, c := range n.Series {
			z += treeImpedance(c, omega)
		}
		return z
	}
	return network.Series{R: n.R, L: n.L, C: n.C}.Impedance(omega)
}
