package fdtd

import (
	"math"

	"linewitness/sim/network"
)

// A model is a network on a grid: all that stays constant through a run.
type model struct {
	net      *network.Network
	grid     Grid
	coefs    []coefs
	series   []*relaxation // of each section, nil without skin effect
	shunt    []*relaxation // of each section, nil without dielectric dispersion
	z        []float64     // sqrt(L/C) of each section, ohm
	store    []float64     // C dx/(2 dt) of each section, S
	junction *junctionSystem
	source   int   // index of the source among the companions
	branch   []int // companion of each branch of the network, -1 if open
}

func newModel(net *network.Network, g Grid) (*model, error) {
	m := &model{net: net, grid: g}
	n := len(net.Junctions)
	stores := make([]bool, n)
	add, keep := make([]float64, n), make([]float64, n)
	for k, s := range net.Sections {
		gg := m.section(k)
		for _, j := range []int{s.From, s.To} {
			stores[j] = true
			add[j] += m.store[k] * (1 + gg)
			keep[j] += m.store[k] * (1 - gg)
		}
	}
	branches := m.companions()
	var err error
	m.junction, err = newJunctionSystem(stores, add, keep, branches)
	return m, err
}

// section adds the constants of section k and returns its g = G dt/(2C), with
// the conductance of the relaxation.
func (m *model) section(k int) (gg float64) {
	s, g := m.net.Sections[k], m.grid
	z := math.Sqrt(s.Line.L / s.Line.C)
	series := newRelaxation(skinForm(s.Dispersion.Skin, m.net.Omega()), g.Step)
	shunt := newRelaxation(debyeForm(s.Dispersion, m.net.Omega()), g.Step)
	r := (s.Line.R + series.resistance()) * g.Step / (2 * s.Line.L)
	gg = (s.Line.G + shunt.resistance()) * g.Step / (2 * s.Line.C)
	series.finish(g.Step / s.Line.L / (1 + r))
	shunt.finish(g.Step / s.Line.C / (1 + gg))
	m.z = append(m.z, z)
	m.series, m.shunt = append(m.series, series), append(m.shunt, shunt)
	m.coefs = append(m.coefs, newCoefs(g.Courant[k], r, gg))
	m.store = append(m.store, 1/(2*z*g.Courant[k])) // C dx/(2 dt)
	return gg
}

// companions makes the companion forms of all closed branches and, last, of
// the source. The source current out of the source is minus that of its
// companion.
func (m *model) companions() []companion {
	var all []companion
	dt, steps := m.grid.Step, m.grid.StepsPerPeriod
	for _, b := range m.net.Branches {
		if b.Open {
			m.branch = append(m.branch, -1)
			continue
		}
		m.branch = append(m.branch, len(all))
		c := newCompanion(b.Series, b.A, b.B, dt, steps)
		c.turns = b.Turns()
		all = append(all, c)
	}
	m.source = len(all)
	src := m.net.Source
	return append(all, newCompanion(src.Series, src.At, network.Ground, dt, steps))
}

// A lane is the state of one solution on a model.
type lane struct {
	m    *model
	v, w [][]float64  // of each section
	gw   []afterglow  // of each section\'s centres
	gv   []afterglow  // of its edges, the ends included
	end  [][2]float64 // currents at the two ends of each section, averaged over the last step, A
	j    []float64    // junction voltages: at the step, or averaged over the last step where nothing is stored
	mem  []memory     // of each companion
	avg  []float64    // current of each companion averaged over the last step, A
	x    []float64
	rhs  []float64
	e0   float64 // EMF at the step, V
}

func (m *model) newLane() *lane {
	l := &lane{
		m:   m,
		j:   make([]float64, len(m.net.Junctions)),
		mem: make([]memory, len(m.junction.branches)),
		avg: make([]float64, len(m.junction.branches)),
		x:   make([]float64, m.junction.unknowns),
		rhs: make([]float64, m.junction.unknowns),
	}
	cells := m.grid.TotalCells()
	back := make([]float64, 2*cells+len(m.net.Sections))
	for _, n := range m.grid.Cells {
		l.v, back = append(l.v, back[:n+1:n+1]), back[n+1:]
		l.w, back = append(l.w, back[:n:n]), back[n:]
	}
	for k, n := range m.grid.Cells {
		l.gw = append(l.gw, m.series[k].newAfterglow(n))
		l.gv = append(l.gv, m.shunt[k].newAfterglow(n+1))
	}
	l.end = make([][2]float64, len(m.net.Sections))
	return l
}

