package fdtd

import (
	"math"
	"slices"
)

// A charter draws up the map of a stress run. All its storage is made in
// advance; when the rows are used up every second one makes room.
type charter struct {
	m        *model
	path     []Leg
	envelope bool
	lanes    int
	places   []place
	bounds   []int       // envelope: the first edge along the path that place i stands for, and the end
	sum      [][]float64 // envelope: of the edges of each leg, the squares of this row
	end      int         // last step of the map
	every    int         // steps of a row
	stride   int         // envelope: steps between samples
	reach    int         // envelope of crests: places to either side, or 0
	rows     int
	data     [][]float64 // of the only or the cosine lane, [row x place]; likewise of the sine lane
}

// A place is an edge of a section.
type place struct {
	section, edge int
	z             float64 // m along the path
}

// newCharter is nil if no map is asked for or there is no path.
func newCharter(m *model, set Settings, lanes int) *charter {
	c := &charter{m: m, lanes: lanes, path: MainPath(m.net)}
	if !set.Map || len(c.path) == 0 {
		return nil
	}
	c.end = mapSteps(m, set.MaxPeriods)
	n := m.grid.StepsPerPeriod
	var last int
	c.every, last = strides(c.end, mapRows-1)
	c.envelope = n < rowsPerPeriod*last
	edges := c.spread()
	kept := lanes
	if c.envelope {
		half := max(1, n/2)
		first, _ := strides((c.end+half-1)/half, mapRows)
		c.every, c.stride = first*half, samplesApart(half)
		// A cell is about a step of delay long, and half a wavelength half a period.
		if lobe := float64(half*len(c.places)) / float64(edges); lobe < placesPerLobe {
			c.reach = int(math.Ceil(lobe / 2))
		}
		for _, leg := range c.path {
			c.sum = append(c.sum, make([]float64, m.grid.Cells[leg.Section]+1))
		}
		kept = 1
	} else {
		c.rows = 1 // at switch-on all is 0
	}
	for range kept {
		c.data = append(c.data, make([]float64, mapRows*len(c.places)))
	}
	return c
}

// leastSamples is how many samples of a half period its mean square is taken
// of: three, evenly spread, give that of a sinusoid exactly, one more is spare.
const leastSamples = 4

// samplesApart is the largest divisor of a half period that leaves leastSamples.
func samplesApart(half int) int {
	for d := half / leastSamples; d > 1; d-- {
		if half%d == 0 {
			return d
		}
	}
	return 1
}

// spread spreads the places over the path, by edges: evenly in delay, about. It
// gives the number of edges.
func (c *charter) spread() (edges int) {
	edges = 1
	for _, leg := range c.path {
		edges += c.m.grid.Cells[leg.Section]
	}
	at := thin(edges, mapPlaces)
	next, begin := 0, 0
	c.along(func(leg, edge, along int, z float64) {
		if next < len(at) && along == at[next] {
			c.places = append(c.places, place{c.path[leg].Section, edge, z})
			c.bounds = append(c.bounds, begin)
			next++
			if next < len(at) {
				begin = (at[next-1] + at[next] + 1) / 2
			}
		}
	})
	c.bounds = append(c.bounds, edges)
	return edges
}

// along calls do for every edge of the path, numbered from the source on. Where
// two legs meet it takes the edge of the first.
func (c *charter) along(do func(leg, edge, along int, z float64)) {
	count, z0 := 0, 0.0
	for k, leg := range c.path {
		n := c.m.grid.Cells[leg.Section]
		l := c.m.net.Sections[leg.Section].Length
		for i := min(1, k); i <= n; i++ {
			edge := i
			if leg.Reversed {
				edge = n - i
			}
			do(k, edge, count, z0+l*float64(i)/float64(n))
			count++
		}
		z0 += l
	}
}

// look takes in the state after step n.
func (c *charter) look(lanes []*lane, n int) {
	switch {
	case c == nil || n > c.end:
	case c.envelope:
		c.add(lanes, n)
	case n%c.every == 0:
		if c.rows == mapRows {
			c.halve()
			if n%c.every != 0 {
				return
			}
		}
		for i, l := range lanes {
			row := c.row(i, c.rows)
			for p, at := range c.places {
				row[p] = l.v[at.section][at.edge]
			}
		}
		c.rows++
	}
}

// row is a row of a lane.
func (c *charter) row(lane, row int) []float64 {
	n := len(c.places)
	return c.data[lane][row*n : (row+1)*n]
}

// halve makes room: of instantaneous rows it drops every second, of mean squares
// it takes the mean of two.
func (c *charter) halve() {
	for i := range c.data {
		for r := range mapRows / 2 {
			to, from, other := c.row(i, r), c.row(i, 2*r), c.row(i, 2*r+1)
			for p := range to {
				to[p] = from[p]
				if c.envelope {
					to[p] = (from[p] + other[p]) / 2
				}
			}
		}
	}
	c.rows = mapRows / 2
	c.every *= 2
}

// add adds the squares of the lanes, and ends a row.
func (c *charter) add(lanes []*lane, n int) {
	if n%c.stride == 0 {
		for k, leg := range c.path {
			for _, l := range lanes {
				sum := c.sum[k]
				for i, v := range l.v[leg.Section][:len(sum)] {
					sum[i] += v * v
				}
			}
		}
	}
	if n%c.every != 0 {
		return
	}
	c.fold()
	if c.rows++; c.rows == mapRows {
		c.halve()
	}
}

// fold makes a row of the sums: amplitudes squared, the largest of the edges
// that each place stands for. The mean square of a sinusoid is half the square
// of its amplitude, that of a cosine and a sine lane together all of it.
func (c *charter) fold() {
	row := c.row(0, c.rows)
	unit := 2 / float64(c.lanes) * float64(c.stride) / float64(c.every)
	clear(row)
	p := 0
	c.along(func(leg, edge, along int, _ float64) {
		for along >= c.bounds[p+1] {
			p++
		}
		row[p] = math.Max(row[p], unit*c.sum[leg][edge])
	})
	for _, sum := range c.sum {
		clear(sum)
	}
}

// chart is the map so far.
func (c *charter) chart() Map {
	if c == nil {
		return Map{}
	}
	out := Map{Path: c.path, Envelope: c.envelope, Crests: c.reach > 0}
	for _, p := range c.places {
		out.Z = append(out.Z, p.z)
	}
	middle := 0.0
	if c.envelope {
		middle = 0.5
	}
	for r := range c.rows {
		out.T = append(out.T, (float64(r)+middle)*float64(c.every)*c.m.grid.Step)
		out.A = append(out.A, c.values(0, r))
		if len(c.data) > 1 {
			out.B = append(out.B, c.values(1, r))
		}
	}
	return out
}

// values are those of a row: roots of the squares, and of crests the largest
// within reach.
func (c *charter) values(lane, r int) []float64 {
	row := c.row(lane, r)
	out := append([]float64(nil), row...)
	if !c.envelope {
		return out
	}
	for p := range out {
		out[p] = math.Sqrt(slices.Max(row[max(0, p-c.reach):min(len(row), p+c.reach+1)]))
	}
	return out
}
