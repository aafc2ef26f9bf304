package fdtd

import (
	"math"
	"math/cmplx"

	"linewitness/sim/line"
)

// A rational is the form in which a line's dependence on frequency is stepped
// in time, a sum of first-order sections
//
//	sum of r[k] s/(s + x[k])
//
// each passive: a resistor beside an inductor in the series impedance, a
// resistor and a capacitor one after the other in the shunt admittance. No
// approximation of its own loss can make it active.
type rational struct {
	x []float64 // rad/s
	r []float64 // ohm/m or S/m
}

// at is the value at s.
func (f rational) at(s complex128) complex128 {
	sum := complex128(0)
	for k, x := range f.x {
		sum += complex(f.r[k], 0) * s / (s + complex(x, 0))
	}
	return sum
}

// The poles: two a decade, from poleSpan decades below the source frequency to
// as many above. Beyond them one section at each end stands for all the rest.
const (
	polesPerDecade = 2
	poleSpan       = 1.5 // decades
)

// poleStep is the distance of two poles in ln x.
const poleStep = math.Ln10 / polesPerDecade

// innerPoles are the poles without the two of the ends.
func innerPoles(omega float64) []float64 {
	n := int(2*poleSpan*polesPerDecade) + 1
	x := make([]float64, n)
	for k := range x {
		x[k] = omega * math.Exp(poleStep*(float64(k)-float64(n-1)/2))
	}
	return x
}

// skinForm approximates K sqrt(s) by the trapezoidal rule, in ln x, on
//
//	sqrt(s) = (1/pi) integral of s/(sqrt(x) (s+x)) dx from 0 to infinity
//
// whose error is 2 e^{-pi^2/D}, 0.04 % at two poles a decade (D = ln 10/2).
// The poles left out at each end are geometric series; one section matches
// each in the first two orders of x/s and of s/x, so that the form is zero at
// zero frequency as K sqrt(s) is.
//
// Source: the rule itself; derived and checked against K sqrt(s) in the tests.
func skinForm(k, omega float64) rational {
	if k == 0 {
		return rational{}
	}
	x := innerPoles(omega)
	c := k * poleStep / math.Pi // r = c sqrt(x)
	f := rational{}
	// Low end: r -> sum of r, x -> sum of r x over it (c left out till the end).
	q := math.Exp(-poleStep / 2)
	series := func(q float64) float64 { return q / (1 - q) }
	x0, xn := x[0], x[len(x)-1]
	r0, rx0 := math.Sqrt(x0)*series(q), math.Pow(x0, 1.5)*series(q*q*q)
	f.add(rx0/r0, c*r0)
	for _, p := range x {
		f.add(p, c*math.Sqrt(p))
	}
	// High end: l = r/x -> sum of l, 1/x -> sum of l/x over it.
	ln, lxn := series(q)/math.Sqrt(xn), math.Pow(xn, -1.5)*series(q*q*q)
	f.add(ln/lxn, c*ln*ln/lxn)
	return f
}

// debyeForm approximates s D ln[(w2+s)/(w1+s)]/ln(w2/w1), which is the integral
//
//	(D/ln(w2/w1)) integral of s x/(s+x) d(ln x) from w1 to w2
//
// by the midpoint rule over the poles and one section for what is left at each
// end, matched likewise.
func debyeForm(d line.Dispersion, omega float64) rational {
	f := rational{}
	if d.Delta == 0 {
		return f
	}
	c := d.Delta / math.Log(d.W2/d.W1)
	x := innerPoles(omega)
	half := math.Exp(poleStep / 2)
	lo := clamp(x[0]/half, d.W1, d.W2)
	hi := clamp(x[len(x)-1]*half, d.W1, d.W2)
	if lo > d.W1 { // the integrals of x and of x^2 over d(ln x)
		m1, m2 := lo-d.W1, (lo*lo-d.W1*d.W1)/2
		f.add(m2/m1, c*m1)
	}
	for _, p := range x {
		a, b := clamp(p/half, d.W1, d.W2), clamp(p*half, d.W1, d.W2)
		if b > a {
			f.add(p, c*p*math.Log(b/a))
		}
	}
	if hi < d.W2 { // of 1 and of 1/x
		m0, m1 := math.Log(d.W2/hi), 1/hi-1/d.W2
		f.add(m0/m1, c*m0*m0/m1)
	}
	return f
}

func (f *rational) add(x, r float64) { f.x, f.r = append(f.x, x), append(f.r, r) }

func clamp(x, lo, hi float64) float64 { return math.Min(math.Max(x, lo), hi) }

// FormResidual is how far the rational form of a dispersion is from it, at
// worst over the band from a tenth to ten times the angular frequency omega,
// relative to it: of the series impedance K sqrt(s) and of the shunt
// admittance. It is zero for what is not there.
func FormResidual(d line.Dispersion, omega float64) (series, shunt float64) {
	skin, debye := skinForm(d.Skin, omega), debyeForm(d, omega)
	for i := range 41 {
		s := complex(0, omega*math.Pow(10, float64(i-20)/20))
		if d.Skin != 0 {
			series = math.Max(series, cmplx.Abs(skin.at(s)/d.Series(s)-1))
		}
		if d.Delta != 0 {
			shunt = math.Max(shunt, cmplx.Abs(debye.at(s)/d.Shunt(s)-1))
		}
	}
	return series, shunt
}
