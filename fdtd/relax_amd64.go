//go:build amd64 && !purego

package fdtd

import "golang.org/x/sys/cpu"

var useAVX = cpu.X86.HasAVX

// relaxAVX is relaxSlow for a number of blocks of four cells and nine poles.
// It multiplies and adds in the same order without fusing, so that both give
// the same bits.
//
//go:noescape
func relaxAVX(sum, j, u, p, b *float64, blocks int)

func relaxBlocks(g *afterglow, p, b *[poles]float64) {
	if !useAVX {
		relaxSlow(g, p, b)
		return
	}
	relaxAVX(&g.sum[0], &g.j[0], &g.u[0], &p[0], &b[0], len(g.sum)/cellsPerBlock)
}

// currentsAVX is currentBlocksSlow, but for u, which it does not keep; factors
// are wa and wb.
//
//go:noescape
func currentsAVX(w, v, sum, j, p, b, factors *float64, blocks int)

func currentBlocks(v, w []float64, c *coefs, r *relaxation, g *afterglow, blocks int) {
	if !useAVX {
		currentBlocksSlow(v, w, c, r, g, blocks)
		return
	}
	factors := [2]float64{c.wa, c.wb}
	currentsAVX(&w[0], &v[0], &g.sum[0], &g.j[0], &r.p[0], &r.b[0], &factors[0], blocks)
}
