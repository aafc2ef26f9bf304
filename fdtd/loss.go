package fdtd

import (
	"math"

	"linewitness/sim/network"
)

// Loss gives the series resistance, ohm/m, and the shunt conductance, S/m, that
// section k has at the source frequency in the form in which it is stepped:
//
//	Re(R + sum r s/(s+x)) at s = j (2/dt) tan(w dt/2)
//
// and likewise G. Without dispersion they are R and G themselves.
//
// The sums over the cells of (Loss |I|^2 + Loss |V|^2)/2, with half the weight
// at the two end edges, are exactly the power that goes into the section and
// does not come out in a steady state of the scheme: its cells are a ladder of
// impedances dx Zd and admittances dx Yd (see Numerical), for which Tellegen's
// theorem holds, and the factor cos(w dt/2) of their real parts is that between
// an end current averaged over a step and its value in the middle.
func (g Grid) Loss(net *network.Network, k int) (series, shunt float64) {
	s := net.Sections[k]
	stepped := complex(0, 2/g.Step*math.Tan(math.Pi/float64(g.StepsPerPeriod)))
	series = s.Line.R + real(skinForm(s.Dispersion.Skin, net.Omega()).at(stepped))
	shunt = s.Line.G + real(debyeForm(s.Dispersion, net.Omega()).at(stepped))
	return series, shunt
}
