package main

import (
	"errors"
	"math"
	"math/cmplx"
	"runtime/debug"
	"strings"
	"testing"

	"linewitness/sim/record"
)

func TestNearest(t *testing.T) {
	names := []string{"verify", "version", "plan", "paper", "json", "a4"}
	for _, tt := range []struct{ word, want string }{
		{"verfy", "verify"},
		{"vreify", "verify"},
		{"plna", "plan"},
		{"papr", "paper"},
		{"jsno", "json"},
		{"version", "version"},
		{"a5", "a4"},
		{"", ""},
		{"solve", ""},
		{"x", ""},
	} {
		if got := nearest(tt.word, names); got != tt.want {
			t.Errorf("nearest(%q) = %q, want %q", tt.word, got, tt.want)
		}
	}
}

func TestDistance(t *testing.T) {
	for _, tt := range []struct {
		a, b string
		want int
	}{
		{"", "", 0},
		{"", "abc", 3},
		{"abc", "", 3},
		{"abc", "abc", 0},
		{"abc", "abd", 1},
		{"abc", "acb", 1},
		{"ca", "abc", 3}, // 2 for the unrestricted distance
		{"kitten", "sitting", 3},
	} {
		if got := distance(tt.a, tt.b); got != tt.want {
			t.Errorf("distance(%q, %q) = %d, want %d", tt.a, tt.b, got, tt.want)
		}
	}
}

func TestChoices(t *testing.T) {
	for _, tt := range []struct{ in, want, err string }{
		{"pdf", "pdf", ""},
		{"csv,pdf", "csv,pdf", ""},
		{"pdf,pdf", "pdf", ""},
		{"none", "none", ""},
		{"pdf,none", "", `unknown value "pdf,none"`},
		{"", "", `unknown value ""`},
		{"pdf,", "", `unknown value ""`},
		{"PDF", "", `unknown value "PDF"`},
	} {
		c := choices{of: []string{"pdf", "json", "csv"}}
		err := c.Set(tt.in)
		switch {
		case tt.err == "" && (err != nil || c.String() != tt.want):
			t.Errorf("Set(%q) gives %s, error %v; want %s", tt.in, c.String(), err, tt.want)
		case tt.err != "" && (err == nil || err.Error() != tt.err):
			t.Errorf("Set(%q) gives error %v, want %s", tt.in, err, tt.err)
		}
	}
}

// What was given is never its own remedy.
func TestChoicesNone(t *testing.T) {
	c := choices{of: []string{"pdf", "json"}}
	var got *choiceError
	if err := c.Set("none,pdf"); !errors.As(err, &got) {
		t.Fatalf("error %v", err)
	}
	if want := "the values are pdf, json, none alone"; got.hint() != want {
		t.Errorf("hint %q, want %q", got.hint(), want)
	}
}

func TestOutputBase(t *testing.T) {
	for _, tt := range []struct{ path, want string }{
		{"feeder.yaml", "feeder"},
		{"a/b.c/feeder.v2.yml", "feeder.v2"},
		{"feeder", "feeder"},
		{"-", "design"},
		{".yaml", ".yaml"},
		{"../feeder.yaml", "feeder"},
	} {
		if got := outputBase(tt.path); got != tt.want {
			t.Errorf("outputBase(%q) = %q, want %q", tt.path, got, tt.want)
		}
	}
}

func TestVersionOf(t *testing.T) {
	info := func(version string, settings ...string) *debug.BuildInfo {
		b := &debug.BuildInfo{Main: debug.Module{Version: version}}
		for i := 0; i < len(settings); i += 2 {
			b.Settings = append(b.Settings, debug.BuildSetting{Key: settings[i], Value: settings[i+1]})
		}
		return b
	}
	for _, tt := range []struct {
		info *debug.BuildInfo
		want string
	}{
		{info(""), "(devel)"},
		{info("v1.2.0"), "v1.2.0"},
		{info("(devel)", "vcs.revision", "0123456789abcdef", "vcs.modified", "false"), "(devel) (0123456789ab)"},
		{info("v1.2.0", "vcs.revision", "01", "vcs.modified", "true"), "v1.2.0 (01+changes)"},
	} {
		if got := versionOf(tt.info); got != tt.want {
			t.Errorf("version %q, want %q", got, tt.want)
		}
	}
}

