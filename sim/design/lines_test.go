package design

import (
	"math"
	"slices"
	"strings"
	"testing"

	"github.com/google/go-cmp/cmp"

	"linewitness/sim/line"
)

func lineOf(t *testing.T, d *Design, name string) Line {
	t.Helper()
	for _, l := range d.Lines {
		if l.Name == name {
			return l
		}
	}
	t.Fatalf("no line %s", name)
	return Line{}
}

// The velocity factor from each of the forms it can be given in.
func TestVelocityForms(t *testing.T) {
	d := goodFile(t, "lines.yaml").Nominal
	for name, want := range map[string]float64{
		"factor":       0.66,
		"permittivity": 1 / 1.5, // 1/sqrt(2.25)
		"delay":        1 / (5.05e-9 * line.C0),
		"delay_ft":     0.3048 / (1.54e-9 * line.C0),
		"capacitance":  1 / (75 * 67e-12 * line.C0),
		"cable":        0.659,
	} {
		l := lineOf(t, d, name)
		near(t, name, l.Nominal.VelocityFactor, want)
		near(t, name+", from its constants", l.Constants.FrontVelocity()/line.C0, want)
	}
}

// The capacitance of the relation of MIL-DTL-28830E, 4.7.10, from memory:
// z0 = 101670/(velocity in per cent times pF/ft); it prints five digits.
func TestCapacitanceAgreesWithTheMilitaryForm(t *testing.T) {
	const printed = 1e-4
	l := lineOf(t, goodFile(t, "lines.yaml").Nominal, "capacitance")
	z0 := 101670 / (100 * l.Nominal.VelocityFactor * 67 * 0.3048)
	if math.Abs(z0/75-1) > printed {
		t.Errorf("z0 = %g, want 75", z0)
	}
}

func TestModels(t *testing.T) {
	d := goodFile(t, "lines.yaml").Nominal
	omega := 2 * math.Pi * 100e6
	for name, want := range map[string]Model{
		"factor": Dispersive, "permittivity": Constant, "delay": Constant, "table": Dispersive, "cable": Dispersive,
		"coax": Dispersive, "open_wire": Dispersive, "board": Constant, "inner_layer": Dispersive,
		"primary": Constant, "asked": Dispersive, "needless": Constant, "wrong_unit": Constant,
	} {
		l := lineOf(t, d, name)
		if l.Model != want || l.Dispersion.None() != (want == Constant) {
			t.Errorf("%s: model %s with dispersion %+v, want %s", name, l.Model, l.Dispersion, want)
		}
		if want == Constant && l.Base != l.Constants {
			t.Errorf("%s: constants %+v, but at high frequencies %+v", name, l.Constants, l.Base)
		}
		sameLine(t, name, l.Dispersion.At(l.Base, omega), l.Constants)
	}
	k := lineOf(t, d, "asked")
	if k.Constants != (line.Constants{R: 1, L: 250e-9, G: 1e-6, C: 100e-12}) || k.Base.R != 0 || k.Base.G != 0 {
		t.Errorf("r, l, g, c made dispersive: %+v, at high frequencies %+v", k.Constants, k.Base)
	}
}

func sameLine(t *testing.T, what string, got, want line.Constants) {
	t.Helper()
	near(t, what+": R", got.R, want.R)
	near(t, what+": L", got.L, want.L)
	near(t, what+": G", got.G, want.G)
	near(t, what+": C", got.C, want.C)
}

// The model changes nothing at the design frequency.
func TestModelsAgreeAtTheDesignFrequency(t *testing.T) {
	src := string(readFile(t, "testdata/good/minimal.yaml"))
	of := func(model string) Line {
		with := strings.Replace(src, "velocity_factor: 0.66}", "velocity_factor: 0.66, loss: {at: 3 MHz, attenuation: 2 dB/100m, dielectric_share: 0.2}, model: "+model+"}", 1)
		return mustLoad(t, model, []byte(with)).Nominal.Lines[0]
	}
	constant, dispersive := of("constant"), of("dispersive")
	if constant.Constants != dispersive.Constants || dispersive.Dispersion.Skin == 0 || dispersive.Dispersion.Delta == 0 {
		t.Errorf("constant %+v, dispersive %+v with %+v", constant.Constants, dispersive.Constants, dispersive.Dispersion)
	}
}

