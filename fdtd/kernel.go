package fdtd

// coefs are the constant factors of the two updates of one section.
type coefs struct {
	va, vb float64 // V[i] <- va V[i] - vb (W[i] - W[i-1])
	wa, wb float64 // W[i] <- wa W[i] - wb (V[i+1] - V[i])
}

// newCoefs gives the factors for Courant number s, r = R dt/(2L) and
// g = G dt/(2C).
func newCoefs(s, r, g float64) coefs {
	return coefs{
		va: (1 - g) / (1 + g), vb: s / (1 + g),
		wa: (1 - r) / (1 + r), wb: s / (1 + r),
	}
}

// onePlusG is 1 + g, from va = (1-g)/(1+g).
func (c *coefs) onePlusG() float64 { return 2 / (1 + c.va) }

// advance takes one section over one step: all of w, and v but for its two
// ends, which belong to the junctions. len(v) is len(w)+1.
//
// It is the loop
//
//	for i := range w { w[i] = wa*w[i] - wb*(v[i+1]-v[i]) }
//	for i := 1; i < len(w); i++ { v[i] = va*v[i] - vb*(w[i]-w[i-1]) }
//
// in a single pass, since v[i] is not needed any more once w[i] is known, and
// unrolled, so that one check of bounds serves four cells.
func advance(v, w []float64, c *coefs) {
	if len(v) != len(w)+1 || len(w) == 0 {
		panic("fdtd: section arrays do not match")
	}
	if c.va == 1 && c.wa == 1 {
		advanceLossless(v, w, c.vb)
		return
	}
	va, vb, wa, wb := c.va, c.vb, c.wa, c.wb
	old := v[1]
	prev := wa*w[0] - wb*(old-v[0])
	w[0] = prev
	i := 1
	for ; i+4 <= len(w); i += 4 {
		x, y := v[i:i+5:i+5], w[i:i+4:i+4]
		v1, v2, v3, v4 := x[1], x[2], x[3], x[4]
		w0 := wa*y[0] - wb*(v1-old)
		w1 := wa*y[1] - wb*(v2-v1)
		w2 := wa*y[2] - wb*(v3-v2)
		w3 := wa*y[3] - wb*(v4-v3)
		x[0] = va*old - vb*(w0-prev)
		x[1] = va*v1 - vb*(w1-w0)
		x[2] = va*v2 - vb*(w2-w1)
		x[3] = va*v3 - vb*(w3-w2)
		y[0], y[1], y[2], y[3] = w0, w1, w2, w3
		prev, old = w3, v4
	}
	for ; i < len(w); i++ {
		next := v[i+1]
		now := wa*w[i] - wb*(next-old)
		w[i] = now
		v[i] = va*old - vb*(now-prev)
		prev, old = now, next
	}
}

// advanceLossless is advance for va = wa = 1 and vb = wb = s.
func advanceLossless(v, w []float64, s float64) {
	old := v[1]
	prev := w[0] - s*(old-v[0])
	w[0] = prev
	i := 1
	for ; i+4 <= len(w); i += 4 {
		x, y := v[i:i+5:i+5], w[i:i+4:i+4]
		v1, v2, v3, v4 := x[1], x[2], x[3], x[4]
		w0 := y[0] - s*(v1-old)
		w1 := y[1] - s*(v2-v1)
		w2 := y[2] - s*(v3-v2)
		w3 := y[3] - s*(v4-v3)
		x[0] = old - s*(w0-prev)
		x[1] = v1 - s*(w1-w0)
		x[2] = v2 - s*(w2-w1)
		x[3] = v3 - s*(w3-w2)
		y[0], y[1], y[2], y[3] = w0, w1, w2, w3
		prev, old = w3, v4
	}
	for ; i < len(w); i++ {
		next := v[i+1]
		now := w[i] - s*(next-old)
		w[i] = now
		v[i] = old - s*(now-prev)
		prev, old = now, next
	}
}
