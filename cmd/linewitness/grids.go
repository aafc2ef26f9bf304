package main

import (
	"strconv"
	"strings"

	"github.com/spf13/cobra"

	"linewitness/sim"
)

// newGrids is the value of the option --grids: as many as the convergence study
// needs to observe an order, or one to leave it out.
func newGrids() *choice {
	most := strconv.Itoa(sim.DefaultGrids)
	return &choice{most, []string{most, "1"}}
}

func addGrids(cmd *cobra.Command, grids *choice) {
	cmd.Flags().Var(grids, "grids", "grids of the convergence study")
	// The error is of a name that is no option; the tests complete it.
	_ = cmd.RegisterFlagCompletionFunc("grids", oneOf(grids.of...))
}

// gridCount is the number of grids that was chosen.
func gridCount(grids *choice) int {
	if grids.value == "1" {
		return 1
	}
	return sim.DefaultGrids
}

// gridsText lists the grids of a study by their steps.
func gridsText(steps []int) string {
	var words []string
	for _, n := range steps {
		words = append(words, strconv.Itoa(n))
	}
	if len(words) == 1 {
		return "one, no convergence study"
	}
	return strings.Join(words, ", ") + " steps a period"
}
