package slip

import "linewitness/sim/network"

// source are the slips in the source.
func (c Catalogue) source() []Change {
	of := func(id ID) Slip { return Slip{ID: id, Where: "the source"} }
	out := []Change{
		{Slip: of(EMFForMatched), Gain: 2},
		{Slip: of(MatchedForEMF), Gain: 0.5},
	}
	change := func(id ID, edit func(*network.Source)) {
		out = append(out, Change{Slip: of(id), Make: func() *network.Network {
			n := *c.Net
			edit(&n.Source)
			return &n
		}})
	}
	z := c.Net.Source.Impedance(c.Net.Omega())
	if z != 0 {
		change(SourceForced, func(s *network.Source) { s.EMF, s.Series = s.EMF/2, network.Series{} })
		change(SourceOmitted, func(s *network.Source) { s.Series = network.Series{} })
	}
	if imag(z) != 0 {
		change(SourceSign, func(s *network.Source) { s.Series = conjugated(s.Series, c.Net.Omega()) })
	}
	return out
}
