package main

import (
	"fmt"
	"strings"

	"github.com/spf13/cobra"

	"linewitness/sim/line"
)

const cablesHelp = `linewitness cables lists the cable types that a line of a design file can name, as
cable: RG-213, with their nominal data. The values are from memory: a record that
uses one says so, and asks for the sheet of the cable in hand.

  linewitness cables

Example:
  linewitness cables
`

func (a *app) cablesCommand() *cobra.Command {
	return &cobra.Command{
		Use:   "cables",
		Short: "the cable table with its pedigree",
		Long:  cablesHelp,
		Args:  noArgs,
		RunE: func(*cobra.Command, []string) error {
			writeTable(a.stdout, cableRows(line.Cables()))
			fmt.Fprintf(a.stdout, "\n%s\n", wrapped(line.CablePedigree(), 80))
			return nil
		},
	}
}

func cableRows(cables []line.Cable) [][]string {
	rows := [][]string{{"type", "z0", "velocity", "capacitance", "voltage rms", "loss in dB/100m"}}
	for _, c := range cables {
		var loss []string
		for _, p := range c.Loss {
			loss = append(loss, fmt.Sprintf("%s at %s", plainNumber(p.Attenuation*line.NeperDB*100), inSI(p.F, "Hz")))
		}
		rows = append(rows, []string{
			c.Type, inSI(c.Z0, "ohm"), plainNumber(c.VelocityFactor), inSI(c.Capacitance, "F") + "/m",
			inSI(c.MaxVoltage, "V"), strings.Join(loss, ", "),
		})
	}
	return rows
}

// wrapped breaks a text into lines of at most width characters.
func wrapped(text string, width int) string {
	var lines []string
	current := ""
	for _, word := range strings.Fields(text) {
		if current != "" && len(current)+1+len(word) > width {
			lines = append(lines, current)
			current = ""
		}
		if current != "" {
			current += " "
		}
		current += word
	}
	return strings.Join(append(lines, current), "\n")
}
