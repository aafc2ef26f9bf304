package sim

import (
	"context"
	"fmt"
	"math"

	"linewitness/fdtd"
	"linewitness/phasor"
	"linewitness/sim/design"
	"linewitness/sim/network"
)

// A planned case is ready to be solved.
type planned struct {
	name    string
	design  *design.Design
	net     *network.Network
	grids   ladder          // finest first
	powered map[string]bool // names of the loads that take up power in any case
	study   bool            // the settling solution runs on all of them, not only on the first
	plan    PlanCase
}

// Nominal is the name of the design as it stands, beside its cases.
const Nominal = "nominal"

// DefaultGrids is the number of grids of the convergence study.
const DefaultGrids = 3

// planAll plans the nominal design and every case, for the convergence study on
// so many grids.
func planAll(ctx context.Context, f *design.File, grids int) ([]*planned, error) {
	all := []*planned{}
	for _, c := range append([]design.Case{{Name: Nominal, Design: f.Nominal}}, f.Cases...) {
		if err := ctx.Err(); err != nil {
			return nil, err
		}
		p, err := newPlanned(ctx, c.Name, c.Design, grids)
		if err != nil {
			return nil, fmt.Errorf("case %s: %w", c.Name, err)
		}
		all = append(all, p)
	}
	var nets []*network.Network
	for _, p := range all {
		nets = append(nets, p.net)
	}
	for _, p := range all {
		p.powered = powered(nets...)
	}
	return all, nil
}

func newPlanned(ctx context.Context, name string, d *design.Design, grids int) (*planned, error) {
	p := &planned{name: name, design: d, net: Network(d), study: grids > 1}
	p.powered = powered(p.net)
	// The stress run needs a second grid in any case.
	var err error
	if p.grids, err = chooseGrids(ctx, p.net, max(2, grids), d.Grid.CellsPerWavelength, d.Grid.Agreement); err != nil {
		return nil, err
	}
	p.predict()
	return p, nil
}

// predict fills the plan: how long the runs will be and what they will cost.
func (p *planned) predict() {
	g, path := p.grids[0].grid, fdtd.LongestPath(p.net)
	rate := phasor.Decay(p.net)
	p.plan = PlanCase{
		Name:          p.name,
		Grid:          gridRecord(p.net, g),
		Cells:         g.TotalCells(),
		LongPath:      path,
		Rate:          rate,
		LoopFactor:    math.Exp(-rate * 2 * path),
		ExpectedError: p.grids[0].error,
	}
	for i, g := range p.grids {
		if i == 0 || p.study {
			p.plan.Grids = append(p.plan.Grids, g.grid.StepsPerPeriod)
		}
	}
	limit := p.design.Grid.MaxPeriods
	p.plan.SettlePeriods = min(limit, settlePeriods(p.net, p.design.Grid.SettleTolerance, rate, path))
	p.plan.StressPeriods = min(limit, p.stressPeriods(rate, path))
	if p.plan.SettlePeriods == limit {
		p.plan.Warnings = append(p.plan.Warnings, fmt.Sprintf(
			"the settling run is predicted to reach its cap of %d periods: it may end as not settled", limit))
	}
	if floor := p.grids[0].floor(); floor > p.design.Grid.Agreement {
		p.plan.Warnings = append(p.plan.Warnings, fmt.Sprintf(
			"the rational form of the dispersive lines alone makes a difference of %.2g %%, above the agreement limit: no grid mends that", 100*floor))
	}
	p.outlast(limit)
	p.cramped()
	lanes := 1.0
	if p.net.Source.Start.Worst {
		lanes = 2
	}
	settle := g.Updates(p.plan.SettlePeriods)
	stress := g.Updates(p.plan.StressPeriods) * lanes
	if p.net.Source.Jumps() {
		stress *= 2
	}
	stress += p.grids[1].grid.Updates(p.plan.StressPeriods) * lanes
	if p.study {
		for _, coarse := range p.grids[1:] {
			settle += coarse.grid.Updates(p.plan.SettlePeriods)
		}
	}
	p.plan.Grid.Updates = settle + stress
	p.plan.Seconds = (settle/settleRate + stress/stressRate) * p.slowdown()
	p.plan.Bytes = p.bytes(lanes)
}

// cramped warns of a section that is so short that it alone makes the grid fine.
func (p *planned) cramped() {
	asked := p.design.Grid.CellsPerWavelength
	for k, n := range p.grids[len(p.grids)-1].grid.Cells {
		if steps := p.grids[0].grid.StepsPerPeriod; n == 1 && float64(steps) > crampedSteps*asked {
			p.plan.Warnings = append(p.plan.Warnings, fmt.Sprintf(
				"section %s is so short that it takes %d steps a period to divide it; leave it out if it does not matter, or study fewer grids (--grids 1)",
				p.net.Sections[k].Name, steps))
			return
		}
	}
}

