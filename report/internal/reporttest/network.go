package reporttest

import (
	"math"
	"math/cmplx"

	"linewitness/sim/record"
)

// A Network is what a record is made from.
type Network struct {
	Frequency float64
	EMF       float64
	Source    complex128
	At        string
	Sections  []Section
	Loads     []Load
	Bridges   []Load // elements between two junctions
}

// Section is a piece of line.
type Section struct {
	Name, From, To string
	Length         float64 // m
	Z0, VF         float64
	DB             float64 // attenuation, dB/m
}

// Load is a load from At to the return conductor or, with To, a bridge.
type Load struct {
	Name, At, To string
	R, L, C      float64
	Open, Short  bool
	Ratio        float64 // of an ideal transformer, To over At; only of a bridge
	Given, As    string  // instead of what follows from the values
}

func (n Network) omega() float64 { return 2 * math.Pi * n.Frequency }

// gamma is the propagation constant of a section and z0 its impedance; all
// its loss is in the conductor.
func (n Network) gamma(s Section) (gamma, z0 complex128) {
	m := n.model(s)
	z := complex(m.R, n.omega()*m.L)
	y := complex(m.G, n.omega()*m.C)
	return cmplx.Sqrt(z * y), cmplx.Sqrt(z / y)
}

func (n Network) model(s Section) record.ModelSection {
	const c0 = 299792458.0
	v := s.VF * c0
	alpha := s.DB / 8.685889638065037
	return record.ModelSection{
		Name: s.Name, Line: "coax", From: s.From, To: s.To, Length: s.Length,
		Wavelengths: s.Length * n.Frequency / v, Degrees: 360 * s.Length * n.Frequency / v,
		Delay: s.Length / v, LossDB: s.DB * s.Length, VelocityFactor: s.VF,
		R: 2 * alpha * s.Z0, L: s.Z0 / v, C: 1 / (s.Z0 * v), Z0: complex(s.Z0, 0),
	}
}

// Z returns the impedance of a load.
func (n Network) z(l Load) complex128 {
	z := complex(l.R, n.omega()*l.L)
	if l.C > 0 {
		z += complex(0, -1/(n.omega()*l.C))
	}
	if l.Short {
		z = 1e-9 // near enough to a short for a picture
	}
	return z
}

// Junctions returns the names in the order of their first mention.
func (n Network) junctions() []string {
	var names []string
	seen := map[string]bool{"": true}
	add := func(s string) {
		if !seen[s] {
			seen[s] = true
			names = append(names, s)
		}
	}
	add(n.At)
	for _, s := range n.Sections {
		add(s.From)
		add(s.To)
	}
	for _, l := range append(append([]Load{}, n.Loads...), n.Bridges...) {
		add(l.At)
		add(l.To)
	}
	return names
}

// solve returns the junction voltages, by nodal analysis with the two-port
// admittances of the sections.
func (n Network) solve() map[string]complex128 {
	names := n.junctions()
	index := map[string]int{}
	for i, name := range names {
		index[name] = i
	}
	size := len(names)
	a := make([][]complex128, size)
	for i := range a {
		a[i] = make([]complex128, size+1)
	}
	bridge := func(from, to string, self, mutual complex128) {
		i, j := index[from], index[to]
		a[i][i] += self
		a[j][j] += self
		a[i][j] += mutual
		a[j][i] += mutual
	}
	for _, s := range n.Sections {
		g, z0 := n.gamma(s)
		x := g * complex(s.Length, 0)
		bridge(s.From, s.To, 1/(z0*cmplx.Tanh(x)), -1/(z0*cmplx.Sinh(x)))
	}
	for _, l := range n.Loads {
		if !l.Open {
			a[index[l.At]][index[l.At]] += 1 / n.z(l)
		}
	}
	for _, l := range n.Bridges {
		if l.Ratio != 0 {
			stiff := complex(1e3, 0) // near enough to an ideal one for a picture
			i, j, r := index[l.At], index[l.To], complex(l.Ratio, 0)
			a[i][i] += r * r * stiff
			a[j][j] += stiff
			a[i][j] -= r * stiff
			a[j][i] -= r * stiff
			continue
		}
		bridge(l.At, l.To, 1/n.z(l), -1/n.z(l))
	}
	i := index[n.At]
	a[i][i] += 1 / n.Source
	a[i][size] += complex(n.EMF, 0) / n.Source
	eliminate(a)
	out := map[string]complex128{}
	for i, name := range names {
		out[name] = a[i][size]
	}
	return out
}

// eliminate solves a linear system by Gauss and Jordan's elimination, in
// place; the last column is the right side and becomes the solution.
func eliminate(a [][]complex128) {
	for k := range a {
		p := k
		for i := k; i < len(a); i++ {
			if cmplx.Abs(a[i][k]) > cmplx.Abs(a[p][k]) {
				p = i
			}
		}
		a[k], a[p] = a[p], a[k]
		for i := range a {
			if i == k {
				continue
			}
			f := a[i][k] / a[k][k]
			for j := k; j <= len(a); j++ {
				a[i][j] -= f * a[k][j]
			}
		}
	}
	for k := range a {
		a[k][len(a)] /= a[k][k]
	}
}

// along returns voltage and current at z on a section.
func (n Network) along(s Section, v1, v2 complex128, z float64) (v, i complex128) {
	g, z0 := n.gamma(s)
	sh := cmplx.Sinh(g * complex(s.Length, 0))
	a, b := g*complex(s.Length-z, 0), g*complex(z, 0)
	v = (v1*cmplx.Sinh(a) + v2*cmplx.Sinh(b)) / sh
	i = (v1*cmplx.Cosh(a) - v2*cmplx.Cosh(b)) / (sh * z0)
	return v, i
}
