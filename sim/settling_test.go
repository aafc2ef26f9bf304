package sim

import (
	"fmt"
	"math"
	"strings"
	"testing"

	"linewitness/sim/line"
	"linewitness/sim/record"
)

// resonant is a line of half a wavelength whose ends reflect much, in case: per
// round trip |Gs Gl| is kept, and a round trip is one period at 10 MHz.
func resonant(rs, rl float64, more string) string {
	return fmt.Sprintf(`
source: {at: a, frequency: 10 MHz, emf: 100 V peak, impedance: %g ohm, start: {profile: ramp, rise: 2 periods, phase: 0 deg}%s}
lines: {k: {z0: 50 ohm, velocity_factor: 1.0}}
sections: {m: {from: a, to: b, length: 0.5 wavelengths, line: k}}
loads: {l: {at: b, r: %g ohm}}
`, rs, more, rl)
}

// TestSettlingPredicted: predicted and measured loop factor, time constant and Q
// are those of the closed form for one line, rho = |Gs Gl|, tau = T/(-ln rho),
// Q = pi f tau (needs of the trade: common practice).
func TestSettlingPredicted(t *testing.T) {
	c := verified(t, text(t, resonant(10, 10, ""))).Cases[0]
	rho := (40.0 / 60) * (40.0 / 60)
	s := c.Settling
	tau := 100e-9 / -math.Log(rho)
	const fine = 1e-5 // one Newton step from the source frequency, at which the line resonates
	for _, e := range []struct {
		what                 string
		got, want, tolerance float64
	}{
		{"predicted loop factor", s.Predicted.LoopFactor, rho, fine},
		{"predicted time constant", s.Predicted.TimeConstant, tau, fine},
		{"predicted Q", s.Predicted.Q, math.Pi * 10e6 * tau, fine},
		{"predicted time to 1 %", s.Predicted.To1Percent, tau * math.Log(100), fine},
		{"measured loop factor", s.LoopFactor, rho, 2e-3}, // of the last changes, which still move
	} {
		if math.Abs(e.got/e.want-1) > e.tolerance {
			t.Errorf("%s: %.6g, want %.6g", e.what, e.got, e.want)
		}
	}
	if s.Passes != 2 || !s.Settled || s.Time < s.Earliest {
		t.Errorf("settled %v after %d passes at %.3g s, earliest %.3g s", s.Settled, s.Passes, s.Time, s.Earliest)
	}
	last := s.Curve[len(s.Curve)-2:]
	for _, p := range last {
		if !p.Passed || p.Estimate > 1e-4 || p.Mean > 1e-4 || p.Harmonic > 1e-4 || p.Gap < s.RoundTrip*(1-1e-9) {
			t.Errorf("a window that passed: %+v", p)
		}
	}
}

// TestSettlingPlaces: the phasors of every junction and load come to 10 %, 1 %
// and 0.1 % in that order, a factor of ten taking ln 10 time constants, and the
// drawn departures say the same.
func TestSettlingPlaces(t *testing.T) {
	c := verified(t, text(t, resonant(2.5, 2.5, ""))).Cases[0]
	decade := c.Settling.Predicted.TimeConstant * math.Log(10)
	if len(c.Settling.Places) != 3 {
		t.Fatalf("%d places, want two junctions and a load", len(c.Settling.Places))
	}
	for _, p := range c.Settling.Places {
		// A round trip is one period; the phasor is taken over one too.
		for _, d := range []float64{p.To1Percent - p.To10Percent, p.ToTenth - p.To1Percent} {
			if math.Abs(d-decade) > 150e-9 {
				t.Errorf("%s: a factor of ten in %.4g s, want %.4g s", p.Name, d, decade)
			}
		}
		for i, at := range p.Time {
			if at > p.To1Percent && p.Departure[i] > 0.01 {
				t.Errorf("%s: departure %.3g at %.4g s, after the time to 1 %% (%.4g s)", p.Name, p.Departure[i], at, p.To1Percent)
				break
			}
		}
		if p.Kind == "junction" && len(p.Time) < 20 {
			t.Errorf("%s: %d points for the figure", p.Name, len(p.Time))
		}
	}
}

