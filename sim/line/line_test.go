package line

import (
	"math"
	"math/cmplx"
	"testing"

	"pgregory.net/rapid"
)

// roundTol allows for the rounding of a handful of operations.
const roundTol = 1e-14

// near reports whether got is within half of the last printed digit of want.
func near(t *testing.T, what string, got, want, half float64) {
	t.Helper()
	if math.Abs(got-want) > half*(1+roundTol) {
		t.Errorf("%s = %g, want %g within %g", what, got, want, half)
	}
}

// The sources of the printed values; the tolerances are half of the last
// printed digit.
//
//	SAD: M.N.O. Sadiku, Elements of Electromagnetics, 7th ed. (2017), ch. 11,
//	     Example and Practice Exercise 11.1 and 11.2, pp. 562-564
//	CHE: D.K. Cheng, Field and Wave Electromagnetics, 2nd ed., Example 9-3,
//	     as quoted in study notes
func TestNominalAgainstTextbooks(t *testing.T) {
	const c3e8 = 3e8 // the books' speed of light
	for _, tt := range []struct {
		name       string
		in         Nominal
		f          float64
		want, half Constants
	}{
		{
			"SAD-11.1, lossless, beta 3 rad/m",
			Nominal{Z0: 70, VelocityFactor: 2 * math.Pi * 1e8 / 3 / C0},
			1e8,
			Constants{L: 334.2e-9, C: 68.2e-12},
			Constants{L: 0.05e-9, C: 0.05e-12},
		},
		{
			"SAD-PE11.1, distortionless, beta 1.5 rad/m",
			Nominal{80, 2 * math.Pi * 5e8 / 1.5 / C0, 5e8, 0.04, 0.5},
			5e8,
			Constants{3.2, 38.2e-9, 5e-4, 5.97e-12},
			Constants{0.05, 0.05e-9, 0.5e-4, 0.005e-12},
		},
		{
			"SAD-11.2, distortionless, u = 0.6c",
			Nominal{60, 0.6 * c3e8 / C0, 1e8, 20e-3, 0.5},
			1e8,
			Constants{1.2, 333e-9, 333e-6, 92.59e-12},
			Constants{0.05, 0.5e-9, 0.5e-6, 0.005e-12},
		},
		{
			"CHE-9.3, distortionless, 0.01 dB/m, 0.1 nF/m",
			Nominal{50, 1 / (50 * 0.1e-9) / C0, 1e6, 0.01 / NeperDB, 0.5},
			1e6,
			Constants{0.0576, 0.25e-6, 23.0e-6, 0.1e-9},
			Constants{5e-5, 5e-9, 0.05e-6, roundTol * 1e-10},
		},
	} {
		t.Run(tt.name, func(t *testing.T) {
			got := tt.in.At(tt.f)
			near(t, "R", got.R, tt.want.R, tt.half.R)
			near(t, "L", got.L, tt.want.L, tt.half.L)
			near(t, "G", got.G, tt.want.G, tt.half.G)
			near(t, "C", got.C, tt.want.C, tt.half.C)
		})
	}
}

// SAD-PE11.2 (see above): 30 ohm/km, 100 mH/km, no G, 20 uF/km at 1 kHz.
func TestSecondaryConstantsAgainstTextbook(t *testing.T) {
	k := Constants{R: 30e-3, L: 100e-6, C: 20e-9}
	omega := 2 * math.Pi * 1e3
	z0, gamma := k.Impedance(omega), k.Propagation(omega)
	near(t, "|Z0|", cmplx.Abs(z0), 70.75, 0.005)
	near(t, "arg Z0, deg", cmplx.Phase(z0)*180/math.Pi, -1.367, 0.0005)
	near(t, "alpha", real(gamma), 2.121e-4, 0.0005e-4)
	near(t, "beta", imag(gamma), 8.888e-3, 0.0005e-3)
	near(t, "phase velocity", k.PhaseVelocity(omega), 7.069e5, 50)
}

