package data

import (
	"encoding/json"
	"math"
	"testing"

	"linewitness/sim/record"
)

// sampleConvergence has a figure that both witnesses give, one that only the
// time domain gives, and one without an index.
func sampleConvergence() record.Convergence {
	nan := math.NaN()
	return record.Convergence{
		Grids: []record.StudyGrid{
			{StepsPerPeriod: 40, Cells: 10, Step: 0.25e-9}, {StepsPerPeriod: 20, Cells: 5, Step: 0.5e-9}, {StepsPerPeriod: 10, Cells: 3, Step: 1e-9},
		},
		Studies: []record.Study{
			{
				ID: "R1", Quantity: "vswr", Subject: "main, from end", Unit: "1", Values: []float64{1.7502, 1.7508, 1.7532},
				Behaviour: record.Converging, Order: 2, Extrapolated: 1.75, Factor: 1.25, GCI: 0.00025, GCIPercent: 0.0143,
				Phasor: 1.75, Error: 0.0002, Grid: 0.00025, Settling: 2e-6, Form: 1e-5, Rounding: 1e-14, Uncertainty: 0.000262, Explained: true,
			},
			{
				Quantity: "peak_voltage", Subject: "main", Unit: "V peak", Values: []float64{21, 20.9}, Behaviour: record.TwoGrids,
				Order: nan, Extrapolated: nan, Factor: 3, GCI: 0.1, GCIPercent: 0.476, Phasor: nan, Error: nan, Grid: 0.1, Uncertainty: 0.1, Explained: true,
			},
			{
				Quantity: "source_power", Unit: "W", Values: []float64{0, 0, 0}, Behaviour: record.GridFree, Order: nan, Extrapolated: 0,
				GCI: 0, GCIPercent: nan, Phasor: 0, Error: 1e-3, Uncertainty: 1e-9,
			},
		},
	}
}

func sampleFidelity() []record.Fidelity {
	nothing := record.Difference{Value: math.NaN()}
	return []record.Fidelity{
		{
			Subject: "main", Curve: "|V| along the section", Points: 11,
			ADM: record.Difference{Value: 0.02, Word: "excellent", Histogram: [6]float64{1}, Grade: 1, Spread: 1},
			FDM: record.Difference{Value: 0.15, Word: "very good", Histogram: [6]float64{0.25, 0.5, 0.25}, Grade: 3, Spread: 3},
			GDM: record.Difference{Value: 0.16, Word: "very good", Histogram: [6]float64{0.125, 0.75, 0.125}, Grade: 2, Spread: 2},
		},
		{Subject: "end current", Curve: "waveform", Note: "zero in both", ADM: nothing, FDM: nothing, GDM: nothing},
	}
}

func sampleClaims() []record.Claim {
	return []record.Claim{
		{
			ID: "C1", Quantity: "input_impedance", Subject: "main, from end", Case: "nominal", Unit: "ohm", Complex: true, Text: "calc", Source: "sheet 3",
			Claimed: 10 - 40i, Phasor: -50i, FDTD: complex(0.01, -50), ClaimedText: "10 - j40 ohm", ToleranceText: "1 %", Tolerance: 0.412, Difference: 14.1, Uncertainty: 0.02,
			Verdict: record.Contradicted, Finding: "The difference is more than the tolerance.",
			Slips: []record.Slip{{
				Name: "velocity factor left out", Where: "every section", Text: "This gives 10 - j40 ohm.", Value: 10 - 40i,
				Also: []string{"feet for metres"}, Explains: []string{"C1", "C2"},
			}},
		},
		{
			ID: "C2", Quantity: "peak_voltage", Subject: "main", Case: "nominal", Unit: "V peak", Claimed: 21, Phasor: complex(math.NaN(), 0), FDTD: 21.05,
			ClaimedText: "21 V peak", ToleranceText: "0.1 V peak", Tolerance: 0.1, Difference: 0.05, Uncertainty: 0.1, Verdict: record.ClaimOpen,
		},
	}
}

