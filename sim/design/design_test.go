package design

import (
	"crypto/sha256"
	"fmt"
	"math"
	"strings"
	"testing"

	"github.com/google/go-cmp/cmp"

	"linewitness/sim/line"
)

// valueTol allows for the rounding of the conversions.
const valueTol = 1e-12

func near(t *testing.T, what string, got, want float64) {
	t.Helper()
	if math.Abs(got-want) > valueTol*math.Abs(want) {
		t.Errorf("%s = %v, want %v", what, got, want)
	}
}

func goodFile(t *testing.T, name string) *File {
	t.Helper()
	return mustLoad(t, name, readFile(t, "testdata/good/"+name))
}

func caseOf(t *testing.T, f *File, name string) *Design {
	t.Helper()
	for _, c := range f.Cases {
		if c.Name == name {
			return c.Design
		}
	}
	t.Fatalf("no case %s", name)
	return nil
}

func TestDefaults(t *testing.T) {
	d := goodFile(t, "minimal.yaml").Nominal
	if diff := cmp.Diff(Grid{40, 1e-4, 0.005, 20000}, d.Grid); diff != "" {
		t.Error("grid:", diff)
	}
	if s := d.Source.Start; s.Ramp || !s.Worst || s.Text != "abrupt, worst phase" {
		t.Errorf("start: %+v", s)
	}
	if d.Convention != Engineering || d.Source.Stop != nil || len(d.Requirements) != 0 {
		t.Errorf("convention %v, stop %v", d.Convention, d.Source.Stop)
	}
}

func TestTextsAndHeader(t *testing.T) {
	d := goodFile(t, "block_style.yaml").Nominal
	for _, tt := range []struct{ what, got, want string }{
		{"revision", d.Record.Revision, "1.10"}, // not the number 1.1
		{"date", d.Record.Date, "2026-02-28"},
		{"purpose", d.Record.Purpose, "Two paragraphs.\n\nThe second."},
		{"start", d.Source.Start.Text, "raised-cosine rise over 3 periods, phase 30 deg"},
		{"stop", d.Source.Stop.Text, "at 15 us, raised-cosine fall over 0.1 us"},
		{"impedance", d.Source.Impedance.Text, "50 ohm, 2 uH, 1 nF"},
		{"line", d.Lines[0].Text, "r 20 mohm/m, l 1.7 uH/m, g 2 nS/m, c 6.7 pF/m"},
		{"length", d.Sections[0].Length.Text, "0.25 wavelengths"},
		{"junctions", fmt.Sprint(d.Junctions), "[tx hut]"},
		{
			"nominal line", goodFile(t, "lengths_and_units.yaml").Nominal.Lines[0].Text,
			"z0 50 Ω, velocity factor 66 %, 6.1 dB/100 ft at 0.1 GHz, dielectric share 10 %",
		},
	} {
		if tt.got != tt.want {
			t.Errorf("%s is %q, want %q", tt.what, tt.got, tt.want)
		}
	}
	history := []Revision{
		{Revision: "1.9", Date: "2025-11-03", By: "A. Kowal", Text: "First issue."},
		{Revision: "1.10", Text: "Open wire in place of the cable;\nboth ends measured again."},
	}
	if diff := cmp.Diff(history, d.Record.History); diff != "" {
		t.Error("history (-want +got):", diff)
	}
	if z := d.Source.Impedance; z.Kind != SeriesParts || z.R != 50 || z.L != 2e-6 || z.C != 1e-9 {
		t.Errorf("source impedance %+v", z)
	}
	near(t, "rise", d.Source.Start.Rise, 3/1.6e6)
	near(t, "phase", d.Source.Start.Phase, math.Pi/6)
	near(t, "stop", d.Source.Stop.At, 15e-6)
	near(t, "available", d.Source.Available.SI, 1e-3*math.Pow(10, 5.4))
	near(t, "EMF", d.Source.EMF.SI, math.Sqrt(8*50*1e-3*math.Pow(10, 5.4)))
}

// The record prints the file and its sum: both are of the bytes as they came,
// byte order mark and line ends included.
func TestFileIsKeptAsItIs(t *testing.T) {
	src := readFile(t, "testdata/good/windows.yaml")
	f := mustLoad(t, "windows.yaml", src)
	if f.Name != "windows.yaml" || string(f.Source) != string(src) {
		t.Errorf("name %q, %d bytes of %d", f.Name, len(f.Source), len(src))
	}
	if want := fmt.Sprintf("%x", sha256.Sum256(src)); f.SHA256 != want {
		t.Errorf("sum %s, want %s", f.SHA256, want)
	}
}

