package sim

import (
	"strings"
	"testing"

	"linewitness/sim/record"
)

// TestClaimsOfDemo: from the design file to the record, the demo's own claims
// are confirmed and nothing is said of them.
func TestClaimsOfDemo(t *testing.T) {
	_, r := demos["hilltop-fm-feeder"](t)
	claims := caseOf(t, r, Nominal).Claims
	if len(claims) != 3 {
		t.Fatalf("%d claims, want 3", len(claims))
	}
	for _, c := range claims {
		if c.Verdict != record.Confirmed || len(c.Slips) > 0 {
			t.Errorf("%s: %s, slips %v", c.ID, c.Verdict, c.Slips)
		}
	}
}

// TestContradictedOnRecord: from the file to the record, a velocity factor left
// out of two figures is named first for both, on the section that has it, and the
// design is not verified though it meets its requirement. A figure that no slip
// gives is said to have none.
//
// The line is that of case M of the mistakes catalogue: 18.68 - j14.84 ohm for
// 16.97 - j0.63 (computed independently; its loss does not depend on the length
// in wavelengths; Z0 is taken real there, which is 1 % of the VSWR).
func TestContradictedOnRecord(t *testing.T) {
	c := verified(t, text(t, `
source: {at: a, frequency: 100 MHz, emf: 20 V peak, impedance: 50 ohm, start: {profile: ramp, rise: 3 periods, phase: 0 deg}}
lines: {k: {z0: 50 ohm, velocity_factor: 0.66, loss: {at: 100 MHz, attenuation: 0.16 dB/m}, model: constant}}
sections: {m: {from: a, to: b, length: 3.2 m, line: k}}
loads: {l: {at: b, impedance: 25 - j40 ohm}}
requirements:
  - {id: R1, quantity: load_power, load: l, min: 0.6 W}
claims:
  - {id: Z, quantity: input_impedance, section: m, end: from, value: 18.68 - j14.84 ohm, tolerance: 1 %}
  - {id: P, quantity: phase_difference, between: [b, a], value: -27.9 deg, tolerance: 0.5 deg}
  - {id: V, quantity: vswr, section: m, end: to, value: 3.494, tolerance: 2 %}
  - {id: N, quantity: load_power, load: l, value: 0.2113 W, tolerance: 0.1 %}
`)).Cases[0]
	if c.Verdict != record.Doubted {
		t.Errorf("verdict %q", c.Verdict)
	}
	by := map[string]record.Claim{}
	for _, k := range c.Claims {
		by[k.ID] = k
	}
	for _, id := range []string{"Z", "P"} {
		k := by[id]
		if k.Verdict != record.Contradicted || len(k.Slips) == 0 || !strings.Contains(k.Slips[0].Name, "velocity factor left out") {
			t.Errorf("%s: %s, slips %+v", id, k.Verdict, k.Slips)
			continue
		}
		if got := strings.Join(k.Slips[0].Explains, " "); !strings.Contains(got, "Z") || !strings.Contains(got, "P") {
			t.Errorf("%s: the slip explains %q", id, got)
		}
	}
	if k := by["V"]; k.Verdict != record.Confirmed {
		t.Errorf("VSWR at the load: %s, %.5g and %.5g", k.Verdict, real(k.Phasor), real(k.FDTD))
	}
	if k := by["N"]; k.Verdict != record.Contradicted || len(k.Slips) > 0 || !strings.Contains(k.Finding, "o single known slip explains it") {
		t.Errorf("a figure of nowhere: %s, %q, slips %v", k.Verdict, k.Finding, k.Slips)
	}
}
