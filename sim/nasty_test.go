package sim

import (
	"math"
	"testing"

	"linewitness/sim/design"
	"linewitness/sim/record"
)

// text makes a design file around the given keys: one line from a to b.
func text(t *testing.T, keys string) *design.File {
	t.Helper()
	f, err := design.Load("t.yaml", []byte("format: 1\nrecord: {title: t, number: n}\n"+keys))
	if err != nil {
		t.Fatal(err)
	}
	return f
}

// requirement finds a requirement of a case by its id.
func requirement(t *testing.T, c record.Case, id string) record.Requirement {
	t.Helper()
	for _, r := range c.Requirements {
		if r.ID == id {
			return r
		}
	}
	t.Fatalf("no requirement %s", id)
	return record.Requirement{}
}

// TestCapBeforeTwoWindows: a cap below two round trips ends with "not
// settled", and the record says why.
func TestCapBeforeTwoWindows(t *testing.T) {
	c := verified(t, text(t, `
source: {at: a, frequency: 10 MHz, emf: 100 V peak, impedance: 50 ohm}
lines: {k: {z0: 50 ohm, velocity_factor: 1.0}}
sections: {m: {from: a, to: b, length: 30 wavelengths, line: k}}
loads: {l: {at: b, r: 100 ohm}}
grid: {max_periods: 50}
`)).Cases[0]
	if c.Verdict != record.Unsettle || c.Settling.Decay == "" {
		t.Errorf("verdict %s, decay %q", c.Verdict, c.Settling.Decay)
	}
}

// TestUnfinishedPeak: a source that is still rising when the cap is reached
// has not shown its peak, however small that is so far.
func TestUnfinishedPeak(t *testing.T) {
	f := text(t, `
source: {at: a, frequency: 10 MHz, emf: 200 V peak, impedance: 50 ohm, start: {profile: ramp, rise: 3000 periods, phase: 0 deg}}
lines: {k: {z0: 50 ohm, velocity_factor: 0.66, rating: {voltage: 500 V peak}}}
sections: {m: {from: a, to: b, length: 7 m, line: k}}
loads: {l: {at: b, r: 100 ohm}}
requirements:
  - {id: P, quantity: peak_voltage, max: 120 V peak}
grid: {max_periods: 200}
`)
	c := verified(t, f).Cases[0]
	if r := requirement(t, c, "P"); r.Verdict != record.NotShownReq || r.Note == "" {
		t.Errorf("peak %.4g V: %s (%s)", r.Value, r.Verdict, r.Note)
	}
	if r := c.Ratings[0]; r.Verdict != record.NotShownReq {
		t.Errorf("rating: %s", r.Verdict)
	}
	if c.Verdict != record.NotShown {
		t.Errorf("verdict %s", c.Verdict)
	}
	plan, err := MakePlan(t.Context(), f, DefaultGrids)
	if err != nil || len(plan.Cases[0].Warnings) == 0 {
		t.Errorf("the plan does not warn: %+v, %v", plan, err)
	}
}

// TestCurrentOfATrap: the current of a parallel trap at its two ends is the one
// that flows through it, not the one that circulates in it; and over all time
// it is no smaller than in steady state.
func TestCurrentOfATrap(t *testing.T) {
	c := verified(t, text(t, `
source: {at: a, frequency: 10 MHz, emf: 100 V peak, impedance: 50 ohm, start: {profile: ramp, rise: 3 periods, phase: 0 deg}}
lines: {k: {z0: 50 ohm, velocity_factor: 0.66}}
sections:
  m: {from: a, to: b, length: 3 m, line: k}
  n: {from: c, to: d, length: 3 m, line: k}
elements:
  trap: {between: [b, c], parallel: [{l: 0.1 uH}, {c: 2.4 nF}]}
loads: {l: {at: d, r: 50 ohm}}
requirements:
  - {id: SB, quantity: steady_current, at: b, max: 2 A peak}
  - {id: SC, quantity: steady_current, at: c, max: 2 A peak}
  - {id: PC, quantity: peak_current, at: c, max: 2 A peak}
`)).Cases[0]
	sb, sc, pc := requirement(t, c, "SB"), requirement(t, c, "SC"), requirement(t, c, "PC")
	// What flows in flows out, to within what the witnesses differ.
	if math.Abs(sb.Value-sc.Value) > sb.Uncertainty+sc.Uncertainty {
		t.Errorf("%.5g A at b, %.5g A at c", sb.Value, sc.Value)
	}
	if pc.Value < sc.Value-pc.Uncertainty-sc.Uncertainty {
		t.Errorf("largest ever %.5g A, steady %.5g A", pc.Value, sc.Value)
	}
}

