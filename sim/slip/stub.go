package slip

import (
	"math"
	"slices"

	"linewitness/sim/network"
)

// A stub is a section that hangs from a junction of others and ends in a short,
// an open or a reactance.
type stub struct{ section, at, far int }

// findStubs finds the stubs of the network.
func (c Catalogue) findStubs() []stub {
	var out []stub
	for k, s := range c.Net.Sections {
		for _, t := range []stub{{k, s.From, s.To}, {k, s.To, s.From}} {
			if t.at != t.far && c.ended(t) && c.attached(t) >= 2 {
				out = append(out, t)
			}
		}
	}
	return out
}

// ended reports whether nothing but lossless parts ends the stub.
func (c Catalogue) ended(t stub) bool {
	if t.far == c.Net.Source.At {
		return false
	}
	for k, s := range c.Net.Sections {
		if k != t.section && (s.From == t.far || s.To == t.far) {
			return false
		}
	}
	for _, b := range c.branchesAt(t.far) {
		if br := c.Net.Branches[b]; br.B != network.Ground || br.R != 0 || br.Ratio != 0 {
			return false
		}
	}
	return true
}

// attached is how many other things meet where the stub hangs.
func (c Catalogue) attached(t stub) int {
	n := len(c.branchesAt(t.at))
	if c.Net.Source.At == t.at {
		n++
	}
	for k, s := range c.Net.Sections {
		if k != t.section && (s.From == t.at || s.To == t.at) {
			n++
		}
	}
	return n
}

// impedance is that of the stub where it hangs.
func (c Catalogue) impedance(t stub) complex128 {
	y := complex128(0)
	for _, b := range c.branchesAt(t.far) {
		switch br := c.Net.Branches[b]; {
		case br.Open:
		case br.Impedance(c.Net.Omega()) == 0:
			return waveOf(c.Net.Sections[t.section], c.Net.Omega()).input(0)
		default:
			y += 1 / br.Impedance(c.Net.Omega())
		}
	}
	return waveOf(c.Net.Sections[t.section], c.Net.Omega()).input(1 / y)
}

// stubs are the slips that are made with stubs.
func (c Catalogue) stubs() []Change {
	var out []Change
	for _, t := range c.findStubs() {
		name := "section " + c.Net.Sections[t.section].Name
		add := func(id ID, where string, make func() *network.Network) {
			out = append(out, Change{Slip: Slip{ID: id, Where: where}, Make: make})
		}
		add(StubSign, name, func() *network.Network { return c.opposed(t) })
		near := c.sourceSide(t.at)
		if !c.parts(t, near) {
			continue
		}
		z := c.impedance(t)
		add(StubInSeries, name, func() *network.Network { return c.inSeries(t, near, z) })
		// On impedance either the impedance of the stub or its admittance, as a
		// number without a unit, is added to the impedance of the line, or the
		// line is read a quarter wave away.
		z0 := c.reference(t, near)
		add(StubOnImpedance, name, func() *network.Network { return c.inSeries(t, near, z) })
		add(StubOnImpedance, name, func() *network.Network { return c.inSeries(t, near, z0*z0/z) })
		for _, k := range c.beyond(t, near) {
			add(StubOnImpedance, name+" by way of section "+c.Net.Sections[k].Name, func() *network.Network {
				return c.with([]int{k}, func(k int) wave {
					w := waveOf(c.Net.Sections[k], c.Net.Omega())
					return w.turned(w.beta + math.Pi/2)
				})
			})
		}
	}
	return out
}

// opposed is the network with a stub of the opposite susceptance.
func (c Catalogue) opposed(t stub) *network.Network {
	n := c.with([]int{t.section}, func(k int) wave {
		w := waveOf(c.Net.Sections[k], c.Net.Omega())
		return w.turned(-w.beta)
	})
	n.Branches = slices.Clone(n.Branches)
	for _, b := range c.branchesAt(t.far) {
		n.Branches[b].Series = conjugated(n.Branches[b].Series, n.Omega())
	}
	return n
}

