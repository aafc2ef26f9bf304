package slip

import (
	"math"
	"math/cmplx"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"linewitness/phasor"
	"linewitness/sim/design"
	"linewitness/sim/line"
	"linewitness/sim/network"
	"linewitness/sim/network/networktest"
)

// TestCatalogue: every slip has a name of its own and a sentence.
func TestCatalogue(t *testing.T) {
	seen := map[string]bool{}
	for _, id := range All() {
		switch name, says := id.Name(), id.Says(); {
		case name == "" || seen[name]:
			t.Errorf("slip %d has no name, or that of another: %q", id, name)
		case !strings.HasSuffix(says, ".") || strings.ToUpper(says[:1]) != says[:1]:
			t.Errorf("%s: not a sentence: %q", name, says)
		default:
			seen[name] = true
		}
	}
}

// TestRank: a slip in one place of several is less usual than in all.
func TestRank(t *testing.T) {
	all := Slip{ID: VelocityOmitted, Where: "every section"}
	one := Slip{ID: VelocityOmitted, Where: "section main", Single: true}
	if all.Rank() >= one.Rank() || all.Label() != "velocity factor left out, every section" || (Slip{ID: HalfTurn}).Label() != HalfTurn.Name() {
		t.Errorf("%d %d %q", all.Rank(), one.Rank(), all.Label())
	}
}

// identityTol is the tolerance of what must come out the same, relative. The
// constants go through two square roots and a division.
const identityTol = 1e-10

// TestWaveOfSection: a section made of a wave has that wave for the closed form,
// also where the phase runs backwards, and for a dispersive line as it was.
func TestWaveOfSection(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		net := networktest.DrawDispersive(t)
		omega, s := net.Omega(), net.Sections[0]
		w := waveOf(s, omega)
		w.beta *= rapid.SampledFrom([]float64{1, -1, 0.66, 57.3}).Draw(t, "phase")
		w.alpha *= rapid.SampledFrom([]float64{0, 1, 8.7}).Draw(t, "loss")
		gamma, zc := phasor.Propagation(w.section(s, omega), omega)
		want := complex(w.alpha, w.beta)
		if d := cmplx.Abs(gamma*complex(s.Length, 0) - want); d > identityTol*cmplx.Abs(want) {
			t.Fatalf("wave %v, want %v", gamma*complex(s.Length, 0), want)
		}
		if cmplx.Abs(zc-w.z0) > identityTol*cmplx.Abs(w.z0) {
			t.Fatalf("impedance %v, want %v", zc, w.z0)
		}
	})
}

// tee is a source, a main line, a stub and a tail with a load.
func tee(end network.Branch) *network.Network {
	section := func(name string, from, to int, wavelengths float64) network.Section {
		const v = 0.7 * line.C0
		return network.Section{
			Name: name, From: from, To: to, Length: wavelengths * v / 1e8,
			Line: line.Constants{R: 0.5, L: 50 / v, G: 2e-4, C: 1 / (50 * v)},
		}
	}
	end.A, end.B, end.Name = 3, network.Ground, "end"
	return &network.Network{
		Frequency: 1e8, Junctions: []string{"source", "tee", "load", "end"},
		Sections: []network.Section{section("main", 0, 1, 0.3), section("stub", 3, 1, 0.11), section("tail", 1, 2, 0.2)},
		Branches: []network.Branch{{Name: "load", A: 2, B: network.Ground, Series: network.Series{R: 30, L: 40e-9}}, end},
		Parts:    []network.Part{{Name: "load", A: 2, B: network.Ground, Branches: []int{0}}, {Name: "end", A: 3, B: network.Ground, Branches: []int{1}}},
		Source:   network.Source{EMF: 10, Series: network.Series{R: 50}},
	}
}

func impedanceAt(t *testing.T, net *network.Network, k int, z float64) complex128 {
	t.Helper()
	s, err := phasor.Solve(net)
	if err != nil {
		t.Fatal(err)
	}
	return s.Voltage(k, z) / s.Current(k, z)
}

