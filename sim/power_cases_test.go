package sim

import (
	"math"
	"math/cmplx"
	"testing"

	"linewitness/sim/line"
	"linewitness/sim/network"
	"linewitness/sim/record"
)

// lossyCoax is a 50 ohm line of 0.053 Np/m, a fifth of it in the dielectric.
var lossyCoax = line.Constants{R: 4.2, L: 250e-9, G: 4.2e-4, C: 100e-12}

// bothAudits are the audits of the two witnesses by name.
func bothAudits(s *solved) map[string]record.PowerAudit {
	p := s.power()
	return map[string]record.PowerAudit{byPhasor: p.Phasor, byFDTD: p.FDTD}
}

// loadPower is what a named load takes up.
func loadPower(t *testing.T, a record.PowerAudit, name string) float64 {
	t.Helper()
	for _, p := range a.Loads {
		if p.Name == name {
			return p.Power
		}
	}
	t.Fatalf("no load %s in the audit", name)
	return 0
}

// TestAuditOfTheFeeder: 8222.5 W of the 10 kW available reach the antenna of the
// demo feeder; computed for it by other programs, see demo_test.go.
func TestAuditOfTheFeeder(t *testing.T) {
	s := auditNetwork(t, Network(load(t, "hilltop-fm-feeder").Nominal), 40)
	for who, a := range bothAudits(s) {
		const printed = 0.05 // half the last digit
		tolerance := printed
		if who == byFDTD {
			tolerance = demoTolerance * 8222.5
		}
		if got := loadPower(t, a, "antenna"); math.Abs(got-8222.5) > tolerance {
			t.Errorf("%s: %.2f W into the antenna, want 8222.5 W", who, got)
		}
		if math.Abs(a.Available-10e3) > 1e-6 || math.Abs(a.Reflected-(a.Available-a.Delivered)) > 1e-6 {
			t.Errorf("%s: available %.8g W, delivered %.8g W, reflected %.8g W", who, a.Available, a.Delivered, a.Reflected)
		}
		if !a.Closed || a.Allowed > 0.01 {
			t.Errorf("%s: imbalance %.3g, allowed %.3g", who, a.Relative, a.Allowed)
		}
		for _, sec := range a.Sections {
			if math.Abs(sec.In-sec.Out-sec.Dissipated) > math.Max(1e-9, a.Allowed)*a.Delivered {
				t.Errorf("%s, %s: in %.6g W, out %.6g W, lost %.6g W", who, sec.Name, sec.In, sec.Out, sec.Dissipated)
			}
		}
		if short := loadPower(t, a, "stub_short"); short != 0 {
			t.Errorf("%s: %g W in an exact short", who, short)
		}
	}
}

// TestAuditOfCombinations: what the inner branches of a nested combination and
// the windings of a transformer take up is their part's.
func TestAuditOfCombinations(t *testing.T) {
	f := text(t, `
source: {at: a, frequency: 100 MHz, emf: 10 V peak, impedance: 50 ohm}
lines: {k: {z0: 50 ohm, velocity_factor: 0.66, loss: {at: 100 MHz, attenuation: 5 dB/100m}}}
sections: {m: {from: a, to: b, length: 1.3 m, line: k}, n: {from: c, to: d, length: 0.7 m, line: k}}
loads: {l: {at: d, parallel: [{series: [{r: 30 ohm}, {parallel: [{r: 80 ohm}, {l: 60 nH}]}]}, {c: 20 pF, esr: 2 ohm}]}}
elements:
  trap: {between: [b, c], series: [{parallel: [{l: 47 nH, q: 180}, {c: 30 pF, q: 300}]}, {l: 20 nH, q: 100}]}
`)
	s := auditNetwork(t, Network(f.Nominal), 40)
	for who, a := range bothAudits(s) {
		if len(a.Elements) != 1 || len(a.Loads) != 1 || !a.Closed {
			t.Fatalf("%s: %+v", who, a)
		}
		st := map[string]*state{byPhasor: s.exact, byFDTD: s.found}[who]
		for p, want := range []float64{a.Loads[0].Power, a.Elements[0].Power} {
			const tolerance = 1e-3 // of what the settling leaves of a small difference
			if got := st.partPower(p); math.Abs(got/want-1) > tolerance || want <= 0 {
				t.Errorf("%s, part %d: %.8g W by R|I|^2/2, %.8g W at its ends", who, p, want, got)
			}
		}
		lost := a.Elements[0].Power + a.Sections[0].Dissipated + a.Sections[1].Dissipated
		if math.Abs(a.Dissipated-lost) > 1e-12*lost {
			t.Errorf("%s: %.12g W lost, in sections and elements %.12g W", who, a.Dissipated, lost)
		}
	}
}

