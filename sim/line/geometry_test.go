package line

import (
	"math"
	"math/cmplx"
	"strings"
	"testing"

	"github.com/google/go-cmp/cmp"
	"pgregory.net/rapid"
)

// copper is 100 % IACS, as in the examples.
var copper = Conductor{Conductivity: 58e6}

// computedTol is for values that were computed apart from this program and
// noted with six digits or more.
const computedTol = 1e-6

func computed(t *testing.T, what string, got, want float64) {
	t.Helper()
	if math.Abs(got/want-1) > computedTol {
		t.Errorf("%s = %.9g, want %.9g", what, got, want)
	}
}

type shape interface{ Geometry() (Geometry, error) }

func mustGeometry(t testing.TB, s shape) Geometry {
	t.Helper()
	g, err := s.Geometry()
	if err != nil {
		t.Fatal(err)
	}
	return g
}

// TestWaveOnGeometry: with little loss, the attenuation is R/(2 Z0) + G Z0/2
// and the wave travels at the velocity factor.
func TestWaveOnGeometry(t *testing.T) {
	// lossTol allows for terms of the order of loss over phase.
	const lossTol = 5e-3
	for _, s := range []shape{
		Coax{0.455e-3, 1.51e-3, 0.3e-3, 2.08, 4e-4, copper, copper},
		TwoWire{1e-3, 6e-3, 1, 0, copper},
		WireOverGround{1e-3, 10e-3, 1, 0, copper, copper},
		Microstrip{3e-3, 1.5e-3, 35e-6, 4.5, 0.01, copper},
		Stripline{2.66e-3, 3.2e-3, 10e-6, 2.2, 1e-3, copper},
	} {
		g := mustGeometry(t, s)
		const f = 1e9
		c := g.At(f)
		gamma := c.Propagation(2 * math.Pi * f)
		alpha := g.Resistance(f)/(2*g.Z0) + g.Dielectric(f)*g.Z0/2
		if math.Abs(real(gamma)/alpha-1) > lossTol {
			t.Errorf("%T: alpha %g, want %g", s, real(gamma), alpha)
		}
		if v := c.PhaseVelocity(2*math.Pi*f) / C0; math.Abs(v/g.VelocityFactor-1) > lossTol {
			t.Errorf("%T: v/c %g, want %g", s, v, g.VelocityFactor)
		}
		if z := c.Impedance(2 * math.Pi * f); cmplx.Abs(z/complex(g.Z0, 0)-1) > lossTol {
			t.Errorf("%T: impedance %v, want %g", s, z, g.Z0)
		}
		if math.Abs(g.VelocityFactor*math.Sqrt(g.Permittivity)-1) > roundTol {
			t.Errorf("%T: velocity factor %g, permittivity %g", s, g.VelocityFactor, g.Permittivity)
		}
	}
}

// TestDispersedGeometry: what Disperse makes of a geometry has, at the highest
// frequencies, the inductance of perfect conductors, and keeps Resistance and
// Conductor at every frequency.
func TestDispersedGeometry(t *testing.T) {
	g := mustGeometry(t, Coax{0.455e-3, 1.51e-3, 0, 2.08, 4e-4, copper, copper})
	const f = 100e6
	c, d := Disperse(g.At(f), 2*math.Pi*f, g.Conductor(f), g.Dielectric(f))
	const rounding = 1e-12
	if want := g.Z0 / g.VelocityFactor / C0; math.Abs(c.L/want-1) > rounding {
		t.Errorf("L = %g, want %g", c.L, want)
	}
	for _, other := range []float64{1e6, f, 3e9} {
		if got, want := d.At(c, 2*math.Pi*other).R, g.Resistance(other); math.Abs(got/want-1) > rounding {
			t.Errorf("R at %g Hz = %g, want %g", other, got, want)
		}
	}
}

func TestWarnings(t *testing.T) {
	soil := Conductor{Conductivity: 0.01}
	for _, tt := range []struct {
		name string
		s    shape
		f    float64
		want string
	}{
		{"thin wire", Coax{0.1e-3, 1e-3, 0, 1, 0, copper, copper}, 1e6, "the skin depth of the inner conductor, 66.1 um, is not small against its radius, 100 um: the resistance does not follow the square root of the frequency, and that of such a wire is 1.45 times what the law gives"},
		{"thin tube", Coax{1e-3, 3e-3, 0.05e-3, 1, 0, copper, copper}, 1e6, "the skin depth of the outer conductor, 66.1 um, is not small against its wall, 50 um: the resistance does not follow the square root of the frequency"},
		{"thick wire", Coax{0.2e-3, 1e-3, 0, 1, 0, copper, copper}, 1e6, ""},
		{"perfect", Coax{1e-9, 1, 0, 1, 0, Conductor{Conductivity: math.Inf(1)}, Conductor{Conductivity: math.Inf(1)}}, 1e6, ""},
		{"higher mode", Coax{0.0645 * 12.7e-3, 0.215 * 12.7e-3, 0, 2.2, 0, copper, copper}, 17.8e9, "the frequency is not below 0.95 of the cut-off of the TE11 mode, 18.64 GHz: other waves than TEM may travel"},
		{"radiating pair", TwoWire{1e-3, 0.2, 1, 0, copper}, 100e6, "the spacing is 0.067 of a wavelength in air: the line radiates, which is not counted"},
		{"soil", WireOverGround{1e-3, 3, 1, 0, copper, soil}, 1e6, "the skin depth of the ground, 5.03 m, is not small against the height of the wire, 3 m: the resistance does not follow the square root of the frequency"},
		{"microstrip, f", Microstrip{1e-3, 1e-3, 35e-6, 9.8, 0, copper}, 10e9, "the wave is not TEM any more: at this frequency the effective permittivity is about 11 % above that of the formulas"},
		{"microstrip, u", Microstrip{200e-3, 1e-3, 35e-6, 2, 0, copper}, 1e6, "width/height is 200; the formula for the permittivity is known to be good from 0.01 to 100\nthe skin depth of the strip, 66.1 um, is not small against its thickness, 35 um: the resistance does not follow the square root of the frequency"},
		{"microstrip, er", Microstrip{1e-3, 1e-3, 0.3e-3, 150, 0, copper}, 1e6, "the permittivity 150 is above 128, up to which the formula is known to be good"},
		{"microstrip, t", Microstrip{1e-3, 1e-3, 0, 2, 0, copper}, 1e6, "the thickness of the strip is not given: the current is taken as uniform across the width, and the conductor loss may be far off"},
		{"stripline, t = 0", Stripline{1e-3, 1e-3, 0, 2, 0, copper}, 1e6, "the thickness of the strip is not given: the current is taken as uniform across the width, and the conductor loss may be far off"},
		{"stripline, t", Stripline{1e-3, 1e-3, 35e-6, 2, 0, copper}, 1e9, "the impedance is that of a thin strip; the thickness lowers it by about 6.1 %"},
	} {
		g := mustGeometry(t, tt.s)
		got := strings.Join(append(g.Warnings, g.WarningsAt(tt.f)...), "\n")
		if diff := cmp.Diff(tt.want, got); diff != "" {
			t.Errorf("%s (-want +got):\n%s", tt.name, diff)
		}
	}
}

