package fdtd

import (
	"context"
	"math"
	"math/cmplx"
	"testing"

	"linewitness/sim/line"
	"linewitness/sim/network"
)

// The numerical phase velocity of the leapfrog scheme without loss, with N
// cells per wavelength and Courant number S:
//
//	v'/v = (pi/N)/asin(sin(pi S/N)/S)
//
// Formula from memory (A. Taflove, Computational Electrodynamics); the values
// were computed apart from this program. Textbooks quote -1.27 % at N = 10 and
// -0.31 % at N = 20 for S = 0.5.
var phaseVelocities = []struct{ n, s, ratio float64 }{
	{10, 0.5, 0.9872637},
	{20, 0.5, 0.9968917},
	{40, 0.5, 0.9992274},
	{10, 0.9, 0.9967531},
	{20, 0.9, 0.9992113},
	{40, 0.9, 0.9998042},
	{10, 1, 1},
	{20, 1, 1},
	{40, 1, 1},
}

// The same as a phase error in degrees per wavelength, from the requirements
// study, where it was computed with another program; digits as given.
var phaseErrors = []struct{ n, s, deg, half float64 }{
	{10, 0.99, 0.123, 5e-4},
	{20, 0.99, 0.0298, 5e-5},
	{40, 0.99, 0.0074, 5e-5},
	{80, 0.99, 0.0018, 5e-5},
	{10, 0.9, 1.173, 5e-4},
	{20, 0.9, 0.284, 5e-4},
	{40, 0.9, 0.0705, 5e-5},
	{80, 0.9, 0.0176, 5e-5},
	{10, 0.5, 4.644, 5e-4},
	{20, 0.5, 1.123, 5e-4},
	{40, 0.5, 0.278, 5e-4},
	{80, 0.5, 0.0694, 5e-5},
}

// velocityHalf is half of the last digit of phaseVelocities.
const velocityHalf = 5.1e-8

// waveTol is the tolerance of a measured phase per cell, rad. What the rise
// of the source leaves behind by the time of the measurement is less.
const waveTol = 1e-8

// measuredPhase is the phase from cell to cell, rad, of a sinusoid that runs
// on a line, for any N and S, whole number of steps per period or not. Two
// lanes take the cosine and the sine, so that V = vc + j vs is the phasor of
// the moment; of any two opposite waves V[i-1] + V[i+1] = 2 cos(k dx) V[i].
func measuredPhase(t *testing.T, n, s float64) float64 {
	const z0, cells = 50, 40
	net := &network.Network{
		Frequency: 1, Junctions: []string{"source", "load"},
		Sections: []network.Section{{From: 0, To: 1, Length: 1, Line: line.Constants{L: z0, C: 1 / z0}}},
		Branches: []network.Branch{{A: 1, B: network.Ground, Series: network.Series{R: z0}}},
		Source:   network.Source{EMF: 1, Series: network.Series{R: z0}},
	}
	g := Grid{StepsPerPeriod: 100, Step: s / cells, Cells: []int{cells}, Courant: []float64{s}}
	cos, sin := newBench(t, net, g), newBench(t, net, g)
	turn := 2 * math.Pi * s / n / g.Step // rad/s: N cells a wavelength
	rise := 60 * n / s * g.Step          // 60 periods
	for range int(90 * n / s) {
		cos.advance(func(t float64) float64 { return gentle.at(math.Min(1, t/rise)) * math.Cos(turn*t) })
		sin.advance(func(t float64) float64 { return gentle.at(math.Min(1, t/rise)) * math.Sin(turn*t) })
	}
	at := func(i int) complex128 { return complex(cos.v[0][i], sin.v[0][i]) }
	sum := 0.0
	for i := 1; i < cells; i++ {
		sum += real((at(i-1) + at(i+1)) / at(i))
	}
	return math.Acos(sum / (cells - 1) / 2)
}

func TestOutsidePhaseVelocityMeasured(t *testing.T) {
	for _, p := range phaseVelocities {
		phase := measuredPhase(t, p.n, p.s)
		if got := 2 * math.Pi / p.n / phase; math.Abs(got-p.ratio) > velocityHalf+waveTol*p.n {
			t.Errorf("N %g, S %g: measured v'/v = %.9f, want %.7f", p.n, p.s, got, p.ratio)
		}
	}
	for _, p := range phaseErrors {
		if got := (measuredPhase(t, p.n, p.s)*p.n/(2*math.Pi) - 1) * 360; math.Abs(got-p.deg) > p.half {
			t.Errorf("N %g, S %g: measured %.5f deg per wavelength too many, want %g", p.n, p.s, got, p.deg)
		}
	}
}

// gridOfWave is a line of some wavelengths with n cells per wavelength and
// Courant number s; n/s must be whole.
func gridOfWave(n, s, wavelengths float64) (*network.Network, Grid) {
	const z0, v, f = 50, 2e8, 1e8
	net := &network.Network{
		Frequency: f, Junctions: []string{"source", "load"},
		Sections: []network.Section{{From: 0, To: 1, Length: wavelengths * v / f, Line: line.Constants{L: z0 / v, C: 1 / (z0 * v)}}},
		Branches: []network.Branch{{A: 1, B: network.Ground, Series: network.Series{R: 20}}},
		Source:   network.Source{EMF: 1, Series: network.Series{R: 30}},
	}
	steps := int(math.Round(n / s))
	return net, Grid{
		StepsPerPeriod: steps, Step: net.Period() / float64(steps),
		Cells: []int{int(math.Round(n * wavelengths))}, Courant: []float64{s},
	}
}