// In a case that changes the frequency the same cable is there: dispersive or
// not, its conductors' loss grows as the root.
func TestLinesInACaseOfOtherFrequency(t *testing.T) {
	f := goodFile(t, "lines.yaml")
	d := caseOf(t, f, "other_frequency")
	for _, name := range []string{"factor", "table", "cable", "coax"} {
		before, l := lineOf(t, f.Nominal, name), lineOf(t, d, name)
		if l.Base != before.Base || l.Dispersion != before.Dispersion {
			t.Errorf("%s is another line at another frequency", name)
		}
		sameLine(t, name, l.Constants, before.Dispersion.At(before.Base, 2*math.Pi*400e6))
	}
	constant := lineOf(t, d, "delay")
	near(t, "R of the constant model", constant.Constants.R, 2*lineOf(t, f.Nominal, "delay").Constants.R)
	if s := d.Sections[0]; s.Length != f.Nominal.Sections[0].Length {
		t.Errorf("a length was cut anew: %+v", s.Length)
	}
}

func TestLossTable(t *testing.T) {
	l := lineOf(t, goodFile(t, "lines.yaml").Nominal, "table")
	if l.Text != "z0 50 ohm, velocity factor 0.66, loss table of 4 points" || len(l.Fit) != 4 {
		t.Errorf("%q with a fit of %d points", l.Text, len(l.Fit))
	}
	var given []line.LossPoint
	for _, p := range l.Fit {
		given = append(given, line.LossPoint{F: p.Frequency, Attenuation: p.Given})
		const fits = 0.05 // the table is that of a usual cable
		if math.Abs(p.Residual()) > fits || p.Residual() != p.Fitted/p.Given-1 {
			t.Errorf("%s: fitted %g, given %g", p.Text, p.Fitted, p.Given)
		}
	}
	fit, err := line.FitLoss(given)
	if err != nil {
		t.Fatal(err)
	}
	k := l.Constants
	near(t, "R", k.R, 2*50*fit.Conductor(100e6))
	near(t, "G", k.G, 2*fit.Dielectric(100e6)/50)
	if l.Fit[2].Text != "7.0 dB/100m at 0.1 GHz" {
		t.Errorf("text %q", l.Fit[2].Text)
	}
	replaced := lineOf(t, caseOf(t, goodFile(t, "lines.yaml"), "other_loss"), "table")
	if replaced.Fit != nil || replaced.Text != "z0 50 ohm, velocity factor 0.66, 8 dB/100m at 100 MHz" {
		t.Errorf("a case with a loss at one frequency: %q, fit %v", replaced.Text, replaced.Fit)
	}
}

func TestCable(t *testing.T) {
	f := goodFile(t, "lines.yaml")
	l := lineOf(t, f.Nominal, "cable")
	for _, p := range l.Pedigree {
		if p.Kind != Catalogue && p.What != "model" || p.Kind == Catalogue && !strings.Contains(p.Note, "from memory") {
			t.Errorf("pedigree %+v", p)
		}
	}
	if len(l.Warnings) != 1 || !strings.Contains(l.Warnings[0], "sheet of the cable in hand") {
		t.Errorf("warnings %q", l.Warnings)
	}
	if r := l.Rating; r.Voltage.SI != 3700*math.Sqrt2 || r.VoltageSource != CableTable || r.Current != nil || r.MarginDB != 0 {
		t.Errorf("rating %+v", r)
	}
	if spelled := lineOf(t, f.Nominal, "spelled"); !strings.HasPrefix(spelled.Text, "RG-58C ") {
		t.Errorf("rg58c is %q", spelled.Text)
	}
	if other := lineOf(t, caseOf(t, f, "other_form"), "cable"); other.Rating.Voltage != nil || other.Nominal.Z0 != 50 {
		t.Errorf("a case without the cable keeps %+v", other)
	}
}

