package design

import (
	"fmt"
	"math"
	"math/cmplx"
	"strings"
	"testing"

	"pgregory.net/rapid"
)

// polarTol allows for the rounding of a sine and a cosine.
const polarTol = 1e-15

func TestComplex(t *testing.T) {
	for text, want := range map[string]complex128{
		"50 ohm":                50,
		"36.5 - j61.1 ohm":      36.5 - 61.1i,
		"36.5 - j 61.1 ohm":     36.5 - 61.1i,
		"36.5-61.1j ohm":        36.5 - 61.1i,
		"36.5-61.1 j ohm":       36.5 - 61.1i,
		"+36.5 + j61.1 Ω":       36.5 + 61.1i,
		"j61.1 ohm":             61.1i,
		"-j61.1 ohm":            -61.1i,
		"- j61.1 ohm":           -61.1i,
		"-61.1j ohm":            -61.1i,
		"1.2 + j0.9 kohm":       1200 + 900i,
		"1e2-1e-1j ohm":         100 - 0.1i,
		"71.2 ohm at 0 deg":     71.2,
		"71.2 ohm at -90 deg":   -71.2i,
		"71.2 ohm at 450 deg":   71.2i,
		"2 kohm at 180 deg":     -2000,
		"71.2 ohm at 1 rad":     cmplx.Rect(71.2, 1),
		"71.2 ohm at -59.1 deg": cmplx.Rect(71.2, -59.1*math.Pi/180),
	} {
		got, f := parseComplex(text, resistance, Engineering)
		if f != nil {
			t.Errorf("%q: %s", text, f.message)
			continue
		}
		if cmplx.Abs(got-want) > polarTol*cmplx.Abs(want) {
			t.Errorf("%q = %v, want %v", text, got, want)
		}
		physics := strings.ReplaceAll(text, "j", "i")
		if got, f := parseComplex(physics, resistance, Physics); f != nil || cmplx.Abs(got-cmplx.Conj(want)) > polarTol*cmplx.Abs(want) {
			t.Errorf("physics %q = %v, want %v", physics, got, cmplx.Conj(want))
		}
	}
}

// Any dimension has complex values, amplitudes with the factor of their unit;
// both says whether more than a size is written.
func TestBoth(t *testing.T) {
	for _, tt := range []struct {
		text string
		d    *dimension
		want complex128
		unit string
		both bool
	}{
		{"120 V peak at -90 deg", voltage, -120i, "V peak", true},
		{"85 V rms", voltage, 85 * math.Sqrt2, "V rms", false},
		{"85 V rms at 0 deg", voltage, 85 * math.Sqrt2, "V rms", true},
		{"3 - j4 kV pp", voltage, 1500 - 2000i, "kV pp", true},
		{"3-4j A rms", current, (3 - 4i) * math.Sqrt2, "A rms", true},
		{"0.45", reflected, 0.45, "", false},
		{"0.3 - j0.2", reflected, 0.3 - 0.2i, "", true},
		{"-j0.2", reflected, -0.2i, "", true},
		{"0.3 + 0j", reflected, 0.3, "", true},
		{"30 - 20j %", reflected, 0.3 - 0.2i, "%", true},
		{"0.45 at 180 deg", reflected, -0.45, "", true},
	} {
		got, f := parseBoth(tt.text, tt.d, Engineering)
		if f != nil {
			t.Errorf("%q: %s", tt.text, f.message)
			continue
		}
		if cmplx.Abs(got.value-tt.want) > polarTol*cmplx.Abs(tt.want) || got.unit.name != tt.unit || got.both != tt.both {
			t.Errorf("%q = %+v, want %v in %q, both %v", tt.text, got, tt.want, tt.unit, tt.both)
		}
	}
}

func TestComplexRefused(t *testing.T) {
	for _, text := range []string{
		"", "ohm", "j ohm", "50 + j ohm", "50 + ohm", "50", "50 j", "50 + 3 ohm", "j5 + 3 ohm", "j5 + j3 ohm", "50 + j3 + 2 ohm",
		"50 + i3 ohm", "50 + k3 ohm", "50 ohm + j3 ohm", "50 ohm at", "50 ohm at 30", "at 30 deg", "-5 ohm at 30 deg",
		"nan + j3 ohm", "1_0 ohm", "50 +- j3 ohm", "50 + j-3 ohm", "jj3 ohm", "3jj ohm", "j3j ohm", "short", "50 V peak",
	} {
		if z, f := parseComplex(text, resistance, Engineering); f == nil {
			t.Errorf("%q is taken for %v", text, z)
		}
	}
}

