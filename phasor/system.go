package phasor

import (
	"math"
	"math/cmplx"

	"gonum.org/v1/gonum/mat"

	"linewitness/sim/network"
)

// A system is the linear system A x = b of a network. Its columns are
//
//	junction voltages | P and M of each section | branch currents | source current
//
// with the currents multiplied by scale, an impedance typical of the network,
// so that all unknowns are volts of one size and A is well conditioned.
type system struct {
	net   *network.Network
	waves []wave
	scale float64 // ohm
	n     int
	a     *mat.Dense // 2n x 2n, the real form [Re -Im; Im Re]
	b     []complex128
	row   int // next row to fill
}

func newSystem(net *network.Network) *system {
	s := &system{net: net, n: len(net.Junctions) + 2*len(net.Sections) + len(net.Branches) + 1}
	omega := net.Omega()
	logs := 0.0
	for _, sec := range net.Sections {
		gamma, zc := Propagation(sec, omega)
		s.waves = append(s.waves, wave{length: sec.Length, gamma: gamma, zc: zc})
		logs += math.Log(cmplx.Abs(zc))
	}
	s.scale = 50
	if k := len(net.Sections); k > 0 {
		s.scale = math.Exp(logs / float64(k))
	}
	s.a = mat.NewDense(2*s.n, 2*s.n, nil)
	s.b = make([]complex128, s.n)
	s.sections()
	s.currentLaw()
	s.branches()
	s.source()
	return s
}

// The columns of the unknowns.
func (s *system) forward(k int) int  { return len(s.net.Junctions) + 2*k }
func (s *system) backward(k int) int { return s.forward(k) + 1 }
func (s *system) branch(b int) int {
	return len(s.net.Junctions) + 2*len(s.net.Sections) + b
}
func (s *system) sourceCurrent() int { return s.n - 1 }

// add adds v to A[row, col], in the real form.
func (s *system) add(row, col int, v complex128) {
	n := s.n
	s.a.Set(row, col, s.a.At(row, col)+real(v))
	s.a.Set(row+n, col+n, s.a.At(row+n, col+n)+real(v))
	s.a.Set(row, col+n, s.a.At(row, col+n)-imag(v))
	s.a.Set(row+n, col, s.a.At(row+n, col)+imag(v))
}

// addVoltage adds v times the voltage of a junction; the return conductor has
// none.
func (s *system) addVoltage(row, junction int, v complex128) {
	if junction != network.Ground {
		s.add(row, junction, v)
	}
}

// sections writes the continuity of the voltage at both ends of each section.
func (s *system) sections() {
	for k, sec := range s.net.Sections {
		e := cmplx.Exp(-s.waves[k].gamma * complex(sec.Length, 0))
		s.add(s.row, sec.From, 1)
		s.add(s.row, s.forward(k), -1)
		s.add(s.row, s.backward(k), -e)
		s.add(s.row+1, sec.To, 1)
		s.add(s.row+1, s.forward(k), -e)
		s.add(s.row+1, s.backward(k), -1)
		s.row += 2
	}
}

// currentLaw writes Kirchhoff's current law at every junction: the currents
// that leave it add up to nothing.
func (s *system) currentLaw() {
	at := func(j int) int { return s.row + j }
	for k, sec := range s.net.Sections {
		y := complex(s.scale, 0) / s.waves[k].zc
		e := cmplx.Exp(-s.waves[k].gamma * complex(sec.Length, 0))
		s.add(at(sec.From), s.forward(k), y)
		s.add(at(sec.From), s.backward(k), -y*e)
		s.add(at(sec.To), s.forward(k), -y*e)
		s.add(at(sec.To), s.backward(k), y)
	}
	for b, br := range s.net.Branches {
		s.add(at(br.A), s.branch(b), complex(br.Turns(), 0))
		if br.B != network.Ground {
			s.add(at(br.B), s.branch(b), -1)
		}
	}
	s.add(at(s.net.Source.At), s.sourceCurrent(), -1)
	s.row += len(s.net.Junctions)
}

// branches writes n VA - VB = Z I for each branch, n being 1 but for a
// transformer, or I = 0 for an open one.
func (s *system) branches() {
	for b, br := range s.net.Branches {
		if br.Open {
			s.add(s.row, s.branch(b), 1)
			s.row++
			continue
		}
		z := br.Impedance(s.net.Omega()) / complex(s.scale, 0)
		w := complex(1/math.Max(1, cmplx.Abs(z)), 0) // keeps the row near unit size
		s.addVoltage(s.row, br.A, w*complex(br.Turns(), 0))
		s.addVoltage(s.row, br.B, -w)
		s.add(s.row, s.branch(b), -w*z)
		s.row++
	}
}

// source writes V + Z I = EMF at the source.
func (s *system) source() {
	src := s.net.Source
	z := src.Impedance(s.net.Omega()) / complex(s.scale, 0)
	w := complex(1/math.Max(1, cmplx.Abs(z)), 0)
	s.add(s.row, src.At, w)
	s.add(s.row, s.sourceCurrent(), w*z)
	s.b[s.row] = w * complex(src.EMF, 0)
	s.row++
}
