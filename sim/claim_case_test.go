package sim

import (
	"context"
	"fmt"
	"math"
	"strings"
	"testing"

	"linewitness/sim/design"
	"linewitness/sim/line"
	"linewitness/sim/network"
	"linewitness/sim/record"
	"linewitness/sim/slip"
)

// withID gives a claim an id.
func withID(c design.Claim, id string) design.Claim {
	c.ID = id
	return c
}

// TestClaimsTogether: of the slips that explain one claim, the one that explains
// the other too comes first, though another comes nearer or is more usual.
func TestClaimsTogether(t *testing.T) {
	a := assessorOf(t, referenceCase())
	power := claimOf(watts, 4*0.615, printedTol)
	got := a.assess(context.Background(), Nominal, []design.Claim{
		withID(claimOf(vEnd, 2*10.464, printedTol), "C1"), withID(power, "C2"),
		withID(claimOf(zin, 16.97-0.63i, printedTol), "C3"),
	})
	if s := got[0].Slips; len(s) == 0 || s[0].Name != slip.EMFForMatched.Name() || strings.Join(s[0].Explains, " ") != "C1 C2" {
		t.Errorf("voltage and power too high: %+v", s)
	}
	if got[2].Verdict != record.Confirmed {
		t.Errorf("impedance: %s", got[2].Verdict)
	}
	// Half of a spectrum explains the voltage alone, and is listed after it.
	if s := got[0].Slips; len(s) < 2 || s[1].Name != slip.DoubleSpectrum.Name() || strings.Join(s[1].Explains, " ") != "C1" {
		t.Errorf("voltage: %+v", s)
	}
}

// TestClaimConfirmedSpeaks: a slip in the design under which a confirmed claim
// would be contradicted comes after one in the result.
func TestClaimConfirmedSpeaks(t *testing.T) {
	a := assessorOf(t, referenceCase())
	got := a.assess(context.Background(), Nominal, []design.Claim{
		withID(claimOf(vEnd, 2*10.464, printedTol), "C1"),
		withID(claimOf(vIn, 5.072, printedTol), "C2"),
	})
	if s := got[0].Slips; len(s) < 2 || s[0].Name != slip.PeakToPeakForPeak.Name() || s[1].Name != slip.EMFForMatched.Name() {
		t.Errorf("one voltage of two is double: %+v", s)
	}
}

// TestNoSlip: a wrong figure that no single slip makes is said to be that.
func TestNoSlip(t *testing.T) {
	got := assessOne(t, assessorOf(t, referenceCase()), claimOf(zin, 3+211i, printedTol))
	if got.Verdict != record.Contradicted || len(got.Slips) > 0 || !strings.Contains(got.Finding, "No single known slip explains it.") {
		t.Errorf("%s, %q, %+v", got.Verdict, got.Finding, got.Slips)
	}
}

// TestUncertainClaims: the verdict with an uncertainty, and with witnesses that
// differ; a slip must confirm with the uncertainty included.
func TestUncertainClaims(t *testing.T) {
	about := vEnd
	right := 10.464
	for _, tt := range []struct {
		name        string
		off, spread float64 // parts of the value; the tolerance is a hundredth
		differ      float64 // of the second witness
		want        record.ClaimVerdict
	}{
		{"confirmed", 0.004, 0.004, 0, record.Confirmed},
		{"uncertain above", 0.008, 0.004, 0, record.ClaimOpen},
		{"uncertain below", 0.012, 0.004, 0, record.ClaimOpen},
		{"contradicted", 0.02, 0.004, 0, record.Contradicted},
		{"witnesses differ", 0.005, 0, 0.03, record.ClaimOpen},
	} {
		a := assessorOf(t, referenceCase())
		found := a.found.clone()
		for j := range found.junctions {
			found.junctions[j] *= complex(1+tt.differ, 0)
		}
		a.found = found
		a.spread = func(design.Requirement, quantity) float64 { return tt.spread * right }
		if got := assessOne(t, a, claimOf(about, complex(right*(1+tt.off), 0), printedTol)); got.Verdict != tt.want {
			t.Errorf("%s: %s (%s)", tt.name, got.Verdict, got.Finding)
		}
	}
	a := assessorOf(t, referenceCase())
	a.spread = func(design.Requirement, quantity) float64 { return 0.02 * right }
	if got := assessOne(t, a, claimOf(about, complex(2*right, 0), printedTol)); got.Verdict != record.Contradicted || len(got.Slips) > 0 {
		t.Errorf("more uncertain than its tolerance: %s, %+v", got.Verdict, got.Slips)
	}
}