// The two cartesian forms and the polar one agree.
func TestComplexForms(t *testing.T) {
	// halfDigit is what cutting the polar form to 15 digits may do.
	const halfDigit = 1e-13
	rapid.Check(t, func(t *rapid.T) {
		r := rapid.Float64Range(0, 1e6).Draw(t, "r")
		x := rapid.Float64Range(-1e6, 1e6).Draw(t, "x")
		sign := "+"
		if math.Signbit(x) {
			sign = "-"
		}
		want := complex(r, x)
		first := fmt.Sprintf("%g %s j%g ohm", r, sign, math.Abs(x))
		last := fmt.Sprintf("%g%s%gj ohm", r, sign, math.Abs(x))
		for _, text := range []string{first, last} {
			if tiny(r) || tiny(x) {
				continue // refused as too small
			}
			if got, f := parseComplex(text, resistance, Engineering); f != nil || got != want {
				t.Fatalf("%q = %v, want %v", text, got, want)
			}
		}
		polar := fmt.Sprintf("%.15g ohm at %.15g rad", cmplx.Abs(want), cmplx.Phase(want))
		if got, f := parseComplex(polar, resistance, Engineering); f == nil && cmplx.Abs(got-want) > halfDigit*cmplx.Abs(want) {
			t.Fatalf("%q = %v, want %v", polar, got, want)
		}
	})
}

func tiny(v float64) bool { return v != 0 && math.Abs(v) < smallest }

// The wrong letter is told with what it would have meant.
func TestWrongLetter(t *testing.T) {
	for _, tt := range []struct {
		text string
		c    Convention
		want string
	}{
		{"36.5 - i61.1 ohm", Engineering, "would mean 36.5 + j61.1 ohm;"},
		{"36.5-61.1i ohm", Engineering, "would mean 36.5+61.1j ohm;"},
		{"i3 ohm", Engineering, "would mean -j3 ohm;"},
		{"-i3 ohm", Engineering, "would mean +j3 ohm;"},
		{"36.5 - j61.1 ohm", Physics, "would mean 36.5 + i61.1 ohm;"},
		{"1e-3 + j5 ohm", Physics, "would mean 1e-3 - i5 ohm;"},
		{"3 + 5e-1j ohm", Physics, "would mean 3 - 5e-1i ohm;"},
		{"5e-1j ohm", Physics, "would mean -5e-1i ohm;"},
	} {
		_, f := parseComplex(tt.text, resistance, tt.c)
		if f == nil || !strings.Contains(f.message, tt.want) {
			t.Errorf("%q under %s: %v, want %q", tt.text, tt.c, f, tt.want)
			continue
		}
		// What it is said to mean is what it means under the other convention.
		_, meant, _ := strings.Cut(f.message, "would mean ")
		meant, _, _ = strings.Cut(meant, ";")
		z, f1 := parseComplex(meant, resistance, tt.c)
		w, f2 := parseComplex(tt.text, resistance, tt.c.other())
		if f1 != nil || f2 != nil || z != w {
			t.Errorf("%q is said to mean %q: %v and %v", tt.text, meant, w, z)
		}
	}
}

func FuzzComplex(f *testing.F) {
	for _, seed := range []string{"36.5 - j61.1 ohm", "36.5-61.1j ohm", "71.2 ohm at -59.1 deg", "-j3 kohm", "i5 ohm", "5 at 3 at 2", "0.3 - j0.2", "30 - j20 %", "85 V rms at 12 deg", "1 - 2j A pp"} {
		f.Add(seed)
	}
	f.Fuzz(func(t *testing.T, text string) {
		for _, d := range []*dimension{resistance, reflected, voltage, current} {
			z, fault := parseBoth(text, d, Engineering)
			if fault != nil {
				fault.hint()
			} else if cmplx.IsNaN(z.value) || cmplx.Abs(z.value) > 2*largest {
				t.Errorf("%q = %v", text, z)
			}
			w, other := parseBoth(text, d, Physics)
			if fault == nil && other == nil && w.value != cmplx.Conj(z.value) && w.value != z.value {
				t.Errorf("%q = %v and %v", text, z, w)
			}
		}
	})
}
