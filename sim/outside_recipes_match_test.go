package sim_test

import (
	"fmt"
	"math"
	"math/cmplx"
	"testing"

	"linewitness/phasor"
	"linewitness/sim/line"
)

// crossing bisects for the place in [a, b] where f crosses zero.
func crossing(a, b float64, f func(float64) float64) float64 {
	up := f(b) > 0
	for range 60 {
		if c := (a + b) / 2; (f(c) > 0) == up {
			b = c
		} else {
			a = c
		}
	}
	return (a + b) / 2
}

// along gives V/I on section 0 at a distance d from its To end.
func along(s *phasor.Solution, l, d float64) complex128 {
	return s.Voltage(0, l-d) / s.Current(0, l-d)
}

// places finds the two distances from the load, within half a wavelength, at
// which f of the normalised impedance is 1.
func places(t *testing.T, k line.Constants, z0 float64, zl complex128, f func(complex128) float64) (d [2]float64) {
	l := wave / 2
	s := readPhasor(t, loaded(freely, k, l, zl)).exact
	g := func(d float64) float64 { return f(along(s, l, d)/complex(z0, 0)) - 1 }
	n, count := 200, 0
	for i := range n {
		a, b := l*float64(i)/float64(n), l*float64(i+1)/float64(n)
		if g(a)*g(b) < 0 && count < 2 {
			d[count] = crossing(a, b, g)
			count++
		}
	}
	if count != 2 {
		t.Fatalf("%d places, want 2", count)
	}
	return d
}

// stubLength is the length of a shorted line whose normalised admittance is
// jb, or of an open one whose normalised impedance is jb: both run from -inf
// to +inf over half a wavelength.
func stubLength(t *testing.T, k line.Constants, z0, b float64, open bool) float64 {
	l := wave / 2
	n := build(freely, z0).section(0, 1, k, l)
	if open {
		n.open(1)
	} else {
		n.load(1, 0)
	}
	s := readPhasor(t, &n.Network).exact
	return crossing(1e-6*l, (1-1e-6)*l, func(d float64) float64 {
		z := along(s, l, d) / complex(z0, 0)
		if open {
			return imag(z) - b
		}
		return imag(1/z) - b
	})
}

// feeder is the length of the line before a matching network, on which there
// must be no reflection.
const feeder = 0.3 * wave

// shuntStub designs both shunt short-circuited stubs by looking along the
// solved line for Re y = 1, and solves the whole network. The names are those
// of the near and far places and stub lengths.
func shuntStub(near, far, nearStub, farStub string) recipe {
	return func(t *testing.T, in inputs, solve reader) found {
		z0, zl := in.f("Z0"), in.c("ZL")
		k := airLine(z0)
		d := places(t, k, z0, zl, func(z complex128) float64 { return real(1 / z) })
		out := found{}
		lengths := [2]float64{}
		for i := range d {
			e := solve(t, loaded(freely, k, d[i], zl)).sections[0]
			b := imag(complex(z0, 0) / readPhasor(t, loaded(freely, k, d[i], zl)).sections[0].zFrom())
			lengths[i] = stubLength(t, k, z0, -b, false)
			out.real("SWR load side", swr(gamma(e.zFrom(), z0)))
			if readsAlong(t, solve) {
				out.real("|b_stub|", math.Abs(b))
				out.real("|B_stub|", math.Abs(b)/z0)
				out.real("|Ys|", math.Abs(b)/z0)
			}
			n := build(freely, z0).section(0, 1, k, feeder).section(1, 2, k, d[i]).section(1, 3, k, lengths[i])
			r := solve(t, &n.load(2, zl).load(3, 0).Network)
			out[fmt.Sprintf("match %d", i+1)] = gamma(r.sections[0].zTo(), z0)
		}
		if readsAlong(t, solve) {
			out.real(near, d[0]/wave)
			out.real(far, d[1]/wave)
			out.real(nearStub, lengths[0]/wave)
			out.real(farStub, lengths[1]/wave)
		}
		return out
	}
}

// readsAlong reports whether a reader can look along a line.
func readsAlong(t *testing.T, solve reader) bool {
	return solve(t, loaded(freely, airLine(50), wave/8, 50)).exact != nil
}

