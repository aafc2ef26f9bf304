package line

import (
	"math"
	"testing"

	"gonum.org/v1/gonum/mathext"
)

// TestCohn: the exact impedance, computed apart from this program with 30 pi
// for the eta0/4 that we take.
func TestCohn(t *testing.T) {
	const rounded = 30 * math.Pi / (eta0 / 4)
	for _, row := range []struct{ ratio, z0, pozar float64 }{
		{0.10, 194.3607, 196.9650},
		{0.25, 140.0140, 138.3962},
		{0.35, 120.5183, 119.1502},
		{0.50, 100.5020, 100.1570},
		{0.83, 74.1619, 74.1525},
		{1.00, 65.3989, 65.4044},
		{2.00, 38.6060, 38.6103},
	} {
		g := mustGeometry(t, Stripline{row.ratio, 1, 0, 1, 0, copper})
		near(t, "Z0", g.Z0*rounded, row.z0, 0.00005)
		near(t, "POZ fit", pozarStrip(row.ratio), row.pozar, 0.0001)
		near(t, "Z0 against POZ", g.Z0*rounded/pozarStrip(row.ratio), 1, 0.015)
	}
}

// pozarStrip is the fit of POZ eqs. 3.179 and 3.180 (see conductor_test.go) to
// Z0 sqrt(er).
func pozarStrip(ratio float64) float64 {
	wide := ratio
	if ratio < 0.35 {
		wide -= (0.35 - ratio) * (0.35 - ratio)
	}
	return 30 * math.Pi / (wide + 0.441)
}

// TestCohnByEllipticIntegrals: the means against the integrals themselves,
// which take m = k^2.
func TestCohnByEllipticIntegrals(t *testing.T) {
	// The library loses digits as m nears 1.
	const libraryTol = 1e-9
	for _, ratio := range []float64{0.01, 0.1, 0.5, 1, 3, 5} {
		x := math.Pi / 2 * ratio
		k, kk := 1/math.Cosh(x), math.Tanh(x)
		want := eta0 / 4 * mathext.CompleteK(k*k) / mathext.CompleteK(kk*kk)
		near(t, "Z0", cohn(ratio)/want, 1, libraryTol)
	}
	// Very wide strips are two parallel-plate lines and two edges.
	near(t, "wide", cohn(100)/(eta0/4/(100+2*math.Ln2/math.Pi)), 1, 1e-9)
}

// TestStriplineAgainstTextbook: POZ Example 3.5, 50 ohm, b = 3.2 mm, er = 2.2,
// t = 0.01 mm, at 10 GHz.
func TestStriplineAgainstTextbook(t *testing.T) {
	const f = 10e9
	x := Stripline{2.65547776313e-3, 3.2e-3, 0.01e-3, 2.2, 1e-3, copper}
	g := mustGeometry(t, x)
	near(t, "Z0", g.Z0, 50, 0.1)
	near(t, "Z0 of w = 2.66 mm, computed with 30 pi", mustGeometry(t, Stripline{2.66e-3, 3.2e-3, 0, 2.2, 0, copper}).Z0*30*math.Pi/(eta0/4), 49.951, 0.0005)
	near(t, "dielectric loss, Np/m", g.Dielectric(f)*g.Z0/2, 0.155, 0.0005)
	computed(t, "dielectric loss", g.Dielectric(f)*g.Z0/2, 0.15543202681)
	near(t, "conductor loss, Np/m", g.Conductor(f)/(2*g.Z0), 0.122, 0.0005)
	computed(t, "conductor loss", x.perMetre(50)*copper.SurfaceResistance(f)/100, 0.122008634546)
	total := (g.Conductor(f)/g.Z0 + g.Dielectric(f)*g.Z0) / 2 * NeperDB
	near(t, "loss, dB/m", total, 2.41, 0.005)
	near(t, "wavelength, m", g.VelocityFactor*C0/f, 0.0202, 0.00005)
	near(t, "loss per wavelength, dB", total*g.VelocityFactor*C0/f, 0.049, 0.0005)
}

// TestStripBranches: the two formulas for the loss meet where one takes over,
// as far as approximations do.
func TestStripBranches(t *testing.T) {
	const apart = 0.07
	x := Stripline{0.35, 1, 0.003, 1, 0, copper}
	near(t, "above over below 120 ohm", x.perMetre(120)/x.perMetre(119.999), 1, apart)
}
