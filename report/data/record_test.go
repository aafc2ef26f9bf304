package data

import (
	"flag"
	"math"
	"os"
	"path/filepath"
	"testing"

	"github.com/google/go-cmp/cmp"

	"linewitness/sim/record"
)

var update = flag.Bool("update", false, "rewrite the golden files")

// golden compares got with testdata/name.
func golden(t *testing.T, name string, got []byte) {
	t.Helper()
	path := filepath.Join("testdata", name)
	if *update {
		if err := os.WriteFile(path, got, 0o666); err != nil {
			t.Fatal(err)
		}
	}
	want, err := os.ReadFile(path)
	if err != nil {
		t.Fatal(err)
	}
	if diff := cmp.Diff(string(want), string(got)); diff != "" {
		t.Errorf("%s (-want +got; go test -update rewrites it):\n%s", path, diff)
	}
}

// sample is a small record by hand: one quarter-wave section from an ideal
// source into an open end in the nominal case, and a case that did not settle.
// Its numbers are chosen to be recognised in the text, not to be physical.
func sample() *record.Record {
	limit, low := 1.5, 1.0
	nominal := record.Case{
		Name:      "nominal",
		Verdict:   record.Missed,
		Model:     record.Model{Frequency: 100e6, Lines: sampleLines()},
		Phasor:    sampleSteady(1),
		FDTD:      sampleSteady(1.0001),
		Settling:  sampleSettling(),
		Power:     samplePower(),
		Stress:    sampleStress(),
		Agreement: sampleAgreement(),
		Grid: record.Grid{
			StepsPerPeriod: 40, Step: 0.25e-9, Updates: 24000,
			Sections: []record.GridSection{{
				Name: "main", Cells: 10, Cell: 0.05, Courant: 1, CellsPerWavelength: 40, Points: 11, PhaseErrorDegrees: 0,
			}},
		},
		Requirements: []record.Requirement{
			{
				ID: "R1", Quantity: "vswr", Subject: "main, from end", Section: "main", Unit: "1", Value: 1.75, Max: &limit, Min: &low,
				Limit: "from 1 to 1.5", Margin: -0.25, MarginDB: math.NaN(), MarginPercent: -16.7, Uncertainty: 1e-4,
				Verdict: record.MissedReq, Method: "fdtd", Text: `"low" & < 1.5`, Source: "SPEC-7 4.2",
			},
			{
				ID: "R2", Quantity: "input_impedance", Subject: "source", Unit: "ohm", Value: math.Inf(1),
				Limit: "within 2 ohm of 50 ohm", Margin: math.Inf(-1), MarginDB: math.NaN(), MarginPercent: math.NaN(),
				Uncertainty: 0.001, Verdict: record.MissedReq, Method: "phasor",
			},
		},
		Ratings:     sampleRatings(),
		Convergence: sampleConvergence(), Fidelity: sampleFidelity(), Claims: sampleClaims(),
		Warnings:  []string{"the source is ideal: it has no available power"},
		Profiles:  []record.Profile{sampleProfile()},
		Waveforms: sampleWaveforms(),
		SpaceTime: sampleSpaceTime(),
		Bounces:   sampleBounces(),
	}
	lost := record.Case{
		Name: "ring, lossless", Verdict: record.Unsettle, Convergence: record.Convergence{Skipped: "no steady state"},
		Settling: record.Settling{Periods: 20000, LoopFactor: 1, Residual: math.NaN(), To1Percent: math.NaN(), Decay: "no decay over 20000 periods", Predicted: unpredicted()},
	}
	return &record.Record{
		Tool: record.Tool{Version: "v0.0.0", Go: "go1.26.0 any/any"},
		Design: record.Design{
			Title: "Sample", Number: "X-1", Revision: "B", File: "sample.yaml", SHA256: "00ff", Convention: "engineering",
			Agreement: 0.005, Tolerance: 1e-4, MaxPeriods: 20000,
			FSVChoices: []string{"four bins"},
			Date:       "2026-03-31", DateFrom: "record",
			History: []record.Revision{
				{Revision: "A", Date: "2026-02-28", By: "R. Aaltonen", Text: "First issue"},
				{Revision: "B", Text: "Longer main"},
			},
		},
		Verdict: record.Unsettle,
		Cases:   []record.Case{nominal, lost},
		Matrix:  sampleMatrix(),
	}
}

func sampleSteady(scale float64) record.Steady {
	s := complex(scale, 0)
	return record.Steady{
		Source: record.SteadySource{V: 10 * s, I: 0.2i * s, Impedance: -50i, Power: 0, Available: math.Inf(1)},
		Sections: []record.SteadySection{{
			Name:       "main",
			From:       record.End{V: 10 * s, I: 0.2i * s, Impedance: -50i, Reflection: -1i, VSWR: math.Inf(1)},
			To:         record.End{V: (12 - 1.0/3*1i) * s, I: 0, Impedance: complex(math.Inf(1), math.NaN()), Reflection: 1, VSWR: math.Inf(1)},
			VoltageMax: record.Extreme{Value: 12 * scale, At: 0.5},
			VoltageMin: record.Extreme{Value: 10 * scale, At: 0},
			CurrentMax: record.Extreme{Value: 0.2 * scale, At: 0},
			Loss:       math.Copysign(0, -1),
		}},
		Loads:     []record.SteadyLoad{{Name: "end", V: 12 * s, I: 0, Power: 0}},
		Junctions: []record.SteadyJunction{{Name: "source", V: 10 * s}, {Name: "far", V: 12 * s}},
	}
}