func changed(t *testing.T, c Catalogue, id ID, where string) *network.Network {
	t.Helper()
	for _, change := range c.Changes() {
		if change.ID == id && change.Where == where {
			return change.Make()
		}
	}
	t.Fatalf("no change %s, %s", id.Name(), where)
	return nil
}

// TestStubInSeries: with the stub in series the main line ends in the sum of
// the two impedances, whatever ends the stub; on its susceptance of the other
// sign see TestStubSign.
func TestStubInSeries(t *testing.T) {
	for name, end := range map[string]network.Branch{
		"short": {}, "open": {Open: true}, "capacitor": {Series: network.Series{C: 20e-12}},
	} {
		net := tee(end)
		length := net.Sections[0].Length
		stub := -impedanceAt(t, net, 1, net.Sections[1].Length) // its To end is at the tee
		tail := impedanceAt(t, net, 2, 0)
		series := changed(t, Catalogue{Net: net}, StubInSeries, "section stub")
		got := impedanceAt(t, series, 0, length)
		if want := stub + tail; cmplx.Abs(got-want) > identityTol*cmplx.Abs(want) {
			t.Errorf("%s: %v, want %v", name, got, want)
		}
	}
}

// TestStubSign: a lossless stub of the opposite susceptance.
func TestStubSign(t *testing.T) {
	net := tee(network.Branch{Series: network.Series{C: 20e-12}})
	for k := range net.Sections {
		net.Sections[k].Line.R, net.Sections[k].Line.G = 0, 0
	}
	at := net.Sections[1].Length
	right := impedanceAt(t, net, 1, at)
	got := impedanceAt(t, changed(t, Catalogue{Net: net}, StubSign, "section stub"), 1, at)
	if cmplx.Abs(got+right) > identityTol*cmplx.Abs(right) {
		t.Errorf("%v, want %v", got, -right)
	}
}

// TestNoStub: a section that ends in a load is no stub, nor one whose junction
// has nothing else, and a ring has no side of the load.
func TestNoStub(t *testing.T) {
	net := tee(network.Branch{Series: network.Series{R: 1}})
	if got := (Catalogue{Net: net}).findStubs(); len(got) > 0 {
		t.Errorf("a stub that ends in 1 ohm: %v", got)
	}
	net = tee(network.Branch{})
	net.Sections = net.Sections[:2]
	net.Branches[0].A = 0
	if got := (Catalogue{Net: net}).findStubs(); len(got) > 0 {
		t.Errorf("the end of a line: %v", got)
	}
	net = tee(network.Branch{})
	net.Sections[2].To = 0 // the tail leads back to the source
	for _, c := range (Catalogue{Net: net}).Changes() {
		if c.ID == StubInSeries || c.ID == StubOnImpedance {
			t.Errorf("ring: %s", c.Label())
		}
	}
}

// TestNothingIsShared: making a change leaves the network as it was.
func TestNothingIsShared(t *testing.T) {
	net := tee(network.Branch{})
	want := *tee(network.Branch{})
	c := Catalogue{Net: net, Single: []int{0, 1, 2}, Quotes: [][]Quote{{{1e7, 0.01}}, nil, {{1e9, 0.1}}}}
	for _, change := range c.Changes() {
		if change.Make != nil {
			change.Make()
		}
	}
	for k, s := range want.Sections {
		if net.Sections[k] != s {
			t.Errorf("section %d: %+v", k, net.Sections[k])
		}
	}
	for b := range want.Branches {
		if net.Branches[b] != want.Branches[b] {
			t.Errorf("branch %d: %+v", b, net.Branches[b])
		}
	}
	for p := range want.Parts {
		if net.Parts[p].A != want.Parts[p].A {
			t.Errorf("part %d: %+v", p, net.Parts[p])
		}
	}
	if net.Source != want.Source || len(net.Junctions) != len(want.Junctions) {
		t.Errorf("source or junctions: %+v", net)
	}
}

