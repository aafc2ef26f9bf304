package agree_test

import (
	"context"
	"flag"
	"math"
	"testing"

	"pgregory.net/rapid"

	"linewitness/fdtd"
	"linewitness/phasor"
	"linewitness/sim/agree"
	"linewitness/sim/network"
	"linewitness/sim/network/networktest"
)

// expectedSlack is how much the found difference may pass the expected one:
// the grid's part is exact and the residual an estimate (see package agree).
const expectedSlack = 3

// TestRandomNetworks lets both witnesses solve random trees and rings, and
// requires their difference to be the one that the grid must cause.
func TestRandomNetworks(t *testing.T) { randomNetworks(t, "200", networktest.Draw) }

// TestRandomDispersiveNetworks does the same for lines with skin effect and
// dielectric loss.
func TestRandomDispersiveNetworks(t *testing.T) { randomNetworks(t, "100", networktest.DrawDispersive) }

// TestRandomTransformers does the same with an ideal transformer in the
// network.
func TestRandomTransformers(t *testing.T) { randomNetworks(t, "60", networktest.DrawTransformer) }

func randomNetworks(t *testing.T, checks string, draw func(*rapid.T) *network.Network) {
	if f := flag.Lookup("rapid.checks"); f.Value.String() == f.DefValue {
		if err := flag.Set("rapid.checks", checks); err != nil {
			t.Fatal(err)
		}
		defer func() { _ = flag.Set("rapid.checks", f.DefValue) }()
	}
	worst := 0.0
	rapid.Check(t, func(t *rapid.T) {
		net := draw(t)
		if phasor.Decay(net) < net.Frequency/300 {
			t.Skip("rings for thousands of periods")
		}
		r := compareWitnesses(t, net, 30)
		for k, s := range r.Sections {
			for what, kind := range map[string]agree.Kind{"voltage": s.Voltage, "current": s.Current} {
				if kind.Found > expectedSlack*kind.Expected {
					t.Fatalf("section %d %s: found %.3g, expected %.3g", k, what, kind.Found, kind.Expected)
				}
			}
		}
		worst = math.Max(worst, r.Found()/r.Expected)
	})
	t.Logf("largest found over expected: %.3f", worst)
}

type fataler interface {
	Fatalf(format string, args ...any)
	Helper()
}

// compareWitnesses settles a network on a grid and compares it with the closed
// form.
func compareWitnesses(t fataler, net *network.Network, cells float64) agree.Result {
	t.Helper()
	g, err := fdtd.NewGrid(net, cells)
	if err != nil {
		t.Fatalf("grid: %v", err)
	}
	return compareOn(t, net, g, 1e-4)
}

func compareOn(t fataler, net *network.Network, g fdtd.Grid, tolerance float64) agree.Result {
	t.Helper()
	exact, err := phasor.Solve(net)
	if err != nil {
		t.Fatalf("phasor: %v", err)
	}
	st, err := fdtd.Settle(context.Background(), net, g, fdtd.Settings{Tolerance: tolerance})
	if err != nil {
		t.Fatalf("settle: %v", err)
	}
	if !st.Settling.Settled {
		t.Fatalf("not settled after %d periods, residual %.3g", st.Settling.Periods, st.Settling.Residual)
	}
	var waves []agree.Wave
	var samples []agree.Samples
	for k, s := range st.Sections {
		waves = append(waves, agree.Wave(g.Numerical(net, k)))
		samples = append(samples, agree.Samples{ZV: s.ZV, V: s.V, ZI: s.ZI, I: s.I})
	}
	discrete, err := phasor.Solve(agree.Equivalent(net, waves))
	if err != nil {
		t.Fatalf("phasor, equivalent: %v", err)
	}
	return agree.Compare(samples, exact, discrete, waves, st.Settling.Residual)
}