// seriesStub designs both series open-circuited stubs. A stub in series with
// one conductor is no piece of line between two junctions and the common
// return; in the network stands the reactance that it has.
func seriesStub(t *testing.T, in inputs, solve reader) found {
	z0, zl := in.f("Z0"), in.c("ZL")
	k := airLine(z0)
	d := places(t, k, z0, zl, func(z complex128) float64 { return real(z) })
	out := found{}
	for i := range d {
		z := readPhasor(t, loaded(freely, k, d[i], zl)).sections[0].zFrom()
		x := imag(z) / z0
		n := build(freely, z0).section(0, 1, k, feeder).element(1, 2, complex(0, -x*z0)).section(2, 3, k, d[i]).load(3, zl)
		out[fmt.Sprintf("match %d", i+1)] = gamma(solve(t, &n.Network).sections[0].zTo(), z0)
		if readsAlong(t, solve) {
			out.real(fmt.Sprintf("d%d", i+1), d[i]/wave)
			out.real(fmt.Sprintf("l%d", i+1), stubLength(t, k, z0, -x, true)/wave)
			if i == 0 {
				out.real("z1 imag", x)
			}
		}
	}
	return out
}

// quarterWave finds the impedance of the quarter-wave line that matches a
// resistance, by bisection on the solved network.
func quarterWave(answer, load string) recipe {
	return func(t *testing.T, in inputs, solve reader) found {
		z0, r := in.f("Z0"), in.f(load)
		z1 := crossing(math.Min(z0, r), math.Max(z0, r), func(z float64) float64 {
			return real(readPhasor(t, loaded(freely, airLine(z), wave/4, complex(r, 0))).sections[0].zFrom()) - z0
		})
		n := build(freely, z0).section(0, 1, airLine(z0), feeder).section(1, 2, airLine(z1), wave/4).load(2, complex(r, 0))
		out := found{"match 1": gamma(solve(t, &n.Network).sections[0].zTo(), z0)}
		if readsAlong(t, solve) {
			out.real(answer, z1)
		}
		return out
	}
}

// bandwidth finds the frequency at which a quarter-wave transformer lets its
// SWR rise to the limit.
func bandwidth(t *testing.T, in inputs, solve reader) found {
	z0, zl, f0, most := in.f("Z0"), in.c("ZL"), in.f("f0"), in.f("SWRmax")
	out := quarterWave("Z1", "ZL")(t, in, solve)
	z1 := real(quarterWave("Z1", "ZL")(t, in, readPhasor)["Z1"])
	at := func(f float64, solve reader) complex128 {
		return gamma(solve(t, loaded(f, airLine(z1), line.C0/f0/4, zl)).sections[0].zFrom(), z0)
	}
	fm := crossing(f0/2, f0, func(f float64) float64 { return most - swr(at(f, readPhasor)) })
	out.real("Gamma_m", cmplx.Abs(at(fm, solve)))
	if readsAlong(t, solve) {
		out.real("fractional bandwidth", 2*(f0-fm)/f0)
	}
	return out
}

// sectionL designs both L-sections: a shunt part at the load that makes the
// resistance Z0, and a series part that takes the reactance away.
func sectionL(t *testing.T, in inputs, solve reader) found {
	z0, zl, f := in.f("Z0"), in.c("ZL"), in.f("f")
	w := 2 * math.Pi * f
	out := found{}
	k := airLine(z0)
	l := 0.3 * line.C0 / f
	seen := func(b float64) complex128 { // the load with its shunt part, at the end of the feeder
		n := build(f, z0).section(0, 1, k, l).load(1, zl).load(1, shunt(b, z0))
		return readPhasor(t, &n.Network).sections[0].zTo()
	}
	resonant := -imag(complex(z0, 0) / zl) // there the resistance is largest; the answers lie on both sides
	for i, limit := range []float64{resonant + 3, resonant - 3} {
		b := crossing(resonant, limit, func(b float64) float64 { return z0 - real(seen(b)) })
		x := -imag(seen(b)) / z0
		n := build(f, z0).section(0, 1, k, l).element(1, 2, complex(0, x*z0)).load(2, zl).load(2, shunt(b, z0))
		out[fmt.Sprintf("match %d", i+1)] = gamma(solve(t, &n.Network).sections[0].zTo(), z0)
		if !readsAlong(t, solve) {
			continue
		}
		out.real(fmt.Sprintf("b%d", i+1), b)
		out.real(fmt.Sprintf("x%d", i+1), x)
		if i == 0 {
			out.real("C1", b/(w*z0))
			out.real("L1", x*z0/w)
		} else {
			out.real("L2", -z0/(w*b))
			out.real("C2", -1/(w*x*z0))
		}
	}
	return out
}

// shunt is the impedance of a part of normalised susceptance b.
func shunt(b, z0 float64) complex128 { return complex(0, -z0/b) }