func sampleStress() record.Stress {
	return record.Stress{
		Profile: "abrupt, worst phase", Duration: 900e-9, Worst: true, Overshot: 0.75,
		Voltage: record.Peak{Value: 21, Section: "main", At: 0.5, Time: 7.5e-9, Phase: 30, Uncertainty: 0.03},
		Current: record.Peak{Value: 0.4, Section: "main", At: 0.025, Time: 5e-9, Phase: 120, Uncertainty: 0.002},
		Sections: []record.StressSection{{
			Name: "main", Voltage: 21, VoltageAt: 0.5, VoltageTime: 7.5e-9,
			Current: 0.4, CurrentAt: 0.025, CurrentTime: 5e-9, SteadyVoltage: 12,
			VoltageUncertainty: 0.03, CurrentUncertainty: 0.002,
		}},
	}
}

func sampleAgreement() record.Agreement {
	return record.Agreement{
		Voltage: 1e-4, Current: 2e-4, RMS: 5e-5, Expected: 3e-4, Limit: 0.005,
		Worst: record.WorstPlace{Section: "main", At: 0.025, Quantity: "current"},
		Sections: []record.AgreementSection{{
			Name: "main", Voltage: 1e-4, Current: 2e-4, ExpectedVoltage: 3e-4, ExpectedCurrent: 3e-4,
			VoltageAt: 0.5, CurrentAt: 0.025, VoltageScale: 12, CurrentMax: 0.2,
		}},
	}
}

// sampleProfile has voltage points at 0 and 0.5, and running peaks at 0.25
// too, as a thinned section has them.
func sampleProfile() record.Profile {
	return record.Profile{
		Section: "main",
		ZV:      []float64{0, 0.5}, VF: []complex128{10i, 12.003}, VP: []complex128{10i, 12}, EV: []float64{0.003, 0.004},
		ZI: []float64{0.25}, IF: []complex128{0}, IP: []complex128{-0.1}, EI: []float64{0.0001},
		PeakZV: []float64{0, 0.25, 0.5}, PeakV: []float64{10.5, 15, 21},
		PeakZI: []float64{0.25}, PeakI: []float64{0.4},
	}
}

func sampleWaveforms() []record.Waveform {
	return []record.Waveform{
		{
			Name: "source voltage", Where: "source", Quantity: "voltage", Unit: "V", Start: 0, Step: 2.5e-10, Samples: []float64{0, 10.0 / 3},
			Tail: record.Tail{Start: 800e-9, Step: 2.5e-10, Samples: []float64{9.9}, Phasor: []float64{10}},
		},
		{
			Name: "end current", Where: "end", Quantity: "current", Unit: "A", Start: 1e-9, Step: 2.5e-10, Samples: []float64{0.125},
			Tail: record.Tail{Start: 800e-9, Step: 2.5e-10, Samples: []float64{0.1}},
		},
	}
}

func sampleLines() []record.ModelLine {
	return []record.ModelLine{
		{
			Name: "coax", Text: "RG-213 of the cable table", Model: "dispersive", SeriesResidual: 4e-4, FieldPerVolt: 384,
			Pedigree: []record.Pedigree{
				{What: "z0", Text: "50 ohm", Kind: "catalogue", Note: "nominal, from memory"},
				{What: "model", Text: "dispersive", Kind: "assumed"},
			},
			Fit: []record.FitPoint{{Frequency: 10e6, Given: 0.0197, Fitted: 0.01991, Text: "1.97 dB/100m at 10 MHz"}},
		},
		{Name: "wire", Text: "l 1 uH/m, c 11.2 pF/m", Model: "constant"},
	}
}

func sampleRatings() []record.Rating {
	return []record.Rating{
		{
			Section: "main", Quantity: "voltage", Unit: "V", Steady: 12, SteadyAt: 0.5, Peak: 21, PeakAt: 0.5, PeakTime: 7.5e-9,
			Uncertainty: 0.01, Rated: 28.2842712474619, Text: "20 V rms", Source: "cable table", Advisory: true, Derating: 6,
			Allowed: 14.1755, Margin: -6.8245, MarginDB: -3.41, MarginPercent: -48.1, Verdict: record.MissedReq, Field: 8064,
		},
		{
			Section: "main", Quantity: "current", Unit: "A", Steady: 0.2, Peak: 0.4, PeakAt: 0.025, PeakTime: 5e-9,
			Uncertainty: math.NaN(), Rated: 1, Text: "1 A peak", Source: "section main",
			Allowed: 1, Margin: 0.6, MarginDB: 7.96, MarginPercent: 60, Verdict: record.NotShownReq,
		},
	}
}

func sampleSpaceTime() record.SpaceTime {
	return record.SpaceTime{
		Path:  []record.PathSection{{Section: "main", Reversed: true, To: 0.5}},
		Phase: 30, Z: []float64{0, 0.5}, T: []float64{0, 5e-9, 10e-9},
		V:      [][]float64{{0, 0}, {10, 0}, {5, 12}},
		Fronts: []record.Front{{Z1: 0.5, T1: 2.5e-9, Passage: 1}},
	}
}

func sampleBounces() record.Bounces {
	return record.Bounces{
		Sections: []record.BounceSection{{Section: "main", From: "source", To: "far", Z0: 50, Delay: 2.5e-9, Kept: 0.999}},
		Coefficients: []record.BounceCoefficient{
			{Junction: "source", FromLeft: math.NaN(), FromRight: -1, ThroughRight: math.NaN(), ThroughLeft: math.NaN()},
			{Junction: "far", FromLeft: 1, FromRight: math.NaN(), ThroughRight: math.NaN(), ThroughLeft: math.NaN()},
		},
		Arrivals: []record.Bounce{
			{Junction: "source", Step: 1, Voltage: 1},
			{Time: 2.5e-9, Junction: "far", Section: "main", Step: 2, Voltage: 2},
		},
		Note: "between the steps the voltage moves",
	}
}
