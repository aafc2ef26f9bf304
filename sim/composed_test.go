package sim

import (
	"math"
	"testing"

	"linewitness/sim/line"
	"linewitness/sim/network"
	"linewitness/sim/record"
)

// judged checks the verdicts of a case and of requirements in it.
func judged(t *testing.T, c record.Case, verdict record.Verdict, want map[string]record.RequirementVerdict) {
	t.Helper()
	if c.Verdict != verdict {
		t.Errorf("case %s: %s, want %s: %v", c.Name, c.Verdict, verdict, c.Warnings)
	}
	for id, v := range want {
		if r := requirement(t, c, id); r.Verdict != v {
			t.Errorf("%s %s %s: %.6g %s, uncertainty %.3g: %s, want %s", id, r.Quantity, r.Subject, r.Value, r.Unit, r.Uncertainty, r.Verdict, v)
		}
	}
}

// TestReturnLossOfAMatch: a match so good that only errors reflect has a return
// loss of at least what they make, and is met.
func TestReturnLossOfAMatch(t *testing.T) {
	c := verified(t, text(t, `
source: {at: a, frequency: 10 MHz, emf: 100 V peak, impedance: 50 ohm, start: {profile: ramp, rise: 3 periods, phase: 0 deg}}
lines: {k: {z0: 50 ohm, velocity_factor: 0.66}}
sections: {m: {from: a, to: b, length: 17 m, line: k}}
loads: {l: {at: b, r: 50 ohm}}
requirements:
  - {id: F, quantity: return_loss, section: m, end: from, min: 20 dB}
  - {id: T, quantity: return_loss, section: m, end: to, min: 20 dB}
  - {id: X, quantity: return_loss, section: m, end: from, min: 86 dB}
`)).Cases[0]
	// 87 dB is what the grid makes of it, within 7 dB.
	judged(t, c, record.NotShown, map[string]record.RequirementVerdict{"F": record.Met, "T": record.Met, "X": record.NotShownReq})
}

// ratrace is a ring of six quarters of a wavelength, whose port p3 is dead.
const ratrace = `
source: {at: p1, frequency: 1 GHz, emf: 10 V peak, impedance: 50 ohm, start: {profile: ramp, rise: 3 periods, phase: 0 deg}}
lines: {k: {z0: 70.710678 ohm, velocity_factor: 0.66}}
sections:
  a: {from: p1, to: p2, length: 90 deg, line: k}
  b: {from: p2, to: p3, length: 90 deg, line: k}
  c: {from: p3, to: p4, length: 90 deg, line: k}
  d: {from: p4, to: p1, length: 270 deg, line: k}
loads: {l2: {at: p2, r: 50 ohm}, iso: {at: p3, r: 50 ohm}, l4: {at: p4, r: 50 ohm}}
requirements:
  - {id: L, quantity: loss, load: iso, min: 30 dB}
  - {id: P, quantity: load_power, load: iso, max: 0 dBm}
  - {id: S, quantity: power_split, between: [l2, l4], min: -0.5 dB, max: 0.5 dB}
  - {id: I, quantity: power_split, between: [l2, iso], min: 30 dB}
`

// TestIsolatedPort: a port that is dead for the closed form and all but dead on
// the grid is no disagreement, and is shown to be isolated.
func TestIsolatedPort(t *testing.T) {
	c := verified(t, text(t, ratrace)).Cases[0]
	judged(t, c, record.Verified, nil)
}

// TestRelativeToRinging: what the reference case has left of its settling counts
// in a change from it, however well the case itself has settled.
func TestRelativeToRinging(t *testing.T) {
	file := `
source: {at: a, frequency: 100 MHz, emf: 10 V peak, impedance: 50 ohm, start: {profile: ramp, rise: 3 periods, phase: 0 deg}}
lines: {k: {z0: 50 ohm, velocity_factor: 1.0}}
sections: {m: {from: a, to: b, length: 0.75 wavelengths, line: k}}
loads: {l: {at: b, r: 50 ohm}}
cases: {ringing: {loads: {l: {r: 1 ohm}}, source: {impedance: 2 ohm}}}
requirements:
  - {id: P, quantity: load_power, load: l, relative_to: ringing, min: 0 dB}
  - {id: V, quantity: steady_voltage, at: b, relative_to: ringing, min: 0 dB}
  - {id: A, quantity: phase, at: b, relative_to: ringing, min: -10 deg, max: 10 deg}
`
	all := func(v record.RequirementVerdict) map[string]record.RequirementVerdict {
		return map[string]record.RequirementVerdict{"P": v, "V": v, "A": v}
	}
	judged(t, verified(t, text(t, file)).Cases[0], record.Verified, all(record.Met))
	// And a reference that has not settled shows nothing.
	r := verified(t, text(t, file+"grid: {max_periods: 40}\n"))
	judged(t, r.Cases[0], record.NotShown, all(record.NotShownReq))
	judged(t, r.Cases[1], record.Unsettle, nil)
	if note := requirement(t, r.Cases[0], "P").Note; note == "" {
		t.Error("no note says why")
	}
}