// TestClaimUnits: a claim is recorded in its own unit, a power in dBm with its
// differences in dB, an angle next to what is claimed.
func TestClaimUnits(t *testing.T) {
	a := assessorOf(t, referenceCase())
	c := claimOf(watts, 0.3075, printedTol)
	c.Unit = "dBm"
	got := assessOne(t, a, c)
	if math.Abs(real(got.Claimed)-24.878) > 1e-3 || math.Abs(real(got.Phasor)-27.889) > 1e-2 || math.Abs(got.Difference-3.01) > 0.02 {
		t.Errorf("%v dBm claimed, %v found, %v apart", got.Claimed, got.Phasor, got.Difference)
	}
	c = claimOf(turn, 469.44*deg, printedTol)
	got = assessOne(t, a, c)
	if got.Verdict != record.Confirmed || math.Abs(real(got.Phasor)-469.44) > 0.01 || !strings.Contains(got.Finding, "469.44 deg is the same as one of 109.44 deg") {
		t.Errorf("%s, %v, %q", got.Verdict, got.Phasor, got.Finding)
	}
	c = claimOf(vEnd, complex(2*10.464, 0), printedTol)
	c.Unit = "V rms"
	got = assessOne(t, a, c)
	if want := 2 * 10.464 / math.Sqrt2; math.Abs(real(got.Claimed)-want) > 1e-9 || math.Abs(real(got.Slips[0].Value)-want) > 0.01 {
		t.Errorf("%v V rms claimed, %+v", got.Claimed, got.Slips)
	}
}

// TestClaimWords: figures and differences as the sentences have them.
func TestClaimWords(t *testing.T) {
	for _, tt := range []struct {
		quantity design.Quantity
		unit     string
		both     bool
		value    complex128
		want     string
	}{
		{design.LoadPower, "W", false, 16445.3, "16.45 kW"},
		{design.LoadPower, "dBm", false, 24.8776, "24.88 dBm"},
		{design.SettleTime, "us", false, 8.9e-7, "890 ns"},
		{design.VSWR, "1", false, 1.00251, "1.003"},
		{design.InputImpedance, "ohm", true, 18.6801 - 14.8363i, "18.68 - j14.84 ohm"},
		{design.InputImpedance, "ohm", true, 2500 + 30i, "2.5 + j0.03 kohm"},
		{design.Voltage, "V rms", true, 3i, "3 V rms at 90 deg"},
		{design.Reflection, "1", true, -0.25, "0.25 at 180 deg"},
		{design.SteadyVoltage, "kV peak", false, 0, "0 V peak"},
		{design.VSWR, "1", false, complex(math.Inf(1), 0), "+Inf"},
	} {
		c := claimed{Claim: design.Claim{Requirement: design.Requirement{Quantity: tt.quantity}, Unit: tt.unit, Complex: tt.both}}
		if got := c.words(tt.value); got != tt.want {
			t.Errorf("got %q, want %q", got, tt.want)
		}
	}
}

