package sim

import (
	"math"
	"strings"
	"testing"

	"linewitness/sim/line"
	"linewitness/sim/network"
)

// TestFrontOfParts: what parts are to a front, by hand.
func TestFrontOfParts(t *testing.T) {
	const r, l, c = 100.0, 1e-6, 1e-9
	short := math.Inf(1)
	at := func(b int, s network.Series) network.Branch { return network.Branch{A: 1, B: b, Series: s} }
	inside := func(s network.Series) network.Branch { return network.Branch{A: 2, B: network.Ground, Series: s} }
	for _, tt := range []struct {
		name    string
		parts   []network.Branch
		want    float64 // S
		varying bool
	}{
		{"nothing", nil, 0, false},
		{"r", []network.Branch{at(-1, network.Series{R: r})}, 1 / r, false},
		{"short", []network.Branch{at(-1, network.Series{})}, short, false},
		{"open", []network.Branch{{A: 1, B: -1, Open: true}}, 0, false},
		{"r-l", []network.Branch{at(-1, network.Series{R: r, L: l})}, 0, true},
		{"r-c", []network.Branch{at(-1, network.Series{R: r, C: c})}, 1 / r, true},
		{"l", []network.Branch{at(-1, network.Series{L: l})}, 0, true},
		{"c", []network.Branch{at(-1, network.Series{C: c})}, short, true},
		{"l-c", []network.Branch{at(-1, network.Series{L: l, C: c})}, 0, true},
		{"two r", []network.Branch{at(-1, network.Series{R: r}), at(-1, network.Series{R: r})}, 2 / r, false},
		{"r, then r and l side by side", []network.Branch{
			at(2, network.Series{R: r}), inside(network.Series{R: 3 * r}), inside(network.Series{L: l}),
		}, 1 / (4 * r), true},
		{"r, then r and c side by side", []network.Branch{
			at(2, network.Series{R: r}), inside(network.Series{R: 3 * r}), inside(network.Series{C: c}),
		}, 1 / r, true},
		{"c, then r", []network.Branch{at(2, network.Series{C: c}), inside(network.Series{R: r})}, 1 / r, true},
		{"l, then r", []network.Branch{at(2, network.Series{L: l}), inside(network.Series{R: r})}, 0, true},
	} {
		net := chainOf(50, 50, 1, 2e8, 1)
		net.Junctions = append(net.Junctions, "inside")
		net.Branches = tt.parts
		f := newFrontView(net)
		if got := f.shunt[1]; got != tt.want && !close12(got, tt.want) || f.varying[1] != tt.varying || f.varying[0] {
			t.Errorf("%s: %g S, varying %v, want %g, %v", tt.name, got, f.varying[1], tt.want, tt.varying)
		}
	}
}

// TestFrontLoss: a front on a line of constant R and G keeps e^{-alpha l}; one
// with skin effect has come to what a wave at the source frequency keeps about a
// tenth of a period after it, by erfc(a/(2 sqrt(pi f t))) (Wigington and Nahman,
// Proc. IRE 45, 1957, for a low loss; from memory).
func TestFrontLoss(t *testing.T) {
	net := chainOf(50, 50, 50, 2e8, 10)
	net.Sections[0].Line.R, net.Sections[0].Line.G = 2, 8e-4 // check: e^-0.4, distortionless
	b := bounces(net)
	if kept := b.Sections[0].Kept; !close12(kept, math.Exp(-0.4)) || !close12(b.Arrivals[1].Step, kept/2) {
		t.Errorf("keeps %.9g, arrives with %.9g", kept, b.Arrivals[1].Step)
	}
	if !strings.Contains(b.Note, "loss") || strings.Contains(b.Note, "frequency") {
		t.Errorf("note %q", b.Note)
	}
	s := &net.Sections[0]
	s.Line = line.Constants{R: 1, L: 250e-9, C: 100e-12}
	s.Line, s.Dispersion = line.Disperse(s.Line, net.Omega(), 1, 0)
	b = bounces(net)
	a := -math.Log(b.Sections[0].Kept)
	const afterwards = 1 / (math.Pi * math.Pi) // periods
	// The two agree to first order in a, 0.1 here.
	if comes := math.Erfc(a / (2 * math.Sqrt(math.Pi*afterwards))); math.Abs(comes-b.Sections[0].Kept) > a*a {
		t.Errorf("%g Np: a step comes to %.6g, a wave keeps %.6g", a, comes, b.Sections[0].Kept)
	}
	if !strings.Contains(b.Note, "frequency") {
		t.Errorf("note %q", b.Note)
	}
}