// TestRingDown: after a stop an amplitude falls by the loop factor each round
// trip, to a thousandth in tau ln 1000.
func TestRingDown(t *testing.T) {
	c := verified(t, text(t, resonant(2.5, 2.5, ", stop: {at: 4 us, fall: 0.2 us}"))).Cases[0]
	if len(c.Settling.RingDown) != 2 {
		t.Fatalf("%d junctions ring down, want 2", len(c.Settling.RingDown))
	}
	tau := c.Settling.Predicted.TimeConstant
	for _, r := range c.Settling.RingDown {
		for _, e := range []struct{ got, decades float64 }{{r.To20, 1}, {r.To40, 2}, {r.To60dB, 3}} {
			// The fall of the source and the period of the phasor come on top.
			if d := e.got - tau*math.Log(10)*e.decades; !(d > -0.2e-6 && d < 0.3e-6) {
				t.Errorf("%s: %.0f dB down after %.4g s, predicted %.4g s", r.Name, 20*e.decades, e.got, tau*math.Log(10)*e.decades)
			}
		}
	}
	if d := c.Settling.RingDown[0].To60dB - c.Settling.Predicted.RingDown60; math.Abs(d) > 0.3e-6 {
		t.Errorf("-60 dB %.4g s from the prediction", d)
	}
}

// TestTooSlow: a network that keeps nearly all of its amplitude is not settled
// at the cap, and the record says when it would be.
func TestTooSlow(t *testing.T) {
	c := verified(t, text(t, resonant(0.05, 50000, "")+"grid: {max_periods: 150}\n")).Cases[0]
	if c.Verdict != record.Unsettle || c.Convergence.Skipped == "" {
		t.Fatalf("verdict %s, study %q", c.Verdict, c.Convergence.Skipped)
	}
	rho := (49.95 / 50.05) * (49950.0 / 50050)
	want := math.Log(1e4) / -math.Log(rho) // periods to the default tolerance
	if got := c.Settling.Predicted.Settled * 10e6; got < want || got > want+60 {
		t.Errorf("predicted after %.0f periods, want some more than %.0f", got, want)
	}
	if s := c.Settling.Decay; !strings.Contains(s, "the closed form predicts that 0.996 is kept, and steady state after") {
		t.Errorf("decay %q", s)
	}
}

// TestPlateausOnRecord: an unplugged branch and a far echo hold the junctions
// flat long before the end. The rule is not fooled: both witnesses agree, and the
// times on record lie after the echo.
func TestPlateausOnRecord(t *testing.T) {
	_, r := demos["reference-tree"](t)
	c := caseOf(t, r, "branch_3_unplugged")
	if got := c.Settling.To1Percent; got < 10*114e-9 { // ten round trips of a branch, each with its plateau
		t.Errorf("1 %% after %.4g s", got)
	}
	far := verified(t, text(t, `
source: {at: a, frequency: 10 MHz, emf: 100 V peak, impedance: 50 ohm}
lines: {k: {z0: 50 ohm, velocity_factor: 1.0}}
sections:
  near: {from: a, to: b, length: 1 wavelengths, line: k}
  far: {from: b, to: c, length: 40 wavelengths, line: k}
loads: {l: {at: c, r: 150 ohm}}
`)).Cases[0]
	echo := far.Settling.Echoes[len(far.Settling.Echoes)-1]
	if echo.Name != "c" || math.Abs(echo.Time-2*41*100e-9) > 1e-12 {
		t.Errorf("last echo %+v, want c after 8.2 us", echo)
	}
	for _, p := range far.Settling.Places[:2] { // the source and b see the echo
		if p.To1Percent < echo.Time-100e-9*2 {
			t.Errorf("%s within 1 %% after %.4g s, before the echo", p.Name, p.To1Percent)
		}
	}
	if far.Verdict != record.Verified || far.Settling.Time < 2*echo.Time {
		t.Errorf("verdict %s at %.4g s", far.Verdict, far.Settling.Time)
	}
}

// TestEchoes: the first echoes of the demo feeder come back from the tee after a
// round trip of its main line.
func TestEchoes(t *testing.T) {
	_, r := demos["hilltop-fm-feeder"](t)
	e := caseOf(t, r, Nominal).Settling.Echoes
	// The front runs at the velocity of the highest frequencies, some 1e-3 faster.
	if want := 2 * 120 / (0.921 * line.C0); e[0].Name != "tee" || math.Abs(e[0].Time/want-1) > 2e-3 {
		t.Errorf("first echo %+v, want the tee after %.4g s", e[0], want)
	}
	for i := 1; i < len(e); i++ {
		if e[i].Time < e[i-1].Time {
			t.Errorf("echoes out of order: %+v", e)
		}
	}
}
