package sim_test

import (
	"math"
	"math/cmplx"
	"testing"

	"linewitness/sim/line"
	"linewitness/sim/network"
)

// nominalConstants measures the primary constants of a line that is given by
// Z0, attenuation and velocity. R/L = G/C, since Z0 is real in all of them.
func nominalConstants(t *testing.T, in inputs, solve reader) found {
	f, z0 := in.f("f"), in.f("Z0")
	v, alpha := 0.0, 0.0
	switch {
	case in["u"] != nil:
		v = in.f("u")
	default:
		v = 2 * math.Pi * f / in.f("beta")
	}
	switch {
	case in["alpha_Np_m"] != nil:
		alpha = in.f("alpha_Np_m")
	case in["alpha_dB_m"] != nil:
		alpha = in.f("alpha_dB_m") / line.NeperDB
	}
	k := line.Nominal{Z0: z0, VelocityFactor: v / line.C0, LossAt: f, Attenuation: alpha, DielectricShare: 0.5}.At(f)
	z, g := measure(t, solve, f, k)
	out := primary(z, g, f)
	out.real("lambda", 2*math.Pi/imag(g))
	return out
}

// measure finds the characteristic impedance and the propagation constant of
// a line from an eighth of a wavelength of it, open and short:
//
//	Z = sqrt(Zoc Zsc),  tanh gl = Zsc/Z
func measure(t *testing.T, solve reader, f float64, k line.Constants) (z, g complex128) {
	l := k.Wavelength(f) / 8
	feed := math.Sqrt(k.L / k.C)
	short := solve(t, &build(f, feed).section(0, 1, k, l).load(1, 0).Network).sections[0].zFrom()
	open := solve(t, &build(f, feed).section(0, 1, k, l).open(1).Network).sections[0].zFrom()
	z = cmplx.Sqrt(open) * cmplx.Sqrt(short)
	return z, cmplx.Atanh(short/z) / complex(l, 0)
}

// primary are the constants R + jwL = gZ, G + jwC = g/Z.
func primary(z, g complex128, f float64) found {
	w := 2 * math.Pi * f
	out := found{}
	out.real("R", real(g*z))
	out.real("L", imag(g*z)/w)
	out.real("G", real(g/z))
	out.real("C", imag(g/z)/w)
	return out
}

func secondaryConstants(t *testing.T, in inputs, solve reader) found {
	f := in.f("f")
	z, g := measure(t, solve, f, line.Constants{R: in.f("R"), L: in.f("L"), G: in.f("G"), C: in.f("C")})
	out := found{}
	out.real("|Z0|", cmplx.Abs(z))
	out.real("arg Z0", degrees(z))
	out.real("alpha", real(g))
	out.real("beta", imag(g))
	out.real("v", 2*math.Pi*f/imag(g))
	return out
}

// complexMatched drives the book's line with both of the source impedances
// that its printed figures assume. The propagation constant is the one to be
// found; the load voltage, which the book gives, comes out.
func complexMatched(t *testing.T, in inputs, solve reader) found {
	const f = 1e3 // the book names none; the section is known by gamma and Z0
	z0, vl, l := in.c("Z0"), in.c("VL_rms"), in.f("l")
	drive := func(feed network.Series, vin float64) terminals {
		g := cmplx.Log(complex(vin, 0)/vl) / complex(l, 0)
		k := line.Constants{
			R: real(g * z0), L: imag(g*z0) / (2 * math.Pi * f),
			G: real(g / z0), C: imag(g/z0) / (2 * math.Pi * f),
		}
		b := build(f, 0).section(0, 1, k, l).load(1, z0)
		b.Source.EMF, b.Source.Series = in.f("Vg_rms"), feed
		return solve(t, &b.Network).sections[0]
	}
	ideal, matched := drive(network.Series{}, in.f("Vg_rms")), drive(series(z0, f), in.f("Vg_rms")/2)
	out := found{"Zin": ideal.zFrom(), "Vin": ideal.vFrom, "VL": ideal.vTo, "Vin, Zg=Z0": matched.vFrom, "VL, Zg=Z0": matched.vTo}
	out.real("|Iin|", cmplx.Abs(ideal.iFrom))
	out.real("arg Iin", degrees(ideal.iFrom))
	out.real("|Iin|, Zg=Z0", cmplx.Abs(matched.iFrom))
	out.real("alpha", -math.Log(cmplx.Abs(ideal.vTo/ideal.vFrom))/l)
	out.real("alpha, Zg=Z0", -math.Log(cmplx.Abs(matched.vTo/matched.vFrom))/l)
	out.real("beta", ideal.lag/l)
	return out
}

// distortionless also measures what is left of the voltage after 1 and 5 km,
// at 1 MHz: the book's line has no frequency.
func distortionless(t *testing.T, in inputs, solve reader) found {
	const f = 1e6
	z0, v := in.f("Z0"), 1/(in.f("Z0")*in.f("C"))
	k := line.Nominal{
		Z0: z0, VelocityFactor: v / line.C0,
		LossAt: f, Attenuation: in.f("alpha_dB_m") / line.NeperDB, DielectricShare: 0.5,
	}.At(f)
	z, g := measure(t, solve, f, k)
	out := primary(z, g, f)
	out.real("v", 2*math.Pi*f/imag(g))
	for name, l := range map[string]float64{"V ratio 1 km": 1e3, "V ratio 5 km": 5e3} {
		e := solve(t, loaded(f, k, l, complex(z0, 0))).sections[0]
		out.real(name, cmplx.Abs(e.vTo/e.vFrom))
	}
	return out
}
