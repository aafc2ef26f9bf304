package sim

import (
	"fmt"
	"slices"

	"linewitness/sim/design"
	"linewitness/sim/network"
)

// Network turns one case of a design into the network that both witnesses
// read. It panics if a name in the design leads nowhere: package design has
// checked them.
func Network(d *design.Design) *network.Network {
	b := &builder{d: d, junction: map[string]int{}, net: &network.Network{
		Frequency: d.Source.Frequency.SI,
		Junctions: slices.Clone(d.Junctions),
		Named:     len(d.Junctions),
	}}
	for j, name := range d.Junctions {
		b.junction[name] = j
	}
	for _, s := range d.Sections {
		b.net.Sections = append(b.net.Sections, network.Section{
			Name: s.Name, From: b.at(s.From), To: b.at(s.To),
			Length: s.Length.SI, Line: s.Base, Dispersion: s.Dispersion,
		})
	}
	for _, p := range d.Loads {
		b.part(p, network.Load)
	}
	for _, p := range d.Elements {
		b.part(p, network.Element)
	}
	b.net.Source = b.source(d.Source)
	return b.net
}

type builder struct {
	d        *design.Design
	net      *network.Network
	junction map[string]int
}

func (b *builder) at(name string) int {
	j, ok := b.junction[name]
	if !ok {
		panic("sim: design names a junction it does not have")
	}
	return j
}

func (b *builder) omega() float64 { return 2 * pi * b.d.Source.Frequency.SI }

// part adds a load or an element and its branches.
func (b *builder) part(p design.Part, kind network.Kind) {
	part := network.Part{Name: p.Name, Kind: kind, A: b.at(p.At), B: network.Ground}
	if p.To != "" {
		part.B = b.at(p.To)
	}
	one := network.Branch{Name: p.Name, Kind: kind, A: part.A, B: part.B}
	switch p.Impedance.Kind {
	case design.Combination:
		part.Branches = b.expand(one, p.Impedance.Tree)
	case design.Transformer:
		one.Ratio = p.Ratio
		part.Branches = b.add(one)
	case design.Open:
		one.Open = true
		part.Branches = b.add(one)
	default:
		one.Series = b.series(p.Impedance, p.At)
		part.Branches = b.add(one)
	}
	b.net.Parts = append(b.net.Parts, part)
}

// add adds a branch and gives its index.
func (b *builder) add(br network.Branch) []int {
	b.net.Branches = append(b.net.Branches, br)
	return []int{len(b.net.Branches) - 1}
}

// expand adds the branches of a combination between the ends of br, with
// junctions of its own where parts meet inside, and gives those that leave A.
func (b *builder) expand(br network.Branch, n design.Node) []int {
	switch {
	case len(n.Parallel) > 0:
		var all []int
		for _, child := range n.Parallel {
			all = append(all, b.expand(br, child)...)
		}
		return all
	case len(n.Series) > 0:
		return b.chain(br, inSeries(n.Series))
	}
	br.Series = network.Series{R: n.R, L: n.L, C: n.C}
	return b.add(br)
}

// chain adds nodes one after the other.
func (b *builder) chain(br network.Branch, nodes []design.Node) []int {
	var first []int
	end := br.B
	for i, n := range nodes {
		br.B = end
		if i < len(nodes)-1 {
			br.B = len(b.net.Junctions)
			b.net.Junctions = append(b.net.Junctions, fmt.Sprintf("%s inside %d", br.Name, br.B))
		}
		in := b.expand(br, n)
		if i == 0 {
			first = in
		}
		br.A = br.B
	}
	return first
}

// inSeries gathers the leaves among nodes in series into one, put first, and
// opens nodes that are series themselves.
func inSeries(nodes []design.Node) []design.Node {
	var leaf design.Node
	elastance, leaves := 0.0, 0
	var rest []design.Node
	var walk func([]design.Node)
	walk = func(nodes []design.Node) {
		for _, n := range nodes {
			switch {
			case len(n.Series) > 0:
				walk(n.Series)
			case len(n.Parallel) > 0:
				rest = append(rest, n)
			default:
				leaves++
				leaf.R += n.R
				leaf.L += n.L
				if n.C > 0 {
					elastance += 1 / n.C
				}
			}
		}
	}
	walk(nodes)
	if leaves == 0 {
		return rest
	}
	if elastance > 0 {
		leaf.C = 1 / elastance
	}
	return append([]design.Node{leaf}, rest...)
}

func (b *builder) source(s design.Source) network.Source {
	out := network.Source{
		At:     b.at(s.At),
		EMF:    s.EMF.SI,
		Series: b.series(s.Impedance, s.At),
		Start:  network.Start{Phase: s.Start.Phase, Worst: s.Start.Worst},
	}
	if s.Start.Ramp {
		out.Start.Rise = s.Start.Rise
	}
	if s.Stop != nil {
		out.Stop = &network.Stop{At: s.Stop.At, Fall: s.Stop.Fall}
	}
	return out
}

// series is what an impedance at a junction is realised as.
func (b *builder) series(z design.Impedance, at string) network.Series {
	switch z.Kind {
	case design.SeriesParts:
		return network.Series{R: z.R, L: z.L, C: z.C}
	case design.Short:
		return network.Series{}
	case design.Complex:
		return Realise(z.Z, b.omega())
	case design.Matched:
		return Realise(b.lineAt(at).Impedance(b.omega()), b.omega())
	default:
		panic(fmt.Sprintf("sim: impedance of kind %d has no series form", z.Kind))
	}
}

// lineAt is the line of the one section that ends at a junction.
func (b *builder) lineAt(name string) interface {
	Impedance(omega float64) complex128
} {
	for _, s := range b.d.Sections {
		if s.From == name || s.To == name {
			return s.Constants
		}
	}
	panic("sim: matched where no section ends")
}

// Realise gives the series combination that has the impedance z, ohm, at the
// angular frequency omega: R and L for a positive reactance, R and C for a
// negative one. The real part must not be negative.
func Realise(z complex128, omega float64) network.Series {
	s := network.Series{R: real(z)}
	switch x := imag(z); {
	case x > 0:
		s.L = x / omega
	case x < 0:
		s.C = -1 / (omega * x)
	}
	return s
}
