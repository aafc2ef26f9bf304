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

// advance takes one section over one step: all of w, and v but for its two
// ends, which belong to the junctions. len(v) is len(w)+1.
//
// It is the loop
//
//	for i := range w { w[i] = wa*w[i] - wb*(v[i+1]-v[i]) }
//	for i := 1; i < len(w); i++ { v[i] = va*v[i] - vb*(w[i]-w[i-1]) }
//
// in a single pass: v[i] is not needed any more once w[i] is known.
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
	w = w[1:]
	v = v[1 : len(w)+2]
	for i := range w {
		next := v[i+1]
		wi := wa*w[i] - wb*(next-old)
		w[i] = wi
		v[i] = va*old - vb*(wi-prev)
		prev, old = wi, next
	}
}

// advanceLossless is advance for va = wa = 1 and vb = wb = s.
func advanceLossless(v, w []float64, s float64) {
	old := v[1]
	prev := w[0] - s*(old-v[0])
	w[0] = prev
	w = w[1:]
	v = v[1 : len(w)+2]
	for i := range w {
		next := v[i+1]
		wi := w[i] - s*(next-old)
		w[i] = wi
		v[i] = old - s*(wi-prev)
		prev, old = wi, next
	}
}
