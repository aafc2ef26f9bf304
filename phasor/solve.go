package phasor

import (
	"errors"
	"fmt"
	"math"

	"gonum.org/v1/gonum/mat"

	"linewitness/sim/network"
)

// ErrSingular says that the network has no steady state at its frequency, or
// none that double precision can find: a lossless part of it resonates, so
// that its amplitude would grow for ever.
var ErrSingular = errors.New("the network resonates without loss at the source frequency: it has no steady state; give the resonant part its loss")

// maxCondition is the condition number above which the solution would have
// fewer than about three figures.
const maxCondition = 1e13

// Solve finds the steady state of a network.
//
// Solve returns ErrSingular for a network that resonates without loss. It
// panics if the network names a junction that it does not have.
func Solve(net *network.Network) (*Solution, error) {
	check(net)
	s := newSystem(net)
	var lu mat.LU
	lu.Factorize(s.a)
	if c := lu.Cond(); !(c < maxCondition) {
		return nil, ErrSingular
	}
	x, err := s.refine(&lu)
	if err != nil {
		return nil, err
	}
	return s.solution(x), nil
}

// refine solves the system and improves the solution once by its residual.
func (s *system) refine(lu *mat.LU) ([]complex128, error) {
	rhs := mat.NewVecDense(2*s.n, nil)
	for i, v := range s.b {
		rhs.SetVec(i, real(v))
		rhs.SetVec(i+s.n, imag(v))
	}
	var x, r, d mat.VecDense
	if err := lu.SolveVecTo(&x, false, rhs); err != nil {
		return nil, fmt.Errorf("phasor: %w", err)
	}
	r.MulVec(s.a, &x)
	r.SubVec(rhs, &r)
	if err := lu.SolveVecTo(&d, false, &r); err != nil {
		return nil, fmt.Errorf("phasor: %w", err)
	}
	x.AddVec(&x, &d)
	out := make([]complex128, s.n)
	for i := range out {
		out[i] = complex(x.AtVec(i), x.AtVec(i+s.n))
		if math.IsNaN(real(out[i])) || math.IsNaN(imag(out[i])) {
			return nil, ErrSingular
		}
	}
	return out, nil
}

func (s *system) solution(x []complex128) *Solution {
	sol := &Solution{
		junctions: x[:len(s.net.Junctions)],
		waves:     s.waves,
	}
	for k := range s.waves {
		sol.waves[k].forward = x[s.forward(k)]
		sol.waves[k].backward = x[s.backward(k)]
	}
	amp := complex(1/s.scale, 0)
	for b := range s.net.Branches {
		sol.branches = append(sol.branches, x[s.branch(b)]*amp)
	}
	sol.source = x[s.sourceCurrent()] * amp
	return sol
}

// check panics on a network that could not have come from a design.
func check(net *network.Network) {
	ok := func(j int) bool { return j >= 0 && j < len(net.Junctions) }
	good := ok(net.Source.At) && net.Frequency > 0
	for _, s := range net.Sections {
		good = good && ok(s.From) && ok(s.To) && s.Length > 0
	}
	for _, b := range net.Branches {
		good = good && ok(b.A) && (b.B == network.Ground || ok(b.B))
	}
	if !good {
		panic("phasor: network names a junction it does not have, or has no length or frequency")
	}
}
