package networktest

import (
	"pgregory.net/rapid"

	"linewitness/sim/line"
	"linewitness/sim/network"
)

// DrawDispersive draws a network as Draw does, and makes the loss of its lines
// skin effect and dielectric loss.
func DrawDispersive(t *rapid.T) *network.Network {
	net := Draw(t)
	for k := range net.Sections {
		s := &net.Sections[k]
		skin := rapid.Float64Range(0, 1).Draw(t, "part of R that is skin effect")
		debye := rapid.Float64Range(0, 1).Draw(t, "part of G that is dielectric")
		s.Line, s.Dispersion = line.Disperse(s.Line, omega, skin*s.Line.R, debye*s.Line.G)
	}
	return net
}

// DrawTransformer draws a network as Draw does and puts an ideal transformer
// between its last junction and a new one, with a load.
func DrawTransformer(t *rapid.T) *network.Network {
	net := Draw(t)
	d := drawer{t: t, net: net}
	a := rapid.IntRange(0, len(net.Junctions)-1).Draw(t, "primary")
	b := d.junction()
	net.Branches = append(net.Branches, network.Branch{
		Name: "transformer", Kind: network.Element, A: a, B: b,
		Ratio: rapid.Float64Range(0.2, 5).Draw(t, "ratio"),
	})
	if rapid.Bool().Draw(t, "line beyond") {
		c := d.junction()
		d.section(b, c)
		b = c
	}
	d.branch(network.Load, b, network.Ground, d.lossy())
	return net
}
