package fdtd

import (
	"cmp"
	"math"
	"slices"

	"linewitness/sim/network"
)

// LongestPath is the longest one-way delay between two places of a network
// that can reflect, s: the diameter of the tree of its sections, and the delay
// of every section that closes a loop on top of it. A wave can go round a
// loop, so that sum is safe rather than sharp for rings.
func LongestPath(net *network.Network) float64 {
	t := newTree(net)
	far, _ := t.farthest(net.Source.At)
	_, d := t.farthest(far)
	return d + t.closing
}

// Arrivals is the delay, s, after which a wave front from junction from first
// reaches each junction, on the shortest way; +Inf where none leads. Branches
// between junctions pass it on at once.
func Arrivals(net *network.Network, from int) []float64 {
	out := make([]float64, len(net.Junctions))
	for j := range out {
		out[j] = math.Inf(1)
	}
	out[from] = 0
	// Relaxation to a fixed point: a network has some tens of sections.
	for changed := true; changed; {
		changed = false
		join := func(a, b int, d float64) {
			if out[a]+d < out[b] {
				out[b], changed = out[a]+d, true
			}
			if out[b]+d < out[a] {
				out[a], changed = out[b]+d, true
			}
		}
		for _, s := range net.Sections {
			join(s.From, s.To, s.Delay())
		}
		for _, b := range net.Branches {
			if b.B != network.Ground && !b.Open {
				join(b.A, b.B, 0)
			}
		}
	}
	return out
}

// A tree spans the junctions of a network, longest sections first so that
// what closes a loop is short. Bridging branches join without delay.
type tree struct {
	next    [][]edge
	closing float64 // delay of the sections that close loops
}

type edge struct {
	to      int
	delay   float64
	section int // -1 for a branch
}

func newTree(net *network.Network) *tree {
	t := &tree{next: make([][]edge, len(net.Junctions))}
	sets := network.NewSets(len(net.Junctions))
	join := func(a, b int, d float64, section int) bool {
		if !sets.Join(a, b) {
			return false
		}
		t.next[a] = append(t.next[a], edge{b, d, section})
		t.next[b] = append(t.next[b], edge{a, d, section})
		return true
	}
	order := make([]int, len(net.Sections))
	for k := range order {
		order[k] = k
	}
	slices.SortStableFunc(order, func(a, b int) int {
		return cmp.Compare(net.Sections[b].Delay(), net.Sections[a].Delay())
	})
	for _, k := range order {
		s := net.Sections[k]
		if !join(s.From, s.To, s.Delay(), k) {
			t.closing += s.Delay()
		}
	}
	for _, b := range net.Branches {
		if b.B != network.Ground && !b.Open {
			join(b.A, b.B, 0, -1)
		}
	}
	return t
}

// farthest is the junction farthest from start and its delay.
func (t *tree) farthest(start int) (int, float64) {
	at, best := start, 0.0
	var walk func(j, from int, d float64)
	walk = func(j, from int, d float64) {
		if d > best {
			at, best = j, d
		}
		for _, e := range t.next[j] {
			if e.to != from {
				walk(e.to, j, d+e.delay)
			}
		}
	}
	walk(start, -1, 0)
	return at, best
}

// periods is a time in whole periods, rounded up.
func periods(t, period float64) int { return int(math.Ceil(t/period - 1e-9)) }