// TestGridFloor: the error of the rational forms does not fall with the cells,
// and the grid must not be refined for ever against it.
func TestGridFloor(t *testing.T) {
	f := text(t, `
source: {at: a, frequency: 100 MHz, emf: 100 V peak, impedance: 50 ohm}
lines: {k: {z0: 50 ohm, velocity_factor: 0.66, loss: {at: 100 MHz, attenuation: 20 dB/100m}}}
grid: {agreement: 0.1 %}
sections: {m: {from: a, to: b, length: 50 m, line: k}}
loads: {l: {at: b, r: 100 ohm}}
`)
	p, err := newPlanned(t.Context(), Nominal, f.Nominal, DefaultGrids)
	if err != nil {
		t.Fatal(err)
	}
	if n := p.grids[0].grid.StepsPerPeriod; n > 400 {
		t.Errorf("%d steps per period for an error of %.3g", n, p.grids[0].error)
	}
	if p.grids[0].error > 0.001 {
		t.Errorf("expected error %.3g, above the limit", p.grids[0].error)
	}
}

// TestOpenEnd: the current of an open end is zero, its impedance infinite, and
// a section behind a short carries nothing.
func TestOpenEnd(t *testing.T) {
	c := verified(t, text(t, `
source: {at: a, frequency: 100 MHz, emf: 10 V peak, impedance: 50 ohm}
lines: {k: {z0: 50 ohm, velocity_factor: 0.66, loss: {at: 100 MHz, attenuation: 5 dB/100m}}}
sections:
  m: {from: a, to: b, length: 2 m, line: k}
  dead: {from: b, to: c, length: 1 m, line: k}
  open: {from: a, to: d, length: 0.7 m, line: k}
loads: {short: {at: b, impedance: short}, l: {at: c, r: 50 ohm}}
`)).Cases[0]
	open := section(&c.Phasor, "open").To
	if open.I != 0 || !math.IsInf(open.VSWR, 1) || !math.IsInf(real(open.Impedance), 1) {
		t.Errorf("open end %+v", open)
	}
	for who, p := range both(&c, func(s *record.Steady) float64 { return loadOf(s, "l").Power }) {
		if p != 0 {
			t.Errorf("%s: %g W behind a short", who, p)
		}
	}
	if c.Verdict != record.Verified {
		t.Errorf("verdict %s", c.Verdict)
	}
}

// TestJump: the peak of an abrupt start is known no better than its jump. On a
// matched line without loss nothing exceeds half the EMF, and a limit just above
// must not be missed; at an inductive load an ideal jump doubles, and the
// uncertainty must reach there.
func TestJump(t *testing.T) {
	for _, tt := range []struct {
		load string
		top  float64 // V, of the ideal jump
	}{
		{"r: 50 ohm", 316},
		{"impedance: 30 + j40 ohm", 632},
	} {
		c := verified(t, text(t, `
source: {at: a, frequency: 50 MHz, emf: 632 V peak, impedance: 50 ohm, start: {profile: abrupt, phase: 0 deg}}
lines: {k: {z0: 50 ohm, velocity_factor: 0.9}}
sections: {m: {from: a, to: b, length: 10 m, line: k}, n: {from: b, to: c, length: 3.33 m, line: k}}
loads: {l: {at: c, `+tt.load+`}}
requirements:
  - {id: P, quantity: peak_voltage, max: 320 V peak}
`)).Cases[0]
		r := requirement(t, c, "P")
		if math.Abs(r.Value-tt.top) > r.Uncertainty {
			t.Errorf("%s: peak %.1f V with uncertainty %.1f V, an ideal jump gives %.0f V", tt.load, r.Value, r.Uncertainty, tt.top)
		}
		if tt.top < 320 && r.Verdict == record.MissedReq {
			t.Errorf("%s: %s", tt.load, r.Verdict)
		}
	}
}
