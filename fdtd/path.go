package fdtd

import "math"

// departures are the paths in seconds.
func (f *follower) departures() []Departure {
	var out []Departure
	for _, p := range f.paths {
		d := Departure{Error: p.error}
		for _, step := range p.time {
			d.Time = append(d.Time, float64(step)*f.dt)
		}
		out = append(out, d)
	}
	return out
}

// A path is an error against time, thinned so that it never has more than
// pathPoints points.
type path struct {
	every int // steps between points
	since int
	time  []int // steps
	error []float64
}

const pathPoints = 1024

func newPath(period int) path {
	return path{
		every: max(1, period/16), since: math.MaxInt / 2,
		time: make([]int, 0, pathPoints), error: make([]float64, 0, pathPoints),
	}
}

// see keeps every every-th error, and the half of them when there is no room.
func (p *path) see(step int, e float64) {
	if p.since++; p.since < p.every {
		return
	}
	p.since = 0
	if len(p.time) == pathPoints {
		for i := range pathPoints / 2 {
			p.time[i], p.error[i] = p.time[2*i], p.error[2*i]
		}
		p.time, p.error = p.time[:pathPoints/2], p.error[:pathPoints/2]
		p.every *= 2
	}
	p.time, p.error = append(p.time, step), append(p.error, e)
}
