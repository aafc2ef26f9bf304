package phasor

import (
	"math"
	"math/cmplx"

	"gonum.org/v1/gonum/mat"

	"linewitness/sim/network"
)

// Decay predicts how slowly the network comes to steady state: the rate, 1/s,
// of its slowest natural mode near the source frequency. An amplitude falls
// as e^{-Decay t}; the result is 0 for a mode that does not decay, and +Inf
// for a network without echoes. It is NaN, not predicted, for a network of
// more than modesLimit sections.
//
// A wave that leaves a junction comes back, once through its section and once
// scattered, as M(s) times itself, M(s) = S(s) diag(e^{-g(s) l}). A natural
// mode is an s with an eigenvalue m(s) = 1; from s = jw one Newton step in
// ln m,
//
//	s - jw = -ln m / (d ln m/ds),   dm/ds = w^H (dM/ds) v / (w^H v)
//
// with w and v the left and right eigenvectors, gives it with the time that
// waves spend in lines and lumped parts alike.
func Decay(net *network.Network) float64 {
	check(net)
	if len(net.Sections) > modesLimit {
		return math.NaN()
	}
	s0 := complex(0, net.Omega())
	h := 1e-5 * s0 // central difference: error 1e-10 relative, rounding 1e-11
	m := roundTrip(net, s0)
	dm := roundTrip(net, s0+h)
	back := roundTrip(net, s0-h)
	for i := range dm {
		for j := range dm {
			dm[i][j] = (dm[i][j] - back[i][j]) / (2 * h)
		}
	}
	return slowest(m, dm)
}

// modesLimit bounds the eigenvalue problem of Decay.
const modesLimit = 64

// faint is the eigenvalue below which a mode dies within one passage.
const faint = 1e-6

// offset is added to the diagonal before the eigenvalues are found, and taken
// off them again. A round trip of one resonant line has the eigenvalues +a and
// -a, real to rounding: then those of M and of its conjugate are the same, and
// the QR iteration may stand still between values of one size.
const offset = 0.37 + 0.59i

// slowest is the least decay rate of the modes of m, whose derivative is dm; NaN
// if the eigenvalues are not found.
func slowest(m, dm [][]complex128) (rate float64) {
	// The library panics, instead of failing, where its iteration for small
	// matrices does not converge (gonum v0.17, Dhseqr on Dlaqr04).
	defer func() {
		if recover() != nil {
			rate = math.NaN()
		}
	}()
	n := len(m)
	real2 := mat.NewDense(2*n, 2*n, nil)
	for i := range m {
		for j, v := range m[i] {
			real2.Set(i, j, real(v))
			real2.Set(i+n, j+n, real(v))
			real2.Set(i, j+n, -imag(v))
			real2.Set(i+n, j, imag(v))
		}
		for _, at := range []int{i, i + n} {
			real2.Set(at, at, real2.At(at, at)+real(offset))
		}
		real2.Set(i, i+n, real2.At(i, i+n)-imag(offset))
		real2.Set(i+n, i, real2.At(i+n, i)+imag(offset))
	}
	var eig mat.Eigen
	if !eig.Factorize(real2, mat.EigenBoth) {
		return math.NaN()
	}
	var right, left mat.CDense
	eig.VectorsTo(&right)
	eig.LeftVectorsTo(&left)
	rate = math.Inf(1)
	for k, lambda := range eig.Values(nil) {
		lambda -= offset
		v, size := project(&right, k, n)
		w, _ := project(&left, k, n)
		if cmplx.Abs(lambda) < faint || size < 1e-6 {
			continue // dead, or an eigenvector of the conjugate half of the real form
		}
		var num, den complex128
		for i := range v {
			den += cmplx.Conj(w[i]) * v[i]
			for j := range v {
				num += cmplx.Conj(w[i]) * dm[i][j] * v[j]
			}
		}
		slope := num / den / lambda // d ln m/ds
		if r := real(cmplx.Log(lambda) / slope); r >= 0 && r < rate {
			rate = r
		}
	}
	return rate
}

