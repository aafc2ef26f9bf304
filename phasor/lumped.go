package phasor

import (
	"cmp"
	"math/cmplx"
	"slices"

	"linewitness/sim/network"
)

// lumpedModes are how far from s0 = jw the modes are in which lumped parts ring,
// by one step in the network with endless sections: with its nodal matrix A,
//
//	A(s0) v = -d A'(s0) v
//
// Those far away are left out: one step does not tell of them.
func lumpedModes(net *network.Network, s0 complex128) (steps []complex128) {
	if !rings(net) {
		return nil
	}
	all, _ := pairs(solveComplex(endless(net, s0), derivative(net, s0, endless)))
	for _, p := range all {
		if d := -1 / p.value; cmplx.Abs(d) < nearby*cmplx.Abs(s0) {
			steps = append(steps, d)
		}
	}
	return steps
}

// nearby is how far from the source frequency a mode may lie, as a part of it,
// to be looked for.
const nearby = 0.3

// mostModes is how many modes are followed, the slowest, in a network of no more
// than followLimit sections: a step of a large one takes a tenth of a second.
const (
	mostModes   = 3
	followLimit = 32
)

// polished are the modes by one step, slowest first, the slowest of those nearby
// where they are.
func polished(net *network.Network, s0 complex128, steps []complex128) []complex128 {
	slices.SortFunc(steps, func(a, b complex128) int { return cmp.Compare(-real(a), -real(b)) })
	left := mostModes
	if len(net.Sections) > followLimit {
		left = 0
	}
	for i, d := range steps {
		if left == 0 {
			break
		}
		if cmplx.Abs(d) > nearby*cmplx.Abs(s0) {
			continue
		}
		left--
		if s, ok := natural(net, s0, d); ok {
			steps[i] = s - s0
		}
	}
	return steps
}

// rings reports whether the network has lumped parts that store energy.
func rings(net *network.Network) bool {
	stores := func(s network.Series) bool { return s.L > 0 || s.C > 0 }
	return stores(net.Source.Series) || slices.ContainsFunc(net.Branches, func(b network.Branch) bool {
		return !b.Open && stores(b.Series)
	})
}

// natural finds a mode of the network near s0 + d by Newton's method on
// det A det(1 - M), which has no poles: where A is singular M is not finite. With
//
//	d ln det A/ds = tr(A^-1 A')
//
// a step is -1/(tr(A^-1 A') - tr((1 - M)^-1 M')).
func natural(net *network.Network, s0, d complex128) (complex128, bool) {
	const rounds, settled = 12, 1e-8
	s := s0 + d
	for range rounds {
		m := roundTrip(net, s)
		for i := range m {
			for j := range m[i] {
				m[i][j] = -m[i][j]
			}
			m[i][i]++
		}
		slope := trace(solveComplex(endless(net, s), derivative(net, s, endless))) -
			trace(solveComplex(m, derivative(net, s, roundTrip)))
		step := -1 / slope
		s += step
		switch {
		case cmplx.IsNaN(s), cmplx.Abs(s-s0) > 2*nearby*cmplx.Abs(s0):
			return 0, false
		case cmplx.Abs(step) < settled*cmplx.Abs(s0):
			return s, true
		}
	}
	return 0, false
}

func trace(m [][]complex128) complex128 {
	sum := complex128(0)
	for i := range m {
		sum += m[i][i]
	}
	return sum
}