// Each verdict has its status, and a worse verdict never a smaller one.
func TestStatusOf(t *testing.T) {
	for _, tt := range []struct {
		verdict record.Verdict
		want    int
	}{
		{record.Verified, 0}, {record.NotShown, 1}, {record.Doubted, 1}, {record.Missed, 1}, {record.Disagree, 3}, {record.Unsettle, 4},
	} {
		if got := statusOf(tt.verdict); got != tt.want {
			t.Errorf("statusOf(%q) = %d, want %d", tt.verdict, got, tt.want)
		}
	}
}

func TestTypeable(t *testing.T) {
	for _, tt := range []struct{ got, want string }{
		{inUnit(1375, "V peak"), "1.375 kV peak"},
		{inUnit(-0.25, "1"), "-0.2500"},
		{inUnit(73, "ohm"), "73.00 ohm"},
		{inUnit(2.5, "deg"), "2.50 deg"},
		{inUnit(math.NaN(), "W"), "-"},
		{inUnit(math.Inf(1), "1"), "infinite"},
		{inSI(2.5e-5, "s"), "25.00 us"},
		{plainNumber(2.1e-7), "2.100e-7"},
		{plainNumber(-1.2e9), "-1.200e9"},
		{percent(0.00012), "0.0120 %"},
		{counted(1, "period"), "1 period"},
		{counted(20000, "period"), "20 000 periods"},
	} {
		if tt.got != tt.want {
			t.Errorf("got %q, want %q", tt.got, tt.want)
		}
	}
}

func TestWriteOutcome(t *testing.T) {
	r := sampleRecord()
	var b strings.Builder
	writeOutcome(&b, r)
	const want = `Short line (T-1 revision A): not settled

nominal: requirement missed
  agreement    0.0200 % found, 0.0300 % expected, limit 0.500 %
  settling     600.0 ns, 60 periods, remaining error 0.00250 %, loop factor 0.2500
  convergence  3 figures: 2 converging with order 1.95 to 2.02, 1 on two grids; largest index 0.024 % (R1)
  validation   every error is explained; largest error over uncertainty 0.41 (source_power source)
  curves       2 curves: largest global difference 0.034, excellent (main, |V| along the section)
  id    quantity             value          limit              margin        uncertainty  verdict
  R1    vswr main, from end  1.750          at most 1.5        -0.2500       0.0010       missed
  R2.1  peak_voltage main    1.900 kV peak  at most 2 kV peak  100.0 V peak  5.0 V        met
  R3    load_power aerial    3.353 dBm      at least 3 dBm     0.35 dB       0.010 dB     met
  id  quantity                        claimed                   found                     verdict       first slip
  C1  vswr main, from end             1.750                     1.750                     confirmed
  C2  input_impedance main, from end  18.68 - j14.84 ohm        36.50 - j61.10 ohm        contradicted  velocity factor left out, every section
  C3  voltage at mast                 5.000 V rms at 90.00 deg  7.000 V rms at 89.00 deg  contradicted  no single known slip explains it
  C4  peak_voltage main               1.890 kV peak             1.900 kV peak             not shown

lossless: not settled
  agreement    0 % found, 0 % expected, limit 0.500 %
  settling     no steady state: decay of 0 % a round trip
  convergence  left out: no steady state

warning: an ideal step
warning in nominal: mind the gap
`
	if got := b.String(); got != want {
		t.Errorf("got\n%s\nwant\n%s", got, want)
	}
}

// Columns begin under each other and no line ends in a space.
func TestWriteTable(t *testing.T) {
	var b strings.Builder
	writeTable(&b, [][]string{{"a", "longer", "c"}, {"éé", "b", ""}, {"x", "y", "z"}})
	const want = "  a   longer  c\n  éé  b\n  x   y       z\n"
	if b.String() != want {
		t.Errorf("got\n%s\nwant\n%s", b.String(), want)
	}
}

