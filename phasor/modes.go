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
// with w and v the left and right eigenvectors, tells about where it is, with
// the time that waves spend in lines and lumped parts alike. Where hardly
// anything comes back from a line, as behind a matched source, what rings are
// the lumped parts: see lumpedModes. The slowest of both are followed to where
// they are: see natural.
func Decay(net *network.Network) float64 {
	check(net)
	if len(net.Sections) > modesLimit {
		return math.NaN()
	}
	s0 := complex(0, net.Omega())
	steps, ok := lineModes(roundTrip(net, s0), derivative(net, s0, roundTrip), delays(net))
	if !ok {
		return math.NaN()
	}
	steps = append(polished(net, s0, steps), polished(net, s0, lumpedModes(net, s0))...)
	return slowest(steps, band*net.Omega())
}

// band is how far from the source frequency, as a part of it, a mode may ring
// for it to count: what rings further off hardly shows in a phasor. If none is
// so near, the nearest count.
const band = 0.5

// slowest is the least decay rate of the modes that lie so far from s0, of those
// that ring within a distance of it, rad/s.
func slowest(steps []complex128, within float64) float64 {
	rate, nearest := math.Inf(1), math.Inf(1)
	for _, d := range steps {
		nearest = math.Min(nearest, math.Abs(imag(d)))
	}
	const equal = 1 + 1e-6
	within = math.Max(within, equal*nearest)
	for _, d := range steps {
		if r := -real(d); r >= 0 && r < rate && math.Abs(imag(d)) <= within {
			rate = r
		}
	}
	return rate
}

// derivative is that of a matrix by s: a central difference, whose error is
// 1e-10 of it and whose rounding 1e-11.
func derivative(net *network.Network, s complex128, of func(*network.Network, complex128) [][]complex128) [][]complex128 {
	h := complex(0, 1e-5*net.Omega())
	d, back := of(net, s+h), of(net, s-h)
	for i := range d {
		for j := range d[i] {
			d[i][j] = (d[i][j] - back[i][j]) / (2 * h)
		}
	}
	return d
}

// modesLimit bounds the eigenvalue problem of Decay.
const modesLimit = 64

// faint is the eigenvalue below which a mode dies within one passage.
const faint = 1e-6

// lineModes are how far from s0 the modes of m, whose derivative is dm, are by
// one step; false if the eigenvalues are not found. delays are those of the
// waves, s.
func lineModes(m, dm [][]complex128, delays []float64) (steps []complex128, ok bool) {
	all, ok := pairs(m)
	for _, p := range all {
		if cmplx.Abs(p.value) < faint {
			continue // dead
		}
		var num, den complex128
		var norm, left, delay float64
		for i := range p.right {
			den += cmplx.Conj(p.left[i]) * p.right[i]
			for j := range p.right {
				num += cmplx.Conj(p.left[i]) * dm[i][j] * p.right[j]
			}
			size := real(p.right[i] * cmplx.Conj(p.right[i]))
			norm, left, delay = norm+size, left+real(p.left[i]*cmplx.Conj(p.left[i])), delay+size*delays[i]
		}
		step := -cmplx.Log(p.value) * p.value * den / num
		if cmplx.Abs(den) < defective*math.Sqrt(norm*left) {
			step = cmplx.Log(p.value) * complex(norm/delay, 0)
		}
		steps = append(steps, step)
	}
	return steps, ok
}

// defective is the cosine between the eigenvectors of one eigenvalue below which
// it is as good as a double one that has one vector only, as in a ring of equal
// parts. Such a value has no derivative: the delay of its waves stands for it.
const defective = 0.01

// delays are those of the waves of a round trip, in their order.
func delays(net *network.Network) (out []float64) {
	for _, s := range net.Sections {
		out = append(out, s.Delay(), s.Delay())
	}
	return out
}

// roundTrip is M(s): row and column 2k stand for the wave that leaves the
// From end of section k, 2k+1 for the one that leaves its To end.
func roundTrip(net *network.Network, s complex128) [][]complex128 {
	a := endless(net, s)
	ends := 2 * len(net.Sections)
	rhs := make([][]complex128, len(a)) // one column an arriving wave
	for i := range rhs {
		rhs[i] = make([]complex128, ends)
	}
	decay := make([]complex128, len(net.Sections))
	for k, sec := range net.Sections {
		var y0 complex128
		y0, decay[k] = passage(sec, s)
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

// passage is the characteristic admittance of a section, S, and what is left of
// a wave at its other end.
func passage(sec network.Section, s complex128) (y0, decay complex128) {
	z, y := lineAt(sec, s)
	g := cmplx.Sqrt(z) * cmplx.Sqrt(y)
	return cmplx.Sqrt(y) / cmplx.Sqrt(z), cmplx.Exp(-g * complex(sec.Length, 0))
}

// endless is the nodal matrix of the network with sections from whose other ends
// nothing comes back.
func endless(net *network.Network, s complex128) [][]complex128 {
	n := len(net.Junctions) + len(net.Branches) + 1
	a := make([][]complex128, n)
	for i := range a {
		a[i] = make([]complex128, n)
	}
	stampBranches(net, s, a)
	for _, sec := range net.Sections {
		y0, _ := passage(sec, s)
		a[sec.From][sec.From] += y0
		a[sec.To][sec.To] += y0
	}
	return a
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