// crampedSteps is how many times more steps than asked for a short section may
// cost before it is told.
const crampedSteps = 8

// outlast warns of a source that is still rising, or has not stopped, when the
// cap on the runs is reached.
func (p *planned) outlast(limit int) {
	src := p.net.Source
	end := src.Start.Rise
	if src.Stop != nil {
		end = math.Max(end, src.Stop.At+src.Stop.Fall)
	}
	if end > float64(limit)*p.net.Period() {
		p.plan.Warnings = append(p.plan.Warnings, fmt.Sprintf(
			"the source is not done rising or stopping (%.3g us) when the cap of %d periods is reached: peaks will not be shown; raise max_periods", end*1e6, limit))
	}
}

// slowdown is how much longer a cell takes than one of a constant line, over
// all cells: about three times as long again for each relaxation (measured by
// BenchmarkStep of package fdtd).
func (p *planned) slowdown() float64 {
	cells, work := 0.0, 0.0
	for k, n := range p.grids[0].grid.Cells {
		cells += float64(n)
		work += float64(n) * (1 + 3*float64(relaxations(p.net.Sections[k])))
	}
	return work / cells
}

// relaxations is how many of its two laws, series and shunt, a section has to
// relax.
func relaxations(s network.Section) int {
	n := 0
	if s.Dispersion.Skin != 0 {
		n++
	}
	if s.Dispersion.Delta != 0 {
		n++
	}
	return n
}

// settlePeriods predicts the settling run: the rule of fdtd.Settle with
// changes that fall as e^{-rate t} after the ramp.
func settlePeriods(net *network.Network, tolerance, rate, path float64) int {
	t := net.Period()
	trip := math.Max(1, math.Ceil(2*path/t-1e-9))
	least := math.Max(fdtd.RampPeriods+trip+1, 4*trip)
	decay := math.Log(1/tolerance) / rate / t
	if math.IsNaN(decay) { // not predicted
		decay = 20 * trip
	}
	n := math.Max(least, fdtd.RampPeriods+decay)
	return clampInt(trip * (math.Ceil(n/trip) + 1))
}

// stressPeriods predicts the stress run: to rest within a thousandth, and a
// round trip, or what is shown of its end, to see that it stays.
func (p *planned) stressPeriods(rate, path float64) int {
	t, src := p.net.Period(), p.net.Source
	decay := math.Log(1e3) / rate
	if math.IsNaN(decay) {
		decay = 20 * 2 * path
	}
	end, quiet := src.Start.Rise, math.Max(2*path, latePeriods*t)
	if src.Stop != nil {
		end, quiet = src.Stop.At+src.Stop.Fall, 2*path
	}
	return clampInt(math.Ceil((end+path+decay+quiet)/t) + 2)
}

func clampInt(v float64) int {
	if !(v < math.MaxInt32) {
		return math.MaxInt32
	}
	return int(v)
}

// bytes predicts the memory of a case: the state and the running peaks of
// every cell, the poles of dispersive ones, one recorded period, the traces and
// what watches the junctions.
func (p *planned) bytes(lanes float64) float64 {
	g := p.grids[0].grid
	cells, steps := float64(g.TotalCells()), float64(g.StepsPerPeriod)
	lumped := float64(len(p.net.Junctions) + len(p.net.Branches) + 1)
	points := math.Min(2*cells, 2*4096*float64(len(g.Cells)))
	points = math.Max(math.Min(points, (8<<20)/steps), math.Min(2*cells, 4*float64(len(g.Cells))))
	poles := 0.0
	for k, n := range g.Cells {
		poles += float64(n*relaxations(p.net.Sections[k])) * 11 // nine poles, their sum and the field
	}
	const number = 8
	state := cells*(4+4*lanes) + poles*lanes
	recorder := (points+lumped)*steps + 10*points
	ring := math.Max(fdtd.TailPeriods*steps*lumped*lanes, math.Min(2<<20, fdtd.LatePeriods*steps*lumped*lanes))
	whole := math.Max(ring, math.Min(2<<20, float64(p.plan.StressPeriods)*steps*lumped*lanes))
	watch := steps * float64(len(p.net.Junctions)) * (lanes + 2)
	return number * (state + recorder + 2*(ring+whole) + watch + 3*math.Min(8*steps, 1<<18))
}
