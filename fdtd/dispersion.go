package fdtd

import (
	"math"
	"math/cmplx"

	"linewitness/sim/network"
)

// Numerical is how a sinusoidal wave travels on the grid of one section.
type Numerical struct {
	// Exponent is k n, the propagation exponent over the section, with
	//
	//	4 sinh^2(k/2) = dx^2 Zd Yd
	//	Zd = (R + s L + sum r s/(s+x)) cos x,  s = j (2/dt) tan x,  x = w dt/2
	//
	// and Yd likewise; the sums are the rational forms of a dispersion.
	// Without loss k = j k' dx, sin(k' dx/2) = sin(x)/S.
	Exponent complex128
	// Impedance is sqrt(Zd/Yd), the ratio of V to I in a wave, half a cell
	// and half a step put right.
	Impedance complex128
	// EndImpedance is the characteristic impedance that a junction sees,
	// Impedance cos(x)/cosh(k/2): its half cell turns with the rest.
	EndImpedance complex128
}

// Numerical gives the wave on the grid of section k.
//
// Source: the dispersion relation of the leapfrog scheme, for example
// A. Taflove, Computational Electrodynamics, chapter 4 (from memory), with the
// semi-implicit loss, the rational forms by the trapezoidal rule and the half
// end cell put in.
func (g Grid) Numerical(net *network.Network, k int) Numerical {
	zd, yd := g.cell(net, k)
	half := cmplx.Asinh(cmplx.Sqrt(zd) * cmplx.Sqrt(yd) / 2)
	zc := cmplx.Sqrt(zd) / cmplx.Sqrt(yd)
	cos := math.Cos(math.Pi / float64(g.StepsPerPeriod))
	return Numerical{
		Exponent:     2 * half * complex(float64(g.Cells[k]), 0),
		Impedance:    zc,
		EndImpedance: zc * complex(cos, 0) / cmplx.Cosh(half),
	}
}

// cell is dx Zd, ohm, and dx Yd, S, of section k.
func (g Grid) cell(net *network.Network, k int) (zd, yd complex128) {
	s := net.Sections[k]
	dx := s.Length / float64(g.Cells[k])
	sin, cos := math.Sincos(math.Pi / float64(g.StepsPerPeriod))
	// L and C as the scheme uses them: a Courant number set to 1 sets v.
	// dx 2L/dt = 2 z0/S and dx 2C/dt = 2/(z0 S).
	z0 := math.Sqrt(s.Line.L / s.Line.C)
	zd = complex(s.Line.R*dx*cos, 2*z0/g.Courant[k]*sin)
	yd = complex(s.Line.G*dx*cos, 2/(z0*g.Courant[k])*sin)
	if !s.Dispersion.None() {
		stepped := complex(0, 2/g.Step*sin/cos)
		part := complex(dx*cos, 0)
		zd += part * skinForm(s.Dispersion.Skin, net.Omega()).at(stepped)
		yd += part * debyeForm(s.Dispersion, net.Omega()).at(stepped)
	}
	return zd, yd
}
