package reporttest

import (
	"math"
	"math/cmplx"
	"slices"

	"linewitness/sim/record"
)

// spaceTime makes up a map of the voltage along the first way from the source:
// the steady wave behind a front, and an echo from the end.
func (n Network) spaceTime(v map[string]complex128, periods float64) (m record.SpaceTime) {
	const places, times = 120, 90
	var sections []Section
	at, z, delay := n.At, 0.0, 0.0
	starts := []float64{0}
	for {
		i := slices.IndexFunc(n.Sections, func(s Section) bool {
			return (s.From == at || s.To == at) && !slices.ContainsFunc(m.Path, func(p record.PathSection) bool { return p.Section == s.Name })
		})
		if i < 0 {
			break
		}
		s := n.Sections[i]
		p := record.PathSection{Section: s.Name, Reversed: s.From != at, From: z, To: z + s.Length}
		at = s.To
		if p.Reversed {
			at = s.From
		}
		t1 := delay + n.model(s).Delay
		m.Fronts = append(m.Fronts, record.Front{Z0: z, T0: delay, Z1: p.To, T1: t1, Passage: 1})
		m.Path, sections = append(m.Path, p), append(sections, s)
		z, delay = p.To, t1
		starts = append(starts, delay)
	}
	for i := len(m.Fronts) - 1; i >= 0; i-- {
		f := m.Fronts[i]
		m.Fronts = append(m.Fronts, record.Front{Z0: f.Z1, T0: 2*delay - f.T1, Z1: f.Z0, T1: 2*delay - f.T0, Passage: 2})
	}
	m.Phase, m.Envelope = 37, periods > 100
	for k := range places {
		m.Z = append(m.Z, z*float64(k)/(places-1))
	}
	last := math.Max(2.6*delay, 3/n.Frequency)
	for j := range times {
		t := last * float64(j) / (times - 1)
		m.T, m.V = append(m.T, t), append(m.V, nil)
		for _, z := range m.Z {
			m.V[j] = append(m.V[j], n.behind(m, sections, starts, v, z, t))
		}
	}
	return m
}

// behind is the voltage at a place of the path and a time: nothing before the
// front has come.
func (n Network) behind(m record.SpaceTime, sections []Section, starts []float64, v map[string]complex128, z, t float64) float64 {
	for i, p := range m.Path {
		if z > p.To && i < len(m.Path)-1 {
			continue
		}
		s := sections[i]
		at := z - p.From
		arrives := starts[i] + at/s.Length*n.model(s).Delay
		if p.Reversed {
			at = s.Length - at
		}
		if t < arrives {
			return 0
		}
		phasor, _ := n.along(s, v[s.From], v[s.To], at)
		if m.Envelope {
			return cmplx.Abs(phasor)
		}
		return real(phasor * cmplx.Rect(1, n.omega()*t))
	}
	return 0
}

// bounces makes up the bounce table of a chain: of a network whose sections lead
// from one to the next.
func (n Network) bounces() (b record.Bounces) {
	at, time := n.At, 0.0
	nan := math.NaN()
	b.Coefficients = []record.BounceCoefficient{{Junction: at, FromLeft: nan, FromRight: 0, ThroughRight: nan, ThroughLeft: nan}}
	b.Arrivals = []record.Bounce{{Junction: at, Step: 0.5, Voltage: 0.5}}
	for i, s := range n.Sections {
		if s.From != at {
			return record.Bounces{Note: "no bounce table: the network is not a chain"}
		}
		at = s.To
		m := n.model(s)
		time += m.Delay
		b.Sections = append(b.Sections, record.BounceSection{Section: s.Name, From: s.From, To: s.To, Z0: s.Z0, Delay: m.Delay, Kept: math.Pow(10, -m.LossDB/20)})
		q := record.BounceCoefficient{Junction: at, FromLeft: 0.2, FromRight: nan, ThroughRight: nan, ThroughLeft: nan}
		if i < len(n.Sections)-1 {
			g := (n.Sections[i+1].Z0 - s.Z0) / (n.Sections[i+1].Z0 + s.Z0)
			q.FromLeft, q.FromRight, q.ThroughRight, q.ThroughLeft = g, -g, 1+g, 1-g
		}
		b.Coefficients = append(b.Coefficients, q)
		b.Arrivals = append(b.Arrivals, record.Bounce{Time: time, Junction: at, Section: s.Name, Step: 0.5 * (1 + q.FromLeft), Voltage: 0.5 * (1 + q.FromLeft)})
	}
	return b
}
