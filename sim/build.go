package sim

import (
	"fmt"

	"linewitness/sim/design"
	"linewitness/sim/network"
)

// Network turns one case of a design into the network that both witnesses
// read. It panics if a name in the design leads nowhere: package design has
// checked them.
func Network(d *design.Design) *network.Network {
	b := builder{d: d, junction: map[string]int{}}
	for j, name := range d.Junctions {
		b.junction[name] = j
	}
	net := &network.Network{
		Frequency: d.Source.Frequency.SI,
		Junctions: d.Junctions,
	}
	for _, s := range d.Sections {
		net.Sections = append(net.Sections, network.Section{
			Name: s.Name, From: b.at(s.From), To: b.at(s.To),
			Length: s.Length.SI, Line: s.Constants,
		})
	}
	for _, p := range d.Loads {
		net.Branches = append(net.Branches, b.branch(p, network.Load))
	}
	for _, p := range d.Elements {
		net.Branches = append(net.Branches, b.branch(p, network.Element))
	}
	net.Source = b.source(d.Source)
	return net
}

type builder struct {
	d        *design.Design
	junction map[string]int
}

func (b builder) at(name string) int {
	j, ok := b.junction[name]
	if !ok {
		panic("sim: design names a junction it does not have")
	}
	return j
}

func (b builder) omega() float64 { return 2 * pi * b.d.Source.Frequency.SI }

func (b builder) branch(p design.Part, kind network.Kind) network.Branch {
	br := network.Branch{Name: p.Name, Kind: kind, A: b.at(p.At), B: network.Ground}
	if p.To != "" {
		br.B = b.at(p.To)
	}
	if p.Impedance.Kind == design.Open {
		br.Open = true
		return br
	}
	br.Series = b.series(p.Impedance, p.At)
	return br
}

func (b builder) source(s design.Source) network.Source {
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
func (b builder) series(z design.Impedance, at string) network.Series {
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
func (b builder) lineAt(name string) interface {
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
