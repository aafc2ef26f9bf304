package sim_test

import (
	"math"
	"math/cmplx"
	"testing"

	"linewitness/sim/line"
	"linewitness/sim/network"
)

// recipes are the recipes of the examples, by id.
var recipes = map[string]recipe{
	"SAD-11.1": nominalConstants, "SAD-PE11.1": nominalConstants, "SAD-11.2": nominalConstants, "CHE-P9.9": nominalConstants,
	"SAD-PE11.2": secondaryConstants, "SAD-PE11.3": complexMatched, "CHE-9.3": distortionless,
	"SAD-11.4": terminated, "SAD-11.5": maximaMinima, "POZ-2.2": terminated, "POZ-2.3": admittance,
	"CHE-9.5": matchedSource, "CHE-9.6": openShort,
	"SAD-PE11.4": loadFromSWR, "SAD-11.6": slotted, "POZ-2.4": slotted, "CHE-9.9": firstMinimum,
	"SAD-11.7":   shuntStub("lB (near)", "lA (far)", "dB stub length at lB", "dA stub length at lA"),
	"SAD-PE11.7": shuntStub("lA", "lB", "dA", "dB"),
	"POZ-5.3":    seriesStub, "SAD-QW": quarterWave("Z0'", "ZL"), "POZ-2.5": quarterWave("Z1", "RL"),
	"POZ-5.5": bandwidth, "POZ-5.1": sectionL,
	"M": caseM, "M-2": caseM, "M-5": caseM, "M-7": caseM, "M-8": caseM,
	"M-10": caseM, "M-11": caseM, "M-11b": caseM, "M-12": caseM, "M-14": caseM,
}

// freely is the frequency of an example whose print gives wavelengths only.
const freely = 100e6

// airLine is a lossless line for such an example, with the velocity of light.
func airLine(z0 float64) line.Constants { return lossless(z0, line.C0) }

// wave is its wavelength, m.
const wave = line.C0 / freely

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

// terminated is a lossless line with a load. The magnitude of the reflection
// coefficient is taken at the near end, its angle at the load.
func terminated(t *testing.T, in inputs, solve reader) found {
	f, v, z0 := freely, line.C0, in.f("Z0")
	if in["f"] != nil {
		f, v = in.f("f"), in.f("u")
	}
	l := 0.0
	if in["l"] != nil {
		l = in.f("l")
	} else {
		l = in.f("l_wl") * v / f
	}
	e := solve(t, loaded(f, lossless(z0, v), l, in.c("ZL"))).sections[0]
	near, far := gamma(e.zFrom(), z0), gamma(e.zTo(), z0)
	out := found{"Zin": e.zFrom()}
	out.real("|Gamma|", cmplx.Abs(near))
	out.real("arg Gamma", degrees(far))
	out.real("arg Gamma_in", math.Mod(degrees(near)+360, 360))
	out.real("SWR", swr(near))
	out.real("RL", -20*math.Log10(cmplx.Abs(near)))
	out.real("|Zin|", cmplx.Abs(e.zFrom()))
	out.real("arg Zin", degrees(e.zFrom()))
	return out
}

func maximaMinima(t *testing.T, in inputs, solve reader) found {
	z0, zl := in.f("Z0"), in.c("ZL")
	la, lb := in.f("l_a_wl")*wave, in.f("l_b_wl")*wave
	ra := solve(t, loaded(freely, airLine(z0), la, zl))
	rb := solve(t, loaded(freely, airLine(z0), lb, zl))
	a, b := ra.sections[0], rb.sections[0]
	out := found{"YL": 1 / a.zTo(), "Zin(0.4wl)": a.zFrom(), "Zin(0.6wl) chart": b.zFrom()}
	out.real("|Gamma|", cmplx.Abs(gamma(a.zFrom(), z0)))
	out.real("arg Gamma", degrees(gamma(a.zTo(), z0)))
	out.real("SWR (check line)", swr(gamma(a.zFrom(), z0)))
	out.real("SWR (chart)", swr(gamma(b.zFrom(), z0)))
	out.real("|Zin(0.4wl)|", cmplx.Abs(a.zFrom()))
	out.real("arg Zin(0.4wl)", degrees(a.zFrom()))
	if ra.exact != nil { // within 0.4 wavelengths of the load there is one of each
		most, least := ra.exact.VoltageExtremes(0)
		out.real("first Vmax", (la-most.At)/wave)
		out.real("Vmin", (la-least.At)/wave)
	}
	return out
}

