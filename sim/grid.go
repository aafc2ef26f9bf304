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
	floor    float64 // the part of it that no finer grid mends
}

// gridFloor is the error that is left on a far finer grid: that of the
// rational forms of dispersive lines.
func gridFloor(net *network.Network, g fdtd.Grid, exact *phasor.Solution) (float64, error) {
	fine, err := newGridding(net, g.Refine(6), exact)
	if err != nil {
		return 0, err
	}
	return fine.error, nil
}

// chooseGrid makes a grid with at least cells cells per wavelength whose
// expected error is within a share of the agreement limit, or near the error
// that no grid mends: a resonant network needs far more cells than its wavelength says.
func chooseGrid(ctx context.Context, net *network.Network, cells, agreement float64) (*gridding, error) {
	exact, err := phasor.Solve(net)
	if err != nil {
		return nil, err
	}
	floor := -1.0
	for {
		if err := ctx.Err(); err != nil {
			return nil, err
		}
		g, err := fdtd.NewGrid(net, cells)
		if err != nil {
			return nil, err
		}
		out, err := newGridding(net, g, exact)
		if err != nil {
			return nil, err
		}
		if floor < 0 {
			if floor, err = gridFloor(net, g, exact); err != nil {
				return nil, err
			}
		}
		out.floor = floor
		target := math.Max(expectedShare*agreement, 1.25*floor)
		if out.error <= target || g.StepsPerPeriod > finest {
			return out, nil
		}
		// The error falls as the square of the step; where it is already
		// saturated that guess would jump too far.
		factor := math.Sqrt(out.error / target)
		cells = float64(g.StepsPerPeriod) * math.Min(2, 1.05*factor)
	}
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
