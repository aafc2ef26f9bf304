package sim

import (
	"context"
	"flag"
	"math"
	"testing"

	"golang.org/x/sync/errgroup"
	"pgregory.net/rapid"

	"linewitness/fdtd"
	"linewitness/phasor"
	"linewitness/sim/design"
	"linewitness/sim/line"
	"linewitness/sim/network"
	"linewitness/sim/network/networktest"
	"linewitness/sim/record"
)

// settled solves a network for its steady state by both witnesses, on three
// grids. The tolerance of the settling is that of a design file.
func settled(t interface{ Fatal(...any) }, net *network.Network, cells float64) *solved {
	grids, err := chooseGrids(context.Background(), net, 3, cells, 0.005)
	if err != nil {
		t.Fatal(err)
	}
	s := &solved{
		name: Nominal, net: net, grid: grids[0], phasor: grids[0].exact, powered: powered(net),
		design: &design.Design{Grid: design.Grid{Agreement: 0.005, SettleTolerance: 1e-4}},
	}
	set := fdtd.Settings{MaxPeriods: 20000}
	if s.steady, err = fdtd.Settle(context.Background(), net, s.grid.grid, set); err != nil {
		t.Fatal(err)
	}
	g, ctx := errgroup.WithContext(context.Background())
	s.studyRuns(ctx, g, grids[1:], set)
	if err := g.Wait(); err != nil {
		t.Fatal(err)
	}
	s.compare()
	return s
}

func setChecks(t *testing.T, n string) {
	f := flag.Lookup("rapid.checks")
	if f.Value.String() != f.DefValue {
		return
	}
	if err := flag.Set("rapid.checks", n); err != nil {
		t.Fatal(err)
	}
	t.Cleanup(func() { _ = flag.Set("rapid.checks", f.DefValue) })
}

// TestStudyOfRandomNetworks: the error of every key figure is explained by the
// uncertainty that is computed for it, and that is not padded: some errors come
// near it. Most figures converge with the formal order.
func TestStudyOfRandomNetworks(t *testing.T) {
	setChecks(t, "40")
	nearest, counts := 0.0, map[record.Behaviour]int{}
	draws := []func(*rapid.T) *network.Network{networktest.Draw, networktest.DrawDispersive, networktest.DrawTransformer}
	rapid.Check(t, func(t *rapid.T) {
		net := draws[rapid.IntRange(0, 2).Draw(t, "kind")](t)
		if phasor.Decay(net) < net.Frequency/300 {
			t.Skip("rings for thousands of periods")
		}
		s := settled(t, net, 40)
		for _, k := range s.keyStudies() {
			st := s.study(k)
			counts[st.Behaviour]++
			if math.IsNaN(st.Error) {
				continue
			}
			if !st.Explained {
				t.Fatalf("%s %s: %.6g and %.6g differ by %.3g, uncertainty %.3g (grid %.2g, settling %.2g, form %.2g, rounding %.2g); grids %.6g %s",
					st.Quantity, st.Subject, st.Values[0], st.Phasor, st.Error, st.Uncertainty, st.Grid, st.Settling, st.Form, st.Rounding, st.Values, st.Behaviour)
			}
			if st.Uncertainty > 10*st.Rounding {
				nearest = math.Max(nearest, math.Abs(st.Error)/st.Uncertainty)
			}
		}
	})
	t.Logf("largest error over uncertainty %.3f; %v", nearest, counts)
	if nearest < 0.5 {
		t.Errorf("no error comes nearer to its uncertainty than %.2f: it is padded", nearest)
	}
	if near := counts[record.Converging]; near < counts[record.Oscillatory]+counts[record.OffOrder] {
		t.Errorf("few figures converge as they must: %v", counts)
	}
}

// TestUnexplained: an error of the time domain far inside the agreement limit
// that the grid does not explain is found, and is a disagreement.
func TestUnexplained(t *testing.T) {
	f := load(t, "hilltop-fm-feeder")
	p, err := newPlanned(t.Context(), Nominal, f.Nominal, DefaultGrids)
	if err != nil {
		t.Fatal(err)
	}
	s := settled(t, p.net, 40)
	good := s.convergence(nil)
	if n := unexplained(good.Studies); n != 0 {
		t.Fatalf("%d unexplained figures before the mistake", n)
	}
	// A scheme that loses one part in a thousand, the same on every grid.
	for _, l := range s.levels {
		l.source *= 1.001
	}
	bad := s.convergence(nil)
	if unexplained(bad.Studies) == 0 {
		t.Error("a current that is off by 0.1 % on every grid is explained")
	}
	if v := s.verdict(&record.Case{Convergence: bad}); v != record.Disagree {
		t.Errorf("verdict %q", v)
	}
}

// TestExactGrid: at a Courant number of 1 the figures do not depend on the grid,
// and the study says so.
func TestExactGrid(t *testing.T) {
	c := line.Nominal{Z0: 50, VelocityFactor: 1}.At(100e6)
	net := &network.Network{
		Frequency: 100e6, Junctions: []string{"a", "b"},
		Sections: []network.Section{{Name: "s", From: 0, To: 1, Length: 0.5 * 299792458.0 / 100e6, Line: c}},
		Branches: []network.Branch{{Name: "load", A: 1, B: network.Ground, Series: network.Series{R: 20}}},
		Parts:    []network.Part{{Name: "load", A: 1, B: network.Ground, Branches: []int{0}}},
		Source:   network.Source{EMF: 2, Series: network.Series{R: 50}},
	}
	s := settled(t, net, 40)
	for _, k := range s.keyStudies() {
		if st := s.study(k); st.Behaviour != record.GridFree || !st.Explained {
			t.Errorf("%s %s: %s, values %.12g, error %.2g of %.2g", st.Quantity, st.Subject, st.Behaviour, st.Values, st.Error, st.Uncertainty)
		}
	}
}
