package reporttest

import (
	"fmt"
	"math"
	"strings"

	"linewitness/sim/record"
)

// Feeder is an FM broadcast feeder with a shorted stub, in four cases.
func Feeder() *record.Record { return feeder() }

var feeder = made(newFeeder)

func newFeeder() *record.Record {
	nominal := FeederNetwork()
	r := newRecord("Hilltop FM feeder, main line and tuning stub", nominal)
	variant := func(change func(*Network)) Network {
		n := nominal
		n.Loads = append([]Load{}, nominal.Loads...)
		n.Sections = append([]Section{}, nominal.Sections...)
		change(&n)
		return n
	}
	iced := variant(func(n *Network) { n.Loads[0].R, n.Loads[0].L = 14, 68.14e-9 })
	arc := variant(func(n *Network) { n.Loads[0].Short = true })
	bare := variant(func(n *Network) { n.Sections, n.Loads = n.Sections[:2], n.Loads[:1] })
	opt := Options{Error: 2e-4, Loop: 0.35}
	r.Cases = []record.Case{
		nominal.Case("nominal", opt), iced.Case("iced", opt), arc.Case("arc", opt), bare.Case("stub_missing", opt),
	}
	for i := range r.Cases {
		judgeFeeder(&r.Cases[i])
		r.Cases[i].Convergence = study(&r.Cases[i], opt)
	}
	claimFeeder(r)
	finish(r)
	return r
}

// FeederNetwork is the nominal network of Feeder.
func FeederNetwork() Network {
	return Network{
		Frequency: 98.1e6, EMF: 2000, Source: 50, At: "transmitter",
		Sections: []Section{
			{Name: "main", From: "transmitter", To: "tee", Length: 120, Z0: 50, VF: 0.921, DB: 0.007},
			{Name: "tail", From: "tee", To: "flange", Length: 0.932, Z0: 50, VF: 0.921, DB: 0.007},
			{Name: "stub", From: "tee", To: "stub_end", Length: 0.447, Z0: 50, VF: 0.997, DB: 0.007},
		},
		Loads: []Load{
			{Name: "antenna", At: "flange", R: 28, L: 29.20e-9},
			{Name: "stub_short", At: "stub_end", Short: true},
		},
	}
}

func newRecord(title string, n Network) *record.Record {
	source := "format: 1\nrecord:\n  title: " + title + "\n  number: DR-0042\n" +
		"# the stub is cut on site: 0.447 m is the drawing's value, 5 mm shorter is still inside\n" +
		"source:\n  at: " + n.At + "\n  frequency: " + trim(n.Frequency/1e6) + " MHz\n  emf: " + trim(n.EMF) + " V peak\n  impedance: 50 ohm\n" +
		"lines:\n  coax: {z0: 50 ohm, velocity_factor: 0.921, loss: {at: 98.1 MHz, attenuation: 0.70 dB/100m}}\nsections:\n"
	for _, s := range n.Sections {
		source += fmt.Sprintf("  %s: {from: %s, to: %s, length: %g m, line: coax}\n", s.Name, s.From, s.To, s.Length)
	}
	return &record.Record{
		Tool: record.Tool{Version: "0.1.0", Go: "go1.26.8 linux/amd64"},
		Design: record.Design{
			Title: title, Number: "DR-0042", Revision: "B",
			Purpose:    "Shows that the feeder may be driven at 10 kW into the nominal and the iced aerial, and what an arc at the flange does to it.",
			PreparedBy: "M. Okafor", CheckedBy: "L. Lindqvist", Date: "2026-05-14",
			File: "feeder.yaml", SHA256: strings.Repeat("0123456789abcdef", 4), Source: []byte(source),
			Convention: "engineering", Agreement: 5e-3, Tolerance: 1e-4, MaxPeriods: 20000,
			FSVChoices: []string{
				"the lowest 4 bins of the transform are the offset", "the break is 5 bins above the one at which 40 % of the magnitudes are reached",
				"derivatives are differences over 1 point to either side",
			},
		},
	}
}

// finish sets the verdict of the record and its cases side by side.
func finish(r *record.Record) {
	r.Matrix = sideBySide(r)
	r.Verdict = record.Verified
	for _, c := range r.Cases {
		if c.Verdict.Rank() > r.Verdict.Rank() {
			r.Verdict = c.Verdict
		}
	}
}

// Limit makes a requirement with an upper limit and judges it.
func Limit(id, quantity, subject, unit string, value, limit, uncertainty float64, words string) record.Requirement {
	q := record.Requirement{
		ID: id, Quantity: quantity, Subject: subject, Unit: unit, Value: value, Max: &limit, Limit: words,
		Margin: limit - value, MarginPercent: 100 * (limit - value) / limit,
		MarginDB: 20 * math.Log10(limit/value), Uncertainty: uncertainty, Method: "fdtd",
	}
	switch {
	case value+uncertainty <= limit:
		q.Verdict = record.Met
	case value-uncertainty > limit:
		q.Verdict = record.MissedReq
	default:
		q.Verdict, q.Note = record.NotShownReq, "the uncertainty straddles the limit"
	}
	return q
}

func judgeFeeder(c *record.Case) {
	main := c.Phasor.Sections[0]
	tail := c.Phasor.Sections[1]
	vswr := Limit("R1", "vswr", "main, from end", "1", main.From.VSWR, 1.5, 4e-4, "at most 1.5")
	vswr.MarginDB = math.NaN()
	vswr.Text, vswr.Source = "The transmitter sees a VSWR of 1.5 or less.", "transmitter manual 4.2"
	c.Requirements = []record.Requirement{
		vswr,
		Limit("R2", "peak_voltage", "main", "V peak", c.Stress.Sections[0].Voltage, 1950, 0.8, "at most 1.95 kV peak"),
		Limit("R3", "peak_voltage", "tail", "V peak", c.Stress.Sections[1].Voltage, 1950, 0.8, "at most 1.95 kV peak"),
		Limit("R4", "steady_current", "tail", "A peak", tail.CurrentMax.Value, 42, 0.02, "at most 42 A peak"),
		Limit("R5", "settle_time", "network", "s", c.Settling.To1Percent, 20e-6, 1e-9, "at most 20 us"),
	}
	for _, q := range c.Requirements {
		if q.Verdict == record.MissedReq {
			c.Verdict = record.Missed
		}
	}
	c.Warnings = []string{"section tail: 0.31 wavelengths are sampled by 15 cells; the phase error of the section is 0.002 degrees"}
}
