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
		Envelope: m.Envelope, Crests: m.Crests, Phase: s.phase() * 180 / pi,
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

// A tour is a path along which wave fronts are followed, from node to node.
type tour struct {
	*frontView
	legs  []fdtd.Leg
	z, at []float64 // m and s of delay at the nodes, from the source on
}

// A way is that of a front which leaves a node; its step is relative to the
// one that the source launches.
type way struct {
	node  int
	right bool // away from the source
	time  float64
	step  float64
}

func newTour(f *frontView, legs []fdtd.Leg) *tour {
	t := &tour{frontView: f, legs: legs, z: []float64{0}, at: []float64{0}}
	for i, leg := range legs {
		s := f.net.Sections[leg.Section]
		t.z, t.at = append(t.z, t.z[i]+s.Length), append(t.at, t.at[i]+s.Delay())
	}
	return t
}

// The fronts that are drawn: so many passages, so many fronts in each but the
// first, and none of a smaller step than 2 % of the first, which is not to be
// seen on a map.
const (
	passages    = 3
	mostInOne   = 5
	visibleStep = 0.02
)

// fronts are the first front along the path, what comes back of it from the end
// and from the junctions, and what of that is reflected again; up to the time
// until.
func (t *tour) fronts(until float64) []record.Front {
	var out []record.Front
	ways := []way{{right: true, step: 1}}
	for passage := 1; passage <= passages; passage++ {
		var next []way
		for _, w := range ways {
			pieces, echoes := t.follow(w, passage)
			out, next = append(out, pieces...), append(next, echoes...)
		}
		slices.SortStableFunc(next, func(a, b way) int { return cmp.Compare(b.step, a.step) })
		next = slices.DeleteFunc(next, func(w way) bool { return w.step < visibleStep })
		ways = next[:min(mostInOne, len(next))]
	}
	return clip(out, until)
}

// follow gives the way of a front, one piece a leg, and those of its echoes.
func (t *tour) follow(w way, passage int) (pieces []record.Front, echoes []way) {
	for node := w.node; ; {
		leg, next := node, node+1
		if !w.right {
			leg, next = node-1, node-1
		}
		if leg < 0 || leg == len(t.legs) {
			return pieces, echoes
		}
		arrives := w.time + math.Abs(t.at[next]-t.at[node])
		pieces = append(pieces, record.Front{Z0: t.z[node], T0: w.time, Z1: t.z[next], T1: arrives, Passage: passage})
		w.step *= t.kept(t.legs[leg].Section)
		back, on := t.divide(next, leg)
		echoes = append(echoes, way{next, !w.right, arrives, w.step * back})
		node, w.time, w.step = next, arrives, w.step*on
		if w.step < visibleStep {
			return pieces, echoes // behind a short, say
		}
	}
}

// divide is how much of a front that comes to a node along a leg is reflected,
// and how much goes on. Parts that are something else at lower frequencies
// reflect and pass some of what follows the front, whatever they do to the front
// itself, and count as 1.
func (t *tour) divide(node, leg int) (back, on float64) {
	sec := t.net.Sections[t.legs[leg].Section]
	j := sec.To
	if (node == leg) != t.legs[leg].Reversed { // the leg begins here
		j = sec.From
	}
	if t.varying[j] {
		return 1, 1
	}
	g := t.reflection(j, t.legs[leg].Section)
	return math.Abs(g), 1 + g
}

// clip ends the fronts at a time.
func clip(fronts []record.Front, until float64) []record.Front {
	var out []record.Front
	for _, p := range fronts {
		if p.T0 >= until {
			continue
		}
		if p.T1 > until {
			part := (until - p.T0) / (p.T1 - p.T0)
			p.Z1, p.T1 = p.Z0+part*(p.Z1-p.Z0), until
		}
		out = append(out, p)
	}
	return out
}