func TestLengths(t *testing.T) {
	d := goodFile(t, "lengths_and_units.yaml").Nominal
	pair := line.Constants{R: 0.055, L: 700e-9, C: 50e-12}
	coax := 0.66 * line.C0 / 1e8 // wavelength
	want := map[string]float64{
		"s1": 1, "s2": 1, "s3": 1, "s4": 1, "s5": 3.5 * 0.3048, "s6": 0.3048,
		"s7": pair.Wavelength(1e8) / 4,        // phase velocity of the lossy line
		"s8": coax / 4,                        // velocity factor of the nominal line
		"s9": 5e-9 / math.Sqrt(pair.L*pair.C), // front velocity
	}
	for _, s := range d.Sections {
		near(t, s.Name, s.Length.SI, want[s.Name])
	}
	near(t, "conductor loss", d.Lines[0].Constants.R, 2*50*0.9*6.1/line.NeperDB/100/0.3048)
	near(t, "dielectric loss", d.Lines[0].Constants.G, 2*0.1*6.1/line.NeperDB/100/0.3048/50)
	near(t, "EMF from peak to peak", d.Source.EMF.SI, 1)
}

func TestPhysicsConvention(t *testing.T) {
	d := goodFile(t, "physics.yaml").Nominal
	if z := d.Source.Impedance.Z; z != 50+5i {
		t.Errorf("source impedance %v", z)
	}
	if z := d.Loads[0].Impedance.Z; z != 36.5+61.1i {
		t.Errorf("load %v", z)
	}
	// e^{-iwt} with phase 90 deg is cos(wt - 90 deg), a sine.
	near(t, "start phase", d.Source.Start.Phase, -math.Pi/2)
	window, circle, phase, difference := d.Requirements[0], d.Requirements[1], d.Requirements[2], d.Requirements[3]
	if window.X.Min.SI != -5 || window.X.Max.SI != 20 || window.R.Min.SI != 10 || window.R.Max != nil {
		t.Errorf("windows %+v %+v", window.R, window.X)
	}
	if circle.Within.Of != 50+10i {
		t.Errorf("circle %+v", circle.Within)
	}
	near(t, "radius", circle.Within.Radius, 0.05*math.Hypot(50, 10))
	near(t, "least phase", phase.Min.SI, -30*math.Pi/180)
	near(t, "largest phase", phase.Max.SI, 10*math.Pi/180)
	if difference.Max != nil || difference.Min.SI != -20*degree || !strings.Contains(difference.Min.Text, "e^{-iwt}") {
		t.Errorf("difference %+v %+v", difference.Min, difference.Max)
	}
}

// The same file in either convention, written accordingly, is one design.
func TestConventionsAgree(t *testing.T) {
	const file = `format: 1
record: {title: T, number: 1}
convention: %s
source: {at: a, frequency: 1 MHz, emf: 1 V peak, impedance: 50 %[2]s %[3]s5 ohm, start: {profile: abrupt, phase: %[4]s30 deg}}
lines: {l: {z0: 50 ohm, velocity_factor: 1}}
sections: {s: {from: a, to: b, length: 1 m, line: l}}
loads: {x: {at: b, impedance: 70 ohm at %[4]s40 deg}}
`
	engineering := mustLoad(t, "e", fmt.Appendf(nil, file, "engineering", "+", "j", "+")).Nominal
	physics := mustLoad(t, "p", fmt.Appendf(nil, file, "physics", "-", "i", "-")).Nominal
	if engineering.Source.Impedance.Z != physics.Source.Impedance.Z ||
		engineering.Source.Start.Phase != physics.Source.Start.Phase ||
		engineering.Loads[0].Impedance.Z != physics.Loads[0].Impedance.Z {
		t.Errorf("engineering %+v %+v, physics %+v %+v", engineering.Source, engineering.Loads, physics.Source, physics.Loads)
	}
}

func TestCases(t *testing.T) {
	f := goodFile(t, "cases.yaml")
	nominal := f.Nominal
	if z := caseOf(t, f, "other_form").Loads[0].Impedance; z.Kind != Complex || z.Z != 30+5i {
		t.Errorf("other_form: %+v", z)
	}
	if z := caseOf(t, f, "one_part").Loads[0].Impedance; z.R != 36 || z.L != 2e-6 {
		t.Errorf("one_part: %+v", z)
	}
	if z := caseOf(t, f, "remove_part").Loads[0].Impedance; z.R != 36 || z.L != 0 {
		t.Errorf("remove_part: %+v", z)
	}
	if d := caseOf(t, f, "remove_stub"); len(d.Sections) != 1 || len(d.Loads) != 1 {
		t.Errorf("remove_stub: %+v", d)
	}
	near(t, "power", caseOf(t, f, "power").Source.EMF.SI, 100)
	if d := caseOf(t, f, "abrupt"); d.Source.Start.Ramp || d.Source.Start.Text != "abrupt, worst phase" {
		t.Errorf("abrupt: %+v", d.Source.Start)
	}
	if d := caseOf(t, f, "burst"); d.Source.Stop == nil || d.Source.Stop.Text != "at 2 us, abrupt" || nominal.Source.Stop != nil {
		t.Errorf("burst: %+v", d.Source.Stop)
	}
	if d := caseOf(t, f, "constants"); d.Lines[0].Nominal != nil || d.Lines[0].Constants.R != 0.1 {
		t.Errorf("constants: %+v", d.Lines)
	}
	if d := caseOf(t, f, "new_part"); len(d.Elements) != 1 || len(nominal.Elements) != 0 {
		t.Errorf("new_part: %+v", d.Elements)
	}
}

