package sim

import (
	"math"
	"testing"

	"linewitness/sim/record"
)

// TestMatrix: each requirement and key figure is a row, the worst is the least
// margin or the farthest from nominal, and phases differ by less than a turn.
func TestMatrix(t *testing.T) {
	req := func(id, unit string, value, margin float64) record.Requirement {
		return record.Requirement{ID: id, Quantity: "phase", Subject: "at b", Unit: unit, Value: value, Margin: margin, Limit: "at most", Verdict: record.Met}
	}
	key := func(v float64) record.Convergence {
		return record.Convergence{Studies: []record.Study{{ID: "R1", Phasor: 7}, {Quantity: "source_power", Subject: "source", Unit: "W", Phasor: v}}}
	}
	m := matrix([]record.Case{
		{Name: "nominal", Requirements: []record.Requirement{req("R1", "deg", 170, 5)}, Convergence: key(10)},
		{Name: "iced", Requirements: []record.Requirement{req("R1", "deg", -170, 3), req("R2", "V peak", 5, -1)}, Convergence: key(12)},
		{Name: "arc", Requirements: []record.Requirement{req("R1", "deg", 171, 9)}, Convergence: key(9)},
	}, []string{"R2", "R1"})
	if len(m.Rows) != 3 || len(m.Cases) != 3 {
		t.Fatalf("%d rows, %d cases", len(m.Rows), len(m.Cases))
	}
	r2, r1, power := m.Rows[0], m.Rows[1], m.Rows[2] // in the order of the file
	if d := r1.Cells[1].Difference; math.Abs(d-20) > 1e-9 {
		t.Errorf("from 170 to -170 deg: %.3g", d)
	}
	if !r1.Cells[1].Worst || r1.Cells[0].Worst || r1.Cells[2].Worst {
		t.Errorf("worst of %+v", r1.Cells)
	}
	if r2.Cells[0].Present || !r2.Cells[1].Present || r2.Cells[2].Present || !r2.Cells[1].Worst || !math.IsNaN(r2.Cells[1].Difference) {
		t.Errorf("a requirement of one case: %+v", r2.Cells)
	}
	if power.ID != "" || power.Cells[1].Difference != 2 || power.Cells[2].Difference != -1 || !power.Cells[1].Worst {
		t.Errorf("a key figure: %+v", power)
	}
	if !math.IsNaN(power.Cells[0].Difference) {
		t.Errorf("nominal differs from itself: %+v", power.Cells[0])
	}
}

// TestMatrixOfDemo: the cases of the demo stand side by side.
func TestMatrixOfDemo(t *testing.T) {
	_, r := demos["hilltop-fm-feeder"](t)
	for _, row := range r.Matrix.Rows {
		if len(row.Cells) != len(r.Cases) {
			t.Fatalf("row %s: %d cells", row.Label, len(row.Cells))
		}
		if row.ID == "R8" && !row.Cells[2].Worst { // the arc has the largest peak
			t.Errorf("worst peak: %+v", row.Cells)
		}
	}
}