func admittance(t *testing.T, in inputs, solve reader) found {
	z0 := in.f("Z0")
	e := solve(t, loaded(freely, airLine(z0), in.f("l_wl")*wave, in.c("ZL"))).sections[0]
	return found{"YL": 1 / e.zTo(), "y(0.15wl)": complex(z0, 0) / e.zFrom(), "Yin": 1 / e.zFrom()}
}

func matchedSource(t *testing.T, in inputs, solve reader) found {
	b := build(in.f("f"), in.f("Rg")).section(0, 1, lossless(in.f("Z0"), in.f("v")), in.f("l")).load(1, in.c("Z0"))
	b.Source.EMF = in.f("Vg_peak")
	e := solve(t, &b.Network).sections[0]
	out := found{}
	out.real("V+", cmplx.Abs(e.vFrom))
	out.real("I+", cmplx.Abs(e.iFrom))
	out.real("phase at load", e.lag/math.Pi)
	out.real("Pav", real(e.vTo*cmplx.Conj(e.iTo))/2)
	return out
}

// openShort takes Z0 and beta from the printed open and short impedances,
// lets a line of those constants be measured again, and looks how long the
// shorted line must be to appear open.
func openShort(t *testing.T, in inputs, solve reader) found {
	const f = 100e6
	l := in.f("l")
	zoc, zsc := in.c("Zoc"), in.c("Zsc")
	z0 := real(cmplx.Sqrt(zoc) * cmplx.Sqrt(zsc))
	beta := math.Atan(imag(zsc)/z0) / l
	k := lossless(z0, 2*math.Pi*f/beta)
	z, g := measure(t, solve, f, k)
	out := found{"Z0": z}
	out.real("beta", imag(g))
	r := solve(t, &build(f, z0).section(0, 1, k, 2*l).load(1, 0).Network)
	out.real("Zin short, 2l", imag(r.sections[0].zFrom()))
	if r.exact != nil {
		_, least := r.exact.CurrentExtremes(0)
		out.real("l for open", 2*l-least.At)
	}
	return out
}

// caseM is the reference line of the requirements study. Its Z0 is real: the
// loss is shared between conductor and dielectric.
func caseM(t *testing.T, in inputs, solve reader) found {
	f, z0, zl := in.f("f"), in.f("Z0"), in.c("ZL")
	v := 0.66 * line.C0
	l := in.f("degrees") / 360 * v / f
	k := line.Nominal{
		Z0: z0, VelocityFactor: 0.66,
		LossAt: f, Attenuation: in.f("loss_dB") / l / line.NeperDB, DielectricShare: 0.5,
	}.At(f)
	b := build(f, in.f("Rg")).section(0, 1, k, l).load(1, zl)
	b.Source.EMF = in.f("EMF")
	r := solve(t, &b.Network)
	e := r.sections[0]
	out := found{"Zin": e.zFrom()}
	out.real("|Gamma in|", cmplx.Abs(gamma(e.zFrom(), z0)))
	out.real("SWR at load", swr(gamma(e.zTo(), z0)))
	out.real("SWR at input", swr(gamma(e.zFrom(), z0)))
	out.real("|Vin|", cmplx.Abs(e.vFrom))
	out.real("|VL|", cmplx.Abs(e.vTo))
	out.real("arg VL/Vin", degrees(e.vTo/e.vFrom))
	out.real("PL", real(r.junctions[1]*cmplx.Conj(r.branches[0]))/2)
	return out
}
