package sim

import (
	"fmt"
	"math"
	"slices"
	"strings"

	"linewitness/sim/network"
	"linewitness/sim/record"
)

// mostArrivals is how many arrivals the bounce table lists: beyond that it is
// read no more.
const mostArrivals = 24

// leastStep is the part of the largest step below which an arrival is left out
// of the table.
const leastStep = 0.005

// bounces is the bounce table of a network whose sections form a chain from the
// source, for a step of the EMF by 1 V.
func bounces(net *network.Network) record.Bounces {
	l, why := newLattice(newFrontView(net))
	if why != "" {
		return record.Bounces{Note: "no bounce table: " + why}
	}
	out := record.Bounces{Coefficients: l.coefficients(), Note: l.note()}
	for i, r := range l.rungs {
		out.Sections = append(out.Sections, record.BounceSection{
			Section: l.section(i).Name, From: net.Junctions[r.from], To: net.Junctions[r.to],
			Z0: 1 / l.admittance(r.section), Delay: r.delay, Kept: r.kept,
		})
	}
	out.Arrivals = worthTelling(l.arrivals(mostEvents, smallestWave))
	return out
}

// worthTelling leaves out the steps that are small beside the largest.
func worthTelling(all []record.Bounce) []record.Bounce {
	top := 0.0
	for _, b := range all {
		top = math.Max(top, math.Abs(b.Step))
	}
	out := slices.DeleteFunc(all, func(b record.Bounce) bool {
		return b.Step == 0 || math.Abs(b.Step) < leastStep*top
	})
	return out[:min(mostArrivals, len(out))]
}

// A lattice is a chain of sections, the rungs, between nodes: rung i lies
// between node i and node i+1, and node 0 is the source's junction.
type lattice struct {
	*frontView
	rungs []rung
}

type rung struct {
	section  int
	from, to int     // junctions, from the source on
	delay    float64 // s
	kept     float64 // of a front at the other end
}

// newLattice finds the chain, or says why there is none.
func newLattice(f *frontView) (l *lattice, why string) {
	at := f.net.Source.At
	for j, s := range f.sections {
		if len(s) > 2 {
			return nil, fmt.Sprintf("the network branches at %s", f.net.Junctions[j])
		}
	}
	switch {
	case f.transformer != "":
		return nil, fmt.Sprintf("%s is a transformer", f.transformer)
	case f.joined != nil:
		return nil, fmt.Sprintf("a part lies between %s and %s", f.net.Junctions[f.joined[0]], f.net.Junctions[f.joined[1]])
	case len(f.sections[at]) != 1:
		return nil, "the source is not at an end of a chain of sections"
	}
	l = &lattice{frontView: f}
	for last := -1; ; {
		next := slices.IndexFunc(f.sections[at], func(k int) bool { return k != last })
		if next < 0 {
			break
		}
		last = f.sections[at][next]
		l.rungs = append(l.rungs, l.rung(last, at))
		at = l.rungs[len(l.rungs)-1].to
	}
	if len(l.rungs) < len(f.net.Sections) {
		return nil, "the sections do not form one chain"
	}
	return l, ""
}

// rung is section k, taken from junction at on.
func (f *frontView) rung(k, at int) rung {
	s := f.net.Sections[k]
	to := s.To
	if at == s.To {
		to = s.From
	}
	return rung{section: k, from: at, to: to, delay: s.Delay(), kept: f.kept(k)}
}

func (l *lattice) section(rung int) network.Section { return l.net.Sections[l.rungs[rung].section] }

// junction is that of a node.
func (l *lattice) junction(node int) int {
	if node == 0 {
		return l.rungs[0].from
	}
	return l.rungs[node-1].to
}

// bounce is the reflection coefficient at a node for what comes from the left,
// the side of the source, or from the right; NaN if nothing comes from there.
func (l *lattice) bounce(node int, fromLeft bool) float64 {
	rung := node
	if fromLeft {
		rung--
	}
	if rung < 0 || rung == len(l.rungs) {
		return math.NaN()
	}
	return l.reflection(l.junction(node), l.rungs[rung].section)
}

func (l *lattice) coefficients() []record.BounceCoefficient {
	var out []record.BounceCoefficient
	for node := range len(l.rungs) + 1 {
		c := record.BounceCoefficient{
			Junction: l.net.Junctions[l.junction(node)],
			FromLeft: l.bounce(node, true), FromRight: l.bounce(node, false),
		}
		// At an end one of the two is NaN, and nothing goes through.
		c.ThroughRight, c.ThroughLeft = 1+c.FromLeft, 1+c.FromRight
		if math.IsNaN(c.FromLeft) || math.IsNaN(c.FromRight) {
			c.ThroughRight, c.ThroughLeft = math.NaN(), math.NaN()
		}
		out = append(out, c)
	}
	return out
}

// note says what the table leaves out.
func (l *lattice) note() string {
	var out []string
	say := func(is bool, text string) {
		if is {
			out = append(out, text)
		}
	}
	var lossy, dispersive, varying bool
	for i, r := range l.rungs {
		s := l.section(i)
		dispersive = dispersive || !s.Dispersion.None()
		lossy = lossy || r.kept < 1
		varying = varying || l.varying[r.from] || l.varying[r.to]
	}
	say(l.launch() == 0, "no step comes onto the line: at its front the source is open, or the line is shorted where it begins")
	say(dispersive, "a loss that grows with frequency rounds a front and leaves it no finite step: what is kept is that of a wave at the source frequency, and a step has come to it about a tenth of a period after its front")
	say(lossy, "behind its front a step on a line with loss still moves")
	say(varying, "an inductance is open to a front and a capacitance a short: the voltage moves on between the steps")
	return strings.Join(out, "; ")
}
