package sim

import (
	"math"
	"math/cmplx"

	"linewitness/sim/network"
	"linewitness/sim/record"
)

// power audits where the power goes by both witnesses.
//
// No power in it is a difference of a forward and a reflected wave, and no
// balance is one of a thing with itself: what is delivered comes from the
// voltage and the current at the source, what is lost and taken up from R|I|^2
// and G|V|^2 of everything behind it.
func (s *solved) power() record.Power {
	return record.Power{Phasor: s.phasorAudit(), FDTD: s.fdtdAudit()}
}

// phasorAudit audits the closed form; the integrals along the sections are
// closed forms too.
func (s *solved) phasorAudit() record.PowerAudit {
	a := newAuditor(s.net, s.exact)
	for k := range s.net.Sections {
		v2, i2 := s.phasor.SquareIntegrals(k)
		a.section(k, v2, i2)
	}
	a.parts()
	return a.close(math.Max(closedFormAllowance*a.through(), solutionRounding*a.flow))
}

// closedFormAllowance is what the balance of the closed form may be off by,
// relative to the power that goes through the network.
const closedFormAllowance = 1e-9

// solutionRounding is what the rounding of the solution may leave in a balance,
// relative to all power that flows to and fro. Kirchhoff's law holds to the
// rounding of the currents, not of their small differences, so that a resonant
// network, which takes little of what swings in it, closes less well.
const solutionRounding = 1e-13

// fdtdAudit audits the time-domain run; the integrals along the sections are
// sums over all cells of the grid.
func (s *solved) fdtdAudit() record.PowerAudit {
	a := newAuditor(s.net, s.found)
	for k, w := range s.steady.Sections {
		a.section(k, w.SquareV, w.SquareI)
	}
	a.parts()
	return a.close(s.gridAllowance(a))
}

// An auditor adds up the power of one witness.
type auditor struct {
	record.PowerAudit
	net *network.Network
	st  *state
	// flow is the apparent power of every terminal added up, W: what swings to
	// and fro, of which the power is the part that does not come back.
	flow    float64
	squares [][2]float64 // of each section, V^2 m and A^2 m
}

func newAuditor(net *network.Network, st *state) *auditor {
	a := &auditor{net: net, st: st}
	a.Available, a.Delivered = net.Source.Available(), st.sourcePower()
	a.Reflected = math.NaN()
	if !math.IsInf(a.Available, 1) {
		a.Reflected = a.Available - a.Delivered
	}
	a.flow = apparent(st.junctions[net.Source.At], st.source)
	for b, br := range net.Branches {
		a.flow += apparent(st.junctions[br.A], st.branches[b]) * br.Turns()
	}
	for _, e := range st.ends {
		a.flow += apparent(e[0].v, e[0].i) + apparent(e[1].v, e[1].i)
	}
	return a
}

// apparent is |V||I|/2, VA.
func apparent(v, i complex128) float64 { return cmplx.Abs(v) * cmplx.Abs(i) / 2 }

// section takes in section k, with the integrals of |V|^2 and |I|^2 along it.
func (a *auditor) section(k int, v2, i2 float64) {
	sec, omega := a.net.Sections[k], a.net.Omega()
	at, ends := sec.At(omega), a.st.ends[k]
	l, c := sec.Dispersion.Storage(sec.Line, omega)
	p := record.SectionPower{
		Name:       sec.Name,
		In:         power(ends[0].v, ends[0].i),
		Out:        power(ends[1].v, ends[1].i),
		Dissipated: (at.R*i2 + at.G*v2) / 2,
		Stored:     (l*i2 + c*v2) / 4,
	}
	a.squares = append(a.squares, [2]float64{v2, i2})
	a.Sections = append(a.Sections, p)
	a.Dissipated += p.Dissipated
	a.Stored += p.Stored
}

// parts takes in the loads and the elements. What is stored inside the source
// is not the network's.
func (a *auditor) parts() {
	for _, part := range a.net.Parts {
		p := record.PartPower{Name: part.Name}
		for _, b := range branchesOf(a.net, part) {
			p.Power += a.branch(b)
		}
		if part.Kind == network.Load {
			a.Loads = append(a.Loads, p)
			a.InLoads += p.Power
		} else {
			a.Elements = append(a.Elements, p)
			a.Dissipated += p.Power
		}
	}
}

// branchesOf are all branches of a part: those that leave its A and, in a
// combination, those inside it, which carry its name.
func branchesOf(net *network.Network, part network.Part) []int {
	var all []int
	for b, br := range net.Branches {
		if br.Name == part.Name && br.Kind == part.Kind {
			all = append(all, b)
		}
	}
	return all
}

// branch gives the power that branch b takes up, R|I|^2/2, W, and takes in what
// it stores, L|I|^2/4 and C|V|^2/4 with the voltage I/(wC) of its capacitor. A
// transformer takes up and stores nothing.
func (a *auditor) branch(b int) float64 {
	br, i, omega := a.net.Branches[b], cmplx.Abs(a.st.branches[b]), a.net.Omega()
	a.Stored += br.L * i * i / 4
	if br.C > 0 {
		v := i / (omega * br.C)
		a.Stored += br.C * v * v / 4
	}
	return br.R * i * i / 2
}

// through is the power that goes through the network: what goes in or what is
// found to stay, whichever is larger.
func (a *auditor) through() float64 {
	return math.Max(a.Delivered, a.Dissipated+a.InLoads)
}

// close strikes the balance; allowed is what it may be off by, W. Where all the
// power there is lies within that, the network takes none that this witness
// can tell from nothing: the balance is then measured against what is allowed.
func (a *auditor) close(allowed float64) record.PowerAudit {
	a.Balance = a.Delivered - a.Dissipated - a.InLoads
	scale := a.through()
	a.Q = math.Inf(1)
	if a.Delivered > allowed {
		a.Q = a.net.Omega() * a.Stored / a.Delivered
	}
	if allowed > scale && !math.IsInf(allowed, 1) {
		scale = allowed
	}
	if scale > 0 {
		a.Relative, a.Allowed = math.Abs(a.Balance)/scale, allowed/scale
	}
	a.Closed = math.Abs(a.Balance) <= allowed
	return a.PowerAudit
}