// A section's own rating wins, key by key.
func TestRatings(t *testing.T) {
	f := goodFile(t, "lines.yaml")
	for i, want := range map[int]Rating{
		0: {},
		1: {Voltage: &Limit{SI: 1000, Unit: "kV peak", Text: "1 kV peak"}, VoltageSource: "section s2", MarginDB: 6},
		2: {Current: &Limit{SI: 4, Unit: "A peak", Text: "4 A peak"}, CurrentSource: "section s3"},
		3: {
			Voltage: &Limit{SI: 1400 * math.Sqrt2, Unit: "V rms", Text: "1400 V rms"}, VoltageSource: CableTable,
			Current: &Limit{SI: 5 * math.Sqrt2, Unit: "A rms", Text: "5 A rms"}, CurrentSource: "line spelled", MarginDB: 3,
		},
		4: {
			Voltage: &Limit{SI: 1400 * math.Sqrt2, Unit: "V rms", Text: "1400 V rms"}, VoltageSource: CableTable,
			Current: &Limit{SI: 5 * math.Sqrt2, Unit: "A rms", Text: "5 A rms"}, CurrentSource: "line spelled",
		},
	} {
		compareRating(t, f.Nominal.Sections[i], want)
	}
	compareRating(t, caseOf(t, f, "other_rating").Sections[1], Rating{
		Voltage: &Limit{SI: 3700 * math.Sqrt2, Unit: "V rms", Text: "3700 V rms"}, VoltageSource: CableTable,
		Current: &Limit{SI: 3 * math.Sqrt2, Unit: "A rms", Text: "3 A rms"}, CurrentSource: "section s2", MarginDB: 6,
	})
}

func compareRating(t *testing.T, s Section, want Rating) {
	t.Helper()
	places := cmp.FilterPath(func(p cmp.Path) bool { return p.Last().String() == ".Pos" }, cmp.Ignore())
	rounding := cmp.Comparer(func(a, b float64) bool { return math.Abs(a-b) <= valueTol*math.Abs(a) })
	if diff := cmp.Diff(want, s.Rating, places, rounding); diff != "" {
		t.Errorf("rating of %s (-want +got):\n%s", s.Name, diff)
	}
}

// The dimensions reach the geometry as they are: the formulas are tested in
// package line.
func TestGeometry(t *testing.T) {
	d := goodFile(t, "lines.yaml").Nominal
	copper := line.Conductor{Conductivity: 58e6}
	rough := func(sigma float64) line.Conductor { return line.Conductor{Conductivity: sigma, Roughness: 0.5e-6} }
	for name, made := range map[string]interface{ Geometry() (line.Geometry, error) }{
		"coax": line.Coax{
			Inner: 0.292e-3, Outer: 1.855e-3, Wall: 6 * 25.4e-6, Permittivity: 2.25, LossTangent: 0.0004,
			InnerMetal: rough(58e6), OuterMetal: rough(23e6),
		},
		"open_wire":    line.TwoWire{Diameter: 2e-3, Spacing: 0.15, Permittivity: 1, Metal: copper},
		"counterpoise": line.WireOverGround{Radius: 2e-3, Height: 0.3, Permittivity: 1, Metal: copper, Ground: line.Conductor{Conductivity: 1e6}},
		"board":        line.Microstrip{Width: 3e-3, Height: 1.6e-3, Thickness: 35e-6, Permittivity: 4.2, LossTangent: 0.02, Metal: copper},
		"inner_layer":  line.Stripline{Width: 0.5e-3, Spacing: 1.2e-3, Thickness: 35e-6, Permittivity: 4.2, LossTangent: 0.02, Metal: copper},
	} {
		g, err := made.Geometry()
		if err != nil {
			t.Fatal(err)
		}
		l := lineOf(t, d, name)
		sameLine(t, name, l.Constants, g.At(100e6))
		if l.Nominal != nil {
			t.Errorf("%s is nominal", name)
		}
		if diff := cmp.Diff(append(slices.Clone(g.Warnings), g.WarningsAt(100e6)...), l.Warnings); diff != "" {
			t.Errorf("%s: warnings (-want +got):\n%s", name, diff)
		}
		if name == "coax" {
			near(t, "field per volt", l.FieldPerVolt, 1/(0.292e-3*math.Log(1.855/0.292)))
		} else if l.FieldPerVolt != 0 {
			t.Errorf("%s: field per volt %g", name, l.FieldPerVolt)
		}
	}
	quarter := lineOf(t, d, "coax").Constants.Wavelength(100e6) / 4
	near(t, "a quarter wave of the coax", d.Sections[2].Length.SI, quarter)
}

