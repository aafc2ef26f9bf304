package sim

import (
	"context"
	"fmt"

	"linewitness/sim/design"
	"linewitness/sim/record"
)

// The bounds on one case of a run, unless Options.NoBound is set.
const (
	MaxUpdates = 2e12    // cell updates
	MaxBytes   = 8 << 30 // memory, bytes
)

// A Plan is the grid and the predicted cost of every case; making one takes
// no step in time.
type Plan struct {
	Cases []PlanCase
}

// PlanCase is the plan of one case.
type PlanCase struct {
	Name          string
	Grid          record.Grid // Updates is the predicted number
	Grids         []int       // steps per period of the grids of the convergence study, finest first
	Cells         int         // of all sections
	LongPath      float64     // s, longest one-way path
	Rate          float64     // 1/s, decay of the slowest natural mode near the source frequency; NaN if it was not predicted
	LoopFactor    float64     // amplitude kept per longest round trip, predicted; NaN if it was not
	SettlePeriods int         // predicted length of the settling run
	StressPeriods int         // predicted length of the stress run
	Seconds       float64     // predicted, on one core at the nominal rate
	Bytes         float64     // predicted memory
	ExpectedError float64     // predicted agreement error of the grid
	Warnings      []string
}

// A BoundError is a run that is refused because of its predicted cost.
type BoundError struct {
	Case           string
	Updates, Bytes float64
}

func (e *BoundError) Error() string {
	return fmt.Sprintf("case %s would take %.2g cell updates and %.2g MiB, over the bound of %.2g updates or %d MiB",
		e.Case, e.Updates, e.Bytes/(1<<20), float64(MaxUpdates), MaxBytes>>20)
}

// Bound is the error with which Verify refuses a case that passes the bounds, or nil.
func (c *PlanCase) Bound() error {
	if c.Grid.Updates > MaxUpdates || c.Bytes > MaxBytes {
		return &BoundError{Case: c.Name, Updates: c.Grid.Updates, Bytes: c.Bytes}
	}
	return nil
}

// MakePlan plans every case of a design for a study on so many grids, 3 or 1. It
// does not refuse a costly one; see PlanCase and the bounds.
func MakePlan(ctx context.Context, f *design.File, grids int) (*Plan, error) {
	all, err := planAll(ctx, f, grids)
	if err != nil {
		return nil, err
	}
	out := &Plan{}
	for _, p := range all {
		out.Cases = append(out.Cases, p.plan)
	}
	return out, nil
}
