package recheck

import (
	"math"

	"linewitness/report/result"
)

// A spread is what a steady state is known to on a section, or in the whole
// network: the larger of the found and the expected difference of the two
// solutions.
type spread struct {
	v, i           float64 // V, A
	largeV, largeI float64 // the largest values, V, A
}

// power is what the product of a voltage and a current may be off, W.
func (s spread) power() float64 { return (s.v*s.largeI + s.i*s.largeV) / 2 }

// relative is the larger of the two parts.
func (s spread) relative() float64 {
	return math.Max(share(s.v, s.largeV), share(s.i, s.largeI))
}

// share is a part of a whole, 0 of nothing.
func share(part, whole float64) float64 {
	if whole == 0 || math.IsNaN(whole) {
		return 0
	}
	return part / whole
}

// spread is that of the section that the value is about, or of the network.
func (at *place) spread() spread {
	sections := at.inCase().Get("agreement", "sections")
	if s := sections.Get(at.section()); s != nil {
		return spreadOf(s)
	}
	return networkSpread(sections)
}

// network is the spread of the whole network.
func (at *place) network() spread { return networkSpread(at.inCase().Get("agreement", "sections")) }

func networkSpread(sections *result.Node) (all spread) {
	if sections == nil {
		return all
	}
	for _, s := range sections.Nodes {
		one := spreadOf(s)
		all.v, all.i = math.Max(all.v, one.v), math.Max(all.i, one.i)
		all.largeV, all.largeI = math.Max(all.largeV, one.largeV), math.Max(all.largeI, one.largeI)
	}
	return all
}

func spreadOf(s *result.Node) spread {
	v, i := number(s, "voltage_scale_v"), number(s, "current_scale_a")
	return spread{
		v: v * (math.Max(number(s, "voltage"), number(s, "voltage_expected")) + rounding), largeV: v,
		i: i * (math.Max(number(s, "current"), number(s, "current_expected")) + rounding), largeI: i,
	}
}

// number is a number of an object, 0 where it has none.
func number(n *result.Node, key string) float64 {
	if v := n.Float(key); !math.IsNaN(v) {
		return v
	}
	return 0
}
