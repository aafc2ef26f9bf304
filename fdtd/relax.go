package fdtd

// A relaxation steps the rational form of one section: the trapezoidal rule
// on dy/dt = x (u - y) for each of its poles, where u is W (or V) averaged over
// the step. The states hold what each pole adds to the next W (or V), so that
// a cell needs their sum and nothing else:
//
//	j[k] <- p[k] j[k] + b[k] (u0 + u1)
//
// The arrays are padded with dead poles to a multiple of poleBlock.
type relaxation struct {
	p, b  []float64
	total float64 // sum of r/(1 + x dt/2): the resistance (or conductance) at once, ohm/m or S/m
}

// poleBlock is how many poles a pass of the kernel takes at once, each into a
// sum of its own so that they do not wait for each other.
const poleBlock = 3

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
		r.p = append(r.p, 1-x*dt/h)
		r.b = append(r.b, x*dt/h*g/2)
	}
	for len(r.p)%poleBlock != 0 {
		r.p, r.b = append(r.p, 0), append(r.b, 0)
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

// An afterglow is the state of a relaxation along a section in one lane: the
// poles of a cell side by side, and their sum.
type afterglow struct{ j, sum []float64 }

func (r *relaxation) newAfterglow(cells int) afterglow {
	if r == nil {
		return afterglow{}
	}
	return afterglow{j: make([]float64, cells*len(r.p)), sum: make([]float64, cells)}
}

// push takes the poles of one cell over a step with u = u0 + u1 and returns
// their new sum.
func (r *relaxation) push(j []float64, u float64) float64 {
	p, b := r.p[:len(j)], r.b[:len(j)]
	var s0, s1, s2 float64
	for k := 0; k+poleBlock <= len(j); k += poleBlock {
		x, y, z := j[k:k+3:k+3], p[k:k+3:k+3], b[k:k+3:k+3]
		x0 := y[0]*x[0] + z[0]*u
		x1 := y[1]*x[1] + z[1]*u
		x2 := y[2]*x[2] + z[2]*u
		x[0], x[1], x[2] = x0, x1, x2
		s0 += x0
		s1 += x1
		s2 += x2
	}
	return s0 + s1 + s2
}

// advanceDispersive is advance with the relaxation of the series impedance, of
// the shunt admittance, or of both; a nil one is not there.
func advanceDispersive(v, w []float64, c *coefs, series *relaxation, sw afterglow, shunt *relaxation, sv afterglow) {
	if len(v) != len(w)+1 || len(w) == 0 {
		panic("fdtd: section arrays do not match")
	}
	if series == nil {
		for i := range w {
			w[i] = c.wa*w[i] - c.wb*(v[i+1]-v[i])
		}
	} else {
		n := len(series.p)
		sum, j := sw.sum[:len(w)], sw.j
		for i, old := range w {
			now := c.wa*old - c.wb*(v[i+1]-v[i]) + sum[i]
			w[i] = now
			sum[i] = series.push(j[:n:n], old+now)
			j = j[n:]
		}
	}
	if shunt == nil {
		for i := 1; i < len(w); i++ {
			v[i] = c.va*v[i] - c.vb*(w[i]-w[i-1])
		}
		return
	}
	n := len(shunt.p)
	sum, j := sv.sum[:len(w)], sv.j[n:]
	for i := 1; i < len(w); i++ {
		old := v[i]
		now := c.va*old - c.vb*(w[i]-w[i-1]) + sum[i]
		v[i] = now
		sum[i] = shunt.push(j[:n:n], old+now)
		j = j[n:]
	}
}
