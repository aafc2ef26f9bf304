package sim

import (
	"context"
	"math"

	"linewitness/fdtd"
	"linewitness/phasor"
	"linewitness/sim/agree"
	"linewitness/sim/network"
)

// expectedShare is the part of the agreement limit that the grid's own error
// may take.
const expectedShare = 0.1

// A gridding is a grid with what it must do to the steady state.
type gridding struct {
	grid     fdtd.Grid
	exact    *phasor.Solution
	discrete *phasor.Solution
	waves    []agree.Wave
	error    float64 // expected error of the grid alone
	// limit is the same on a grid so fine that only what no grid mends is left
	// of the error: that of the rational forms of dispersive lines.
	limit *gridding
}

// floor is the part of the error that no grid mends.
func (g *gridding) floor() float64 { return g.limit.error }

// limitSteps is how many times a grid is halved to stand for one without a
// step: its own error is smaller by 4^limitSteps.
const limitSteps = 6

// A ladder is the grids of one case, finest first; each has twice the cells and
// twice the steps of the next, so every Courant number stays what it is.
type ladder []*gridding

// chooseGrids makes a ladder of so many grids. The finest has at least cells
// cells per wavelength, and an expected error within a share of the agreement
// limit, or near the error that no grid mends: a resonant network needs far more
// cells than its wavelength says.
func chooseGrids(ctx context.Context, net *network.Network, rungs int, cells, agreement float64) (ladder, error) {
	exact, err := phasor.Solve(net)
	if err != nil {
		return nil, err
	}
	scale := float64(int(1) << (rungs - 1)) // of the finest against the coarsest
	coarse := cells / scale
	var limit *gridding
	for {
		if err := ctx.Err(); err != nil {
			return nil, err
		}
		base, err := fdtd.NewGrid(net, coarse)
		if err != nil {
			return nil, err
		}
		out, err := newGridding(net, base.Refine(rungs-1), exact)
		if err != nil {
			return nil, err
		}
		if limit == nil {
			if limit, err = newGridding(net, out.grid.Refine(limitSteps), exact); err != nil {
				return nil, err
			}
		}
		out.limit = limit
		target := math.Max(expectedShare*agreement, 1.25*limit.error)
		if out.error <= target || out.grid.StepsPerPeriod > finest {
			return out.down(net, base, rungs)
		}
		// The error falls as the square of the step, but jumps with the
		// Courant numbers of short sections: a good number of steps is not to
		// be leapt over.
		factor := math.Min(2, math.Max(smallStep, 0.7*math.Sqrt(out.error/target)))
		coarse = math.Max(coarse+1, coarse*factor)
	}
}

// smallStep is the least factor by which the number of steps is raised.
const smallStep = 1.05

// down is the ladder below its finest grid, which is base refined.
func (g *gridding) down(net *network.Network, base fdtd.Grid, rungs int) (ladder, error) {
	out := ladder{g}
	for r := rungs - 2; r >= 0; r-- {
		next, err := newGridding(net, base.Refine(r), g.exact)
		if err != nil {
			return nil, err
		}
		out = append(out, next)
	}
	return out, nil
}

// finest is the number of steps per period beyond which the grid is taken as
// it is; the cost bound will have its say.
const finest = 1 << 16

func newGridding(net *network.Network, g fdtd.Grid, exact *phasor.Solution) (*gridding, error) {
	out := &gridding{grid: g, exact: exact}
	for k := range net.Sections {
		n := g.Numerical(net, k)
		out.waves = append(out.waves, agree.Wave(n))
	}
	var err error
	out.discrete, err = phasor.Solve(agree.Equivalent(net, out.waves))
	if err != nil {
		return nil, err
	}
	// A few hundred points find the largest error well enough to choose a
	// grid by; the comparison itself looks at all of them.
	points := make([]agree.Samples, len(net.Sections))
	for k, s := range net.Sections {
		n := min(g.Cells[k], 256)
		for i := 0; i <= n; i++ {
			z := s.Length * float64(i) / float64(n)
			points[k].ZV = append(points[k].ZV, z)
			points[k].ZI = append(points[k].ZI, z)
			points[k].V = append(points[k].V, exact.Voltage(k, z))
			points[k].I = append(points[k].I, exact.Current(k, z))
		}
	}
	out.error = agree.Compare(points, exact, out.discrete, out.waves, 0).Expected
	return out, nil
}
