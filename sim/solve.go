package sim

import (
	"context"
	"math"

	"golang.org/x/sync/errgroup"

	"linewitness/fdtd"
	"linewitness/phasor"
	"linewitness/sim/agree"
	"linewitness/sim/design"
	"linewitness/sim/network"
)

// A solved case has both witnesses' answers and their comparison, not yet
// judged.
type solved struct {
	name     string
	design   *design.Design
	net      *network.Network
	grid     *gridding
	phasor   *phasor.Solution
	steady   *fdtd.Steady
	stress   *fdtd.Stress
	sharp    *fdtd.Stress // the stress run again with the source's jump as it is, nil if it has none
	second   *fdtd.Stress // the last of these again on another grid, nil if there is none
	compared agree.Result
	exact    *state // of the phasor witness
	found    *state // of the time-domain witness
}

// solve runs both witnesses on a planned case.
func (p *planned) solve(ctx context.Context, progress func(float64)) (*solved, error) {
	set := fdtd.Settings{
		Tolerance:  p.design.Grid.SettleTolerance,
		MaxPeriods: p.design.Grid.MaxPeriods,
		Progress:   progress,
	}
	s := &solved{name: p.name, design: p.design, net: p.net, grid: p.grid, phasor: p.grid.exact}
	var err error
	if s.steady, err = fdtd.Settle(ctx, p.net, p.grid.grid, set); err != nil {
		return nil, err
	}
	// The steady state is off by what is left of the settling. Without a
	// steady state nothing tells when the network is at rest: the run goes on
	// to its cap.
	set.Rest = atRest
	if s.steady.Settling.Settled {
		set.Rest += 3 * s.steady.Settling.Residual
	}
	if err := s.stressRuns(ctx, p.second, set); err != nil {
		return nil, err
	}
	s.compare()
	return s, nil
}

// stressRuns makes the stress run, the one with a jump as it is if the source
// jumps, and the last of these on the second grid, side by side.
func (s *solved) stressRuns(ctx context.Context, second *gridding, set fdtd.Settings) error {
	g, ctx := errgroup.WithContext(ctx)
	run := func(out **fdtd.Stress, steady *fdtd.Steady, sharp bool) {
		set := set
		set.Sharp = sharp
		g.Go(func() (err error) {
			*out, err = fdtd.StressRun(ctx, s.net, steady, set)
			return err
		})
	}
	jumps := s.net.Source.Jumps()
	run(&s.stress, s.steady, false)
	if jumps {
		run(&s.sharp, s.steady, true)
	}
	if second != nil {
		again := *s.steady
		again.Grid = second.grid
		again.Junctions = nil // of that grid, which is known exactly
		for j := range s.net.Junctions {
			again.Junctions = append(again.Junctions, second.discrete.Junction(j))
		}
		run(&s.second, &again, jumps)
	}
	return g.Wait()
}

// atRest is the part of the largest amplitude within which a waveform counts as
// that of the steady state. Peaks come long before.
const atRest = 1e-3

func (s *solved) compare() {
	var samples []agree.Samples
	for _, w := range s.steady.Sections {
		samples = append(samples, agree.Samples{ZV: w.ZV, V: w.V, ZI: w.ZI, I: w.I})
	}
	g, residual := s.grid, s.steady.Settling.Residual
	s.compared = agree.Compare(samples, g.exact, g.discrete, g.waves, residual)
	s.exact = phasorState(s.net, s.phasor)
	s.found = fdtdState(s.net, s.steady)
}

// jumpOrder is the order at which a peak behind a jump is taken to converge. The
// front of a jump is as wide on the grid as the 2/3 power of the cell and its
// ripple does not fall at all, so half of that is taken.
const jumpOrder = 1.0 / 3

// stressed takes a value from the stress runs, with its uncertainty: the
// change from the coarser grid, and what the largest sample may miss of the
// true crest. With two lanes (every start phase) nothing is missed between
// samples but in the envelope, which is far smoother.
func (s *solved) stressed(pick func(*fdtd.Stress) float64) stressed {
	v := pick(s.stress)
	out := stressed{value: v}
	last, order := s.stress, 1.0
	if s.sharp != nil {
		// The truth of an ideal jump lies beyond the run with an edge by as
		// much as the one without, and by what the grids tell of that.
		last, order = s.sharp, jumpOrder
		out.spread = math.Abs(v - pick(last))
	}
	if s.second != nil {
		// What is left of an error that falls with the step as its order says.
		h, h2 := math.Pow(last.Grid.Step, order), math.Pow(s.second.Grid.Step, order)
		out.spread += math.Abs(pick(last)-pick(s.second)) * h / math.Abs(h-h2)
	}
	// The run ends when it is this near to the steady state.
	out.spread += atRest * v
	if !s.stress.Worst {
		out.spread += v * (1 - math.Cos(pi/float64(s.stress.Grid.StepsPerPeriod)))
	}
	return out
}

// finished reports whether the stress runs ended with the network at rest, so
// that no later peak is possible.
func (s *solved) finished() bool {
	for _, r := range []*fdtd.Stress{s.stress, s.sharp, s.second} {
		if r != nil && !r.Complete {
			return false
		}
	}
	return true
}

// stressNote says what is to be known of the peaks of this case.
func (s *solved) stressNote() string {
	switch {
	case !s.finished():
		return "the run ended before the network was at rest"
	case s.second == nil:
		return "one grid only: no uncertainty of the peak but that between samples"
	}
	return ""
}

// cost of the runs, for the plan and the progress.
const (
	settleRate = 6e8 // cell updates per second of a settling run, one core
	stressRate = 2e8 // likewise of a stress run, each lane counted
)
