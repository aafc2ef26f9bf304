package design

import (
	"strings"
	"testing"

	"github.com/google/go-cmp/cmp"
)

const termsDesign = `format: 1
record: {title: Feeder, number: T-1, purpose: "one, two"}   # a comment
source: {at: tx, frequency: 10 MHz, emf: 20 V peak, impedance: 50 ohm}
lines:
  coax: {z0: 50 ohm, velocity_factor: 0.66, loss: [{at: 1 MHz, attenuation: 1 dB/100m}, {at: 10 MHz, attenuation: 3.3 dB/100m}, {at: 50 MHz, attenuation: 8 dB/100m}]}
sections:
  main: {from: tx, to: mast, length: 20 m, line: coax}
loads: {aerial: {at: mast, r: 50 ohm}}
cases: {arc: {loads: {aerial: {r: 1 ohm}}}, open: {loads: {aerial: null}}}
requirements:
  - {id: R1, quantity: vswr, section: main, end: from, max: 1.5, cases: [nominal, arc]}
`

func TestTerms(t *testing.T) {
	f, err := Load("terms.yaml", []byte(termsDesign))
	if err != nil {
		t.Fatal(err)
	}
	var got []string
	var list func(at string, t Term)
	list = func(at string, t Term) {
		at = strings.Trim(at+"/"+t.Key, "/")
		if t.Terms == nil {
			got = append(got, at+" = "+t.Text)
		}
		for _, inner := range t.Terms {
			list(at, inner)
		}
	}
	list("", Terms(f))
	want := []string{
		"format = 1", "record/title = Feeder", "record/number = T-1", "record/purpose = one, two",
		"source/at = tx", "source/frequency = 10 MHz", "source/emf = 20 V peak", "source/impedance = 50 ohm",
		"lines/coax/z0 = 50 ohm", "lines/coax/velocity_factor = 0.66",
		"lines/coax/loss = [{at: 1 MHz, attenuation: 1 dB/100m}, {at: 10 MHz, attenuation: 3.3 dB/100m}, {at: 50 MHz, attenuation: 8 dB/100m}]",
		"sections/main/from = tx", "sections/main/to = mast", "sections/main/length = 20 m", "sections/main/line = coax",
		"loads/aerial/at = mast", "loads/aerial/r = 50 ohm",
		"cases/arc/loads/aerial/r = 1 ohm", "cases/open/loads/aerial = null",
		"requirements/R1/id = R1", "requirements/R1/quantity = vswr", "requirements/R1/section = main", "requirements/R1/end = from",
		"requirements/R1/max = 1.5", "requirements/R1/cases = [nominal, arc]",
	}
	if diff := cmp.Diff(want, got); diff != "" {
		t.Errorf("terms (-want +got):\n%s", diff)
	}
	if main := Terms(f).Terms[4].Terms[0]; main.Text != "{from: tx, to: mast, length: 20 m, line: coax}" {
		t.Errorf("the text of a mapping is %q", main.Text)
	}
}

func TestSameValue(t *testing.T) {
	for _, tt := range []struct {
		a, b string
		want bool
	}{
		{"85 m", "0.085 km", true},
		{"85 m", "85.0 m", true},
		{"1 ft", "304.8 mm", true},
		{"22.5 deg", "0.0625 wavelengths", true},
		{"300 V peak", "212.13203435596427 V rms", true},
		{"1.5", "1.50", true},
		{"1.5", "1.5:1", true},
		{"120 pF", "0.12 nF", true},
		{"85 m", "86 m", false},
		{"85 m", "85 ohm", false},
		{"22.5 deg", "22.5 m", false}, // a length of line and a length are not the same thing
		{"tx", "tx", false},           // no values
		{"5 %", "0.05", false},        // not in any one unit
	} {
		if got := SameValue(tt.a, tt.b); got != tt.want {
			t.Errorf("%q and %q the same: %t, want %t", tt.a, tt.b, got, tt.want)
		}
	}
}
