package report

import (
	"math"
	"strings"
	"testing"

	"linewitness/report/figure"
	"linewitness/report/internal/reporttest"
	"linewitness/sim/record"
	"pgregory.net/rapid"
)

// Where the power goes is on paper, by both solutions, and it is said what a
// power is.
func TestPowerText(t *testing.T) {
	all := textOf(t, reporttest.Feeder())
	for _, s := range []string{
		"Power: where it goes", "Every power is Re(V I*)/2", "not the power where the characteristic impedance is complex",
		"1.777 kW", "8.241 kW", "8.242 kW", "antenna (load)", "closed", "Q = ωW/P", "3.997 mJ",
		"main (section)", "1.759 kW, 17.6 %", "8.223 kW, 82.2 %",
		"Of 10.00 kW available, 10.00 kW (100 %) go into the network and 8.223 kW (82.2 %) into the loads; the largest loss is in main, 1.759 kW (17.6 %).",
	} {
		if !strings.Contains(all, squeezed(s)) {
			t.Errorf("the text lacks %q", s)
		}
	}
}

// A balance that is not closed says so, and an ideal source has no available
// power to show parts of.
func TestPowerOfIdealSource(t *testing.T) {
	r := reporttest.One("Ideal", reporttest.Single(1), reporttest.Options{Error: 1e-4, Loop: 0.5})
	for _, a := range []*record.PowerAudit{&r.Cases[0].Power.Phasor, &r.Cases[0].Power.FDTD} {
		a.Available, a.Reflected = math.Inf(1), math.NaN()
	}
	r.Cases[0].Power.FDTD.Closed = false
	all := textOf(t, r)
	for _, s := range []string{"no limit", "not closed", "Part of delivered", "W delivered, "} {
		if !strings.Contains(all, squeezed(s)) {
			t.Errorf("the text lacks %q", s)
		}
	}
	if s := "go into the network"; strings.Contains(all, squeezed(s)) {
		t.Errorf("an ideal source has %q, as if power were reflected", s)
	}
}

// audit draws an audit whose balance is closed.
func audit(t *rapid.T) record.PowerAudit {
	a := record.PowerAudit{Reflected: rapid.Float64Range(0, 10).Draw(t, "reflected")}
	watts := rapid.Float64Range(1e-3, 10)
	for range rapid.IntRange(0, 30).Draw(t, "sections") {
		a.Sections = append(a.Sections, record.SectionPower{Name: "s", Dissipated: watts.Draw(t, "loss")})
		a.Dissipated += a.Sections[len(a.Sections)-1].Dissipated
	}
	for range rapid.IntRange(1, 30).Draw(t, "loads") {
		a.Loads = append(a.Loads, record.PartPower{Name: "l", Power: watts.Draw(t, "power")})
		a.InLoads += a.Loads[len(a.Loads)-1].Power
	}
	a.Delivered = a.Dissipated + a.InLoads
	a.Available = a.Delivered + a.Reflected
	return a
}

// sumTolerance is for the rounding of sums of 60 powers, relative.
const sumTolerance = 1e-12

// The bars lead without a gap from the available power down to nothing, however
// many takers are gathered.
func TestFlowBars(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		a := audit(t)
		most := rapid.IntRange(1, 70).Draw(t, "most")
		parts := gatheredParts(takers(a), most)
		if kinds := 2; len(parts) > most+kinds {
			t.Fatalf("%d parts where %d were asked for", len(parts), most)
		}
		list := flowBars(a, parts, a.Available)
		near := func(x, y float64) bool { return math.Abs(x-y) <= sumTolerance*a.Available }
		level := a.Available
		for _, b := range list {
			if !near(b.To, level) {
				t.Fatalf("%s begins at %v, the one before left %v", b.Name, b.To, level)
			}
			if b.Fill != figure.Blank {
				level = b.From
			}
		}
		if !near(level, 0) {
			t.Fatalf("%v of %v is left over", level, a.Available)
		}
	})
}

// What takes nothing, or no number, is not drawn.
func TestTakers(t *testing.T) {
	a := record.PowerAudit{
		Delivered: 10,
		Sections:  []record.SectionPower{{Name: "lossless"}, {Name: "lossy", Dissipated: 4}},
		Elements:  []record.PartPower{{Name: "odd", Power: math.NaN()}, {Name: "endless", Power: math.Inf(1)}},
		Loads:     []record.PartPower{{Name: "short", Power: 1e-30}, {Name: "load", Power: 6}},
	}
	var got []string
	for _, p := range takers(a) {
		got = append(got, p.name+" "+p.kind)
	}
	if s, want := strings.Join(got, ", "), "lossy section, load load"; s != want {
		t.Errorf("takers %q, want %q", s, want)
	}
	a.Sections = nil
	if got, want := readable(flowFinding(a, 10, "delivered")), "Of 10.00 W delivered, 0 W (0 %) into the loads; nothing is lost on the way."; got != want {
		t.Errorf("finding %q, want %q", got, want)
	}
}
