package sim

import (
	"linewitness/fdtd"
	"linewitness/sim/record"
)

// convergence writes down the study on the grids: that of the requirements,
// already made, and that of the key figures.
func (s *solved) convergence(studies []record.Study) record.Convergence {
	out := record.Convergence{Studies: studies}
	for _, k := range s.keyStudies() {
		out.Studies = append(out.Studies, s.study(k))
	}
	for _, run := range append([]*fdtd.Steady{s.steady}, s.coarser...) {
		out.Grids = append(out.Grids, record.StudyGrid{
			StepsPerPeriod: run.Grid.StepsPerPeriod, Cells: run.Grid.TotalCells(), Step: run.Grid.Step,
		})
	}
	switch {
	case len(s.coarser) > 0:
	case !s.steady.Settling.Settled:
		out.Skipped = "no steady state was reached on the finest grid"
	default:
		out.Skipped = "one grid was asked for"
	}
	return out
}

// unexplained counts the figures whose error their uncertainty does not explain.
func unexplained(studies []record.Study) int {
	n := 0
	for _, s := range studies {
		if !s.Explained {
			n++
		}
	}
	return n
}