func TestPedigree(t *testing.T) {
	d := goodFile(t, "lines.yaml").Nominal
	for name, want := range map[string][]Provenance{
		"factor": {
			{"z0", "50 ohm", GivenInDesign, ""},
			{"velocity factor", "0.66", GivenInDesign, ""},
			{"loss", "2 dB/100m at 25 MHz", GivenInDesign, ""},
			{"dielectric share", "0.1", GivenInDesign, ""},
			{"model", "dispersive", Assumed, "resistance by skin effect, conductance by a constant loss tangent"},
		},
		"short_table": {
			{"z0", "50 ohm", GivenInDesign, ""},
			{"velocity factor", "0.66", GivenInDesign, ""},
			{"loss", "2 dB/km at 1 MHz", Datasheet, ""},
			{"loss", "7 dB/km at 10 MHz", Datasheet, ""},
			{"model", "dispersive", Assumed, "resistance by skin effect, conductance by a constant loss tangent"},
		},
		// 119.917 ohm acosh(75)
		"open_wire": {
			{"permittivity", "1", Assumed, "air or vacuum"},
			{"loss tangent", "0", Assumed, "a dielectric without loss"},
			{"roughness", "0", Assumed, "smooth conductors"},
			{"conductivity", "copper", Assumed, "58 MS/m"},
			{"diameter", "2 mm", FromGeometry, ""},
			{"spacing", "150 mm", FromGeometry, ""},
			{"z0", "600.85 ohm", FromGeometry, "worked out, of perfect conductors"},
			{"velocity factor", "1", FromGeometry, "worked out, of perfect conductors"},
			{"model", "dispersive", GivenInDesign, ""},
		},
	} {
		got := slices.Clone(lineOf(t, d, name).Pedigree)
		order := func(p []Provenance) {
			slices.SortFunc(p, func(a, b Provenance) int { return strings.Compare(a.What+a.Text, b.What+b.Text) })
		}
		order(got)
		order(want)
		if diff := cmp.Diff(want, got); diff != "" {
			t.Errorf("%s (-want +got):\n%s", name, diff)
		}
	}
}

func TestLineWarnings(t *testing.T) {
	d := goodFile(t, "lines.yaml").Nominal
	for name, want := range map[string]string{
		"mismatch":    "the capacitance 93.5 pF/m is -7.5 % from the",
		"delay":       "",
		"short_table": "outside of the loss table",
		"needless":    "changes nothing",
		"wrong_unit":  "too high to be skin effect",
		"air":         "times the speed of light",
	} {
		warnings := lineOf(t, d, name).Warnings
		if all := strings.Join(warnings, "\n"); !strings.Contains(all, want) || want == "" && all != "" {
			t.Errorf("%s: warnings %q, want %q", name, warnings, want)
		}
		for _, text := range warnings {
			if !slices.Contains(d.Warnings, "line "+name+": "+text) {
				t.Errorf("the design lacks the warning %q of %s", text, name)
			}
		}
	}
}
