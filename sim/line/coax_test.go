package line

import (
	"math"
	"testing"
)

const inch = 25.4e-3

// See conductor_test.go for the sources.
func TestCoaxAgainstTextbooks(t *testing.T) {
	// POZ problem 2.3: a semi-rigid cable; conductor loss computed with the
	// formula for the permittivity 2.08.
	g := mustGeometry(t, Coax{0.455e-3, 1.51e-3, 0, 2.08, 4e-4, copper, copper})
	near(t, "Z0, POZ P2.3", g.Z0, 49.9, 0.05)
	near(t, "Z0, computed", g.Z0, 49.8705, 0.00005)
	near(t, "conductor loss, dB/m, computed", g.Conductor(1e9)/(2*g.Z0)*NeperDB, 0.3270, 0.00005)
	near(t, "dielectric loss, dB/m, computed", g.Dielectric(1e9)*g.Z0/2*NeperDB, 0.0525, 0.00005)

	// ELL m0189, m0190: an RG-59, whose nominal impedance is 75 ohm. Its
	// dielectric is given as a conductivity of 5.9e-5 S/m; as a loss tangent
	// that holds at one frequency.
	const f, conductivity, er = 1e9, 5.9e-5, 2.25
	tan := conductivity / (2 * math.Pi * f * er / (mu0 * C0 * C0))
	g = mustGeometry(t, Coax{0.292e-3, 1.855e-3, 0, er, tan, copper, copper})
	near(t, "Z0, ELL, computed", g.Z0, 73.9043, 0.00005)
	near(t, "V/m per V, ELL, computed", g.PeakField, 1852.28, 0.005)
	near(t, "alpha_G, ELL, from a figure", g.Dielectric(f)*g.Z0/2, 0.0075, 0.00025)
	computed(t, "alpha_G", g.Dielectric(f)*g.Z0/2, 0.00740902949808)

	// Air breaks down at 3 MV/m: computed for a = 1 mm, b/a = 2.3.
	g = mustGeometry(t, Coax{1e-3, 2.3e-3, 0, 1, 0, copper, copper})
	near(t, "V at 3 MV/m, computed", 3e6/g.PeakField, 2498.73, 0.005)
}

// TestCoaxCutOff: POZ Example 3.3 reads kc a = 0.45 off a graph and has 17.7
// GHz; the root of its equation is 0.4746, and 18.64 GHz.
func TestCoaxCutOff(t *testing.T) {
	const graphReading = 0.06
	a, b := 0.0645*inch/2, 0.215*inch/2
	g := mustGeometry(t, Coax{a, b, 0, 2.2, 0, copper, copper})
	near(t, "b/a, POZ", b/a, 3.33, 0.005)
	near(t, "fc, POZ", g.CutOff/17.7e9, 1, graphReading)
	near(t, "fc with the book's kc a, POZ", g.CutOff*0.45/(te11(a, b)*a), 17.7e9, 0.05e9)
	near(t, "0.95 of that, POZ", modeMargin*g.CutOff*0.45/(te11(a, b)*a), 16.8e9, 0.05e9)
	// A thin wire leaves the TE11 mode of a tube, kc b = 1.8412; a narrow gap
	// has kc (a+b)/2 = 1 (textbook values, from memory).
	near(t, "kc b of a tube", te11(1e-6, 1), 1.8412, 0.00005)
	near(t, "kc of a narrow gap", te11(1, 1.0001)*1.00005, 1, 1e-8)
	for _, ratio := range []float64{1.001, 1.5, 3, 3.6, 20, 1e4} {
		k := te11(1, ratio)
		if r := te11Residual(k, 1, ratio); math.Abs(r) > 1e-9*math.Abs(te11Residual(k*0.9, 1, ratio)) {
			t.Errorf("b/a = %g: residual %g", ratio, r)
		}
	}
}

// TestBestCoax: ELL m0189 and m0190: the ratio b/a with the least loss and with
// the most power. The book's impedances of 59.9 and 76.6 ohm are cut off, not
// rounded.
func TestBestCoax(t *testing.T) {
	perfect := Conductor{Conductivity: math.Inf(1)}
	loss := func(outer Conductor) func(ratio float64) float64 {
		return func(ratio float64) float64 {
			g := mustGeometry(t, Coax{1 / ratio, 1, 0, 1, 0, copper, outer})
			return g.Conductor(1e6) / g.Z0
		}
	}
	power := func(ratio float64) float64 { // less is more
		g := mustGeometry(t, Coax{1 / ratio, 1, 0, 1, 0, copper, copper})
		return g.PeakField * g.PeakField * g.Z0
	}
	for _, row := range []struct {
		name                 string
		of                   func(float64) float64
		ratio, half, z0, cut float64
	}{
		{"least loss, perfect outer conductor", loss(perfect), 2.72, 0.005, 59.9, 0.0614},
		{"least loss", loss(copper), 3.59, 0.005, 76.6, 0.0575},
		{"most power", power, 1.65, 0.005, 30.0, 0.05},
	} {
		best := minimise(row.of, 1.2, 6)
		near(t, row.name+", b/a", best, row.ratio, row.half)
		near(t, row.name+", Z0", mustGeometry(t, Coax{1, best, 0, 1, 0, copper, copper}).Z0, row.z0, row.cut)
	}
}

// minimise finds the least value of f between low and high by thirds.
func minimise(f func(float64) float64, low, high float64) float64 {
	for range 60 {
		third := (high - low) / 3
		if f(low+third) < f(high-third) {
			high -= third
		} else {
			low += third
		}
	}
	return (low + high) / 2
}

// TestCoaxDirectCurrent: two tubes of the same section have the same
// resistance.
func TestCoaxDirectCurrent(t *testing.T) {
	// A wall from 3 to 5 has the section of a wire with the radius 4.
	g := mustGeometry(t, Coax{1e-3, 3e-3, 2e-3, 1, 0, copper, copper})
	near(t, "R at direct current", g.DCResistance/(wireDC(copper, 1e-3)+wireDC(copper, 4e-3)), 1, roundTol)
	if g := mustGeometry(t, Coax{1e-3, 3e-3, 0, 1, 0, copper, copper}); g.DCResistance != 0 {
		t.Errorf("without a wall: %g", g.DCResistance)
	}
}
