package fdtd

// A descent keeps, of a sequence of errors, the last step at which it was
// above any given level, to within descentStep of the level: a list of steps
// with ever smaller errors.
type descent []struct {
	step  int
	error float64
}

const descentStep = 1e-3

// push takes in the next error. One that is hardly below the last takes over its
// place and leaves it its level: were the level to follow, a slow fall would have
// no step in it at all.
func (d descent) push(step int, e float64) descent {
	n := len(d)
	for n > 0 && d[n-1].error <= e {
		n--
	}
	d = d[:n]
	if n > 0 && d[n-1].error <= e*(1+descentStep) {
		d[n-1].step = step
		return d
	}
	return append(d, struct {
		step  int
		error float64
	}{step, e})
}

// last is the last step at which the error was above level, 0 if none.
func (d descent) last(level float64) int {
	for i := len(d) - 1; i >= 0; i-- {
		if d[i].error > level {
			return d[i].step
		}
	}
	return 0
}