// step takes the lane over one step, at whose end the EMF is e1. It does not
// allocate.
func (l *lane) step(e1 float64) {
	m := l.m
	for k := range l.v {
		if m.series[k] == nil && m.shunt[k] == nil {
			advance(l.v[k], l.w[k], &m.coefs[k])
			continue
		}
		advanceCurrents(l.v[k], l.w[k], &m.coefs[k], m.series[k], &l.gw[k])
		advanceVoltages(l.v[k], l.w[k], &m.coefs[k], m.shunt[k], &l.gv[k])
	}
	l.assemble(e1)
	m.junction.solve(l.x, l.rhs)
	l.currents(e1)
	copy(l.j, l.x)
	for k := range l.v {
		s := &m.net.Sections[k]
		l.ends(k, l.j[s.From], l.j[s.To])
	}
	l.e0 = e1
}

// ends sets the voltages of the two end edges of section k, relaxes its edges
// and works out the currents at its ends: those of the end cells and of the half
// cells beyond them.
func (l *lane) ends(k int, from, to float64) {
	v, w, m := l.v[k], l.w[k], l.m
	last := len(v) - 1
	held := m.store[k] * m.coefs[k].onePlusG()
	lost := held * m.coefs[k].va
	l.end[k] = [2]float64{
		w[0]/m.z[k] + held*from - lost*v[0],
		w[last-1]/m.z[k] - held*to + lost*v[last],
	}
	if r := m.shunt[k]; r != nil {
		g := &l.gv[k]
		l.end[k][0] -= m.relaxed(k) * g.sum[0]
		l.end[k][1] += m.relaxed(k) * g.sum[last]
		g.u[0], g.u[last] = v[0]+from, v[last]+to
		r.relax(g)
	}
	v[0], v[last] = from, to
}

// assemble fills the right-hand side of the junction system.
func (l *lane) assemble(e1 float64) {
	js := l.m.junction
	clear(l.rhs)
	for j, g := range js.keep {
		l.rhs[j] = g * l.j[j] // keep is 0 where nothing is stored
	}
	for k := range l.w {
		s, w := &l.m.net.Sections[k], l.w[k]
		l.rhs[s.From] -= w[0] / l.m.z[k]
		l.rhs[s.To] += w[len(w)-1] / l.m.z[k]
		if l.m.shunt[k] != nil { // the half cells relax too
			l.rhs[s.From] += l.m.relaxed(k) * l.gv[k].sum[0]
			l.rhs[s.To] += l.m.relaxed(k) * l.gv[k].sum[len(w)]
		}
	}
	for b := range js.branches {
		c := &js.branches[b]
		e := l.emf(b, e1)
		if c.ideal {
			l.rhs[c.slot] = l.constraint(c, e, b, e1)
			continue
		}
		i := c.y * (l.known(c.a) - l.known(c.b) - e - c.history(&l.mem[b]))
		l.rhs[c.a] -= i
		if c.b != network.Ground {
			l.rhs[c.b] += i
		}
	}
}

// relaxed turns the sum of the poles of an end edge of section k, in volts of a
// full update, into the current of its half cell, A: C dx/(2 dt) (1 + g).
func (m *model) relaxed(k int) float64 {
	return m.store[k] * m.coefs[k].onePlusG()
}

// emf is the EMF of branch b averaged over the step; only the source has one.
func (l *lane) emf(b int, e1 float64) float64 {
	if b == l.m.source {
		return (l.e0 + e1) / 2
	}
	return 0
}

// constraint is the right-hand side for an ideal branch.
func (l *lane) constraint(c *companion, avg float64, b int, e1 float64) float64 {
	if l.m.junction.onAverage(*c) {
		return avg - c.turns*l.known(c.a) + l.known(c.b)
	}
	if b == l.m.source {
		return e1
	}
	return 0
}

// known is the part of the average voltage of a junction that is known before
// the step: half the old voltage where it is stored.
func (l *lane) known(j int) float64 {
	if j == network.Ground || !l.m.junction.stores[j] {
		return 0
	}
	return l.j[j] / 2
}

// currents works out the average branch currents and takes the branches over
// the step. It needs the old junction voltages, still in l.j.
func (l *lane) currents(e1 float64) {
	js := l.m.junction
	for b := range js.branches {
		c := &js.branches[b]
		if c.ideal {
			l.avg[b] = l.x[c.slot]
			continue
		}
		v := js.average(c.a, l.x, l.j) - js.average(c.b, l.x, l.j)
		i := c.y * (v - l.emf(b, e1) - c.history(&l.mem[b]))
		c.advance(&l.mem[b], i)
		l.avg[b] = i
	}
}
