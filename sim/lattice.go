package sim

import (
	"cmp"
	"math"
	"slices"

	"linewitness/sim/record"
)

// mostEvents and smallestWave end the sum of the waves on a lattice: far more
// arrivals than a table lists, and waves far below what it lists.
const mostEvents, smallestWave = 4096, 1e-9

// A traveller is a wave front on its way to a node.
type traveller struct {
	time     float64
	node     int
	fromLeft bool
	step     float64 // V, as it arrives
}

// compare orders travellers by time, then by where they come to.
func (t traveller) compare(u traveller) int {
	side := func(t traveller) int {
		if t.fromLeft {
			return 0
		}
		return 1
	}
	return cmp.Or(cmp.Compare(t.time, u.time), cmp.Compare(t.node, u.node), cmp.Compare(side(t), side(u)))
}

// A sky holds the travellers in the order of their arrival.
type sky struct {
	all  []traveller
	same float64 // s: closer than that is the same time
}

// add takes a traveller in; it joins one that comes to the same place from the
// same side at the same time, so that their number stays small.
func (s *sky) add(t traveller) {
	i, _ := slices.BinarySearchFunc(s.all, t.time-s.same, func(u traveller, at float64) int { return cmp.Compare(u.time, at) })
	for ; i < len(s.all) && s.all[i].time <= t.time+s.same; i++ {
		if u := &s.all[i]; u.node == t.node && u.fromLeft == t.fromLeft {
			u.step += t.step
			return
		}
	}
	i, _ = slices.BinarySearchFunc(s.all, t, traveller.compare)
	s.all = slices.Insert(s.all, i, t)
}

// sameTime is the part of the delay of the whole chain below which two times
// are one: what differs less does so by rounding.
const sameTime = 1e-9

// arrivals are the arrivals of the fronts at the nodes for an EMF that steps by
// 1 V, in the order of time, at most most of them. Waves below smallest are let
// go.
func (l *lattice) arrivals(most int, smallest float64) []record.Bounce {
	flying := &sky{}
	for _, r := range l.rungs {
		flying.same += sameTime * r.delay
	}
	send := func(from traveller, rightwards bool, step float64) {
		rung, to := from.node, from.node+1
		if !rightwards {
			rung, to = from.node-1, from.node-1
		}
		if rung < 0 || rung == len(l.rungs) {
			return
		}
		r := l.rungs[rung]
		if step *= r.kept; math.Abs(step) >= smallest {
			flying.add(traveller{from.time + r.delay, to, rightwards, step})
		}
	}
	voltage := make([]float64, len(l.rungs)+1)
	var out []record.Bounce
	tell := func(t traveller, section string, step float64) {
		voltage[t.node] += step
		out = append(out, record.Bounce{
			Time: t.time, Junction: l.net.Junctions[l.junction(t.node)], Section: section, Step: step, Voltage: voltage[t.node],
		})
	}
	tell(traveller{}, "", l.launch())
	send(traveller{}, true, l.launch())
	for len(flying.all) > 0 && len(out) < most {
		t := flying.all[0]
		flying.all = flying.all[1:]
		g := l.bounce(t.node, t.fromLeft)
		rung := t.node
		if t.fromLeft {
			rung--
		}
		tell(t, l.section(rung).Name, (1+g)*t.step)
		send(t, !t.fromLeft, g*t.step)
		send(t, t.fromLeft, (1+g)*t.step)
	}
	return out
}
