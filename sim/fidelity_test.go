package sim

import (
	"strings"
	"testing"

	"linewitness/sim/record"
)

// curveOf finds a comparison of a record by what it is of.
func curveOf(t *testing.T, c record.Case, subject, curve string) record.Fidelity {
	t.Helper()
	for _, f := range c.Fidelity {
		if f.Subject == subject && strings.HasPrefix(f.Curve, curve) {
			return f
		}
	}
	t.Fatalf("no %s of %s", curve, subject)
	return record.Fidelity{}
}

// shortRun is a line that is at rest long before sixteen periods are over, with
// a dead section behind a short and a current that is hardly there.
const shortRun = `
source: {at: a, frequency: 100 MHz, emf: 10 V peak, impedance: 50 ohm, start: {profile: ramp, rise: 1 periods, phase: 0 deg}}
lines: {k: {z0: 50 ohm, velocity_factor: 0.66, loss: {at: 100 MHz, attenuation: 5 dB/100m}}}
sections:
  m: {from: a, to: b, length: 2.2 m, line: k}
  dead: {from: c, to: d, length: 1.5 m, line: k}
elements: {join: {between: [b, c], c: 0.3 pF}}
loads: {l: {at: b, r: 60 ohm}, short: {at: c, impedance: short}, x: {at: d, r: 50 ohm}, tank: {at: b, r: 2 kohm, l: 100 uH}}
`

// TestWaveformsOfAShortRun: what is compared is the steady wave, not the start, so
// that two solutions that agree are found to.
func TestWaveformsOfAShortRun(t *testing.T) {
	c := verified(t, text(t, shortRun)).Cases[0]
	for _, subject := range []string{"source voltage", "source current", "b voltage", "l current"} {
		f := curveOf(t, c, subject, "waveform")
		if f.Note != "" || f.GDM.Word != "excellent" {
			t.Errorf("%s: %.3g %s %s", subject, f.GDM.Value, f.GDM.Word, f.Note)
		}
	}
	if f := curveOf(t, c, "dead", "|V|"); f.Note == "" {
		t.Errorf("rounding in a dead section is compared: %.3g %s", f.GDM.Value, f.GDM.Word)
	}
}

// TestWaveformsOfAnUnfinishedRun: a run that its cap ends shows no steady wave.
func TestWaveformsOfAnUnfinishedRun(t *testing.T) {
	c := verified(t, text(t, strings.Replace(shortRun, "rise: 1 periods", "rise: 100 periods", 1)+"grid: {max_periods: 60}\n")).Cases[0]
	if f := curveOf(t, c, "source voltage", "waveform"); f.Note == "" {
		t.Errorf("compared: %.3g %s", f.GDM.Value, f.GDM.Word)
	}
}
