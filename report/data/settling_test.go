package data

import (
	"encoding/json"
	"math"
	"strings"
	"testing"

	"linewitness/sim/record"
)

func sampleSettling() record.Settling {
	return record.Settling{
		Settled: true, Time: 600e-9, Periods: 60, Residual: 2.5e-5, LoopFactor: 0.25,
		LongPath: 2.5e-9, RoundTrip: 5e-9, Ramp: 100e-9, Earliest: 110e-9,
		Mean: 1e-9, Harmonic: 2e-9, To1Percent: 31e-9, Passes: 2,
		Predicted: record.PredictedSettling{
			LoopFactor: 0.26, Q: 1.166, TimeConstant: 3.71e-9, To10Percent: 8.55e-9, To1Percent: 17.1e-9, ToTenth: 25.6e-9,
			RingDown60: 25.7e-9, Settled: 590e-9,
		},
		Curve: []record.SettlingPoint{
			{Time: 590e-9, Gap: 10e-9, Change: 3e-4, Estimate: math.Inf(1), Mean: 3e-9, Harmonic: 4e-9},
			{Time: 600e-9, Gap: 10e-9, Change: 7.5e-5, Estimate: 2.5e-5, Mean: 1e-9, Harmonic: 2e-9, Passed: true},
		},
		Places: []record.SettlingPlace{
			{
				Name: "far", Kind: "junction", Quantity: "voltage", To10Percent: 12e-9, To1Percent: 31e-9, ToTenth: math.NaN(),
				Time: []float64{0, 1e-9}, Departure: []float64{1, 0.5},
			},
			{Name: "far", Kind: "load", Quantity: "current", To10Percent: 11e-9, To1Percent: 30e-9, ToTenth: 44e-9},
		},
		Echoes:   []record.Echo{{Name: "far", Time: 5e-9}},
		RingDown: []record.RingDown{{Name: "far", To20: 9e-9, To40: 18e-9, To60dB: math.NaN()}},
	}
}

// unpredicted is the prediction of a network for which none was made.
func unpredicted() record.PredictedSettling {
	nan := math.NaN()
	return record.PredictedSettling{
		LoopFactor: nan, Q: nan, TimeConstant: nan, To10Percent: nan, To1Percent: nan, ToTenth: nan, RingDown60: nan, Settled: nan,
	}
}

// samplePower has an ideal source: what it could give has no limit, and so
// nothing is reflected from it.
func samplePower() record.Power {
	a := record.PowerAudit{
		Available: math.Inf(1), Delivered: 10, Reflected: math.NaN(), Dissipated: 4, InLoads: 6,
		Sections: []record.SectionPower{{Name: "main", In: 9, Out: 6, Dissipated: 3, Stored: 2e-8}},
		Elements: []record.PartPower{{Name: "choke", Power: 1}},
		Loads:    []record.PartPower{{Name: "end", Power: 6}},
		Balance:  0, Relative: 0, Allowed: 1e-9, Closed: true, Stored: 2.5e-8, Q: 1.57,
	}
	b := a
	b.Delivered, b.Balance, b.Relative, b.Allowed, b.Closed = 10.01, 0.01, 1e-3, 5e-4, false
	return record.Power{Phasor: a, FDTD: b}
}

// What proves the settling and where the power goes is found where the format
// says.
func TestJSONOfEvidence(t *testing.T) {
	text, err := JSON(sample())
	if err != nil {
		t.Fatal(err)
	}
	var doc any
	if err := json.Unmarshal(text, &doc); err != nil {
		t.Fatal(err)
	}
	for _, tt := range []struct {
		path string
		want any
	}{
		{"nominal/settling/long_path_s", 2.5e-9},
		{"nominal/settling/earliest_s", 110e-9},
		{"nominal/settling/passes", 2.0},
		{"nominal/settling/predicted/loop_factor", 0.26},
		{"nominal/settling/predicted/to_0_1_percent_s", 25.6e-9},
		{"nominal/settling/predicted/ring_down_60_db_s", 25.7e-9},
		{"nominal/settling/windows/0/estimate", nil}, // while the changes do not fall
		{"nominal/settling/windows/0/passed", false},
		{"nominal/settling/windows/1/gap_s", 10e-9},
		{"nominal/settling/windows/1/passed", true},
		{"nominal/settling/places/0/to_0_1_percent_s", nil},
		{"nominal/settling/places/1/kind", "load"},
		{"nominal/settling/places/1/quantity", "current"},
		{"nominal/settling/echoes/0/time_s", 5e-9},
		{"nominal/settling/ring_down/far/to_minus_40_db_s", 18e-9},
		{"nominal/settling/ring_down/far/to_minus_60_db_s", nil},
		{"nominal/power/phasor/available_w", nil},
		{"nominal/power/phasor/reflected_w", nil},
		{"nominal/power/phasor/sections/main/dissipated_w", 3.0},
		{"nominal/power/phasor/elements/choke/power_w", 1.0},
		{"nominal/power/phasor/loads/end/power_w", 6.0},
		{"nominal/power/phasor/closed", true},
		{"nominal/power/fdtd/balance_relative", 1e-3},
		{"nominal/power/fdtd/balance_allowed", 5e-4},
		{"nominal/power/fdtd/closed", false},
		{"nominal/power/fdtd/stored_j", 2.5e-8},
		{"ring, lossless/settling/predicted/q", nil},
		{"ring, lossless/power/phasor", nil}, // no audit was made
	} {
		got, ok := lookUp(doc, "cases/"+tt.path)
		if !ok || got != tt.want {
			t.Errorf("%s = %v (there: %t), want %v", tt.path, got, ok, tt.want)
		}
	}
}

// A name that stands twice where names are keys is refused; a load and a
// junction may share one among the places.
func TestJSONRefusesNamesOfEvidence(t *testing.T) {
	for _, tt := range []struct {
		name   string
		mend   func(*record.Case)
		reason string
	}{
		{"two ring-downs", func(c *record.Case) { c.Settling.RingDown = append(c.Settling.RingDown, c.Settling.RingDown[0]) }, "settling: two entries of kind junction"},
		{"two loads", func(c *record.Case) {
			c.Power.FDTD.Loads = []record.PartPower{{Name: "end"}, {Name: "end"}}
		}, "power: fdtd: two entries of kind load"},
		{"two elements", func(c *record.Case) {
			c.Power.Phasor.Elements = []record.PartPower{{Name: "x"}, {Name: "x"}}
		}, "power: phasor: two entries of kind element"},
		{"a section without a name", func(c *record.Case) {
			c.Power.Phasor.Sections = []record.SectionPower{{}}
		}, "power: phasor: an entry of kind section has no name"},
	} {
		r := sample()
		tt.mend(&r.Cases[0])
		if _, err := JSON(r); err == nil || !strings.Contains(err.Error(), tt.reason) {
			t.Errorf("%s: error %v, want one with %q", tt.name, err, tt.reason)
		}
	}
}