// TestStepDown: the currents behind a transformer are larger than those of the
// line, and what the settling leaves of them is too.
func TestStepDown(t *testing.T) {
	c := verified(t, text(t, `
source: {at: a, frequency: 10 MHz, emf: 10 V peak, impedance: 20 ohm, start: {profile: ramp, rise: 3 periods, phase: 0 deg}}
lines: {k: {z0: 50 ohm, velocity_factor: 1.0}}
sections: {m: {from: a, to: b, length: 2.5 wavelengths, line: k}}
elements: {t: {from: b, to: c, ratio: "50:1"}}
loads: {l: {at: c, r: 5 mohm}}
requirements:
  - {id: I, quantity: steady_current, at: c, max: 100 A peak}
  - {id: W, quantity: steady_current, max: 100 A peak}
`)).Cases[0]
	judged(t, c, record.Verified, nil)
}

// TestResonantTank: likewise the voltage of a tank that no section ends at, on
// one grid as on three.
func TestResonantTank(t *testing.T) {
	f := text(t, `
source: {at: a, frequency: 10 MHz, emf: 10 V peak, impedance: 50 ohm, start: {profile: ramp, rise: 3 periods, phase: 0 deg}}
lines: {k: {z0: 50 ohm, velocity_factor: 1.0}}
sections: {m: {from: a, to: b, length: 1 wavelengths, line: k}}
elements: {coil: {between: [b, c], l: 5 uH}}
loads: {l: {at: c, c: 50.66 pF, r: 3 ohm}}
requirements:
  - {id: V, quantity: steady_voltage, at: c, max: 100 V peak}
`)
	for _, grids := range []int{1, 3} {
		r, err := Verify(t.Context(), f, Options{Grids: grids})
		if err != nil {
			t.Fatal(err)
		}
		judged(t, r.Cases[0], record.Verified, nil)
	}
}

// TestFarEnd: at the far end of a line that takes 89 dB the errors are those
// that are there, not those of the near end.
func TestFarEnd(t *testing.T) {
	c := verified(t, text(t, `
source: {at: a, frequency: 10 MHz, emf: 100 V peak, impedance: 50 ohm, start: {profile: ramp, rise: 3 periods, phase: 0 deg}}
lines: {k: {z0: 50 ohm, velocity_factor: 0.66, loss: {at: 10 MHz, attenuation: 50 dB/100m}}}
sections: {m: {from: a, to: b, length: 180 m, line: k}}
loads: {l: {at: b, r: 150 ohm}}
requirements:
  - {id: L, quantity: loss, section: m, min: 87 dB, max: 91 dB}
  - {id: P, quantity: load_power, load: l, min: -40 dBm}
`)).Cases[0]
	judged(t, c, record.Missed, map[string]record.RequirementVerdict{"L": record.Met, "P": record.MissedReq})
}

// TestBackwards: a section that is drawn against the power has the VSWR and the
// loss of one that is drawn with it.
func TestBackwards(t *testing.T) {
	draw := func(from, to, end string) record.Case {
		return verified(t, text(t, `
source: {at: a, frequency: 100 MHz, emf: 10 V peak, impedance: 50 ohm, start: {profile: ramp, rise: 3 periods, phase: 0 deg}}
lines: {k: {z0: 50 ohm, velocity_factor: 0.66, loss: {at: 100 MHz, attenuation: 5 dB/100m}}}
sections: {m: {from: `+from+`, to: `+to+`, length: 13 m, line: k}}
loads: {l: {at: b, r: 75 ohm}}
requirements:
  - {id: V, quantity: vswr, section: m, end: `+end+`, max: 2}
  - {id: L, quantity: loss, section: m, max: 1 dB}
claims:
  - {id: C, quantity: vswr, section: m, end: `+end+`, value: 1.5, tolerance: 0.01}
`)).Cases[0]
	}
	with, against := draw("a", "b", "to"), draw("b", "a", "from")
	for _, id := range []string{"V", "L"} {
		w, a := requirement(t, with, id), requirement(t, against, id)
		if math.Abs(w.Value-a.Value) > w.Uncertainty || a.Verdict != record.Met {
			t.Errorf("%s: %.5g with the power, %.5g against it (%s)", id, w.Value, a.Value, a.Verdict)
		}
	}
	if v := against.Claims[0].Verdict; v != record.Confirmed {
		t.Errorf("claim against the power: %s", v)
	}
	if v := section(&against.Phasor, "m").From.VSWR; math.Abs(v-1.5) > 0.01 {
		t.Errorf("record: VSWR %.4g", v)
	}
}