// A case that changes the frequency or the line has the same pieces of line
// in it; one that gives a length cuts it anew.
func TestElectricalLengthsAreCutOnce(t *testing.T) {
	f := goodFile(t, "cases.yaml")
	quarter := 0.66 * line.C0 / 10e6 / 4
	near(t, "nominal", f.Nominal.Sections[0].Length.SI, quarter)
	for _, name := range []string{"frequency", "cut", "constants"} {
		near(t, name, caseOf(t, f, name).Sections[0].Length.SI, quarter)
	}
	near(t, "stub at another frequency", caseOf(t, f, "frequency").Sections[1].Length.SI, quarter/2)
	near(t, "stub cut anew", caseOf(t, f, "cut").Sections[1].Length.SI, quarter/2*10/11)
}

func TestRequirementCases(t *testing.T) {
	f := goodFile(t, "cases.yaml")
	all := []string{"other_form", "one_part", "remove_part", "remove_stub", "power", "abrupt", "no_start", "burst", "constants", "frequency", "cut", "new_part"}
	for i, want := range [][]string{{"nominal", "power"}, all, {"one_part"}} {
		if diff := cmp.Diff(want, f.Nominal.Requirements[i].Cases); diff != "" {
			t.Errorf("requirement %d (-want +got):\n%s", i+1, diff)
		}
	}
	if diff := cmp.Diff(f.Nominal.Requirements, caseOf(t, f, "cut").Requirements); diff != "" {
		t.Error("the requirements differ between cases:", diff)
	}
}

func TestLimits(t *testing.T) {
	r := map[string]Requirement{}
	for _, x := range goodFile(t, "requirements.yaml").Nominal.Requirements {
		r[x.ID] = x
	}
	for _, tt := range []struct {
		name string
		got  *Limit
		si   float64
		unit string
	}{
		{"VSWR", r["R1"].Max, 3, "1"},
		{"VSWR as a proportion", r["R2"].Max, 1.5, "1"},
		{"return loss, dB", r["R3"].Min, 6, "dB"},
		{"reflection", r["R4"].Max, 0.5, "1"},
		{"reflection in per cent", r["R5"].Max, 0.5, "%"},
		{"impedance window", r["R6"].R.Max, 100, "ohm"},
		{"voltage, peak", r["R8"].Max, 80 * math.Sqrt2, "V rms"},
		{"current, peak", r["R11"].Max, 2, "A pp"},
		{"overshoot", r["R12"].Max, 0.4, "%"},
		{"settle time, s", r["R13"].Max, 4e-6, "periods"},
		{"power, W", r["R14"].Max, 1e-3 * math.Pow(10, 4.5), "dBm"},
		{"change of power, dB", r["R15"].Min, -3, "dB"},
		{"efficiency", r["R16"].Min, 0.1, "%"},
		{"loss, dB", r["R18"].Max, 1, "dB"},
		{"phase, rad", r["R20"].Min, -math.Pi, "deg"},
		{"split, dB", r["R23"].Max, 10, "dB"},
		{"agreement", r["R24"].Max, 0.005, "%"},
	} {
		near(t, tt.name, tt.got.SI, tt.si)
		if tt.got.Unit != tt.unit {
			t.Errorf("%s: unit %q, want %q", tt.name, tt.got.Unit, tt.unit)
		}
	}
	near(t, "settled", r["R13"].Settled, 0.001)
	if r["R1"].Text != "In words" || r["R1"].Document != "Spec 4.2" || r["R2"].Reference.SI != 75 {
		t.Errorf("R1 %+v, R2 %+v", r["R1"], r["R2"])
	}
	if r["R22"].Between != [2]string{"aerial", "hut"} || r["R7"].Within.Of != 50-10i || r["R7"].Within.Radius != 40 {
		t.Errorf("R22 %+v, R7 %+v", r["R22"], r["R7"])
	}
}

// The pieces of a loop, a bridge and a ring come through with their ends.
func TestNetworkShape(t *testing.T) {
	d := goodFile(t, "loop_and_bridge.yaml").Nominal
	if diff := cmp.Diff([]string{"n1", "n2", "n3", "n4", "n5"}, d.Junctions); diff != "" {
		t.Error(diff)
	}
	bridge := d.Elements[0]
	if bridge.At != "n3" || bridge.To != "n4" || bridge.Impedance.R != 0.3 || bridge.Impedance.L != 200e-9 {
		t.Errorf("bridge %+v", bridge)
	}
	if d.Elements[1].Impedance.Kind != Open || d.Loads[2].Impedance.Kind != Open || d.Elements[2].To != "" {
		t.Errorf("elements %+v", d.Elements)
	}
	near(t, "rms source", d.Source.EMF.SI, 10*math.Sqrt2)
}
