package line

import (
	"math"
	"testing"
)

// The sources of the printed values; what is marked computed was computed
// apart from this program.
//
//	ELL: S.W. Ellingson, Electromagnetics Vol. 2 (VT Publishing, 2020), by
//	     module of its source text
//	POZ: D.M. Pozar, Microwave Engineering, 4th ed. (2012), from a digest
func TestSkinDepth(t *testing.T) {
	const um, mohm = 1e-6, 1e-3
	near(t, "copper, 1 GHz, ELL", copper.SkinDepth(1e9), 2.1*um, 0.05*um)
	near(t, "copper, 10 GHz, POZ", copper.SkinDepth(10e9), 0.66*um, 0.005*um)
	near(t, "copper, 10 GHz, POZ", copper.SurfaceResistance(10e9), 0.026, 0.0005)
	aluminium, _ := Metal("Aluminum")
	near(t, "aluminium, 10 MHz, ELL m0158", Conductor{Conductivity: aluminium}.SkinDepth(10e6), 26*um, 0.5*um)
	near(t, "aluminium, 1 kHz, ELL m0158", Conductor{Conductivity: aluminium}.SkinDepth(1e3), 2.6e-3, 0.05e-3)
	computed(t, "aluminium, 10 MHz", Conductor{Conductivity: aluminium}.SkinDepth(10e6), 26.1649114689*um)
	for _, row := range []struct{ f, depth, rs float64 }{
		{1e6, 66.0855 * um, 0.260895 * mohm},
		{1e9, 2.089807 * um, 8.25023 * mohm},
		{10e9, 0.660855 * um, 26.0895 * mohm},
	} {
		near(t, "skin depth, computed", copper.SkinDepth(row.f)/row.depth, 1, 1e-6)
		near(t, "surface resistance, computed", copper.SurfaceResistance(row.f)/row.rs, 1, 1e-6)
	}
}

func TestMetals(t *testing.T) {
	// 1/58 MS/m is the 1.7241e-8 ohm m of 100 % IACS.
	sigma, _ := Metal("COPPER")
	near(t, "resistivity of copper", 1/sigma, 1.7241e-8, 0.00005e-8)
	for _, name := range MetalNames() {
		if s, ok := Metal(name); !ok || s < 1e7 {
			t.Errorf("%s: %g, %v", name, s, ok)
		}
	}
	if _, ok := Metal("unobtainium"); ok {
		t.Error("unobtainium is known")
	}
}

// TestRoughness: with the roughness of a skin depth the factor is 1.60514
// (computed from the formula, which is from memory); it tends to 2.
func TestRoughness(t *testing.T) {
	const f = 1e9
	for _, row := range []struct{ ratio, want, tol float64 }{{0, 1, 0}, {1, 1.60514, 5e-6}, {1e3, 2, 1e-6}} {
		rough := Conductor{58e6, row.ratio * copper.SkinDepth(f)}
		near(t, "roughness factor", rough.SurfaceResistance(f)/copper.SurfaceResistance(f), row.want, row.tol)
	}
}

// TestWireImpedance: copper, radius 0.5 mm, computed with the Bessel functions
// of another library.
func TestWireImpedance(t *testing.T) {
	const a = 0.5e-3
	near(t, "R at direct current", wireDC(copper, a), 0.021952406, 0.5e-9)
	for _, row := range []struct{ f, re, im, half float64 }{
		{10e3, 0.02210146, 0.003130932, 0.5e-8},
		{100e3, 0.03182662, 0.02464298, 0.5e-8},
		{1e6, 0.08880174, 0.08273452, 0.5e-8},
		{10e6, 0.26818688, 0.26252315, 0.5e-8},
	} {
		z := WireImpedance(58e6, a, row.f)
		near(t, "Re Z", real(z), row.re, row.half)
		near(t, "Im Z", imag(z), row.im, row.half)
	}
	near(t, "Re Z at 1 Hz", real(WireImpedance(58e6, a, 1))/wireDC(copper, a), 1, 1e-9)
	// The two forms of the ratio meet.
	below, above := besselRatio(complex(212, 212)), besselRatio(complex(212.14, 212.14))
	near(t, "jump of the ratio", real(below)-real(above), 0, 2e-6)
	near(t, "continued fraction against asymptote", real(below), real(1+1/(2*complex(212, 212))+3/(8*complex(212, 212)*complex(212, 212))), 1e-8)
}

// TestWhereTheLawHolds: against the exact impedance, the law of the square
// root with a quarter of the resistance at direct current is right to 1.5 %
// from three skin depths on, and to 0.2 % from ten on.
func TestWhereTheLawHolds(t *testing.T) {
	for _, row := range []struct{ depths, law, whole float64 }{{thinLimit, 0.19, 0.015}, {10, 0.06, 0.002}} {
		f := 1e6
		a := row.depths * copper.SkinDepth(f)
		exact := real(WireImpedance(58e6, a, f))
		law := copper.SurfaceResistance(f) / (2 * math.Pi * a)
		near(t, "exact over law", exact/law, 1, row.law)
		near(t, "exact over law and constant", exact/(law+wireDC(copper, a)/4), 1, row.whole)
	}
}

// ELL m0159: the inner conductor of an RG-59, 2.28e7 S/m, radius 0.292 mm.
func TestWireAgainstTextbook(t *testing.T) {
	steel, a := Conductor{Conductivity: 2.28e7}, 0.292e-3
	perRootHertz := steel.SurfaceResistance(1) / (2 * math.Pi * a)
	near(t, "R/sqrt(f)", perRootHertz, 2.27e-4, 0.005e-4)
	near(t, "R at 13 MHz", perRootHertz*math.Sqrt(13e6), 0.82, 0.005)
	near(t, "R at direct current", wireDC(steel, a), 0.16, 0.005)
	computed(t, "R/sqrt(f)", perRootHertz, 2.26803485799e-4)
	computed(t, "R at 13 MHz", perRootHertz*math.Sqrt(13e6), 0.817751597502)
	computed(t, "R at direct current", wireDC(steel, a), 0.163738036221)
	// The skin depth is the radius at 130 kHz.
	near(t, "skin depth at 130 kHz", steel.SkinDepth(130298.589184)/a, 1, computedTol)
}
