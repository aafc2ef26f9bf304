package fdtd

// A relaxation steps the rational form of one section: the trapezoidal rule
// on dy/dt = x (u - y) for each of its poles, where u is W (or V) averaged over
// the step. The states hold what each pole adds to the next W (or V), so that
// a cell needs their sum and nothing else:
//
//	j[k] <- p[k] j[k] + b[k] (u0 + u1)
//
// Dead poles fill the arrays where a form has fewer than poles.
type relaxation struct {
	p, b  [poles]float64
	total float64 // sum of r/(1 + x dt/2): the resistance (or conductance) at once, ohm/m or S/m
}

// poles is the number of poles of a form: those of innerPoles and the two ends.
const poles = int(2*poleSpan*polesPerDecade) + 3

// newRelaxation makes the relaxation of a form, or nil for an empty one. The
// scale that turns a share of the field into W (or V), dt/L over 1+r (or dt/C
// over 1+g), depends on total and is put in by finish.
func newRelaxation(f rational, dt float64) *relaxation {
	if len(f.x) == 0 {
		return nil
	}
	r := &relaxation{}
	for k, x := range f.x {
		h := 1 + x*dt/2
		g := f.r[k] / h
		r.total += g
		r.p[k] = 1 - x*dt/h
		r.b[k] = x * dt / h * g / 2
	}
	return r
}

// resistance is total, or 0 of nothing.
func (r *relaxation) resistance() float64 {
	if r == nil {
		return 0
	}
	return r.total
}

func (r *relaxation) finish(scale float64) {
	if r == nil {
		return
	}
	for k := range r.b {
		r.b[k] *= scale
	}
}

// cellsPerBlock is how many cells lie side by side in the arrays of the poles,
// so that one instruction takes the same pole of all of them.
const cellsPerBlock = 4

// An afterglow is the state of a relaxation along a section in one lane.
type afterglow struct {
	j   []float64 // [block][pole][cell of the block]
	sum []float64 // of the poles of each cell
	u   []float64 // of each cell, the field before and after the step added up
}

// newAfterglow makes the state for a number of cells, rounded up to blocks.
func (r *relaxation) newAfterglow(cells int) afterglow {
	if r == nil {
		return afterglow{}
	}
	blocks := (cells + cellsPerBlock - 1) / cellsPerBlock
	return afterglow{
		j:   make([]float64, blocks*poles*cellsPerBlock),
		sum: make([]float64, blocks*cellsPerBlock),
		u:   make([]float64, blocks*cellsPerBlock),
	}
}

// relax takes all poles over the step and adds them up.
func (r *relaxation) relax(g *afterglow) {
	blocks := len(g.sum) / cellsPerBlock
	if len(g.u) != len(g.sum) || len(g.j) != blocks*poles*cellsPerBlock {
		panic("fdtd: afterglow arrays do not match")
	}
	if blocks > 0 {
		relaxBlocks(g, &r.p, &r.b)
	}
}

// relaxSlow is the loop that relaxBlocks stands for.
func relaxSlow(g *afterglow, p, b *[poles]float64) {
	j := g.j
	for i := 0; i < len(g.sum); i += cellsPerBlock {
		u := (*[cellsPerBlock]float64)(g.u[i:])
		var s [cellsPerBlock]float64
		for k := range poles {
			x := (*[cellsPerBlock]float64)(j[k*cellsPerBlock:])
			pk, bk := p[k], b[k]
			x0 := pk*x[0] + bk*u[0]
			x1 := pk*x[1] + bk*u[1]
			x2 := pk*x[2] + bk*u[2]
			x3 := pk*x[3] + bk*u[3]
			x[0], x[1], x[2], x[3] = x0, x1, x2, x3
			s[0] += x0
			s[1] += x1
			s[2] += x2
			s[3] += x3
		}
		*(*[cellsPerBlock]float64)(g.sum[i:]) = s
		j = j[poles*cellsPerBlock:]
	}
}

// advanceCurrents takes w over one step with what its relaxation adds, or none
// if r is nil, and the relaxation with it.
func advanceCurrents(v, w []float64, c *coefs, r *relaxation, g *afterglow) {
	v = v[:len(w)+1]
	if r == nil {
		for i := range w {
			w[i] = c.wa*w[i] - c.wb*(v[i+1]-v[i])
		}
		return
	}
	blocks := len(w) / cellsPerBlock
	if len(g.sum) < len(w) || len(g.j) != len(g.sum)*poles {
		panic("fdtd: afterglow arrays do not match")
	}
	if blocks > 0 {
		currentBlocks(v, w, c, r, g, blocks)
	}
	if done := blocks * cellsPerBlock; done < len(w) {
		rest := afterglow{j: g.j[done*poles:], sum: g.sum[done:], u: g.u[done:]}
		currentsSlow(v[done:], w[done:], c, &rest)
		relaxSlow(&rest, &r.p, &r.b)
	}
}

// currentsSlow is the update of w without the relaxation, which it leaves the
// sums of the field before and after.
func currentsSlow(v, w []float64, c *coefs, g *afterglow) {
	sum, u := g.sum[:len(w)], g.u[:len(w)]
	for i, old := range w {
		now := c.wa*old - c.wb*(v[i+1]-v[i]) + sum[i]
		w[i] = now
		u[i] = old + now
	}
}

// currentBlocksSlow is the loop that currentBlocks stands for: whole blocks of
// cells and their relaxation.
func currentBlocksSlow(v, w []float64, c *coefs, r *relaxation, g *afterglow, blocks int) {
	n := blocks * cellsPerBlock
	whole := afterglow{j: g.j[:n*poles], sum: g.sum[:n], u: g.u[:n]}
	currentsSlow(v[:n+1], w[:n], c, &whole)
	relaxSlow(&whole, &r.p, &r.b)
}

// advanceVoltages takes the inner edges of v over one step. The relaxation
// waits for the two end edges.
func advanceVoltages(v, w []float64, c *coefs, r *relaxation, g *afterglow) {
	if r == nil {
		for i := 1; i < len(w); i++ {
			v[i] = c.va*v[i] - c.vb*(w[i]-w[i-1])
		}
		return
	}
	sum, u := g.sum[:len(w)], g.u[:len(w)]
	for i := 1; i < len(w); i++ {
		old := v[i]
		now := c.va*old - c.vb*(w[i]-w[i-1]) + sum[i]
		v[i] = now
		u[i] = old + now
	}
}
