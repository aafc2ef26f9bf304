package slip

import (
	"math"
	"slices"

	"linewitness/sim/line"
	"linewitness/sim/network"
)

// A Change is a slip in the design as it was calculated.
type Change struct {
	Slip
	// Reflected marks a slip that is made only where a reflection is carried
	// along a line: in a reflection, a VSWR, a return loss or an impedance.
	Reflected bool
	// Gain is the factor of all amplitudes of a slip that changes nothing else,
	// or 0.
	Gain float64
	// Make makes the network that was calculated. It is nil with a Gain.
	Make func() *network.Network
}

// A Catalogue makes the changes of one network.
type Catalogue struct {
	Net    *network.Network
	Quotes [][]Quote // of each section; may be nil
	// Single are the sections, by index, in which slips are made one section at
	// a time.
	Single []int
}

// Changes gives the changes of the catalogue that the network has a place for.
func (c Catalogue) Changes() []Change {
	return slices.Concat(c.lines(), c.source(), c.loads(), c.ends(), c.stubs())
}

// PerSection is how many changes a section is good for by itself.
func (c Catalogue) PerSection() int { return len(lineSlips) + 2*c.quotes() }

// quotes is the largest number of quotes that a section has.
func (c Catalogue) quotes() int {
	most := 0
	for _, q := range c.Quotes {
		most = max(most, len(q))
	}
	return most
}

// lines are the slips in the data of sections: in all, and in each by itself.
func (c Catalogue) lines() []Change {
	every := c.indices()
	var out []Change
	for _, s := range lineSlips {
		for q := range c.variants(s.ID) {
			if len(every) != 1 {
				out = append(out, c.line(s, Slip{ID: s.ID, Where: "every section"}, q, every))
			}
			for _, k := range c.Single {
				place := Slip{ID: s.ID, Where: "section " + c.Net.Sections[k].Name, Single: len(every) > 1}
				out = append(out, c.line(s, place, q, []int{k}))
			}
		}
	}
	return out
}

func (c Catalogue) indices() []int {
	var all []int
	for k := range c.Net.Sections {
		all = append(all, k)
	}
	return all
}

// variants is in how many ways a line slip can be made: one for each quote of
// those about a quoted loss.
func (c Catalogue) variants(id ID) int {
	switch id {
	case LossUnscaled, LossScaledBack, LossScaledLinear:
		return c.quotes()
	}
	return 1
}

func (c Catalogue) line(s lineSlip, place Slip, quote int, sections []int) Change {
	return Change{Slip: place, Reflected: s.reflected, Make: func() *network.Network {
		return c.with(sections, func(k int) wave { return s.of(c.piece(k, quote)) })
	}}
}

// with is the network with other waves on some sections.
func (c Catalogue) with(sections []int, of func(k int) wave) *network.Network {
	n := *c.Net
	n.Sections = slices.Clone(n.Sections)
	for _, k := range sections {
		n.Sections[k] = of(k).section(n.Sections[k], n.Omega())
	}
	return &n
}

func (c Catalogue) piece(k, quote int) piece {
	s := c.Net.Sections[k]
	p := piece{
		wave: waveOf(s, c.Net.Omega()), air: c.Net.Omega() * s.Length / line.C0,
		quoted: math.NaN(), ratio: 1,
	}
	if k < len(c.Quotes) && quote < len(c.Quotes[k]) {
		q := c.Quotes[k][quote]
		p.quoted, p.ratio = q.Attenuation*s.Length, c.Net.Frequency/q.Frequency
	}
	return p
}