// TestTimedClaims: what only the time domain has is judged by it alone, and
// only slips in the result and in the strength of the source are looked for.
func TestTimedClaims(t *testing.T) {
	a := assessorOf(t, referenceCase())
	figure := &timedFigure{value: 14, spread: 0.01, note: "the run ended before the network was at rest"}
	a.timed = func(design.Requirement) *timedFigure { return figure }
	about := design.Requirement{Quantity: design.PeakVoltage}
	got := assessOne(t, a, claimOf(about, 14*math.Sqrt2, printedTol))
	if got.Verdict != record.Contradicted || !math.IsNaN(real(got.Phasor)) || !firstNamed(got, slip.PeakForRMS, "") || !strings.Contains(got.Finding, "Only the time domain") {
		t.Errorf("%s, %v, %q, %+v", got.Verdict, got.Phasor, got.Finding, got.Slips)
	}
	if got = assessOne(t, a, claimOf(about, 28, printedTol)); !firstNamed(got, slip.EMFForMatched, "the source") {
		t.Errorf("double: %+v", got.Slips)
	}
	figure.unfinished = true
	if got = assessOne(t, a, claimOf(about, 14, printedTol)); got.Verdict != record.ClaimOpen || !strings.Contains(got.Finding, figure.note) {
		t.Errorf("unfinished: %s, %q", got.Verdict, got.Finding)
	}
	figure.value, figure.unfinished = math.NaN(), false
	if got = assessOne(t, a, claimOf(about, 14, printedTol)); got.Verdict != record.ClaimOpen {
		t.Errorf("no figure: %s", got.Verdict)
	}
}

// TestManySections: with many sections, slips in one section are looked for
// where the claims depend most, and the record says so; a context that ends
// cuts the search short.
func TestManySections(t *testing.T) {
	const sections = 40
	f := newFeeder(100e6, 20, 50, "source")
	for k := range sections {
		f.Junctions = append(f.Junctions, fmt.Sprint("j", k))
		f.line(fmt.Sprint("s", k), k, k+1, 50, 0.66, 0.01, 0.6)
	}
	f.load("load", sections, 25-40i)
	f.Source.R = 50
	a := assessorOf(t, &f.Network)
	about := design.Requirement{Quantity: design.InputImpedance, Section: "s0", End: "from"}
	got := assessOne(t, a, claimOf(about, 3+211i, printedTol))
	if !strings.Contains(got.Finding, "of 40 sections") {
		t.Errorf("%q", got.Finding)
	}
	ctx, cancel := context.WithCancel(context.Background())
	cancel()
	if got := a.assess(ctx, Nominal, []design.Claim{claimOf(about, 1, printedTol)}); got != nil {
		t.Errorf("cancelled: %+v", got)
	}
}

// TestQuotes: the quoted losses are those at other frequencies, of a table the
// nearest two.
func TestQuotes(t *testing.T) {
	d := &design.Design{
		Lines: []design.Line{
			{Name: "nominal", Nominal: &line.Nominal{LossAt: 1e6, Attenuation: 0.01}},
			{Name: "at the frequency", Nominal: &line.Nominal{LossAt: 1e8, Attenuation: 0.01}},
			{Name: "table", Fit: []design.FitPoint{
				{Frequency: 1e9, Given: 0.4}, {Frequency: 1e6, Given: 0.1}, {Frequency: 2e8, Given: 0.3}, {Frequency: 1e7, Given: 0.2},
			}},
		},
		Sections: []design.Section{{Line: "table"}, {Line: "nominal"}, {Line: "at the frequency"}},
	}
	d.Source.Frequency.SI = 1e8
	want := "[[{1e+07 0.2} {2e+08 0.3}] [{1e+06 0.01}] []]"
	if got := fmt.Sprint(quotes(d)); got != want {
		t.Errorf("got %s, want %s", got, want)
	}
}

// BenchmarkClaim explains one contradicted claim of a feeder with a stub, of the
// size of the demo.
func BenchmarkClaim(b *testing.B) {
	f := newFeeder(98.1e6, 2000, 50, "transmitter", "tee", "antenna", "stub end")
	f.line("main", 0, 1, 50, 0.921, 0.007, 120).line("tail", 1, 2, 50, 0.921, 0.007, 0.932).line("stub", 1, 3, 50, 0.997, 0.007, 0.447)
	f.load("antenna", 2, 28+18i).part("end", network.Load, 3, network.Branch{})
	a := assessorOf(b, &f.Network)
	c := claimOf(zin, 3+211i, printedTol)
	for b.Loop() {
		a.assess(context.Background(), Nominal, []design.Claim{c})
	}
}