// project takes the part of eigenvector k of the real form [a; b] that
// belongs to M itself, (a + jb)/2, and its norm.
func project(vectors *mat.CDense, k, n int) (v []complex128, size float64) {
	for i := range n {
		x := (vectors.At(i, k) + 1i*vectors.At(i+n, k)) / 2
		v = append(v, x)
		size += real(x)*real(x) + imag(x)*imag(x)
	}
	return v, math.Sqrt(size)
}

// roundTrip is M(s): row and column 2k stand for the wave that leaves the
// From end of section k, 2k+1 for the one that leaves its To end.
func roundTrip(net *network.Network, s complex128) [][]complex128 {
	n := len(net.Junctions) + len(net.Branches) + 1
	a := make([][]complex128, n)
	for i := range a {
		a[i] = make([]complex128, n)
	}
	stampBranches(net, s, a)
	ends := 2 * len(net.Sections)
	rhs := make([][]complex128, n) // one column an arriving wave
	for i := range rhs {
		rhs[i] = make([]complex128, ends)
	}
	decay := make([]complex128, len(net.Sections))
	for k, sec := range net.Sections {
		z, y := lineAt(sec, s)
		g := cmplx.Sqrt(z) * cmplx.Sqrt(y)
		y0 := cmplx.Sqrt(y) / cmplx.Sqrt(z)
		decay[k] = cmplx.Exp(-g * complex(sec.Length, 0))
		a[sec.From][sec.From] += y0
		a[sec.To][sec.To] += y0
		// V = arriving + leaving, so the line brings 2 y0 times the arriving
		// wave. Column 2k is the wave from the From end, at the To end now.
		rhs[sec.To][2*k] += 2 * y0 * decay[k]
		rhs[sec.From][2*k+1] += 2 * y0 * decay[k]
	}
	v := solveComplex(a, rhs)
	m := make([][]complex128, ends)
	for k, sec := range net.Sections {
		m[2*k] = append([]complex128(nil), v[sec.From]...)
		m[2*k+1] = append([]complex128(nil), v[sec.To]...)
		m[2*k][2*k+1] -= decay[k] // leaving = V - arriving
		m[2*k+1][2*k] -= decay[k]
	}
	return m
}

// stampBranches enters the lumped branches and the dead source into the nodal
// matrix, each with its current as an unknown.
func stampBranches(net *network.Network, s complex128, a [][]complex128) {
	row := len(net.Junctions)
	enter := func(from, to int, turns float64, part network.Series, open bool) {
		if open {
			a[row][row] = 1
			row++
			return
		}
		z := complex(part.R, 0) + s*complex(part.L, 0)
		if part.C > 0 {
			z += 1 / (s * complex(part.C, 0))
		}
		a[from][row], a[row][from] = complex(turns, 0), complex(turns, 0)
		if to != network.Ground {
			a[to][row], a[row][to] = -1, -1
		}
		a[row][row] = -z
		row++
	}
	for _, b := range net.Branches {
		enter(b.A, b.B, b.Turns(), b.Series, b.Open)
	}
	enter(net.Source.At, network.Ground, 1, net.Source.Series, false)
}

// solveComplex solves a x = b for every column of b through the real form. A
// singular a gives large numbers, and so a decay of no meaning; Solve will
// have refused such a network.
func solveComplex(a, b [][]complex128) [][]complex128 {
	n, cols := len(a), len(b[0])
	ra, rb := mat.NewDense(2*n, 2*n, nil), mat.NewDense(2*n, cols, nil)
	for i := range n {
		for j, v := range a[i] {
			ra.Set(i, j, real(v))
			ra.Set(i+n, j+n, real(v))
			ra.Set(i, j+n, -imag(v))
			ra.Set(i+n, j, imag(v))
		}
		for j, v := range b[i] {
			rb.Set(i, j, real(v))
			rb.Set(i+n, j, imag(v))
		}
	}
	var x mat.Dense
	var lu mat.LU
	lu.Factorize(ra)
	if err := lu.SolveTo(&x, false, rb); err != nil && x.IsEmpty() {
		x = *mat.NewDense(2*n, cols, nil)
	}
	out := make([][]complex128, n)
	for i := range out {
		for j := range cols {
			out[i] = append(out[i], complex(x.At(i, j), x.At(i+n, j)))
		}
	}
	return out
}
