package sim

import (
	"math"
	"math/cmplx"
	"slices"

	"linewitness/sim/network"
)

// An error budget is how far each phasor of a state may be off.
type budget struct {
	junctions, branches []float64
	source              float64
	ends                [][2]offset // of each section, its From end first
	crests              []offset    // of the largest voltage and current along each section
}

// An offset is a size of errors, V and A.
type offset struct{ v, i float64 }

// rounding is the relative error that arithmetic may leave in a phasor of the
// time-domain run: as of package agree.
const rounding = 1e-11

// likely is how far each phasor may be off: by what the witnesses are found to
// be apart there, or by what the grid must do to it and the settling leaves,
// whichever is larger. The place counts: at the far end of a line of much loss
// an error that is small against the largest voltage would be all there is.
func (s *solved) likely() *budget {
	b := s.budget(s.steady.Settling.Residual + rounding)
	raise := func(left *float64, exact, found, grid complex128) {
		*left = math.Max(cmplx.Abs(found-exact), *left+cmplx.Abs(grid-exact))
	}
	raiseSize := func(left *float64, exact, found, grid extreme) {
		raise(left, complex(exact.value, 0), complex(found.value, 0), complex(grid.value, 0))
	}
	exact, found, grid := s.exact, s.found, s.predicted
	for j := range b.junctions {
		raise(&b.junctions[j], exact.junctions[j], found.junctions[j], grid.junctions[j])
	}
	for k := range b.branches {
		raise(&b.branches[k], exact.branches[k], found.branches[k], grid.branches[k])
	}
	raise(&b.source, exact.source, found.source, grid.source)
	for k := range b.ends {
		for e := range b.ends[k] {
			x, f, g := exact.ends[k][e], found.ends[k][e], grid.ends[k][e]
			raise(&b.ends[k][e].v, x.v, f.v, g.v)
			raise(&b.ends[k][e].i, x.i, f.i, g.i)
		}
		raiseSize(&b.crests[k].v, exact.voltage[k].largest, found.voltage[k].largest, grid.voltage[k].largest)
		raiseSize(&b.crests[k].i, exact.current[k].largest, found.current[k].largest, grid.current[k].largest)
	}
	return b
}

// budget is one of errors of the same size e everywhere, relative to the
// largest of their kind, as the residual of a settling run is: on a section to
// the largest there, at a junction without a section to that of all junctions,
// in a branch to that of all branches.
func (s *solved) budget(e float64) *budget {
	net := s.net
	b := &budget{junctions: make([]float64, len(net.Junctions)), branches: make([]float64, len(net.Branches))}
	currents := make([]float64, len(net.Junctions))
	var top offset
	for k := range s.compared.Sections {
		c := &s.compared.Sections[k]
		o := offset{e * c.Voltage.Scale, e * c.Current.Scale}
		b.ends, b.crests = append(b.ends, [2]offset{o, o}), append(b.crests, o)
		for _, j := range []int{net.Sections[k].From, net.Sections[k].To} {
			b.junctions[j] = math.Max(b.junctions[j], o.v)
			currents[j] += o.i // Kirchhoff's law: their errors may add up in a branch
		}
		top.v, top.i = math.Max(top.v, o.v), math.Max(top.i, o.i)
	}
	top.v = math.Max(top.v, e*largestOf(s.exact.junctions))
	for j := range currents { // where no section ends, the worst of all
		if currents[j] == 0 {
			b.junctions[j], currents[j] = top.v, top.i
		}
	}
	lumped := e * math.Max(largestOf(s.exact.branches), cmplx.Abs(s.exact.source))
	for k, br := range net.Branches {
		b.branches[k] = b.within(br.Series, br.A, br.B, lumped, net.Omega())
		if br.Ratio != 0 { // tied to two junctions, by no impedance
			b.branches[k] = lumped
		}
		b.branches[k] = math.Max(b.branches[k], currents[br.A])
		if br.B != network.Ground {
			b.branches[k] = math.Max(b.branches[k], currents[br.B])
		}
	}
	b.source = b.within(net.Source.Series, net.Source.At, network.Ground, lumped, net.Omega())
	b.source = math.Max(b.source, currents[net.Source.At])
	return b
}

// within is how far the current of a series part between two junctions may be
// off: by that of all branches, or by what its voltage is off over its impedance.
// What is left of a start rings at another frequency than that of the source,
// where a reactance is another, and that of a resonant circuit is anything.
func (b *budget) within(part network.Series, from, to int, all, omega float64) float64 {
	v := b.junctions[from]
	if to != network.Ground {
		v += b.junctions[to]
	}
	const other = 2 // how much less a reactance may be there
	switch {
	case part.Ideal(), part.L > 0 && part.C > 0:
		return all
	case part.L > 0, part.C > 0:
		v *= other
	}
	return math.Min(all, v/cmplx.Abs(part.Impedance(omega)))
}

func largestOf(p []complex128) float64 {
	top := 0.0
	for _, v := range p {
		top = math.Max(top, cmplx.Abs(v))
	}
	return top
}

// largest is the largest budget of all voltages, and of all currents.
func (b *budget) largest() offset {
	top := offset{slices.Max(b.junctions), b.source}
	for _, i := range b.branches {
		top.i = math.Max(top.i, i)
	}
	for _, c := range b.crests {
		top.v, top.i = math.Max(top.v, c.v), math.Max(top.i, c.i)
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
			probe(&s.ends[k][e].v, b.ends[k][e].v)
			probe(&s.ends[k][e].i, b.ends[k][e].i)
		}
		sum += b.extremes(s, q, base, k)
	}
	return sum
}

// extremes is the part of spread that the largest values along section k make.
func (b *budget) extremes(s *state, q quantity, base float64, k int) float64 {
	sum := 0.0
	move := func(e *extreme, size float64) {
		was := e.value
		e.value = was + size
		sum += math.Abs(q(s) - base)
		e.value = was
	}
	move(&s.voltage[k].largest, b.crests[k].v)
	move(&s.current[k].largest, b.crests[k].i)
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
