package fdtd

import (
	"math"
	"math/rand/v2"
	"testing"
)

// slowAdvance is the loop of advance's comment.
func slowAdvance(v, w []float64, c *coefs) {
	for i := range w {
		w[i] = c.wa*w[i] - c.wb*(v[i+1]-v[i])
	}
	for i := 1; i < len(w); i++ {
		v[i] = c.va*v[i] - c.vb*(w[i]-w[i-1])
	}
}

// TestAdvance compares the kernels with the slow loop for every small size,
// with and without loss; guards beside the arrays must stay.
func TestAdvance(t *testing.T) {
	// The order of the operations is the same, so only a fused multiply-add
	// can make a difference: one rounding.
	const tolerance = 4e-16
	random := rand.New(rand.NewPCG(1, 2))
	for n := 1; n <= 40; n++ {
		for _, c := range []coefs{newCoefs(1, 0, 0), newCoefs(0.7, 0, 0), newCoefs(0.9, 0.1, 0.02)} {
			v, w := make([]float64, n+3), make([]float64, n+2)
			for i := range v {
				v[i] = random.Float64() - 0.5
			}
			for i := range w {
				w[i] = random.Float64() - 0.5
			}
			vs, ws := append([]float64(nil), v...), append([]float64(nil), w...)
			advance(v[1:n+2], w[1:n+1], &c)
			slowAdvance(vs[1:n+2], ws[1:n+1], &c)
			for i := range v {
				if math.Abs(v[i]-vs[i]) > tolerance {
					t.Fatalf("n=%d %+v: v[%d] = %v, want %v", n, c, i-1, v[i], vs[i])
				}
			}
			for i := range w {
				if math.Abs(w[i]-ws[i]) > tolerance {
					t.Fatalf("n=%d %+v: w[%d] = %v, want %v", n, c, i-1, w[i], ws[i])
				}
			}
		}
	}
}
