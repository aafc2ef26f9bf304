package reporttest

import (
	"math"
	"math/cmplx"

	"linewitness/sim/record"
)

// claim judges a made-up claim on the figures of both witnesses.
func claim(q record.Claim, tolerance string, relative float64) record.Claim {
	q.ToleranceText, q.Tolerance = tolerance, relative*cmplx.Abs(q.Claimed)
	q.Difference = cmplx.Abs(q.FDTD - q.Claimed)
	if !cmplx.IsNaN(q.Phasor) {
		q.Difference = math.Max(q.Difference, cmplx.Abs(q.Phasor-q.Claimed))
	}
	switch {
	case q.Difference+q.Uncertainty <= q.Tolerance:
		q.Verdict = record.Confirmed
	case q.Difference-q.Uncertainty > q.Tolerance:
		q.Verdict = record.Contradicted
	default:
		q.Verdict, q.Finding = record.ClaimOpen, "The difference and its uncertainty straddle the tolerance."
	}
	return q
}

// claimFeeder gives the cases of Feeder claims of every verdict: two that one
// slip explains, and one that none does.
func claimFeeder(r *record.Record) {
	c := &r.Cases[0]
	p, f := c.Phasor, c.FDTD
	main := p.Sections[0]
	slip := record.Slip{
		Name: "velocity factor left out", Where: "every section", Text: "with it left out the impedance is 18.68 - j14.84 ohm",
		Value: 18.68 - 14.84i, Also: []string{"velocity factor used twice (section stub)"}, Explains: []string{"C2", "C3"},
	}
	at := slip
	at.Value, at.Also = 0.6*p.Junctions[1].V, nil
	c.Claims = []record.Claim{
		claim(record.Claim{
			ID: "C1", Quantity: "vswr", Subject: "main, from end", Case: c.Name, Unit: "1", Claimed: 1.001, ClaimedText: "1.001", Text: "Matched at the transmitter",
			Source: "calc sheet 2", Phasor: complex(main.From.VSWR, 0), FDTD: complex(f.Sections[0].From.VSWR, 0), Uncertainty: 4e-4,
		}, "1 %", 0.01),
		claim(record.Claim{
			ID: "C2", Quantity: "input_impedance", Subject: "main, from end", Case: c.Name, Unit: "ohm", Complex: true, Claimed: 18.7 - 14.8i, ClaimedText: "18.7 - j14.8 ohm",
			Text: "Impedance at the lower end of the main feeder", Source: "calc sheet 3", Phasor: main.From.Impedance, FDTD: f.Sections[0].From.Impedance, Uncertainty: 0.02,
			Slips: []record.Slip{slip, {Name: "degrees taken for radians", Where: "section stub", Value: 18.9 - 14.6i, Explains: []string{"C2"}}},
		}, "2 %", 0.02),
		claim(record.Claim{
			ID: "C3", Quantity: "voltage", Subject: "at tee", Case: c.Name, Unit: "V rms", Complex: true, Claimed: 0.6 * p.Junctions[1].V / math.Sqrt2, ClaimedText: "424.1 V rms at 12 deg",
			Phasor: p.Junctions[1].V / math.Sqrt2, FDTD: f.Junctions[1].V / math.Sqrt2, Uncertainty: 0.15, Slips: []record.Slip{at},
		}, "1 %", 0.01),
		claim(record.Claim{
			ID: "C4", Quantity: "load_power", Subject: "antenna", Case: c.Name, Unit: "W", Claimed: 6543, ClaimedText: "6.543 kW", Source: "tender",
			Phasor: complex(p.Loads[0].Power, 0), FDTD: complex(f.Loads[0].Power, 0), Uncertainty: 4,
		}, "1 %", 0.01),
	}
	if c.Verdict.Rank() < record.Doubted.Rank() {
		c.Verdict = record.Doubted
	}
	for i := range c.Claims {
		if q := &c.Claims[i]; q.Verdict == record.Contradicted && len(q.Slips) > 0 {
			q.Finding = "Of the single slips tried, " + counted(len(q.Slips)) + " would give the claimed figure."
		} else if q.Verdict == record.Contradicted {
			q.Finding = "No single known slip explains it."
		}
	}
	arc := &r.Cases[2]
	volts := arc.Stress.Sections[0].Voltage
	arc.Claims = []record.Claim{claim(record.Claim{
		ID: "C5", Quantity: "peak_voltage", Subject: "main", Case: arc.Name, Unit: "V peak", Claimed: complex(volts*0.99, 0), ClaimedText: trim(volts*0.99) + " V peak",
		Phasor: cmplx.NaN(), FDTD: complex(volts, 0), Uncertainty: volts * 0.002,
	}, "1 %", 0.01)}
}

func counted(n int) string { return []string{"none", "one", "two", "three"}[n] }
