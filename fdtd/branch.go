package fdtd

import (
	"math"

	"linewitness/sim/network"
)

// A companion is a series R-L-C branch from junction a to junction b as the
// trapezoidal rule sees it over one step:
//
//	i = y (va - vb - e - h),  1/y = R + 2L/dt + dt/(2C)
//	h = -(2L/dt) i0 + q0/C
//
// where i, va, vb and the EMF e are averages over the step, i0 and q0 the
// current and the charge at its start.
type companion struct {
	a, b  int     // junctions; b may be network.Ground
	ideal bool    // no impedance: i is an unknown of the junction system
	turns float64 // of an ideal transformer, b to a; else 1. turns va - vb = e, and turns i leaves a
	y     float64 // S; not used if ideal
	twoL  float64 // 2L/dt, ohm
	invC  float64 // 1/C, 1/F
	dt    float64
	slot  int // row of i among the unknowns if ideal
}

// A memory is the state of a companion in one lane.
type memory struct{ i, q float64 }

// newCompanion makes the companion of a series combination, with its inductor
// and capacitor pre-warped so that their reactance is exact at the frequency
// with steps steps per period.
func newCompanion(s network.Series, a, b int, dt float64, steps int) companion {
	x := math.Pi / float64(steps)
	warp := x / math.Tan(x)
	c := companion{a: a, b: b, dt: dt, ideal: s.Ideal(), turns: 1}
	r := s.R
	if s.L > 0 {
		c.twoL = 2 * s.L * warp / dt
		r += c.twoL
	}
	if s.C > 0 {
		c.invC = 1 / (s.C * warp)
		r += dt / 2 * c.invC
	}
	if !c.ideal {
		c.y = 1 / r
	}
	return c
}

// history is h, V.
func (c *companion) history(m *memory) float64 { return m.q*c.invC - c.twoL*m.i }

// advance takes the state over the step with its average current.
func (c *companion) advance(m *memory, avg float64) {
	m.i = 2*avg - m.i
	m.q += c.dt * avg
}
