package sim

import (
	"cmp"
	"math"
	"slices"

	"linewitness/fdtd"
	"linewitness/sim/record"
)

// spaceTime is the map of the voltage along the main path.
func (s *solved) spaceTime() record.SpaceTime {
	m := s.stress.Map
	out := record.SpaceTime{
		Envelope: m.Envelope, Phase: s.phase() * 180 / pi,
		Z: m.Z, T: m.T, V: m.At(s.phase()),
	}
	if len(m.T) == 0 {
		return record.SpaceTime{}
	}
	z := 0.0
	for _, leg := range m.Path {
		sec := s.net.Sections[leg.Section]
		out.Path = append(out.Path, record.PathSection{
			Section: sec.Name, Reversed: leg.Reversed, From: z, To: z + sec.Length,
		})
		z += sec.Length
	}
	out.Fronts = newTour(newFrontView(s.net), m.Path).fronts(m.T[len(m.T)-1])
	return out
}

// A tour is a path along which wave fronts are followed.
type tour struct {
	*frontView
	legs   []fdtd.Leg
	z, at  []float64 // m and s of delay at the nodes, from the source on
	pieces []record.Front
}

func newTour(f *frontView, legs []fdtd.Leg) *tour {
	t := &tour{frontView: f, legs: legs, z: []float64{0}, at: []float64{0}}
	for i, leg := range legs {
		s := f.net.Sections[leg.Section]
		t.z, t.at = append(t.z, t.z[i]+s.Length), append(t.at, t.at[i]+s.Delay())
	}
	return t
}

// mostEchoes is how many junctions the fronts are followed back from: with the
// front that goes out and what the source sends out again, some dozen.
const mostEchoes = 5

// fronts are the first front along the path, what comes back of it from the end
// and from the junctions that reflect most, and what of each the source sends
// along the path again; up to the time until.
func (t *tour) fronts(until float64) []record.Front {
	last := len(t.legs)
	t.follow(0, last, 0, until, 1)
	back := t.echoes()
	for _, e := range back {
		t.follow(e, 0, t.at[e], until, 2)
	}
	if t.mirror(0) > visible {
		for _, e := range back {
			t.follow(0, last, 2*t.at[e], until, 3)
		}
	}
	return t.pieces
}

// visible is the reflection coefficient below which no front is drawn: 2 % of
// the wave is not to be seen on a map.
const visible = 0.02

// echoes are the nodes that reflect visibly, the end first and then those that
// reflect most.
func (t *tour) echoes() []int {
	var out []int
	for node := 1; node < len(t.legs); node++ {
		if t.mirror(node) > visible {
			out = append(out, node)
		}
	}
	slices.SortStableFunc(out, func(a, b int) int { return cmp.Compare(t.mirror(b), t.mirror(a)) })
	if end := len(t.legs); t.mirror(end) > visible {
		out = slices.Insert(out, 0, end)
	}
	return out[:min(mostEchoes, len(out))]
}

// mirror is how much of a front that comes to a node is reflected: from the
// source's side, or at the source from the path. Parts that are something else
// at lower frequencies reflect some of what follows the front, whatever they do
// to the front itself, and count as 1.
func (t *tour) mirror(node int) float64 {
	leg := t.legs[max(0, node-1)]
	j := t.net.Sections[leg.Section].To
	if leg.Reversed != (node == 0) {
		j = t.net.Sections[leg.Section].From
	}
	if t.varying[j] {
		return 1
	}
	return math.Abs(t.reflection(j, leg.Section))
}

// follow adds the way of a front from a node to another, leaving at a time, one
// piece a leg, up to the time until.
func (t *tour) follow(from, to int, leaves, until float64, passage int) {
	way := 1
	if to < from {
		way = -1
	}
	for node := from; node != to; node += way {
		next := node + way
		p := record.Front{
			Z0: t.z[node], T0: leaves + math.Abs(t.at[node]-t.at[from]),
			Z1: t.z[next], T1: leaves + math.Abs(t.at[next]-t.at[from]), Passage: passage,
		}
		if p.T0 >= until {
			return
		}
		if p.T1 > until {
			part := (until - p.T0) / (p.T1 - p.T0)
			p.Z1, p.T1 = p.Z0+part*(p.Z1-p.Z0), until
		}
		t.pieces = append(t.pieces, p)
	}
}