func sampleRecord() *record.Record {
	vswr, volts := 1.5, 2000.0
	return &record.Record{
		Design:  record.Design{Title: "Short line", Number: "T-1", Revision: "A", File: "short.yaml"},
		Verdict: record.Unsettle,
		Cases: []record.Case{
			{
				Name: "nominal", Verdict: record.Missed,
				Agreement: record.Agreement{Voltage: 1e-4, Current: 2e-4, Expected: 3e-4, Limit: 0.005},
				Settling:  record.Settling{Settled: true, Time: 600e-9, Periods: 60, Residual: 2.5e-5, LoopFactor: 0.25},
				Requirements: []record.Requirement{
					{
						ID: "R1", Quantity: "vswr", Subject: "main, from end", Unit: "1", Value: 1.75, Max: &vswr,
						Limit: "at most 1.5", Margin: -0.25, Uncertainty: 0.001, Verdict: record.MissedReq,
					},
					{
						ID: "R2.1", Quantity: "peak_voltage", Subject: "main", Unit: "V peak", Value: 1900, Max: &volts,
						Limit: "at most 2 kV peak", Margin: 100, Uncertainty: 5, Verdict: record.Met,
					},
					{
						ID: "R3", Quantity: "load_power", Subject: "aerial", Unit: "dBm", Value: 3.353, Min: &volts,
						Limit: "at least 3 dBm", Margin: 0.353, Uncertainty: 0.01, Verdict: record.Met,
					},
				},
				Convergence: record.Convergence{Studies: []record.Study{
					{ID: "R1", Behaviour: record.Converging, Order: 1.95, Factor: 1.25, GCIPercent: 0.024, Phasor: 1.75, Error: 1, Uncertainty: 4, Explained: true},
					{
						Quantity: "source_power", Subject: "source", Behaviour: record.Converging, Order: 2.02, Factor: 1.25, GCIPercent: 0.01,
						Phasor: 1, Error: -0.41, Uncertainty: 1, Explained: true,
					},
					{ID: "R2", Behaviour: record.TwoGrids, Order: math.NaN(), Phasor: math.NaN(), Explained: true},
				}},
				Fidelity: []record.Fidelity{
					{Subject: "main", Curve: "|V| along the section", GDM: record.Difference{Value: 0.034, Word: "excellent"}},
					{Subject: "main", Curve: "|I| along the section", GDM: record.Difference{Value: 0.012, Word: "excellent"}},
					{Subject: "aerial", Curve: "waveform", GDM: record.Difference{Value: math.NaN()}},
				},
				Claims:   sampleClaims(),
				Warnings: []string{"an ideal step", "mind the gap"},
			},
			{
				Name: "lossless", Verdict: record.Unsettle,
				Agreement: record.Agreement{Limit: 0.005},
				Settling:  record.Settling{Decay: "decay of 0 % a round trip"},

				Convergence: record.Convergence{Skipped: "no steady state"},
				Warnings:    []string{"an ideal step"},
			},
		},
	}
}

func sampleClaims() []record.Claim {
	return []record.Claim{
		{ID: "C1", Quantity: "vswr", Subject: "main, from end", Unit: "1", Claimed: 1.75, Phasor: 1.75, FDTD: 1.75, Verdict: record.Confirmed},
		{
			ID: "C2", Quantity: "input_impedance", Subject: "main, from end", Unit: "ohm", Complex: true, Claimed: 18.68 - 14.84i, Phasor: 36.5 - 61.1i,
			Verdict: record.Contradicted, Slips: []record.Slip{{Name: "velocity factor left out", Where: "every section"}, {Name: "feet for metres"}},
		},
		{
			ID: "C3", Quantity: "voltage", Subject: "at mast", Unit: "V rms", Complex: true, Claimed: 5i, Phasor: cmplx.Rect(7, 89*math.Pi/180),
			Verdict: record.Contradicted,
		},
		{
			ID: "C4", Quantity: "peak_voltage", Subject: "main", Unit: "V peak", Claimed: 1890, Phasor: complex(math.NaN(), 0), FDTD: 1900,
			Verdict: record.ClaimOpen,
		},
	}
}

// An error without an explanation is named, and only so many of them.
func TestValidationText(t *testing.T) {
	c := record.Convergence{}
	for _, id := range []string{"R1", "R2", "", "R4", "R5"} {
		c.Studies = append(c.Studies, record.Study{ID: id, Quantity: "loss", Phasor: 1, Error: 3, Uncertainty: 2})
	}
	const want = "not explained: R1, 1.5 of its uncertainty; R2, 1.5 of its uncertainty; loss, 1.5 of its uncertainty; and 2 more"
	if got := validationText(c.Tally()); got != want {
		t.Errorf("got %q, want %q", got, want)
	}
}
