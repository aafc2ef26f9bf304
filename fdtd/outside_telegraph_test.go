package fdtd

import (
	"math"
	"testing"

	"gonum.org/v1/gonum/integrate/quad"

	"linewitness/sim/line"
)

// A telegraph line is switched onto a unit step at its beginning. Until an
// echo comes back, at a place x with tau = x sqrt(LC),
//
//	v = u(t-tau) { e^{-a tau} + b tau int_tau^t e^{-a s} I1(b w)/w ds }
//	i = sqrt(C/L) u(t-tau) { e^{-a t} I0(b w(t)) + (G/C) int_tau^t e^{-a s} I0(b w) ds }
//
// with w = sqrt(s^2 - tau^2), a = (R/L + G/C)/2 and b = (R/L - G/C)/2.
//
// Source: Magnusson et al., Transmission Lines and Wave Propagation (from
// memory). The values of stepTable, which the integrals are checked against,
// were found by two other routes, one a numerical inversion of the Laplace
// transform e^{-gx}/s.
type telegraph struct {
	line.Constants
	x float64 // m
}

func (l telegraph) tau() float64 { return l.x * math.Sqrt(l.L*l.C) }
func (l telegraph) a() float64   { return (l.R/l.L + l.G/l.C) / 2 }
func (l telegraph) b() float64   { return (l.R/l.L - l.G/l.C) / 2 }

// nodes of a Gauss-Legendre rule: the integrands are even in w, and so smooth
// in s; 60 nodes leave 1e-13 of the largest here.
const nodes = 60

// voltage is v(x, t) for an ideal unit step, V.
func (l telegraph) voltage(t float64) float64 {
	tau, a, b := l.tau(), l.a(), l.b()
	if t < tau {
		return 0
	}
	f := func(s float64) float64 { return math.Exp(-a*s) * b * i1over(b*b*(s*s-tau*tau)) }
	return math.Exp(-a*tau) + b*tau*quad.Fixed(f, tau, t, nodes, nil, 0)
}

// current is i(x, t), A.
func (l telegraph) current(t float64) float64 {
	tau, a, b := l.tau(), l.a(), l.b()
	if t < tau {
		return 0
	}
	f := func(s float64) float64 { return math.Exp(-a*s) * i0(b*b*(s*s-tau*tau)) }
	return math.Sqrt(l.C/l.L) * (f(t) + l.G/l.C*quad.Fixed(f, tau, t, nodes, nil, 0))
}

// i0 is I0(y) and i1over is I1(y)/y for y^2 = q, by their power series
//
//	I0(y) = sum (q/4)^k/(k!)^2,  I1(y)/y = 1/2 sum (q/4)^k/(k! (k+1)!)
//
// whose terms are all positive. Source: M. Abramowitz and I. A. Stegun,
// Handbook of Mathematical Functions, 9.6.10 (from memory).
func i0(q float64) float64     { return powers(q, 0) }
func i1over(q float64) float64 { return powers(q, 1) / 2 }

func powers(q, n float64) float64 {
	sum, term := 1.0, 1.0
	for k := 1.0; term > 1e-17*sum; k++ {
		term *= q / 4 / (k * (k + n))
		sum += term
	}
	return sum
}

// stepLine is the line of all cases: 50 ohm and 5 ns/m.
func stepLine(r, g, x float64) telegraph {
	return telegraph{line.Constants{R: r, L: 250e-9, G: g, C: 100e-12}, x}
}

// stepTable holds v in V and i in mA at the times stepTimes tau.
var (
	stepTimes = []float64{1.0001, 1.2, 1.5, 2, 3, 5, 10}
	stepTable = []struct {
		name string
		line telegraph
		v, i []float64
	}{
		{
			"series loss, 10 m", stepLine(10, 0, 10),
			[]float64{0.36789783, 0.40209090, 0.44522114, 0.50118184, 0.57688163, 0.66169928, 0.75460592},
			[]float64{7.357221, 6.704958, 5.9699748, 5.150617, 4.2342417, 3.3544377, 2.4379606},
		},
		{
			"series loss, 2 m", stepLine(10, 0, 2),
			[]float64{0.81873239, 0.82194444, 0.82654436, 0.83366736, 0.84614019, 0.86560933, 0.89544991},
			[]float64{16.37432, 15.801857, 15.002149, 13.811619, 11.87205, 9.2322275, 6.1272057},
		},
		{
			"distortionless, 10 m", stepLine(2, 8e-4, 10),
			[]float64{0.67032005, 0.67032005, 0.67032005, 0.67032005, 0.67032005, 0.67032005, 0.67032005},
			[]float64{13.406401, 13.406401, 13.406401, 13.406401, 13.406401, 13.406401, 13.406401},
		},
		{
			"shunt loss, 10 m", stepLine(0, 2e-3, 10),
			[]float64{0.60653824, 0.62105524, 0.64066072, 0.66849167, 0.71082039, 0.76426126, 0.82741230},
			[]float64{12.131371, 13.619312, 15.755774, 19.091609, 25.089213, 35.230298, 54.823891},
		},
	}
)

// TestOutsideBesselTable checks the integrals of this file against the table,
// to half of its last digit (i has one less in
// some places).
func TestOutsideBesselTable(t *testing.T) {
	const halfV, halfI = 5.1e-9, 5.1e-7 // V, mA
	for _, c := range stepTable {
		for k, q := range stepTimes {
			at := q * c.line.tau()
			if d := c.line.voltage(at) - c.v[k]; math.Abs(d) > halfV {
				t.Errorf("%s, %g tau: v off by %.2g", c.name, q, d)
			}
			if d := 1e3*c.line.current(at) - c.i[k]; math.Abs(d) > halfI {
				t.Errorf("%s, %g tau: i off by %.2g mA", c.name, q, d)
			}
		}
	}
}