// TestNothingThrough: the loss of a stub without loss, and of a section into
// which power goes at both ends, is no figure; nor is an impedance where there is
// neither voltage nor current.
func TestNothingThrough(t *testing.T) {
	c := verified(t, text(t, `
source: {at: a, frequency: 30 MHz, emf: 100 V peak, impedance: 50 ohm, start: {profile: ramp, rise: 3 periods, phase: 0 deg}}
lines: {k: {z0: 75 ohm, velocity_factor: 0.8}}
sections:
  m: {from: a, to: b, length: 37 deg, line: k}
  o: {from: b, to: c, length: 81 deg, line: k}
  s: {from: b, to: d, length: 200 deg, line: k}
  dead: {from: d, to: e, length: 40 deg, line: k}
loads: {l: {at: b, r: 20 ohm}, sh: {at: d, impedance: short}, x: {at: e, r: 10 ohm}}
requirements:
  - {id: O, quantity: loss, section: o, max: 1 dB}
  - {id: S, quantity: loss, section: s, max: 1 dB}
  - {id: Z, quantity: input_impedance, section: dead, end: from, within: 5 ohm of 50 ohm}
  - {id: X, quantity: input_impedance, section: o, end: to, x: {min: 10 ohm}}
`)).Cases[0]
	no := record.NotShownReq
	judged(t, c, record.NotShown, map[string]record.RequirementVerdict{"O": no, "S": no, "Z": no, "X": no})
	for _, id := range []string{"O", "S", "Z"} {
		if r := requirement(t, c, id); !math.IsNaN(r.Value) {
			t.Errorf("%s: %g", id, r.Value)
		}
	}
}

// TestSettledBeforeTheEnd: a run that its cap ends may have more to come.
func TestSettledBeforeTheEnd(t *testing.T) {
	c := verified(t, text(t, `
source: {at: a, frequency: 10 MHz, emf: 100 V peak, impedance: 50 ohm, start: {profile: ramp, rise: 100 periods, phase: 0 deg}}
lines: {k: {z0: 50 ohm, velocity_factor: 0.66}}
sections: {m: {from: a, to: b, length: 3 wavelengths, line: k}}
loads: {l: {at: b, r: 500 ohm}}
requirements:
  - {id: S, quantity: settle_time, within: 60 %, max: 9 us}
grid: {max_periods: 65}
`)).Cases[0]
	judged(t, c, record.NotShown, map[string]record.RequirementVerdict{"S": record.NotShownReq})
}

// TestSettlingOfABareJump: where the ripple of a bare jump keeps a coarse grid from
// settling, the time has no uncertainty, and the record says why it is not shown.
func TestSettlingOfABareJump(t *testing.T) {
	c := verified(t, text(t, `
source: {at: a, frequency: 10 MHz, emf: 100 V peak, impedance: 0 ohm, start: {profile: abrupt, phase: worst}, stop: {at: 2.5 us}}
lines: {k: {z0: 50 ohm, velocity_factor: 0.66}}
sections: {m: {from: a, to: b, length: 1.3 m, line: k}}
loads: {l: {at: b, r: 500 ohm, l: 3 uH}}
requirements:
  - {id: S, quantity: settle_time, max: 2.5 us}
`)).Cases[0]
	if r := requirement(t, c, "S"); r.Verdict != record.NotShownReq || math.IsNaN(r.Value) || r.Note == "" {
		t.Errorf("%g s: %s (%s)", r.Value, r.Verdict, r.Note)
	}
}

// TestSourceOfAResonantBranch: most of the current of the source goes past the
// section, and what is left of its start rings in the reactances of the source.
// Drawn at random, where it was not explained.
func TestSourceOfAResonantBranch(t *testing.T) {
	const f = 100e6
	reactance := func(ohm float64) float64 { return ohm / (2 * math.Pi * f) }
	k := line.Constants{L: 20 / line.C0, C: 1 / (20 * line.C0), G: 2 * 0.1 * f / line.C0 / 20} // 0.1 Np per wavelength
	net := &network.Network{
		Frequency: f, Junctions: []string{"a", "b", "c"},
		Sections: []network.Section{{Name: "s", From: 0, To: 1, Length: 0.0625 * line.C0 / f, Line: k}},
		Branches: []network.Branch{
			{Name: "load", A: 1, B: network.Ground, Series: network.Series{R: 10}},
			{Name: "choke", Kind: network.Element, A: 0, B: 2, Series: network.Series{R: 1, L: reactance(1)}},
			{Name: "hanging", A: 2, B: network.Ground, Series: network.Series{R: 10}},
		},
		Source: network.Source{EMF: 1, Series: network.Series{R: 10, L: reactance(30.875), C: 1 / (2 * math.Pi * f)}},
	}
	s := settled(t, net, 40)
	for _, k := range s.keyStudies() {
		if st := s.study(k); !st.Explained {
			t.Errorf("%s %s: error %.3g, uncertainty %.3g", st.Quantity, st.Subject, st.Error, st.Uncertainty)
		}
	}
}
