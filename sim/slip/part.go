package slip

import (
	"slices"

	"linewitness/sim/network"
)

// series is a series combination of the impedance z at omega. Unlike a real
// part it may have a negative resistance.
func series(z complex128, omega float64) network.Series {
	s := network.Series{R: real(z)}
	switch x := imag(z); {
	case x > 0:
		s.L = x / omega
	case x < 0:
		s.C = -1 / (omega * x)
	}
	return s
}

// conjugated is a series combination with the other sign of its reactance.
func conjugated(s network.Series, omega float64) network.Series {
	z := s.Impedance(omega)
	return series(complex(real(z), -imag(z)), omega)
}

// loads are the slips in the sign of a load's reactance: of each and of all.
func (c Catalogue) loads() []Change {
	var out []Change
	var all []int
	for p, part := range c.Net.Parts {
		if part.Kind == network.Load && c.reactive(p) {
			all = append(all, p)
		}
	}
	for _, p := range all {
		place := Slip{ID: LoadSign, Where: "load " + c.Net.Parts[p].Name, Single: len(all) > 1}
		out = append(out, Change{Slip: place, Make: func() *network.Network { return c.opposite([]int{p}) }})
	}
	if len(all) > 1 {
		out = append(out, Change{Slip: Slip{ID: LoadSign, Where: "every load"}, Make: func() *network.Network { return c.opposite(all) }})
	}
	return out
}

// inside reports whether branch b belongs to part p. All branches of a part,
// those inside a combination too, have its name and kind.
func (c Catalogue) inside(b, p int) bool {
	branch, part := c.Net.Branches[b], c.Net.Parts[p]
	return branch.Name == part.Name && branch.Kind == part.Kind
}

func (c Catalogue) reactive(p int) bool {
	for b, branch := range c.Net.Branches {
		if c.inside(b, p) && !branch.Open && imag(branch.Impedance(c.Net.Omega())) != 0 {
			return true
		}
	}
	return false
}

// opposite is the network with the reactances of some parts of the other sign.
func (c Catalogue) opposite(parts []int) *network.Network {
	n := *c.Net
	n.Branches = slices.Clone(n.Branches)
	for _, p := range parts {
		for b := range n.Branches {
			if c.inside(b, p) {
				n.Branches[b].Series = conjugated(n.Branches[b].Series, n.Omega())
			}
		}
	}
	return &n
}

// ends are shorts taken for opens and opens for shorts: exact parts, and ends
// of sections with nothing on them.
func (c Catalogue) ends() []Change {
	var out []Change
	for _, part := range c.Net.Parts {
		if part.B != network.Ground || len(part.Branches) != 1 {
			continue
		}
		b := part.Branches[0]
		branch := c.Net.Branches[b]
		place := Slip{Where: kindName(part.Kind) + " " + part.Name}
		switch {
		case branch.Open:
			place.ID = OpenForShort
		case branch.Ideal() && branch.Ratio == 0:
			place.ID = ShortForOpen
		default:
			continue
		}
		out = append(out, Change{Slip: place, Make: func() *network.Network { return c.exchanged(b) }})
	}
	for j, name := range c.Net.Junctions {
		if c.bare(j) {
			place := Slip{ID: OpenForShort, Where: "junction " + name}
			out = append(out, Change{Slip: place, Make: func() *network.Network { return c.shorted(j) }})
		}
	}
	return out
}

func kindName(k network.Kind) string {
	if k == network.Load {
		return "load"
	}
	return "element"
}

// bare reports whether junction j has one end of a section and nothing else.
func (c Catalogue) bare(j int) bool {
	ends := 0
	for _, s := range c.Net.Sections {
		for _, at := range []int{s.From, s.To} {
			if at == j {
				ends++
			}
		}
	}
	return ends == 1 && j != c.Net.Source.At && len(c.branchesAt(j)) == 0
}

// branchesAt are the branches that end at junction j.
func (c Catalogue) branchesAt(j int) (out []int) {
	for b, br := range c.Net.Branches {
		if br.A == j || br.B == j {
			out = append(out, b)
		}
	}
	return out
}

// exchanged is the network with an open branch shorted or a shorted one open.
func (c Catalogue) exchanged(b int) *network.Network {
	n := *c.Net
	n.Branches = slices.Clone(n.Branches)
	n.Branches[b].Open = !n.Branches[b].Open
	n.Branches[b].Series = network.Series{}
	return &n
}

func (c Catalogue) shorted(j int) *network.Network {
	n := *c.Net
	n.Branches = append(slices.Clone(n.Branches), network.Branch{Name: "short", Kind: network.Element, A: j, B: network.Ground})
	return &n
}
