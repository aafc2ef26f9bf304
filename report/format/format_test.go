package format

import (
	"math"
	"math/cmplx"
	"strings"
	"testing"
)

// show makes the special characters of a text readable in a table.
func show(s string) string {
	return strings.NewReplacer(Minus, "-", Space, " ", string(Sup), "^{", string(Sub), "_{", string(End), "}").Replace(s)
}

func TestNumber(t *testing.T) {
	for _, c := range []struct {
		in   float64
		want string
	}{
		{0, "0"},
		{1, "1.000"},
		{-1, "-1.000"},
		{1.8264, "1.826"},
		{999.96, "1000"},
		{123456, "123456"},
		{1e6, "1.000 × 10^{6}"},
		{0.00012345, "0.0001234"},
		{-2.5e-7, "-2.500 × 10^{-7}"},
		{math.NaN(), "–"},
		{math.Inf(1), "infinite"},
		{math.Inf(-1), "-infinite"},
	} {
		if got := show(Number(c.in)); got != c.want {
			t.Errorf("Number(%v) = %q, want %q", c.in, got, c.want)
		}
	}
}

func TestSI(t *testing.T) {
	for _, c := range []struct {
		in   float64
		unit string
		want string
	}{
		{1375, "V", "1.375 kV"},
		{999.96, "V", "1.000 kV"},
		{0, "V", "0 V"},
		{-0.0316, "A", "-31.60 mA"},
		{8.81e-7, "s", "881.0 ns"},
		{98.1e6, "Hz", "98.10 MHz"},
		{66.7e-12, "F/m", "66.70 pF/m"},
		{2e21, "W", "2000 EW"},
		{3e-21, "W", "0.003000 aW"},
		{math.Inf(1), "W", "infinite W"},
		{math.NaN(), "W", "–"},
	} {
		if got := show(SI(c.in, c.unit)); got != c.want {
			t.Errorf("SI(%v, %q) = %q, want %q", c.in, c.unit, got, c.want)
		}
	}
}

func TestQuantity(t *testing.T) {
	for _, c := range []struct {
		in   float64
		unit string
		want string
	}{
		{1950, "V peak", "1.950 kV peak"},
		{1.5, "1", "1.500"},
		{1.5, "", "1.500"},
		{-0.852, "dB", "-0.85 dB"},
		{0.0031, "dB", "0.00310 dB"},
		{3.434, "deg", "3.43°"},
		{73, "ohm", "73.00 Ω"},
		{0.5, "%", "0.5000 %"},
		{2e-5, "s", "20.00 µs"},
		{4, "furlong", "4.000 furlong"},
		{math.NaN(), "V peak", "–"},
	} {
		if got := show(Quantity(c.in, c.unit)); got != c.want {
			t.Errorf("Quantity(%v, %q) = %q, want %q", c.in, c.unit, got, c.want)
		}
	}
}

func TestComplex(t *testing.T) {
	for _, c := range []struct {
		in          complex128
		unit        string
		rect, polar string
	}{
		{50.006 - 0.029i, "Ω", "50.01 - j0.03 Ω", "50.01 Ω at -0.03°"},
		{-14 + 42i, "Ω", "-14.00 + j42.00 Ω", "44.27 Ω at 108.43°"},
		{50 - 1e-9i, "Ω", "50.00 + j0.00 Ω", "50.00 Ω at 0.00°"},
		{3000i, "Ω", "0.000 + j3.000 kΩ", "3.000 kΩ at 90.00°"},
		{0.25, "", "0.2500 + j0.0000", "0.2500 at 0.00°"},
		{0, "V", "0.00 + j0.00 V", "0 V"},
		{cmplx.Inf(), "Ω", "infinite", "infinite"},
		{cmplx.NaN(), "Ω", "–", "–"},
	} {
		if got := show(Complex(c.in, c.unit)); got != c.rect {
			t.Errorf("Complex(%v) = %q, want %q", c.in, got, c.rect)
		}
		if got := show(Polar(c.in, c.unit)); got != c.polar {
			t.Errorf("Polar(%v) = %q, want %q", c.in, got, c.polar)
		}
	}
}

func TestSigned(t *testing.T) {
	for in, want := range map[string]string{
		"-2 deg to 2 deg":        "−2 deg to 2 deg",
		"phase -90 deg (-3 dB)":  "phase −90 deg (−3 dB)",
		"series R-L, 10-4, a -b": "series R-L, 10-4, a -b",
		"Ω -1":                   "Ω −1",
		"":                       "",
		"-":                      "-",
	} {
		if got := Signed(in); got != want {
			t.Errorf("Signed(%q) = %q, want %q", in, got, want)
		}
	}
}

func TestFactor(t *testing.T) {
	for symbol, want := range map[string]float64{"k": 1e3, "": 1, "u": 1e-6, "µ": 1e-6, "M": 1e6} {
		if got, ok := Factor(symbol); !ok || got != want {
			t.Errorf("Factor(%q) = %v, %v, want %v", symbol, got, ok, want)
		}
	}
	if _, ok := Factor("x"); ok {
		t.Error("x is taken for a prefix")
	}
}

func TestSmallForms(t *testing.T) {
	for _, c := range []struct{ got, want string }{
		{Count(0), "0"},
		{Count(9999), "9999"},
		{Count(-1234567), "-1 234 567"},
		{Plural(1, "cell"), "1 cell"},
		{Plural(20000, "period"), "20 000 periods"},
		{Percent(0.00012), "0.0120 %"},
		{Percent(math.Inf(1)), "infinite %"},
		{Share(0.2949), "29 %"},
		{Share(0.0123), "1.2 %"},
		{Share(-0.5), "-50 %"},
		{Share(math.NaN()), "–"},
		{Angle(-0.001), "0.00°"},
		{Feet(120), "393.7 ft"},
		{Wavelengths(42.63), "42.63 λ"},
		{Electrical(15347.2), "15 347°"},
		{Electrical(22.5), "22.50°"},
		{Tick(0.30000000000000004, 0.1), "0.3"},
		{Tick(-500, 500), "-500"},
		{Tick(1e-17, 0.5), "0.0"},
		{Tick(2.5, 2.5), "2.5"},
		{Decade(-2), "1 %"},
		{Decade(-4), "0.01 %"},
		{Decade(-5), "0.001 %"},
		{Decade(-6), "10^{-4} %"},
		{Decade(1), "1000 %"},
		{Decade(2), "10^{4} %"},
		{Decade(0), "100 %"},
		{VSWR(math.Inf(1)), "infinite"},
		{Percent(1e-17), "< 10^{-10} %"},
		{Percent(0), "0 %"},
		{Bare(1315, "V peak"), "1.315 kV"},
		{Bare(0.353, "dBm"), "0.35 dB"},
		{Bare(0.5, "1"), "0.5000"},
		{Uncertainty(0.8, "V peak"), "800 mV"},
		{Uncertainty(0.00018, "1"), "0.00018"},
		{Uncertainty(0.0093, "deg"), "0.0093°"},
		{Uncertainty(math.NaN(), "V peak"), "–"},
		{Uncertainty(0.0007, "dBm"), "0.00070 dB"},
	} {
		if show(c.got) != c.want {
			t.Errorf("got %q, want %q", show(c.got), c.want)
		}
	}
}
