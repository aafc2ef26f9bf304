package sim_test

import (
	"math"
	"math/cmplx"
	"testing"

	"linewitness/sim/line"
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
