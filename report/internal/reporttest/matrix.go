package reporttest

import (
	"math"
	"strings"

	"linewitness/sim/record"
)

// sideBySide sets the cases of a record beside each other.
func sideBySide(r *record.Record) (m record.Matrix) {
	seen := map[string]bool{}
	for _, c := range r.Cases {
		m.Cases = append(m.Cases, c.Name)
		for _, q := range c.Requirements {
			if !seen[q.ID] {
				seen[q.ID] = true
				m.Rows = append(m.Rows, required(r, q))
			}
		}
	}
	for _, k := range []struct {
		label, unit string
		of          func(record.Case) float64
	}{
		{"peak voltage, whole network", "V peak", func(c record.Case) float64 { return c.Stress.Voltage.Value }},
		{"peak current, whole network", "A peak", func(c record.Case) float64 { return c.Stress.Current.Value }},
		{"power from the source", "W", func(c record.Case) float64 { return c.Phasor.Source.Power }},
		{"time to settle to 1 %", "s", func(c record.Case) float64 { return c.Settling.To1Percent }},
	} {
		row := record.MatrixRow{Label: k.label, Unit: k.unit}
		for _, c := range r.Cases {
			row.Cells = append(row.Cells, record.MatrixCell{Present: true, Value: k.of(c)})
		}
		m.Rows = append(m.Rows, marked(row, func(a record.MatrixCell) float64 { return -math.Abs(a.Difference) }))
	}
	return m
}

func required(r *record.Record, of record.Requirement) record.MatrixRow {
	row := record.MatrixRow{ID: of.ID, Label: strings.ReplaceAll(strings.Replace(of.Quantity, "vswr", "VSWR", 1), "_", " ") + ", " + of.Subject, Unit: of.Unit, Limit: of.Limit}
	for _, c := range r.Cases {
		cell := record.MatrixCell{Value: math.NaN()}
		for _, q := range c.Requirements {
			if q.ID == of.ID {
				cell = record.MatrixCell{Present: true, Value: q.Value, Verdict: q.Verdict}
			}
		}
		row.Cells = append(row.Cells, cell)
	}
	return marked(row, func(a record.MatrixCell) float64 { return -a.Value })
}

// marked adds differences and marks the cell with the least of a measure.
func marked(row record.MatrixRow, measure func(record.MatrixCell) float64) record.MatrixRow {
	worst := -1
	for i := range row.Cells {
		a := &row.Cells[i]
		a.Difference = math.NaN()
		if i > 0 && a.Present && row.Cells[0].Present {
			a.Difference = a.Value - row.Cells[0].Value
		}
		if x := measure(*a); !math.IsNaN(x) && (worst < 0 || x < measure(row.Cells[worst])) {
			worst = i
		}
	}
	if worst >= 0 {
		row.Cells[worst].Worst = true
	}
	return row
}