// CHE-9.3 (see above) also prints the velocity and the voltage left after 1
// and 5 km, which a distortionless line keeps at every frequency.
func TestDistortionlessLine(t *testing.T) {
	k := Nominal{50, 2e8 / C0, 1e6, 0.01 / NeperDB, 0.5}.At(1e6)
	for _, f := range []float64{1e3, 1e6, 1e9} {
		gamma := k.Propagation(2 * math.Pi * f)
		near(t, "v", k.PhaseVelocity(2*math.Pi*f), 2e8, 0.05e8)
		near(t, "V ratio over 1 km", math.Exp(-1000*real(gamma)), 0.316, 0.0005)
		near(t, "V ratio over 5 km", math.Exp(-5000*real(gamma)), 0.00316, 0.000005)
	}
}

func TestLossFollowsFrequency(t *testing.T) {
	for _, tt := range []struct{ share, r, g float64 }{
		{0, 4, 0},     // all in the conductors: sqrt(16)
		{1, 0, 16},    // all in the dielectric
		{0.5, 4, 16},  // each by its own law
		{0.25, 4, 16}, // whatever the shares
	} {
		n := Nominal{50, 0.66, 1e6, 0.01, tt.share}
		low, high := n.At(1e6), n.At(16e6)
		if math.Abs(high.R-tt.r*low.R) > roundTol*high.R {
			t.Errorf("share %g: R grows by %g, want %g", tt.share, high.R/low.R, tt.r)
		}
		if math.Abs(high.G-tt.g*low.G) > roundTol*high.G {
			t.Errorf("share %g: G grows by %g, want %g", tt.share, high.G/low.G, tt.g)
		}
		if low.L != high.L || low.C != high.C {
			t.Errorf("share %g: L or C changes with frequency", tt.share)
		}
	}
}

// A nominal line gives back what it was made from: z0 and v from L and C, and
// the attenuation from gamma up to the low loss approximation.
func TestNominalRoundTrip(t *testing.T) {
	// lossTol bounds the relative error of a = R/(2 Z0) + G Z0/2, which is
	// below (a/beta)^2; the draws keep a/beta under 1e-3.
	const lossTol = 1e-6
	rapid.Check(t, func(t *rapid.T) {
		f := math.Pow(10, rapid.Float64Range(4, 9).Draw(t, "log f"))
		n := Nominal{
			Z0:              rapid.Float64Range(10, 600).Draw(t, "z0"),
			VelocityFactor:  rapid.Float64Range(0.1, 1).Draw(t, "vf"),
			LossAt:          f,
			DielectricShare: rapid.Float64Range(0, 1).Draw(t, "share"),
		}
		beta := 2 * math.Pi / n.Wavelength(f)
		n.Attenuation = beta * rapid.Float64Range(1e-6, 1e-3).Draw(t, "a/beta")
		k := n.At(f)
		if got := math.Sqrt(k.L / k.C); math.Abs(got-n.Z0) > roundTol*n.Z0 {
			t.Fatalf("sqrt(L/C) = %g, want %g", got, n.Z0)
		}
		if got := k.FrontVelocity(); math.Abs(got-n.VelocityFactor*C0) > roundTol*got {
			t.Fatalf("1/sqrt(LC) = %g, want %g", got, n.VelocityFactor*C0)
		}
		if got := real(k.Propagation(2 * math.Pi * f)); math.Abs(got-n.Attenuation) > lossTol*n.Attenuation {
			t.Fatalf("alpha = %g, want %g", got, n.Attenuation)
		}
		if got := k.Wavelength(f); math.Abs(got-n.Wavelength(f)) > lossTol*got {
			t.Fatalf("wavelength = %g, want %g", got, n.Wavelength(f))
		}
	})
}

// Without loss the phase and the front travel together.
func TestLosslessVelocities(t *testing.T) {
	k := Constants{L: 250e-9, C: 100e-12}
	if p, v := k.PhaseVelocity(2*math.Pi*1e6), k.FrontVelocity(); math.Abs(p-v) > roundTol*v {
		t.Errorf("phase velocity %g, front velocity %g", p, v)
	}
}