func sampleMatrix() record.Matrix {
	return record.Matrix{Cases: []string{"nominal", "ring, lossless"}, Rows: []record.MatrixRow{
		{ID: "R1", Label: "VSWR, main, from end", Unit: "1", Limit: "from 1 to 1.5", Cells: []record.MatrixCell{
			{Present: true, Value: 1.75, Difference: math.NaN(), Verdict: record.MissedReq, Worst: true}, {Value: math.NaN(), Difference: math.NaN()},
		}},
		{Label: "peak voltage", Unit: "V peak", Cells: []record.MatrixCell{
			{Present: true, Value: 21, Difference: math.NaN()}, {Present: true, Value: 20, Difference: -1, Worst: true},
		}},
	}}
}

// A reader finds the evidence where the format says; what has no number is
// null, and a claim is complex only where both parts are claimed.
func TestEvidenceRead(t *testing.T) {
	text, err := JSON(sample())
	if err != nil {
		t.Fatal(err)
	}
	var doc any
	if err := json.Unmarshal(text, &doc); err != nil {
		t.Fatal(err)
	}
	const c = "cases/nominal/"
	for _, tt := range []struct {
		path string
		want any
	}{
		{"design/fsv_choices/0", "four bins"},
		{c + "convergence/grids/2/steps_per_period", 10.0},
		{c + "convergence/skipped", ""},
		{c + "convergence/figures/0/values/1", 1.7508},
		{c + "convergence/figures/0/order", 2.0},
		{c + "convergence/figures/0/gci_percent", 0.0143},
		{c + "convergence/figures/0/uncertainty_parts/form", 1e-5},
		{c + "convergence/figures/0/explained", true},
		{c + "convergence/figures/1/behaviour", "two grids"},
		{c + "convergence/figures/1/phasor", nil},
		{c + "convergence/figures/1/error", nil},
		{c + "convergence/figures/2/factor", nil},
		{c + "convergence/figures/2/explained", false},
		{c + "fidelity/0/fdm/histogram/1", 0.5},
		{c + "fidelity/0/gdm/word", "very good"},
		{c + "fidelity/1/adm/value", nil},
		{c + "fidelity/1/note", "zero in both"},
		{c + "claims/0/claimed/im", -40.0},
		{c + "claims/0/fdtd/re", 0.01},
		{c + "claims/0/slips/0/value/re", 10.0},
		{c + "claims/0/slips/0/explains/1", "C2"},
		{c + "claims/1/claimed", 21.0},
		{c + "claims/1/phasor", nil},
		{c + "claims/1/verdict", "not shown"},
		{"cases/ring, lossless/convergence/skipped", "no steady state"},
		{"matrix/cases/1", "ring, lossless"},
		{"matrix/rows/0/cells/0/verdict", "missed"},
		{"matrix/rows/0/cells/1/present", false},
		{"matrix/rows/0/cells/1/value", nil},
		{"matrix/rows/0/cells/1/verdict", nil},
		{"matrix/rows/1/cells/1/difference", -1.0},
		{"matrix/rows/1/cells/1/worst", true},
	} {
		got, ok := lookUp(doc, tt.path)
		if !ok || got != tt.want {
			t.Errorf("%s = %v (there: %t), want %v", tt.path, got, ok, tt.want)
		}
	}
}

// A record made without the evidence has its keys, empty.
func TestWithoutEvidence(t *testing.T) {
	text, err := JSON(&record.Record{Cases: []record.Case{{Name: "nominal"}}})
	if err != nil {
		t.Fatal(err)
	}
	var doc struct {
		Cases map[string]struct {
			Convergence *struct {
				Grids, Figures []any
				Skipped        string
			}
			Fidelity, Claims *[]any
		}
		Matrix *struct{ Cases, Rows *[]any }
	}
	if err := json.Unmarshal(text, &doc); err != nil {
		t.Fatal(err)
	}
	n := doc.Cases["nominal"]
	if n.Convergence == nil || n.Convergence.Grids == nil || n.Convergence.Figures == nil || n.Fidelity == nil || n.Claims == nil ||
		doc.Matrix == nil || doc.Matrix.Cases == nil || doc.Matrix.Rows == nil {
		t.Errorf("a key of the evidence is not there:\n%s", text)
	}
}
