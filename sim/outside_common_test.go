package sim_test

import (
	"context"
	"math"
	"math/cmplx"
	"testing"

	"linewitness/fdtd"
	"linewitness/sim/network"
)

// What every practitioner knows of a line (common practice, from no one
// source), asked of both witnesses.

// commonTol is the tolerance of these facts. The lines are lossless and whole
// numbers of cells long at Courant number 1, where both witnesses are exact;
// what is left is the settling tolerance, settledTo of the largest amplitude
// on a section, on some of them magnified tenfold.
const commonTol = 1e-6

// A view is a section as one witness sees it.
type view struct {
	terminals
	zv, zi []float64 // m from the From end
	v, i   []complex128
}

// node is the index of the grid point at z.
func (v view) node(t *testing.T, z float64) int {
	t.Helper()
	i := int(math.Round(z / v.zv[1]))
	if i >= len(v.zv) || math.Abs(v.zv[i]-z) > 1e-9*wave {
		t.Fatalf("no grid point at %g m", z)
	}
	return i
}

// views gives the only section of a network as both witnesses see it, at the
// points of the grid.
func views(t *testing.T, net *network.Network) map[string]view {
	t.Helper()
	st, err := fdtd.Settle(context.Background(), net, gridOf(t, net), fdtd.Settings{Tolerance: settledTo})
	if err != nil || !st.Settling.Settled {
		t.Fatalf("settle: %v", err)
	}
	s := st.Sections[0]
	exact := readPhasor(t, net)
	p := view{terminals: exact.sections[0], zv: s.ZV, zi: s.ZI}
	for _, z := range s.ZV {
		p.v = append(p.v, exact.exact.Voltage(0, z))
	}
	for _, z := range s.ZI {
		p.i = append(p.i, exact.exact.Current(0, z))
	}
	return map[string]view{
		"phasor": p,
		"fdtd":   {terminals{s.VFrom, s.IFrom, s.VTo, s.ITo, lag(s.V)}, s.ZV, s.ZI, s.V, s.I},
	}
}

// each runs a check on both views of a lossless line of some wavelengths and
// a load; open is infinite.
func each(t *testing.T, name string, wavelengths float64, zl complex128, check func(t *testing.T, v view)) {
	t.Helper()
	n := build(freely, 50).section(0, 1, airLine(75), wavelengths*wave)
	if cmplx.IsInf(zl) {
		n.open(1)
	} else {
		n.load(1, zl)
	}
	for witness, v := range views(t, &n.Network) {
		t.Run(name+"/"+witness, func(t *testing.T) { check(t, v) })
	}
}

func holds(t *testing.T, what string, got, want complex128, scale float64) {
	t.Helper()
	near(t, "common practice", what, got, want, commonTol*scale)
}

func TestOutsideCommonPractice(t *testing.T) {
	zl := 30 + 45i
	each(t, "phase constant is 2 pi f/v, the same phase after a wavelength", 2.25, 75, func(t *testing.T, v view) {
		holds(t, "lag", complex(v.lag, 0), 2.25*2*math.Pi, 2*math.Pi)
		turn := v.node(t, wave)
		for i := 0; i+turn < len(v.v); i++ {
			holds(t, "V(z + lambda)/V(z)", v.v[i+turn]/v.v[i], 1, 1)
		}
	})
	each(t, "half a wavelength repeats the load", 0.5, zl, func(t *testing.T, v view) {
		holds(t, "Zin", v.zFrom(), zl, 75)
		holds(t, "V at the load", v.vTo, -v.vFrom, cmplx.Abs(v.vFrom))
	})
	each(t, "a quarter wavelength inverts it", 0.25, zl, func(t *testing.T, v view) {
		holds(t, "Zin", v.zFrom(), 75*75/zl, 75)
	})
	each(t, "a quarter wavelength makes a short of an open", 0.25, cmplx.Inf(), func(t *testing.T, v view) {
		holds(t, "Zin", v.zFrom(), 0, 75)
	})
	each(t, "a quarter wavelength makes an open of a short", 0.25, 0, func(t *testing.T, v view) {
		holds(t, "1/Zin", 1/v.zFrom(), 0, 1./75)
	})
	each(t, "a load seen through a line is not the load", 0.15, zl, func(t *testing.T, v view) {
		if d := cmplx.Abs(v.zFrom() - zl); d < 20 {
			t.Errorf("Zin is within %.2g ohm of the load", d)
		}
		holds(t, "|Gamma| at both ends", complex(cmplx.Abs(gamma(v.zFrom(), 75)), 0), complex(cmplx.Abs(gamma(zl, 75)), 0), 1)
	})
}

// On a lossless line without a load that takes power the nulls are perfect
// and half a wavelength apart, current nulls lie a quarter wavelength from
// voltage nulls, and voltage and current are a quarter period apart in time.
func TestOutsideStandingWave(t *testing.T) {
	for name, load := range map[string]struct {
		z     complex128
		nulls []float64 // of the voltage, wavelengths from the far end
	}{
		"shorted": {0, []float64{0, 0.5, 1}},
		"open":    {cmplx.Inf(), []float64{0.25, 0.75, 1.25}},
	} {
		each(t, name, 1.35, load.z, func(t *testing.T, v view) {
			top := largest(v.v)
			for _, d := range load.nulls {
				i := v.node(t, (1.35-d)*wave)
				holds(t, "V at a null", v.v[i], 0, top)
				if i == len(v.i) {
					continue
				}
				// The current is largest there: the same half a cell to both sides.
				holds(t, "I beside it", v.i[i], v.i[i-1], largest(v.i))
				within := math.Cos(math.Pi/float64(v.node(t, wave))) - commonTol
				if m := cmplx.Abs(v.i[i]) * 75; m < within*top {
					t.Errorf("|I| Z0 = %g at a null of V, want the largest V %g", m, top)
				}
			}
			quarterPeriod(t, v)
		})
	}
}

// quarterPeriod requires V and I to be in quadrature at every point that is
// no null.
func quarterPeriod(t *testing.T, v view) {
	t.Helper()
	top := largest(v.i)
	for n, i := range v.i {
		mid := (v.v[n] + v.v[n+1]) / 2
		p := mid * cmplx.Conj(i)
		holds(t, "real part of V I*", complex(real(p), 0), 0, largest(v.v)*top)
	}
}

func largest(p []complex128) float64 {
	m := 0.0
	for _, v := range p {
		m = math.Max(m, cmplx.Abs(v))
	}
	return m
}
