package sim

import (
	"math"

	"linewitness/sim/network"
)

// A frontView is a network as a wave front sees it: at the highest frequencies,
// where a section is its sqrt(L/C), an inductance is open and a capacitance a
// short.
type frontView struct {
	net      *network.Network
	sections [][]int   // that end at each junction
	shunt    []float64 // S, of the parts from each junction to the return conductor; +Inf is a short
	source   float64   // S, of the source's impedance
	// varying tells of each junction whether what is at it, the source too, is
	// something else at lower frequencies.
	varying []bool
	// joined are two junctions where sections end that a part joins, or nil.
	joined []int
	// transformer is the name of an ideal transformer, or empty.
	transformer string
}

// jump is the conductance of a series combination at the highest frequencies, S.
func jump(s network.Series) float64 {
	switch {
	case s.L > 0:
		return 0
	case s.R > 0:
		return 1 / s.R
	}
	return math.Inf(1)
}

func newFrontView(net *network.Network) *frontView {
	n := len(net.Junctions)
	f := &frontView{
		net: net, source: jump(net.Source.Series),
		sections: make([][]int, n), shunt: make([]float64, n), varying: make([]bool, n),
	}
	for k, s := range net.Sections {
		f.sections[s.From] = append(f.sections[s.From], k)
		f.sections[s.To] = append(f.sections[s.To], k)
	}
	for _, set := range f.clusters() {
		f.study(set)
	}
	if src := net.Source; src.L > 0 || src.C > 0 {
		f.varying[src.At] = true
	}
	return f
}

// A cluster is a set of junctions that parts join, and the parts at them.
type cluster struct {
	junctions []int
	branches  []network.Branch
}

// clusters are the sets of junctions that have parts.
func (f *frontView) clusters() []*cluster {
	sets := network.NewSets(len(f.net.Junctions))
	for _, b := range f.net.Branches {
		if !b.Open && b.B != network.Ground {
			sets.Join(b.A, b.B)
		}
	}
	of := map[int]*cluster{}
	var all []*cluster
	for _, b := range f.net.Branches {
		if b.Open {
			continue
		}
		root := sets.Root(b.A)
		if of[root] == nil {
			of[root] = &cluster{}
			all = append(all, of[root])
		}
		of[root].branches = append(of[root].branches, b)
	}
	for j := range f.net.Junctions {
		if c := of[sets.Root(j)]; c != nil {
			c.junctions = append(c.junctions, j)
		}
	}
	return all
}

// study works out what a cluster is to the junctions of it where sections end.
func (f *frontView) study(c *cluster) {
	var ends []int
	for _, j := range c.junctions {
		if len(f.sections[j]) > 0 {
			ends = append(ends, j)
		}
	}
	varying := len(ends) > 1
	if varying {
		f.joined = ends[:2]
	}
	for _, b := range c.branches {
		varying = varying || b.L > 0 || b.C > 0 || b.Ratio != 0
		if b.Ratio != 0 {
			f.transformer = b.Name
		}
	}
	for _, j := range ends {
		f.varying[j] = varying
	}
	if len(ends) == 1 {
		f.shunt[ends[0]] = c.conductance(ends[0])
	}
}

// conductance is that from a junction to the return conductor, by turning each
// star of the others into a mesh; transformers are left out.
func (c *cluster) conductance(from int) float64 {
	index := map[int]int{network.Ground: 0, from: 1}
	for _, j := range c.junctions {
		if j != from {
			index[j] = len(index)
		}
	}
	sets := network.NewSets(len(index))
	for _, b := range c.branches {
		if b.Ratio == 0 && math.IsInf(jump(b.Series), 1) {
			sets.Join(index[b.A], index[b.B])
		}
	}
	if sets.Root(0) == sets.Root(1) {
		return math.Inf(1)
	}
	n := len(index)
	g := make([]float64, n*n)
	plus := func(a, b int, y float64) { g[a*n+b] += y; g[b*n+a] += y }
	for _, b := range c.branches {
		if y, p, q := jump(b.Series), sets.Root(index[b.A]), sets.Root(index[b.B]); b.Ratio == 0 && p != q {
			plus(p, q, y)
		}
	}
	for r := range n {
		if r != sets.Root(0) && r != sets.Root(1) {
			dissolve(g, n, r)
		}
	}
	return g[sets.Root(1)*n+sets.Root(0)]
}

// dissolve replaces node r of a network of n conductances g[a n + b] by the mesh
// that its star is worth.
func dissolve(g []float64, n, r int) {
	sum := 0.0
	for a := range n {
		sum += g[r*n+a]
	}
	for a := range n {
		for b := range n {
			if a != b && sum > 0 {
				g[a*n+b] += g[r*n+a] * g[r*n+b] / sum
			}
		}
	}
	for a := range n {
		g[r*n+a], g[a*n+r] = 0, 0
	}
}

// admittance is sqrt(C/L) of section k, S.
func (f *frontView) admittance(k int) float64 {
	c := f.net.Sections[k].Line
	return math.Sqrt(c.C / c.L)
}

// kept is what is left of a front at the other end of section k.
//
// On a line of constant R and G that is e^{-(R/(2 Z0) + G Z0/2) l} exactly. A
// loss that grows with frequency leaves no finite step; the same with the R and
// the G at the source frequency f is taken then. With skin effect a step is
// erfc(a/(2 sqrt(pi f t))), a Np of loss at f, at t after its front: for a small
// loss 1 - a at f t = 1/pi^2, a tenth of a period.
func (f *frontView) kept(k int) float64 {
	s := f.net.Sections[k]
	c, y := s.At(f.net.Omega()), f.admittance(k)
	return math.Exp(-(c.R*y + c.G/y) / 2 * s.Length)
}

// reflection is the reflection coefficient of voltage of a front that comes
// along section k to junction j: (y - Y)/(y + Y), Y being all else at j.
func (f *frontView) reflection(j, k int) float64 {
	y, other := f.admittance(k), f.shunt[j]
	if j == f.net.Source.At {
		other += f.source
	}
	own := false // a section from j to j would be here twice
	for _, s := range f.sections[j] {
		if s == k && !own {
			own = true
			continue
		}
		other += f.admittance(s)
	}
	if math.IsInf(other, 1) {
		return -1
	}
	return (y - other) / (y + other)
}

// launch is the step at the source's junction for a step of the EMF by one.
func (f *frontView) launch() float64 {
	at := f.net.Source.At
	other := f.shunt[at]
	for _, s := range f.sections[at] {
		other += f.admittance(s)
	}
	switch {
	case math.IsInf(other, 1):
		return 0
	case math.IsInf(f.source, 1):
		return 1
	}
	return f.source / (f.source + other)
}
