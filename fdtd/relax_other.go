//go:build !amd64 || purego

package fdtd

func relaxBlocks(g *afterglow, p, b *[poles]float64) { relaxSlow(g, p, b) }

func currentBlocks(v, w []float64, c *coefs, r *relaxation, g *afterglow, blocks int) {
	currentBlocksSlow(v, w, c, r, g, blocks)
}
