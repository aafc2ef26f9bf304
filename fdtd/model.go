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
	z        []float64 // sqrt(L/C) of each section, ohm
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
		z := math.Sqrt(s.Line.L / s.Line.C)
		m.z = append(m.z, z)
		r := s.Line.R * g.Step / (2 * s.Line.L)
		gg := s.Line.G * g.Step / (2 * s.Line.C)
		m.coefs = append(m.coefs, newCoefs(g.Courant[k], r, gg))
		// C dx/(2 dt) = 1/(2 z S), and G dx/4 is gg times that.
		store := 1 / (2 * z * g.Courant[k])
		for _, j := range []int{s.From, s.To} {
			stores[j] = true
			add[j] += store * (1 + gg)
			keep[j] += store * (1 - gg)
		}
	}
	branches := m.companions()
	var err error
	m.junction, err = newJunctionSystem(stores, add, keep, branches)
	return m, err
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
		all = append(all, newCompanion(b.Series, b.A, b.B, dt, steps))
	}
	m.source = len(all)
	src := m.net.Source
	return append(all, newCompanion(src.Series, src.At, network.Ground, dt, steps))
}

// A lane is the state of one solution on a model.
type lane struct {
	m    *model
	v, w [][]float64 // of each section
	j    []float64   // junction voltages: at the step, or averaged over the last step where nothing is stored
	mem  []memory    // of each companion
	avg  []float64   // current of each companion averaged over the last step, A
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
	return l
}

// step takes the lane over one step, at whose end the EMF is e1. It does not
// allocate.
func (l *lane) step(e1 float64) {
	for k := range l.v {
		advance(l.v[k], l.w[k], &l.m.coefs[k])
	}
	l.assemble(e1)
	l.m.junction.solve(l.x, l.rhs)
	l.currents(e1)
	copy(l.j, l.x)
	for k := range l.v {
		s := &l.m.net.Sections[k]
		v := l.v[k]
		v[0], v[len(v)-1] = l.j[s.From], l.j[s.To]
	}
	l.e0 = e1
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
		return avg - l.known(c.a) + l.known(c.b)
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
