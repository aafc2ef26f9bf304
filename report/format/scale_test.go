package format

import (
	"math"
	"testing"
)

// A scale prints every value of a row alike, with the digits that show the
// step.
func TestScale(t *testing.T) {
	for _, c := range []struct {
		size, step float64
		unit       string
		in         float64
		want       string
	}{
		{1315, 0.21, "V peak", 1315.2468, "1.31525 kV"},
		{1315, 0.21, "V peak", -13.15, "-0.01315 kV"},
		{1315, 13.15, "V rms", 1315.2468, "1.315 kV"},
		{0.0315, 0.00315, "A peak", 1e-9, "< 0.1 mA"},
		{1.0021, 1e-5, "1", 1.00213, "1.002130 1"},
		{4.9e-4, 4.9e-5, "1", -1.2e-5, "-12 10^{-6}"},
		{0.0039, 0.00039, "dB", 0.0039, "3.90 10^{-3} dB"},
		{0.35, 0.035, "deg", 0.35, "0.350 °"},
		{3.3, 0.033, "dBm", 3.353, "3.353 dBm"},
		{50, 1e-14, "ohm", 50.0000000001, "50.0000000 Ω"},
		{0, 0, "ohm", 0, "0 Ω"},
		{math.Inf(1), math.NaN(), "1", 2, "2 1"},
		{math.NaN(), math.NaN(), "V peak", math.NaN(), "– V"},
		{2e6, 2e5, "1", math.Inf(-1), "-infinite 10^{6}"},
	} {
		s := NewScale(c.size, c.step, c.unit)
		if got := show(s.Number(c.in) + " " + s.Unit); got != c.want {
			t.Errorf("%v in the scale of %v and %v %s is %q, want %q", c.in, c.size, c.step, c.unit, got, c.want)
		}
	}
}

func TestErrorScale(t *testing.T) {
	for _, c := range []struct {
		size float64
		unit string
		in   float64
		want string
	}{{0.0039, "dBm", 0.0039, "3.90 10^{-3} dB"}, {-9.2, "V rms", 0.034, "0.03 V"}, {9.2, "V peak", 0.0034, "< 0.01 V"}, {123.4, "W", -123.4, "-123 W"}} {
		s := ErrorScale(c.size, c.unit)
		if got := show(s.Number(c.in) + " " + s.Unit); got != c.want {
			t.Errorf("%v in the scale of %v %s is %q, want %q", c.in, c.size, c.unit, got, c.want)
		}
	}
}

func TestPhasor(t *testing.T) {
	nan, inf := math.NaN(), math.Inf(1)
	for _, c := range []struct {
		z    complex128
		unit string
		want string
	}{
		{36.5 - 61.1i, "ohm", "36.50 - j61.10 Ω"},
		{1000i, "V rms", "1.000 kV rms at 90.00°"},
		{-0.5, "1", "0.5000 at 180.00°"},
		{0, "A peak", "0 A peak"},
		{complex(nan, 0), "V peak", "–"},
		{complex(nan, nan), "ohm", "–"},
		{complex(inf, 0), "1", "infinite"},
	} {
		if got := show(Phasor(c.z, c.unit)); got != c.want {
			t.Errorf("Phasor(%v, %q) = %q, want %q", c.z, c.unit, got, c.want)
		}
	}
}

func TestChange(t *testing.T) {
	for _, c := range []struct {
		v    float64
		unit string
		want string
	}{
		{12.3, "V peak", "+12.30 V"},
		{-0.42, "dBm", "-0.42 dB"},
		{0, "1", "0"},
		{0.001, "deg", "0.00°"}, // a sign before nothing would be odd
		{math.Inf(1), "1", "+infinite"},
		{math.NaN(), "V peak", "–"},
	} {
		if got := show(Change(c.v, c.unit)); got != c.want {
			t.Errorf("Change(%v, %q) = %q, want %q", c.v, c.unit, got, c.want)
		}
	}
}

func TestQualifier(t *testing.T) {
	for unit, want := range map[string]string{"V peak": "", "kV rms": "rms", "A pp": "pp", "ohm": "", "1": ""} {
		if got := Qualifier(unit); got != want {
			t.Errorf("Qualifier(%q) = %q, want %q", unit, got, want)
		}
	}
}

// The numbers of the evidence have the digits that tell something.
func TestEvidenceNumbers(t *testing.T) {
	nan, inf := math.NaN(), math.Inf(1)
	for _, c := range []struct{ got, want string }{
		{Ratio(0.4123), "0.41"},
		{Ratio(2.8e-9), "< 0.001"},
		{Ratio(0), "0"},
		{Ratio(inf), "infinite"},
		{Ratio(nan), "–"},
		{Measure(0.0336), "0.034"},
		{Measure(1e-7), "< 0.001"},
		{Measure(0), "0.000"},
		{Measure(nan), "–"},
		{Index(0.02418), "0.024 %"},
		{Index(1e-9), "< 10^{-6} %"},
		{Index(0), "0 %"},
		{Index(nan), "–"},
		{Short(1.25), "1.25"},
		{Short(3), "3"},
		{Short(100), "100"},
		{Short(nan), "–"},
	} {
		if got := show(c.got); got != c.want {
			t.Errorf("%q, want %q", got, c.want)
		}
	}
}
