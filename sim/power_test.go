package sim

import (
	"context"
	"flag"
	"math"
	"slices"
	"testing"

	"pgregory.net/rapid"

	"linewitness/fdtd"
	"linewitness/phasor"
	"linewitness/sim/network"
	"linewitness/sim/network/networktest"
)

// auditNetwork solves a network by both witnesses, on a grid of at least cells
// cells per wavelength, as far as an audit needs it.
func auditNetwork(t fataler, net *network.Network, cells float64) *solved {
	t.Helper()
	s := auditClosedForm(t, net)
	g, err := fdtd.NewGrid(net, cells)
	if err != nil {
		t.Fatalf("grid: %v", err)
	}
	if s.steady, err = fdtd.Settle(context.Background(), net, g, fdtd.Settings{}); err != nil {
		t.Fatalf("settle: %v", err)
	}
	grid, err := newGridding(net, g, s.phasor)
	if err != nil {
		t.Fatalf("gridding: %v", err)
	}
	s.found = fdtdState(net, s.steady, grid.waves)
	return s
}

// auditClosedForm solves a network by the phasor witness alone. Where there are
// no parts every branch becomes one.
func auditClosedForm(t fataler, net *network.Network) *solved {
	t.Helper()
	if len(net.Parts) == 0 {
		for b, br := range net.Branches {
			net.Parts = append(net.Parts, network.Part{Name: br.Name, Kind: br.Kind, A: br.A, B: br.B, Branches: []int{b}})
		}
	}
	sol, err := phasor.Solve(net)
	if err != nil {
		t.Fatalf("phasor: %v", err)
	}
	return &solved{net: net, phasor: sol, exact: phasorState(net, sol)}
}

// randomNetworks are the kinds of random network.
var randomNetworks = map[string]func(*rapid.T) *network.Network{
	"constant":    networktest.Draw,
	"dispersive":  networktest.DrawDispersive,
	"transformer": networktest.DrawTransformer,
}

// times runs a property so often, or as often as the command line says.
func times(t *testing.T, n string, property func(*rapid.T)) {
	if f := flag.Lookup("rapid.checks"); f.Value.String() == f.DefValue {
		if err := flag.Set("rapid.checks", n); err != nil {
			t.Fatal(err)
		}
		defer func() { _ = flag.Set("rapid.checks", f.DefValue) }()
	}
	rapid.Check(t, property)
}

// TestPhasorBalance: 200 random networks of each kind close to 1e-9. In 9000 of
// them the largest imbalance was 6.5e-12.
func TestPhasorBalance(t *testing.T) {
	const asked = 1e-9
	for name, draw := range randomNetworks {
		t.Run(name, func(t *testing.T) {
			worst := 0.0
			times(t, "200", func(t *rapid.T) {
				a := auditClosedForm(t, draw(t)).phasorAudit()
				if !a.Closed || a.Relative > asked {
					t.Fatalf("imbalance %.3g, allowed %.3g: %+v", a.Relative, a.Allowed, a)
				}
				worst = math.Max(worst, a.Relative)
			})
			t.Logf("largest imbalance %.2g", worst)
		})
	}
}

// TestGridBalance: the time-domain run closes within what its settling and its
// rational forms allow, and that is no licence: half the networks must close to
// within some 1e-3. In 3000 of them the imbalance never passed what is allowed.
func TestGridBalance(t *testing.T) {
	const half = 2e-3
	for name, draw := range randomNetworks {
		t.Run(name, func(t *testing.T) {
			var share, allowed []float64
			times(t, "40", func(t *rapid.T) {
				net := draw(t)
				if phasor.Decay(net) < net.Frequency/100 {
					t.Skip("rings for hundreds of periods")
				}
				a := auditNetwork(t, net, 30).fdtdAudit()
				if !a.Closed || a.Relative > a.Allowed {
					t.Fatalf("imbalance %.3g, allowed %.3g: %+v", a.Relative, a.Allowed, a)
				}
				share, allowed = append(share, a.Relative/a.Allowed), append(allowed, a.Allowed)
			})
			slices.Sort(share)
			slices.Sort(allowed)
			t.Logf("found over allowed: median %.2g, largest %.2g; allowed: median %.2g", share[len(share)/2], share[len(share)-1], allowed[len(allowed)/2])
			if m := allowed[len(allowed)/2]; m > half {
				t.Errorf("half the networks may be off by more than %.2g, want %g", m, half)
			}
		})
	}
}

// lossyLine is a mismatched line in which most of the power is lost.
func lossyLine() *network.Network {
	return &network.Network{
		Frequency: 100e6, Junctions: []string{"a", "b"},
		Sections: []network.Section{{Name: "line", From: 0, To: 1, Length: 7.3, Line: lossyCoax}},
		Branches: []network.Branch{{Name: "load", A: 1, B: network.Ground, Series: network.Series{R: 20, C: 50e-12}}},
		Source:   network.Source{EMF: 10, Series: network.Series{R: 50}},
	}
}

// TestWrongIntegralIsFound: a dissipation that is off by a per cent, of the
// current's part or of the voltage's, does not close; nor does a load that takes
// up a per cent more than it should, or, by either witness, a wrong resistance.
func TestWrongIntegralIsFound(t *testing.T) {
	s := auditNetwork(t, lossyLine(), 40)
	fdtdAudit := s.fdtdAudit()
	if !fdtdAudit.Closed || !s.phasorAudit().Closed {
		t.Fatalf("does not close: %+v", s.power())
	}
	if a := fdtdAudit; a.Allowed > 0.002 || a.Dissipated < 0.5*a.Delivered {
		t.Fatalf("allowed %.3g with %.3g W of %.3g W lost: shows nothing", a.Allowed, a.Dissipated, a.Delivered)
	}
	const wrong = 1.01
	w := &s.steady.Sections[0]
	for what, p := range map[string]*float64{"current": &w.SquareI, "voltage": &w.SquareV, "load": &s.net.Branches[0].R} {
		was := *p
		*p *= wrong
		if a := s.fdtdAudit(); a.Closed || a.Relative <= a.Allowed {
			t.Errorf("fdtd, %s: 1 %% too much and closed, imbalance %.3g, allowed %.3g", what, a.Relative, a.Allowed)
		}
		*p = was
	}
	s.net.Sections[0].Line.R *= wrong // after the solutions, by which the audit goes
	for who, a := range bothAudits(s) {
		if a.Closed {
			t.Errorf("%s: a resistance 1 %% too large and closed, imbalance %.3g, allowed %.3g", who, a.Relative, a.Allowed)
		}
	}
}

type fataler interface {
	Fatalf(format string, args ...any)
	Helper()
}
