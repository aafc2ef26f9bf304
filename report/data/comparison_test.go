package data

import (
	"encoding/json"
	"math"
	"strings"
	"testing"

	"linewitness/sim/record"
)

func sampleComparison() *record.Comparison {
	return &record.Comparison{
		Old: record.Side{File: "feeder-a.yaml", Kind: "design file", Title: "Feeder", Number: "T-1", Revision: "A", SHA256: "00ff", Version: "v1", Verdict: record.Verified},
		New: record.Side{File: "feeder-b.pdf", Kind: "record", Title: "Feeder", Number: "T-1", Revision: "B", SHA256: "11ee", Version: "v1", Verdict: record.Missed},
		Changes: []record.Change{
			{Kind: record.ChangedTerm, Place: "section main", Term: "length", Old: "85 m", New: "87 m"},
			{Kind: record.AddedTerm, Case: "iced", Place: "element tuning", New: "{at: mast, c: 120 pF}"},
			{Kind: record.FollowTerm, Place: "section stub", Term: "length", Old: "22.5 deg", New: "22.5 deg", OldSI: 5.2, NewSI: 5.1, Unit: "m"},
		},
		Cases: []record.CaseEffect{{Name: "nominal", Old: record.Verified, New: record.Missed, Effects: []record.Effect{
			{
				Kind: record.RequirementEffect, ID: "R1", Quantity: "vswr", Subject: "main, from end", Direction: record.Worse,
				Old: &record.Figure{Value: 1.2, Unit: "1", Uncertainty: 0.01, Margin: 0.3, Limit: "at most 1.5", Verdict: "met"},
				New: &record.Figure{Value: complex(math.Inf(1), 0), Unit: "1", Uncertainty: math.NaN(), Margin: math.NaN(), Limit: "at most 1.5", Verdict: "missed"},
			},
			{
				Kind: record.ClaimEffect, ID: "C1", Quantity: "input_impedance", Direction: record.NewFigure,
				New: &record.Figure{Value: 50 - 1i, Complex: true, Unit: "ohm", Margin: 1, Verdict: "confirmed"},
			},
		}}},
		Worsened: true,
	}
}

func TestComparisonGolden(t *testing.T) {
	got, err := Comparison(sampleComparison())
	if err != nil {
		t.Fatal(err)
	}
	golden(t, "comparison.json", got)
	if !json.Valid(got) {
		t.Error("it is not JSON")
	}
}

func TestComparisonRefuses(t *testing.T) {
	c := sampleComparison()
	c.Cases = append(c.Cases, c.Cases[0])
	if _, err := Comparison(c); err == nil || !strings.Contains(err.Error(), `two entries of kind case have the name "nominal"`) {
		t.Errorf("error %v", err)
	}
}
