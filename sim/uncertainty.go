package sim

import (
	"math"
	"slices"

	"linewitness/sim/agree"
	"linewitness/sim/network"
)

// An error budget is how far each phasor of a state may be off: the larger of
// the found and the expected difference of the witnesses on the sections that
// meet there.
type budget struct {
	junctions, branches []float64
	source              float64
	ends                [][2]float64 // V and A of each section
}

func newBudget(net *network.Network, r *agree.Result) *budget {
	return budgetOf(net, r, foundOrExpected)
}

// budgetOf is a budget with errors of a size of one's own, relative to the
// section's largest.
func budgetOf(net *network.Network, r *agree.Result, size errorSize) *budget {
	b := &budget{
		junctions: make([]float64, len(net.Junctions)),
		branches:  make([]float64, len(net.Branches)),
	}
	currents := make([]float64, len(net.Junctions))
	topV, topI := 0.0, 0.0
	for k := range r.Sections {
		s := &r.Sections[k]
		v, i := size(&s.Voltage)*s.Voltage.Scale, size(&s.Current)*s.Current.Scale
		b.ends = append(b.ends, [2]float64{v, i})
		for _, j := range []int{net.Sections[k].From, net.Sections[k].To} {
			b.junctions[j] = math.Max(b.junctions[j], v)
			currents[j] += i // Kirchhoff's law: their errors may add up in a branch
		}
		topV, topI = math.Max(topV, v), math.Max(topI, i)
	}
	for j := range currents { // where no section ends, the worst of all
		if currents[j] == 0 {
			b.junctions[j], currents[j] = topV, topI
		}
	}
	for k, br := range net.Branches {
		b.branches[k] = currents[br.A]
		if br.B != network.Ground {
			b.branches[k] = math.Max(b.branches[k], currents[br.B])
		}
	}
	b.source = currents[net.Source.At]
	return b
}

// largest is the largest budget of the voltages (0) or of the currents (1) of
// all sections.
func (b *budget) largest(kind int) float64 {
	top := 0.0
	for _, e := range b.ends {
		top = math.Max(top, e[kind])
	}
	return top
}

// spread is how far q may be off when every phasor of s is off by its budget:
// the sum over the phasors of the largest change that one of them makes, in
// any of four directions. Errors of the witnesses are not random, so they add
// up and not their squares.
func (b *budget) spread(s *state, q quantity) float64 {
	base := q(s)
	if math.IsInf(base, 0) || math.IsNaN(base) {
		return 0
	}
	sum := 0.0
	probe := func(p *complex128, size float64) {
		was, worst := *p, 0.0
		for _, d := range []complex128{1, -1, 1i, -1i} {
			*p = was + d*complex(size, 0)
			worst = math.Max(worst, math.Abs(q(s)-base))
		}
		*p = was
		sum += worst
	}
	s = s.clone()
	for j := range s.junctions {
		probe(&s.junctions[j], b.junctions[j])
	}
	for k := range s.branches {
		probe(&s.branches[k], b.branches[k])
	}
	probe(&s.source, b.source)
	for k := range s.ends {
		for e := range s.ends[k] {
			probe(&s.ends[k][e].v, b.ends[k][0])
			probe(&s.ends[k][e].i, b.ends[k][1])
		}
		sum += b.extremes(s, q, base, k)
	}
	return sum
}

// extremes is the part of spread that the largest values along section k make.
func (b *budget) extremes(s *state, q quantity, base float64, k int) float64 {
	sum := 0.0
	for i, e := range []*extreme{&s.voltage[k].largest, &s.current[k].largest} {
		was := e.value
		e.value = was + b.ends[k][i]
		sum += math.Abs(q(s) - base)
		e.value = was
	}
	return sum
}

func (s *state) clone() *state {
	c := *s
	c.junctions = slices.Clone(s.junctions)
	c.branches = slices.Clone(s.branches)
	c.ends = slices.Clone(s.ends)
	c.voltage = slices.Clone(s.voltage)
	c.current = slices.Clone(s.current)
	return &c
}
