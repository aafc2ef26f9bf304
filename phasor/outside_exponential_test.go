package phasor

import (
	"math"
	"math/cmplx"
	"testing"

	"gonum.org/v1/gonum/mat"
	"pgregory.net/rapid"

	"linewitness/sim/line"
	"linewitness/sim/network"
)

// The telegrapher's equations as one linear system, d/dz [V I] = -A [V I] with
// A = [[0, Z], [Y, 0]], have the solution [V I](l) = e^{-Al} [V I](0). The
// matrix exponential (gonum's, by scaling, squaring and a Pade approximant)
// knows nothing of waves, propagation constants or characteristic impedances.

// exponentialTol is the tolerance relative to the largest V or I Z0 of the
// network. The squarings of the exponential and the growing wave, e^{1.5} over
// each of up to four sections, magnify its rounding of some 1e-15.
const exponentialTol = 1e-10

// ohms scales the currents of the chain, so that both halves of the matrix
// are of one size.
const ohms = 75

// chain is a 2 x 2 complex matrix that takes [V, I ohms] from one end of a
// cascade to the other, in the real form [Re -Im; Im Re].
type chain struct{ *mat.Dense }

// exponential is the chain of a line of length l.
func exponential(k line.Constants, omega, l float64) chain {
	z := complex(k.R, omega*k.L) * complex(-l/ohms, 0)
	y := complex(k.G, omega*k.C) * complex(-l*ohms, 0)
	a := mat.NewDense(4, 4, []float64{
		0, real(z), 0, -imag(z),
		real(y), 0, -imag(y), 0,
		0, imag(z), 0, real(z),
		imag(y), 0, real(y), 0,
	})
	var e mat.Dense
	e.Exp(a)
	return chain{&e}
}

// after is the chain of c behind first.
func (c chain) after(first chain) chain {
	var p mat.Dense
	p.Mul(c.Dense, first.Dense)
	return chain{&p}
}

func (c chain) at(i, j int) complex128 { return complex(c.At(i, j), c.At(i+2, j)) }

// apply takes V and I through the chain.
func (c chain) apply(v, i complex128) (complex128, complex128) {
	i *= ohms
	return c.at(0, 0)*v + c.at(0, 1)*i, (c.at(1, 0)*v + c.at(1, 1)*i) / ohms
}

// input is V and I at the beginning of a chain between a source and a load:
// V0 = E - Zs I0 and V1 = Zl I1.
func (c chain) input(emf, zs, zl complex128) (v, i complex128) {
	a, b := c.at(0, 0), c.at(0, 1)*ohms
	cc, d := c.at(1, 0)/ohms, c.at(1, 1)
	i = emf * (zl*cc - a) / (b - a*zs - zl*(d-cc*zs))
	return emf - zs*i, i
}

// drawCascade draws a source, a cascade of one to four lossy lines that
// differ in everything, and a load.
func drawCascade(t *rapid.T) *network.Network {
	float := func(lo, hi float64, what string) float64 { return rapid.Float64Range(lo, hi).Draw(t, what) }
	part := func(what string) network.Series {
		s := network.Series{R: float(1, 300, what+" ohm")}
		if rapid.Bool().Draw(t, what+" has l") {
			s.L = float(1e-8, 3e-7, what+" l")
		}
		if rapid.Bool().Draw(t, what+" has c") {
			s.C = float(5e-12, 1e-9, what+" c")
		}
		return s
	}
	net := &network.Network{
		Frequency: math.Pow(10, float(6, 9, "log f")), Junctions: []string{"0"},
		Source: network.Source{EMF: float(1, 1e3, "emf"), Series: part("source")},
	}
	n := rapid.IntRange(1, 4).Draw(t, "sections")
	for k := range n {
		c := line.Constants{L: float(1e-7, 2e-6, "l"), C: float(1e-11, 3e-10, "c")}
		// From no loss at all to a line that is all loss.
		c.R = net.Omega() * c.L * float(0, 2, "R/wL")
		c.G = net.Omega() * c.C * float(0, 2, "G/wC")
		gamma := cmplx.Abs(c.Propagation(net.Omega()))
		net.Junctions = append(net.Junctions, string(rune('1'+k)))
		net.Sections = append(net.Sections, network.Section{From: k, To: k + 1, Length: float(0.01, 1.5, "gamma l") / gamma, Line: c})
	}
	net.Branches = []network.Branch{{A: n, B: network.Ground, Series: part("load")}}
	return net
}

func TestOutsideMatrixExponential(t *testing.T) {
	worst := 0.0
	rapid.Check(t, func(t *rapid.T) {
		net := drawCascade(t)
		s, err := Solve(net)
		if err != nil {
			t.Fatal(err)
		}
		omega := net.Omega()
		chains := make([]chain, len(net.Sections))
		whole := exponential(line.Constants{}, omega, 0)
		for k, sec := range net.Sections {
			chains[k] = exponential(sec.Line, omega, sec.Length)
			whole = chains[k].after(whole)
		}
		v, i := whole.input(complex(net.Source.EMF, 0), net.Source.Impedance(omega), net.Branches[0].Impedance(omega))
		top := math.Max(cmplx.Abs(v), cmplx.Abs(i)*ohms)
		off := func(gotV, gotI complex128) {
			d := math.Max(cmplx.Abs(gotV-v), cmplx.Abs(gotI-i)*ohms) / top
			worst = math.Max(worst, d)
			if !(d <= exponentialTol) {
				t.Fatalf("V = %v, I = %v, want %v, %v: off by %.2g", gotV, gotI, v, i, d)
			}
		}
		off(s.Junction(0), s.Source())
		for k, sec := range net.Sections {
			z := sec.Length * rapid.Float64Range(0, 1).Draw(t, "place")
			v0, i0 := v, i
			v, i = exponential(sec.Line, omega, z).apply(v0, i0)
			off(s.Voltage(k, z), s.Current(k, z))
			v, i = chains[k].apply(v0, i0)
			top = math.Max(top, math.Max(cmplx.Abs(v), cmplx.Abs(i)*ohms))
			off(s.Junction(k+1), s.Current(k, sec.Length))
		}
		off(s.Junction(len(net.Sections)), s.Branch(0))
	})
	t.Logf("largest difference: %.2g", worst)
}
