package phasor

import (
	"math"

	"gonum.org/v1/gonum/mat"
)

// offset is added to the diagonal before the eigenvalues are found, and taken
// off them again. A round trip of one resonant line has the eigenvalues +a and
// -a, real to rounding: then those of M and of its conjugate are the same, and
// the QR iteration may stand still between values of one size.
const offset = 0.37 + 0.59i

// A pair is an eigenvalue with its right and left eigenvectors.
type pair struct {
	value       complex128
	right, left []complex128
}

// pairs are the eigenvalues of m; false if they are not found.
func pairs(m [][]complex128) (all []pair, ok bool) {
	// The library panics, instead of failing, where its iteration for small
	// matrices does not converge (gonum v0.17, Dhseqr on Dlaqr04).
	defer func() {
		if recover() != nil {
			all, ok = nil, false
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
		return nil, false
	}
	var right, left mat.CDense
	eig.VectorsTo(&right)
	eig.LeftVectorsTo(&left)
	for k, lambda := range eig.Values(nil) {
		v, size := project(&right, k, n)
		w, _ := project(&left, k, n)
		if size >= 1e-6 { // else an eigenvector of the conjugate half of the real form
			all = append(all, pair{lambda - offset, v, w})
		}
	}
	return all, true
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
