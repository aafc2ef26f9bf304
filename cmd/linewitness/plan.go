package main

import (
	"fmt"
	"io"
	"strconv"

	"github.com/spf13/cobra"

	"linewitness/sim"
)

const planHelp = `linewitness plan prints the grid, the predicted length and the predicted cost of the
time-domain runs of every case, and solves nothing.

  linewitness plan DESIGN        - is standard input

      --grids N              grids of the convergence study, 3 or 1  (default 3)
  -h, --help                 this text

verify refuses a case that is over the bounds on work and memory; plan shows it.
The time is for one core at a nominal rate of cell updates.

Example:
  linewitness plan feeder.yaml
`

func (a *app) planCommand() *cobra.Command {
	grids := newGrids()
	cmd := &cobra.Command{
		Use:               "plan DESIGN",
		Short:             "the grid and the predicted cost",
		Long:              planHelp,
		Args:              exactlyOne("a design file"),
		ValidArgsFunction: designFiles,
		RunE: func(cmd *cobra.Command, args []string) error {
			file, err := a.load(cmd.Context(), args[0])
			if err != nil {
				return err
			}
			plan, err := sim.MakePlan(cmd.Context(), file, gridCount(grids))
			if err != nil {
				return verifyError(file.Name, err)
			}
			writePlan(a.stdout, plan)
			return nil
		},
	}
	addGrids(cmd, grids)
	return cmd
}

func writePlan(w io.Writer, plan *sim.Plan) {
	for i := range plan.Cases {
		if i > 0 {
			fmt.Fprintln(w)
		}
		writePlanCase(w, &plan.Cases[i])
	}
}

func writePlanCase(w io.Writer, c *sim.PlanCase) {
	fmt.Fprintf(w, "%s:\n", c.Name)
	writeTable(w, gridRows(c))
	writeTable(w, [][]string{
		{"step", fmt.Sprintf("%s, %d a period", inSI(c.Grid.Step, "s"), c.Grid.StepsPerPeriod)},
		{"grids", gridsText(c.Grids)},
		{"longest path", inSI(c.LongPath, "s")},
		{"loop factor", plainNumber(c.LoopFactor) + " a round trip"},
		{"settling run", counted(c.SettlePeriods, "period")},
		{"stress run", counted(c.StressPeriods, "period")},
		{"steps", strconv.Itoa((c.SettlePeriods + c.StressPeriods) * c.Grid.StepsPerPeriod)},
		{"cells", strconv.Itoa(c.Cells)},
		{"cell updates", plainNumber(c.Grid.Updates)},
		{"time", inSI(c.Seconds, "s")},
		{"memory", fmt.Sprintf("%.1f MiB", c.Bytes/(1<<20))},
		{"agreement", percent(c.ExpectedError) + " expected"},
	})
	if c.Bound() != nil {
		fmt.Fprintln(w, "  over the bound: verify refuses this case without --no-bound")
	}
	for _, warning := range c.Warnings {
		fmt.Fprintf(w, "  warning: %s\n", warning)
	}
}

func gridRows(c *sim.PlanCase) [][]string {
	rows := [][]string{{"section", "cells", "cell", "Courant", "cells/wavelength", "phase error"}}
	for _, s := range c.Grid.Sections {
		rows = append(rows, []string{
			s.Name, strconv.Itoa(s.Cells), inSI(s.Cell, "m"), plainNumber(s.Courant),
			plainNumber(s.CellsPerWavelength), plainNumber(s.PhaseErrorDegrees) + " deg",
		})
	}
	return rows
}
