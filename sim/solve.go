package sim

import (
	"context"
	"fmt"
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
	name    string
	design  *design.Design
	net     *network.Network
	grid    *gridding
	phasor  *phasor.Solution
	plan    *PlanCase
	powered map[string]bool // see planned
	steady  *fdtd.Steady
	coarser []*fdtd.Steady // the settling solution on the other grids of the study, finest first

	coarseGrids ladder // those grids
	stress      *fdtd.Stress
	sharp       *fdtd.Stress // the stress run again with the source's jump as it is, nil if it has none
	second      *fdtd.Stress // the last of these again with half the steps
	compared    agree.Result
	exact       *state   // of the phasor witness
	found       *state   // of the time-domain witness
	levels      []*state // found, and that of the coarser grids

	predicted, limit *state // see view
}

// solve runs both witnesses on a planned case.
func (p *planned) solve(ctx context.Context, progress func(float64)) (*solved, error) {
	set := fdtd.Settings{
		Tolerance:  p.design.Grid.SettleTolerance,
		MaxPeriods: p.design.Grid.MaxPeriods,
		Progress:   progress,
	}
	s := &solved{name: p.name, design: p.design, net: p.net, grid: p.grids[0], phasor: p.grids[0].exact, plan: &p.plan, powered: p.powered}
	var err error
	if s.steady, err = fdtd.Settle(ctx, p.net, s.grid.grid, set); err != nil {
		return nil, err
	}
	g, ctx := errgroup.WithContext(ctx)
	s.stressRuns(ctx, g, p.grids[1], set)
	if p.study && s.steady.Settling.Settled {
		s.studyRuns(ctx, g, p.grids[1:], set)
	}
	if err := g.Wait(); err != nil {
		return nil, err
	}
	s.compare()
	return s, nil
}

// stressRuns makes the stress run, the one with a jump as it is if the source
// jumps, and the last of these on the second grid, side by side.
//
// The steady state that they run to is off by what is left of the settling.
// Without a steady state nothing tells when the network is at rest: the runs go
// on to their cap.
func (s *solved) stressRuns(ctx context.Context, g *errgroup.Group, second *gridding, set fdtd.Settings) {
	set.Rest = atRest
	if s.steady.Settling.Settled {
		set.Rest += 3 * s.steady.Settling.Residual
		set.Phasor = math.Max(resolved, 15*s.steady.Settling.Residual)
	}
	run := func(out **fdtd.Stress, steady *fdtd.Steady, sharp bool) {
		set := set
		set.Sharp, set.Map = sharp, out == &s.stress
		if set.Map { // whose waveforms are shown, and compared: see waveFidelity
			set.Still = latePeriods
		}
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
	run(&s.second, second.steady(s.net), jumps)
}

// resolved is the departure from the final phasors within which the stress run
// goes on, so that times to 0.1 % are known.
const resolved = 0.95e-3

// steady is the steady state on a grid, which is known exactly, as far as a
// stress run asks for it.
func (g *gridding) steady(net *network.Network) *fdtd.Steady {
	out := &fdtd.Steady{Grid: g.grid, Source: g.discrete.Source()}
	for j := range net.Junctions {
		out.Junctions = append(out.Junctions, g.discrete.Junction(j))
	}
	for b := range net.Branches {
		out.Branches = append(out.Branches, g.discrete.Branch(b))
	}
	return out
}

// studyRuns makes the settling solution on the coarser grids, for as long as on
// the finest, so that what is left of the settling is the same on all.
func (s *solved) studyRuns(ctx context.Context, g *errgroup.Group, grids ladder, set fdtd.Settings) {
	set.Exactly = s.steady.Settling.Periods
	s.coarser, s.coarseGrids = make([]*fdtd.Steady, len(grids)), grids
	for i, coarse := range grids {
		g.Go(func() (err error) {
			s.coarser[i], err = fdtd.Settle(ctx, s.net, coarse.grid, set)
			return err
		})
	}
}

// atRest is the part of the largest amplitude within which a waveform counts as
// that of the steady state. Peaks come long before.
const atRest = 1e-3

// compareOn compares the steady state found on a grid with the closed form.
func compareOn(g *gridding, found *fdtd.Steady, residual float64) agree.Result {
	var samples []agree.Samples
	for _, w := range found.Sections {
		samples = append(samples, agree.Samples{ZV: w.ZV, V: w.V, ZI: w.ZI, I: w.I})
	}
	return agree.Compare(samples, g.exact, g.discrete, g.waves, residual)
}

func (s *solved) compare() {
	s.compared = compareOn(s.grid, s.steady, s.steady.Settling.Residual)
	s.exact = phasorState(s.net, s.phasor)
	s.found = fdtdState(s.net, s.steady, s.grid.waves)
	s.levels = []*state{s.found}
	for i, c := range s.coarser {
		s.levels = append(s.levels, fdtdState(s.net, c, s.coarseGrids[i].waves))
	}
	s.views()
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
	// What is left of an error that falls with the step as its order says.
	h, h2 := math.Pow(last.Grid.Step, order), math.Pow(s.second.Grid.Step, order)
	out.spread += math.Abs(pick(last)-pick(s.second)) * h / math.Abs(h-h2)
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
		if r != nil && !r.Complete { // sharp may not be there
			return false
		}
	}
	return true
}

// stressNote says what is to be known of a peak of this case.
func (s *solved) stressNote(pick func(*fdtd.Stress) float64, unit string) string {
	switch {
	case !s.finished():
		return "the run ended before the network was at rest"
	case s.sharp != nil:
		return fmt.Sprintf("the source jumps: %.4g %s with an edge of %.3g ns, %.4g %s with the bare jump and %.4g %s with that on half the steps",
			pick(s.stress), unit, s.stress.Edge*1e9, pick(s.sharp), unit, pick(s.second), unit)
	}
	return ""
}

// cost of the runs, for the plan and the progress.
const (
	settleRate = 6e8 // cell updates per second of a settling run, one core
	stressRate = 2e8 // likewise of a stress run, each lane counted
)
