package sim_test

import (
	"math"
	"math/cmplx"
	"testing"
)

// At a minimum of the standing wave the impedance is Z0/s. The load is found
// by going from there towards it by a distance d, which on a lossless line is
// towards the source by half a wavelength less d: the input impedance of that
// length of line, terminated by Z0/s.
func loadBehind(t *testing.T, solve reader, z0, s, d, lambda, f float64) complex128 {
	k := lossless(z0, lambda*f)
	return solve(t, loaded(f, k, lambda/2-d, complex(z0/s, 0))).sections[0].zFrom()
}

// loadFromSWR finds the load from s and the angle of its reflection
// coefficient, theta = 180 deg + 2 beta d.
func loadFromSWR(t *testing.T, in inputs, solve reader) found {
	z0, s, l := in.f("Z0"), in.f("s"), in.f("l_wl")*wave
	d := (in.f("theta_deg") - 180) / 720 * wave
	zl := loadBehind(t, solve, z0, s, d, wave, freely)
	r := solve(t, loaded(freely, airLine(z0), l, zl))
	out := found{"ZL": zl, "Zin": r.sections[0].zFrom()}
	out.real("|Gamma|", cmplx.Abs(gamma(r.sections[0].zFrom(), z0)))
	if r.exact != nil {
		_, least := r.exact.VoltageExtremes(0)
		out.real("l_min", (l-least.At)/wave)
	}
	return out
}

// slotted finds a load from the places of the minima with it and with a
// short, the latter being a whole number of half wavelengths from the load.
// The scale of both examples grows towards the load.
func slotted(t *testing.T, in inputs, solve reader) found {
	z0, f, s := in.f("Z0"), freely, 0.0
	if in["u"] != nil { // SAD-11.6
		s = in.f("s")
	} else {
		s = in.f("SWR")
	}
	withShort, withLoad := in.list("minima_short_m"), in.list("minima_load_m")
	lambda := 2 * (withShort[1] - withShort[0])
	if in["u"] != nil {
		f = in.f("u") / lambda
	}
	last := len(withShort) - 1
	d := math.Mod(withShort[last]-withLoad[0], lambda/2)
	zl := loadBehind(t, solve, z0, s, d, lambda, f)
	g := gamma(zl, z0)
	out := found{"ZL": zl, "Gamma": g}
	out.real("theta", degrees(g))
	k := lossless(z0, lambda*f)
	if r := solve(t, loaded(f, k, 0.45*lambda, zl)); r.exact != nil {
		_, least := r.exact.VoltageExtremes(0)
		out.real("l_min", 0.45-least.At/lambda)
		short := solve(t, loaded(f, k, 0.45*lambda, 0))
		_, least = short.exact.CurrentExtremes(0)
		out.real("lambda", 4*(0.45*lambda-least.At))
	}
	return out
}

// firstMinimum finds the load from s and the first minimum, and goes back
// from the load to that minimum.
func firstMinimum(t *testing.T, in inputs, solve reader) found {
	z0, d, lambda := in.f("Z0"), in.f("first_min"), 2*in.f("min_spacing")
	zl := loadBehind(t, solve, z0, in.f("S"), d, lambda, freely)
	out := found{"ZL": zl, "Gamma": gamma(zl, z0)}
	k := lossless(z0, lambda*freely)
	out["R_m"] = solve(t, loaded(freely, k, d, zl)).sections[0].zFrom()
	if r := solve(t, loaded(freely, k, 0.45*lambda, zl)); r.exact != nil {
		_, least := r.exact.VoltageExtremes(0)
		out.real("l_m", 0.45*lambda-least.At)
	}
	return out
}