// sourceSide marks the junctions that hang together with the source when
// junction j is taken out. It is empty if the source is at j.
func (c Catalogue) sourceSide(j int) []bool {
	seen := make([]bool, len(c.Net.Junctions))
	var visit func(int)
	visit = func(at int) {
		if at == network.Ground || at == j || seen[at] {
			return
		}
		seen[at] = true
		for _, s := range c.Net.Sections {
			switch at {
			case s.From:
				visit(s.To)
			case s.To:
				visit(s.From)
			}
		}
		for _, b := range c.branchesAt(at) {
			visit(c.Net.Branches[b].A)
			visit(c.Net.Branches[b].B)
		}
	}
	visit(c.Net.Source.At)
	return seen
}

// parts reports whether the junction of the stub parts the source from
// something else than the stub.
func (c Catalogue) parts(t stub, near []bool) bool {
	if near[t.far] {
		return false
	}
	for k, s := range c.Net.Sections {
		if k != t.section && (s.From == t.at && !near[s.To] || s.To == t.at && !near[s.From]) {
			return true
		}
	}
	for _, b := range c.branchesAt(t.at) {
		if other := c.otherEnd(b, t.at); other == network.Ground || !near[other] {
			return true
		}
	}
	return false
}

func (c Catalogue) otherEnd(b, j int) int {
	br := c.Net.Branches[b]
	if br.A == j {
		return br.B
	}
	return br.A
}

// beyond are the sections that join the stub from the load.
func (c Catalogue) beyond(t stub, near []bool) (out []int) {
	for k, s := range c.Net.Sections {
		if k != t.section && (s.From == t.at && !near[s.To] || s.To == t.at && !near[s.From]) {
			out = append(out, k)
		}
	}
	return out
}

// reference is the characteristic impedance that the stub is normalised to:
// that of the line from the source, or its own.
func (c Catalogue) reference(t stub, near []bool) complex128 {
	for _, s := range c.Net.Sections {
		if s.From == t.at && near[s.To] || s.To == t.at && near[s.From] {
			return waveOf(s, c.Net.Omega()).z0
		}
	}
	return waveOf(c.Net.Sections[t.section], c.Net.Omega()).z0
}

// inSeries is the network with an impedance z in series where the stub hangs.
// All that is not on the side of the source moves to a junction behind it. The
// stub itself goes to a junction of its own, dead, so that sections and
// branches keep their indices.
func (c Catalogue) inSeries(t stub, near []bool, z complex128) *network.Network {
	n := *c.Net
	behind, dead := len(n.Junctions), len(n.Junctions)+1
	n.Junctions = append(slices.Clone(n.Junctions), "behind the stub", "the stub set aside")
	n.Sections, n.Branches = slices.Clone(n.Sections), slices.Clone(n.Branches)
	move := func(j *int, other, to int) {
		if *j == t.at && (other == network.Ground || !near[other]) {
			*j = to
		}
	}
	for k := range n.Sections {
		to := behind
		if k == t.section {
			to = dead
		}
		s := &n.Sections[k]
		from := s.From
		move(&s.From, s.To, to)
		move(&s.To, from, to)
	}
	for b := range n.Branches {
		br := &n.Branches[b]
		a := br.A
		move(&br.A, br.B, behind)
		move(&br.B, a, behind)
	}
	n.Parts = slices.Clone(n.Parts)
	for p := range n.Parts {
		part := &n.Parts[p]
		a := part.A
		move(&part.A, part.B, behind)
		move(&part.B, a, behind)
	}
	n.Branches = append(n.Branches,
		network.Branch{Name: "stub in series", Kind: network.Element, A: t.at, B: behind, Series: series(z, n.Omega())},
		network.Branch{Name: "stub set aside", Kind: network.Element, A: dead, B: network.Ground, Series: network.Series{R: 50}})
	return &n
}