func TestNoGeometry(t *testing.T) {
	nan := math.NaN()
	for _, tt := range []struct {
		s     shape
		field string
		want  string
	}{
		{Coax{0, 1, 0, 1, 0, copper, copper}, "Inner", "the inner radius must be above 0"},
		{Coax{1, nan, 0, 1, 0, copper, copper}, "Outer", "the outer radius must be above 0"},
		{Coax{2, 1, 0, 1, 0, copper, copper}, "Outer", "the outer conductor must be wider inside than the inner conductor"},
		{Coax{1, 2, -1, 1, 0, copper, copper}, "Wall", "the wall of the outer conductor must not be below 0"},
		{Coax{1, 2, 0, 0.5, 0, copper, copper}, "Permittivity", "the permittivity must be at least 1: it is relative to vacuum"},
		{Coax{1, 2, 0, 1, -1, copper, copper}, "LossTangent", "the loss tangent must be at least 0 and below 1"},
		{Coax{1, 2, 0, 1, 0, Conductor{}, copper}, "InnerMetal", "the conductivity of the inner conductor must be above 0"},
		{Coax{1, 2, 0, 1, 0, copper, Conductor{58e6, -1}}, "OuterMetal", "the roughness of the outer conductor must be at least 0"},
		{TwoWire{1, 1, 1, 0, copper}, "Spacing", "the spacing of the axes must be above the diameter"},
		{WireOverGround{1, 1, 1, 0, copper, copper}, "Height", "the height of the axis must be above the radius"},
		{Microstrip{1, 1, 1, 1, 0, copper}, "Thickness", "the thickness must be below the width and the height"},
		{Stripline{1, 1, 0.6, 1, 0, copper}, "Thickness", "the thickness must be below the width and half the spacing"},
		{Stripline{101, 1, 0, 1, 0, copper}, "Width", "the width must be at most 100 times the spacing of the planes"},
	} {
		_, err := tt.s.Geometry()
		e, ok := err.(*GeometryError)
		if !ok || e.Field != tt.field || e.Error() != tt.want {
			t.Errorf("%+v: %v, want %s: %s", tt.s, err, tt.field, tt.want)
		}
	}
}

// TestGeometryIsALine: whatever the dimensions, the constants are those of a
// passive line no faster than light.
func TestGeometryIsALine(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		size := func(name string) float64 {
			return math.Pow(10, rapid.Float64Range(-5, -1).Draw(t, name))
		}
		er := rapid.Float64Range(1, 20).Draw(t, "er")
		// A larger loss tangent over six decades up to 1 THz would need more than
		// the whole capacitance.
		tan := rapid.Float64Range(0, 0.05).Draw(t, "tan")
		m := Conductor{rapid.Float64Range(1e6, 1e8).Draw(t, "sigma"), rapid.Float64Range(0, 1e-5).Draw(t, "roughness")}
		a, b, thin := size("a"), size("b"), size("thickness")
		s := []shape{
			Coax{a, b, thin, er, tan, m, m},
			TwoWire{a, b, er, tan, m},
			WireOverGround{a, b, er, tan, m, m},
			Microstrip{a, b, thin, er, tan, m},
			Stripline{a, b, thin, er, tan, m},
		}[rapid.IntRange(0, 4).Draw(t, "shape")]
		g, err := s.Geometry()
		if err != nil {
			return // a strip too thick, a wire too fat
		}
		f := math.Pow(10, rapid.Float64Range(6, 10).Draw(t, "log f"))
		c := g.At(f)
		if !(c.R > 0 && c.L > 0 && c.G >= 0 && c.C > 0) || g.VelocityFactor > 1+roundTol || g.LossTangent > tan*(1+roundTol) {
			t.Fatalf("%+v: %+v at %g Hz, %+v", s, c, f, g)
		}
		high, _ := Disperse(c, 2*math.Pi*f, g.Conductor(f), g.Dielectric(f))
		if !(high.L > 0 && high.C > 0) {
			t.Fatalf("%+v: dispersed %+v at %g Hz", s, high, f)
		}
	})
}
