package sim

import (
	"fmt"
	"math"
	"testing"

	"linewitness/sim/record"
)

// unlike is a chain of two kinds of line, so long that the front is seen well,
// with a load in case; its source and its far end are matched unless the load
// says otherwise.
func unlike(load string) string {
	return fmt.Sprintf(`
source: {at: a, frequency: 10 MHz, emf: 2 V peak, impedance: 50 ohm, start: {profile: abrupt, phase: worst}}
lines: {k: {z0: 50 ohm, velocity_factor: 1.0}, slow: {z0: 75 ohm, velocity_factor: 0.5}}
sections:
  m: {from: a, to: b, length: 30 m, line: k}
  n: {from: c, to: b, length: 20 m, line: slow}
loads: {l: {at: c, %s}}
`, load)
}

func mapped(t *testing.T, keys string) record.SpaceTime {
	t.Helper()
	m := verified(t, text(t, keys)).Cases[0].SpaceTime
	if len(m.T) == 0 || len(m.V) != len(m.T) || len(m.V[0]) != len(m.Z) {
		t.Fatalf("%d times, %d rows, %d places", len(m.T), len(m.V), len(m.Z))
	}
	return m
}

// TestFrontsOnMap: the first front lies where the first voltage is, within a row
// of the map; before it all is still.
func TestFrontsOnMap(t *testing.T) {
	m := mapped(t, unlike("r: 300 ohm"))
	want := []record.PathSection{{Section: "m", To: 30}, {Section: "n", Reversed: true, From: 30, To: 50}}
	if len(m.Path) != 2 || m.Path[0] != want[0] || m.Path[1] != want[1] {
		t.Fatalf("path %+v, want %+v", m.Path, want)
	}
	row := m.T[1] - m.T[0]
	for p, z := range m.Z {
		arrives := -1.0
		for _, f := range m.Fronts {
			if f.Passage == 1 && z >= f.Z0 && z <= f.Z1 {
				arrives = f.T0 + (f.T1-f.T0)*(z-f.Z0)/(f.Z1-f.Z0)
			}
		}
		if arrives < 0 {
			t.Fatalf("no front at %g m", z)
		}
		// The abrupt start has an edge of six steps. On the grid nothing is ahead
		// of the front by more than two steps, one for each section.
		step := 1 / (10e6 * 40.0)
		for i, at := range m.T {
			still := m.V[i][p] == 0
			if still && at > arrives+row+2*step || !still && at < arrives-2*step {
				t.Errorf("%g m, %g s: %g V, the front comes at %g s", z, at, m.V[i][p], arrives)
				break
			}
		}
	}
}

// TestMapAndWaveforms: where the path begins and ends the map has the waveforms
// of the junctions, at the start phase that is shown.
func TestMapAndWaveforms(t *testing.T) {
	c := verified(t, text(t, unlike("r: 300 ohm, l: 1 uH"))).Cases[0]
	m := c.SpaceTime
	if m.Envelope || m.Phase != c.Stress.Voltage.Phase {
		t.Fatalf("envelope %v, phase %g, want %g", m.Envelope, m.Phase, c.Stress.Voltage.Phase)
	}
	for _, w := range c.Waveforms {
		place := map[string]int{"source voltage": 0, "c voltage": len(m.Z) - 1}
		p, ok := place[w.Name]
		if !ok {
			continue
		}
		for i := 1; i < len(m.T); i++ {
			at := int(math.Round((m.T[i] - w.Start) / w.Step))
			if got, want := m.V[i][p], w.Samples[at]; math.Abs(got-want) > 1e-12*c.Stress.Voltage.Value {
				t.Fatalf("%s at %g s: %g V on the map, %g V", w.Name, m.T[i], got, want)
			}
		}
	}
}

// TestFrontsFollowed: the fronts of two sections, by hand: delays of 100.07 and
// 133.43 ns, reflections at the joint (50 to 75 ohm, 0.2) and at the end (0.6 of
// 1.2), and at the joint again of what comes back (-0.2 of 0.72); the source is
// matched and sends nothing out again.
func TestFrontsFollowed(t *testing.T) {
	const c = 299792458.0
	m := mapped(t, unlike("r: 300 ohm"))
	d1, d2 := 30/c, 20/(c/2)
	want := []record.Front{
		{Z0: 0, T0: 0, Z1: 30, T1: d1, Passage: 1},
		{Z0: 30, T0: d1, Z1: 50, T1: d1 + d2, Passage: 1},
		{Z0: 50, T0: d1 + d2, Z1: 30, T1: d1 + 2*d2, Passage: 2},
		{Z0: 30, T0: d1 + 2*d2, Z1: 0, T1: 2*d1 + 2*d2, Passage: 2},
		{Z0: 30, T0: d1, Z1: 0, T1: 2 * d1, Passage: 2},
		{Z0: 30, T0: d1 + 2*d2, Z1: 50, T1: d1 + 3*d2, Passage: 3},
	}
	if len(m.Fronts) != len(want) {
		t.Fatalf("%d fronts, want %d: %+v", len(m.Fronts), len(want), m.Fronts)
	}
	for i, w := range want {
		g := m.Fronts[i]
		for _, d := range []float64{(g.Z0 - w.Z0) / 50, (g.Z1 - w.Z1) / 50, (g.T0 - w.T0) / d1, (g.T1 - w.T1) / d1} {
			if math.Abs(d) > bounceTol*10 || g.Passage != w.Passage {
				t.Errorf("front %d: %+v, want %+v", i, g, w)
				break
			}
		}
	}
}

// TestFrontsEnd: a matched end sends nothing back, one that is reactive does
// whatever it is to the front; a source that reflects sends it out again; no
// front goes on beyond the map, and there are a dozen at most.
func TestFrontsEnd(t *testing.T) {
	for _, tt := range []struct {
		load           string
		back, backEnds int // pieces of passage 2, and those of them from the end
	}{
		{"r: 75 ohm", 1, 0},
		{"r: 75 ohm, c: 1 nF", 3, 1},
		{"impedance: short", 3, 1},
	} {
		back, ends := 0, 0
		m := mapped(t, unlike(tt.load))
		for _, f := range m.Fronts {
			if f.Passage == 2 {
				back++
				if f.Z0 == m.Z[len(m.Z)-1] {
					ends++
				}
			}
			if f.Passage > 2 && f.Z0 == 0 {
				t.Errorf("%s: a front from a source that is matched: %+v", tt.load, f)
			}
		}
		if back != tt.back || ends != tt.backEnds {
			t.Errorf("%s: %d pieces come back, %d from the end; want %d and %d", tt.load, back, ends, tt.back, tt.backEnds)
		}
	}
	m := mapped(t, resonant(10, 10, ""))
	last := m.T[len(m.T)-1]
	for i, f := range m.Fronts {
		if f.T1 > last || f.T1 <= f.T0 {
			t.Errorf("front %d ends at %g s, the map at %g s", i, f.T1, last)
		}
	}
	if n := len(m.Fronts); n != 3 || m.Fronts[2].Passage != 3 {
		t.Errorf("fronts %+v, want one out, one back, one out", m.Fronts)
	}
}
