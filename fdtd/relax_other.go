//go:build !amd64 || purego

package fdtd

func relaxBlocks(g *afterglow, p, b *[poles]float64) { relaxSlow(g, p, b) }
