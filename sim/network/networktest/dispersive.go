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