// TestQuotedLoss: the loss of the quoted frequency, and scaled wrongly.
func TestQuotedLoss(t *testing.T) {
	net := tee(network.Branch{})
	c := Catalogue{Net: net, Single: []int{0}, Quotes: [][]Quote{{{Frequency: 1e8 / 9, Attenuation: 0.02}}}}
	for id, want := range map[ID]float64{LossUnscaled: 0.02, LossScaledLinear: 0.18, LossScaledBack: 0.02 / 3} {
		got := waveOf(changed(t, c, id, "section main").Sections[0], net.Omega()).alpha / net.Sections[0].Length
		if math.Abs(got-want) > identityTol {
			t.Errorf("%s: %v Np/m, want %v", id.Name(), got, want)
		}
	}
	for _, change := range (Catalogue{Net: net, Single: []int{0}}).Changes() {
		if change.ID == LossUnscaled {
			t.Error("no loss is quoted")
		}
	}
}

// TestMisreadings: figures of some quantities as slips make them, worked by hand.
func TestMisreadings(t *testing.T) {
	plain := func(v complex128) complex128 { return v }
	size := func(v complex128) complex128 { return complex(cmplx.Abs(v), 0) }
	for _, tt := range []struct {
		reading Reading
		id      ID
		want    complex128
	}{
		{Reading{Quantity: design.InputImpedance, Raw: 20 - 10i, Form: plain, Z0: 50}, CurrentReflection, 100 + 50i},
		{Reading{Quantity: design.InputImpedance, Raw: 20 - 10i, Form: plain, Z0: 50}, ResultSign, 20 + 10i},
		{Reading{Quantity: design.LoadPower, Raw: 3, Form: plain}, RMSForPeak, 1.5},
		{Reading{Quantity: design.LoadPower, Raw: 3, Form: plain}, PeakToPeakForRMS, 24},
		{Reading{Quantity: design.Voltage, Raw: 3 + 4i, Form: size}, PeakForRMS, 5 * math.Sqrt2},
		{Reading{Quantity: design.SteadyVoltage, Raw: 5, Form: plain, Steps: 84}, RawSpectrum, 210},
		{Reading{Quantity: design.ReturnLoss, Raw: 0.1, Form: func(v complex128) complex128 { return complex(-20*math.Log10(cmplx.Abs(v)), 0) }}, PowerReflection, 40},
		{Reading{Quantity: design.Reflection, Raw: 0.25, Form: size}, PercentForRatio, 25},
		{Reading{Quantity: design.Overshoot, Raw: 0.37, Form: plain}, TotalForExcess, 1.37},
		{Reading{Quantity: design.Loss, Raw: 0.85, Form: plain}, RoundTripLoss, 1.7},
		{Reading{Quantity: design.PowerSplit, Raw: 3, Form: plain}, SplitReversed, -3},
		{Reading{Quantity: design.Voltage, Raw: 5i, Form: plain, Both: true}, AngleInRadians, cmplx.Rect(5, math.Pi/2*math.Pi/180)},
	} {
		found := false
		for _, m := range tt.reading.Misreadings() {
			for _, v := range m.Figures {
				found = found || m.ID == tt.id && cmplx.Abs(v-tt.want) <= identityTol*cmplx.Abs(tt.want)
			}
		}
		if !found {
			t.Errorf("%s of %s %v: no %v", tt.id.Name(), tt.reading.Quantity, tt.reading.Raw, tt.want)
		}
	}
}

// TestPeaksHaveNoSpectrum: a peak over all time is not read from a spectrum.
func TestPeaksHaveNoSpectrum(t *testing.T) {
	r := Reading{Quantity: design.PeakVoltage, Raw: 5, Form: func(v complex128) complex128 { return v }}
	for _, m := range r.Misreadings() {
		if m.ID == HalfSpectrum || m.ID == RawSpectrum || m.ID == WindowGain {
			t.Errorf("%s", m.Name())
		}
	}
}
