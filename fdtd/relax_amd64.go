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