// TestOutsidePhaseVelocityOfGrid checks what the grid says of itself, where it
// has a whole number of steps, against the same values.
func TestOutsidePhaseVelocityOfGrid(t *testing.T) {
	checked := 0
	for _, p := range phaseVelocities {
		if math.Abs(p.n/p.s-math.Round(p.n/p.s)) > 1e-9 {
			continue
		}
		checked++
		net, g := gridOfWave(p.n, p.s, 2)
		e := g.Numerical(net, 0).Exponent
		if got := 4 * math.Pi / imag(e); math.Abs(got-p.ratio) > velocityHalf {
			t.Errorf("N %g, S %g: v'/v = %.9f, want %.7f", p.n, p.s, got, p.ratio)
		}
		if real(e) != 0 && math.Abs(real(e)) > 1e-12 {
			t.Errorf("N %g, S %g: attenuation %g on a lossless line", p.n, p.s, real(e))
		}
	}
	if checked < 6 {
		t.Errorf("only %d of the values could be checked", checked)
	}
}

// TestOutsideWaveOfGrid checks what the grid says of itself against the wave
// that a settling run has, with loss and at Courant numbers of all sorts: the
// exponent, and the impedances of the inside and of the ends.
func TestOutsideWaveOfGrid(t *testing.T) {
	const settled, tol = 1e-10, 1e-8
	for _, c := range []struct{ n, s, r, g float64 }{ // r, g: R/(wL), G/(wC)
		{18, 0.9, 0, 0}, {20, 0.5, 0, 0}, {20, 1, 0.3, 0}, {18, 0.9, 0.1, 0.4}, {12, 0.75, 0, 0.5}, {10, 0.5, 1, 0.02},
	} {
		net, g := gridOfWave(c.n, c.s, 1.5)
		k := &net.Sections[0].Line
		k.R, k.G = c.r*net.Omega()*k.L, c.g*net.Omega()*k.C
		st, err := Settle(context.Background(), net, g, Settings{Tolerance: settled})
		if err != nil || !st.Settling.Settled {
			t.Fatalf("settle: %v", err)
		}
		want := g.Numerical(net, 0)
		per := want.Exponent / complex(float64(g.Cells[0]), 0)
		s := st.Sections[0]
		top := largest(s.V)
		for i := 1; i < len(s.I); i++ {
			// Any two opposite waves obey these; h is half a cell.
			h := cmplx.Sinh(per / 2)
			miss := (s.V[i-1] + s.V[i+1]) - 2*cmplx.Cosh(per)*s.V[i]
			inside := (s.I[i-1] - s.I[i]) - 2*h/want.Impedance*s.V[i]
			if cmplx.Abs(miss) > tol*top || cmplx.Abs(inside)*50 > tol*top {
				t.Fatalf("%+v, cell %d: the run's wave departs by %.2g and %.2g", c, i, cmplx.Abs(miss)/top, cmplx.Abs(inside)*50/top)
			}
		}
		// The ends: V and I = (P -+ M)/Zend there give the same waves P and M.
		p, m := (s.VFrom+s.IFrom*want.EndImpedance)/2, (s.VTo-s.ITo*want.EndImpedance)/2
		e := cmplx.Exp(-want.Exponent)
		if d := cmplx.Abs(p+m*e-s.VFrom) + cmplx.Abs(p*e+m-s.VTo); d > tol*top {
			t.Errorf("%+v: the end impedance is off, by %.2g of V", c, d/top)
		}
	}
}

// TestOutsideLossOfGrid checks the attenuation on the grid against figures of
// the requirements study, computed there with another program: for little loss
// alpha'/alpha = cos(pi S/N)/cos(k' dx/2); for a telephone pair, R = 5 wL at
// N = 20 and S = 1, alpha +1.9 %, beta -2.1 % and the angle of V/I
// +0.05 deg.
func TestOutsideLossOfGrid(t *testing.T) {
	const halfPercent, halfDegree = 0.05, 0.005
	for _, c := range []struct{ n, s, r, alpha, beta, angle, half float64 }{
		{20, 1, 1e-6, 0, 0, 0, 1e-4},
		{20, 0.5, 1e-6, 0.94, 0.312, 0, 0.005}, // beta as v'/v = 0.9968917 above
		{20, 1, 5, 1.9, -2.1, 0.05, halfPercent},
	} {
		net, g := gridOfWave(c.n, c.s, 1)
		k := &net.Sections[0].Line
		k.R = c.r * net.Omega() * k.L
		exact := k.Propagation(net.Omega()) * complex(net.Sections[0].Length, 0)
		got := g.Numerical(net, 0)
		alpha := 100 * (real(got.Exponent)/real(exact) - 1)
		beta := 100 * (imag(got.Exponent)/imag(exact) - 1)
		angle := cmplx.Phase(got.Impedance/k.Impedance(net.Omega())) * 180 / math.Pi
		if math.Abs(alpha-c.alpha) > c.half || math.Abs(beta-c.beta) > c.half || math.Abs(angle-c.angle) > halfDegree {
			t.Errorf("N %g, S %g, R/wL %g: alpha %+.4f %%, beta %+.4f %%, angle %+.4f deg; want %g, %g, %g",
				c.n, c.s, c.r, alpha, beta, angle, c.alpha, c.beta, c.angle)
		}
	}
}
