package sim

import (
	"math"
	"math/cmplx"

	"linewitness/sim/network"
)

// gridAllowance is what the balance of the time-domain run may be off by, W.
//
// The grid's own error is not in it. In a steady state of the scheme the sums
// over the cells and the power at the ends balance exactly, whatever the wave
// on the grid does (see fdtd.Grid.Loss). What is left is
//
//   - what the settling run leaves of every phasor, see residual;
//   - the difference of the resistance and conductance that a dispersive line
//     has in its rational form from those of its law, by which the audit goes;
//   - rounding.
func (s *solved) gridAllowance(a *auditor) float64 {
	r := s.residual(a)
	sum := r.source() + gridRounding*a.flow
	for b := range s.net.Branches {
		sum += r.branch(b)
	}
	for k, sec := range s.net.Sections {
		at := sec.At(s.net.Omega())
		series, shunt := s.steady.Grid.Loss(s.net, k)
		v2, i2 := a.squares[k][0], a.squares[k][1]
		sum += (math.Abs(series-at.R)*i2 + math.Abs(shunt-at.G)*v2) / 2
		sum += r.section(k, at.R, at.G)
	}
	return sum
}

// gridRounding is what some 1e5 steps leave in a balance, relative to all power
// that flows to and fro.
const gridRounding = 1e-11

// A residual is how far the phasors of a settling run may be from the steady
// state of the grid. Its mean and its harmonics count with it: what dies away
// within a window is in all of them, and a slow one can hide in the fundamental
// behind faster ones, by whose ratio the remaining error is told.
type residual struct {
	*auditor
	part     float64 // of a phasor, relative to the largest of its kind on the section
	impure   float64 // square of what a mean and harmonics add to a square, relative likewise
	branches float64 // largest error of a branch current, A
}

func (s *solved) residual(a *auditor) *residual {
	g := s.steady.Settling
	r := &residual{
		auditor: a,
		part:    residualSlack*g.Residual + g.Mean + g.Harmonic,
		impure:  2*g.Mean*g.Mean + 2*g.Harmonic*g.Harmonic,
	}
	top := cmplx.Abs(a.st.source)
	for _, i := range a.st.branches {
		top = math.Max(top, cmplx.Abs(i))
	}
	r.branches = r.part * top
	return r
}

// junction is how far the voltage of junction j may be off: by the residual of
// any section that ends there, or, where none does, of all junctions.
func (r *residual) junction(j int) float64 {
	if j == network.Ground {
		return 0
	}
	top := 0.0
	for _, v := range r.st.junctions {
		top = math.Max(top, cmplx.Abs(v))
	}
	for k, sec := range r.net.Sections {
		if sec.From == j || sec.To == j {
			top = math.Min(top, r.st.voltage[k].largest.value)
		}
	}
	return r.part * top
}

// current is how far the current of a series part may be off: by the residual
// of all branches, or by what its voltage is off over its impedance.
func (r *residual) current(part network.Series, voltage float64) float64 {
	if part.Ideal() {
		return r.branches
	}
	return math.Min(r.branches, voltage/cmplx.Abs(part.Impedance(r.net.Omega())))
}

// source is the error of Re(V I*)/2 at the source, W.
func (r *residual) source() float64 {
	src := r.net.Source
	dv := r.junction(src.At)
	di := r.current(src.Series, dv)
	v, i := cmplx.Abs(r.st.junctions[src.At]), cmplx.Abs(r.st.source)
	return (v*di + i*dv + dv*di) / 2
}

// branch is the error of R|I|^2/2 of branch b, W.
func (r *residual) branch(b int) float64 {
	br := r.net.Branches[b]
	if br.R == 0 {
		return 0
	}
	di := r.current(br.Series, r.junction(br.A)+r.junction(br.B))
	return br.R * (2*cmplx.Abs(r.st.branches[b])*di + di*di) / 2
}

// section is the error of (R i2 + G v2)/2 of section k, W. By the inequality of
// Cauchy and Schwarz the integral of |I| is at most sqrt(l i2).
func (r *residual) section(k int, series, shunt float64) float64 {
	l := r.net.Sections[k].Length
	off := func(square, largest float64) float64 {
		d := r.part * largest
		return 2*d*math.Sqrt(l*square) + l*(d*d+r.impure*largest*largest)
	}
	v, i := r.st.voltage[k].largest.value, r.st.current[k].largest.value
	return (series*off(r.squares[k][1], i) + shunt*off(r.squares[k][0], v)) / 2
}