// TestAuditWithoutPower: lossless lines on an open and a shorted end take nothing.
// What is delivered is rounding, and neither a Q nor a balance is made of it.
func TestAuditWithoutPower(t *testing.T) {
	net := &network.Network{
		Frequency: 100e6, Junctions: []string{"a", "b", "c"},
		Sections: []network.Section{
			{Name: "open", From: 0, To: 1, Length: 0.613, Line: line.Constants{L: 250e-9, C: 100e-12}},
			{Name: "short", From: 0, To: 2, Length: 1.207, Line: line.Constants{L: 250e-9, C: 100e-12}},
		},
		Branches: []network.Branch{{Name: "short", A: 2, B: network.Ground}},
		Source:   network.Source{EMF: 10, Series: network.Series{R: 50}},
	}
	for who, a := range bothAudits(auditNetwork(t, net, 40)) {
		if !a.Closed || !math.IsInf(a.Q, 1) || a.Stored <= 0 || a.Relative > a.Allowed || a.Allowed > 1 {
			t.Errorf("%s: %+v", who, a)
		}
	}
}

// TestAuditOfAnIdealSource: an ideal source has no available power, so nothing
// is reflected from it.
func TestAuditOfAnIdealSource(t *testing.T) {
	net := lossyLine()
	net.Source.R = 0
	for who, a := range bothAudits(auditNetwork(t, net, 40)) {
		if !math.IsInf(a.Available, 1) || !math.IsNaN(a.Reflected) || !a.Closed || a.Delivered <= 0 {
			t.Errorf("%s: %+v", who, a)
		}
	}
}

// voicePair is a pair at 1 kHz, of 740 ohm at -44.2 degrees.
var voicePair = line.Constants{R: 0.17196, L: 7.65e-7, C: 5e-11}

// TestPowerWithComplexImpedance: 5 km of the pair, on the conjugate of its
// characteristic impedance and on the reactance that reflects most. Forward
// less reflected is not the power there; the audit is.
//
// The reflection 0.972 of the conjugate, 2.37 of +j|Z0| and the 2.9 dB that the
// conjugate takes more than Z0 itself were computed for such a pair by another
// program.
func TestPowerWithComplexImpedance(t *testing.T) {
	omega := 2 * math.Pi * 1e3
	z0 := voicePair.Impedance(omega)
	if math.Abs(cmplx.Abs(z0)-740) > 1 || math.Abs(degrees(z0)+44.2) > 0.05 {
		t.Fatalf("Z0 %.4g ohm at %.4g degrees", cmplx.Abs(z0), degrees(z0))
	}
	powers := map[string]float64{}
	for _, tt := range []struct {
		name       string
		load       complex128
		reflection float64
	}{
		{"Z0", z0, 0}, {"conjugate", cmplx.Conj(z0), 0.972}, {"reactance", complex(0, cmplx.Abs(z0)), 2.37},
	} {
		net := &network.Network{
			Frequency: 1e3, Junctions: []string{"a", "b"},
			Sections: []network.Section{{Name: "pair", From: 0, To: 1, Length: 5e3, Line: voicePair}},
			Branches: []network.Branch{{Name: "load", A: 1, B: network.Ground, Series: Realise(tt.load, omega)}},
			Source:   network.Source{EMF: 10, Series: Realise(z0, omega)},
		}
		s := auditNetwork(t, net, 40)
		if g := cmplx.Abs(reflectionAt(s.exact, 0, 1, z0)); math.Abs(g-tt.reflection) > 0.0055 {
			t.Errorf("%s: reflection %.4g, want %.3g", tt.name, g, tt.reflection)
		}
		end := s.exact.ends[0][1]
		forward := cmplx.Abs(end.v+z0*end.i) / 2
		backward := cmplx.Abs(end.v-z0*end.i) / 2
		waves := (forward*forward - backward*backward) / 2 * real(1/z0)
		for who, a := range bothAudits(s) {
			if !a.Closed || a.Allowed > 0.01 {
				t.Errorf("%s, %s: imbalance %.3g, allowed %.3g", tt.name, who, a.Relative, a.Allowed)
			}
			out := a.Sections[0].Out
			if d := math.Abs(out - loadPower(t, a, "load")); d > a.Allowed*a.Delivered {
				t.Errorf("%s, %s: %.6g W out of the pair, off by %.3g W", tt.name, who, out, d)
			}
			if tt.reflection > 0 && math.Abs(waves-out) < 0.5*math.Max(math.Abs(waves), out) {
				t.Errorf("%s: forward less reflected is %.4g W, near the power %.4g W: shows nothing", tt.name, waves, out)
			}
		}
		powers[tt.name] = s.power().Phasor.InLoads
	}
	if d := decibels(powers["conjugate"] / powers["Z0"]); math.Abs(d-2.9) > 0.05 {
		t.Errorf("the conjugate takes %.3g dB more than Z0, want 2.9 dB", d)
	}
}
