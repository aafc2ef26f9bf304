package fdtd

import "linewitness/sim/network"

// A Leg is a section that a path goes along.
type Leg struct {
	Section  int
	Reversed bool // from its To end to its From end
}

// MainPath is the way, along the sections, from the source to the junction that
// is farthest from it in delay. Of every ring it takes no account of the
// shortest section, so that there is one way to each junction. Where a branch
// between two junctions lies on the way, the sections on its two sides follow
// each other. It is empty if no section can be reached.
func MainPath(net *network.Network) []Leg {
	t := newTree(net)
	far, _ := t.farthest(net.Source.At)
	var out []Leg
	for _, k := range t.way(net.Source.At, -1, far) {
		if k.section >= 0 {
			out = append(out, Leg{k.section, net.Sections[k.section].From == k.to})
		}
	}
	return out
}

// way is the edges from a junction to another, not over the junction from; nil
// if there is none.
func (t *tree) way(at, from, to int) []edge {
	for _, e := range t.next[at] {
		if e.to == from {
			continue
		}
		if e.to == to {
			return []edge{e}
		}
		if rest := t.way(e.to, at, to); rest != nil {
			return append([]edge{e}, rest...)
		}
	}
	return nil
}
