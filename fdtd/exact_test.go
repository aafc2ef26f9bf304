package fdtd

import (
	"context"
	"math"
	"math/cmplx"
	"testing"

	"linewitness/sim/line"
	"linewitness/sim/network"
)

// exactTolerance is for results that the scheme gives exactly: what is left is
// the rounding of some thousand steps and the rest of the settling.
const exactTolerance = 1e-11

// air is a lossless line of impedance z0 with the speed of light.
func air(z0 float64) line.Constants {
	return line.Constants{L: z0 / line.C0, C: 1 / (z0 * line.C0)}
}

const testFrequency = 100e6

var wavelength = line.C0 / testFrequency

// standing solves one section in closed form, with no code of package phasor:
// V(z) = A cosh(g(l-z)) + ... written for a load zl at z = l and a source emf
// behind zs at z = 0, lossless.
func standing(z0, length, z float64, zs, zl complex128, emf float64) (v, i complex128) {
	beta := 2 * math.Pi / wavelength
	cz := complex(z0, 0)
	at := func(d float64) (complex128, complex128) { // V and I at d from the load per unit load voltage
		s, c := math.Sincos(beta * d)
		return complex(c, 0) + 1i*cz*complex(s, 0)/zl, complex(c, 0)/zl + 1i*complex(s, 0)/cz
	}
	vin, iin := at(length)
	load := complex(emf, 0) / (vin + zs*iin)
	v, i = at(length - z)
	return v * load, i * load
}

// TestExactAtCourantOne: at Courant number 1 the scheme moves a wave one cell
// a step, and trapezoidal lumped parts with half end cells turn a junction
// into its exact mirror, so a lossless mismatched line comes out exact.
func TestExactAtCourantOne(t *testing.T) {
	omega := 2 * math.Pi * testFrequency
	for _, tt := range []struct {
		name   string
		source network.Series
		load   network.Series
	}{
		{"resistive", network.Series{R: 50}, network.Series{R: 150}},
		{"matched source", network.Series{R: 75}, network.Series{R: 10}},
		{"inductive load", network.Series{R: 30}, network.Series{R: 25, L: 40e-9}},
		{"capacitive source", network.Series{R: 30, C: 20e-12}, network.Series{R: 100, L: 40e-9, C: 10e-12}},
		{"ideal source", network.Series{}, network.Series{R: 20}},
	} {
		t.Run(tt.name, func(t *testing.T) {
			length := 1.3 * wavelength
			net := &network.Network{
				Frequency: testFrequency, Junctions: []string{"a", "b"},
				Sections: []network.Section{{Name: "line", From: 0, To: 1, Length: length, Line: air(75)}},
				Branches: []network.Branch{{Name: "load", A: 1, B: network.Ground, Series: tt.load}},
				Source:   network.Source{At: 0, EMF: 2, Series: tt.source},
			}
			g := fixedGrid(net, 40)
			if g.Courant[0] != 1 {
				t.Fatalf("Courant number %v, want 1", g.Courant[0])
			}
			st := settled(t, net, g, 1e-12)
			for p, z := range st.Sections[0].ZV {
				want, _ := standing(75, length, z, tt.source.Impedance(omega), tt.load.Impedance(omega), 2)
				if d := cmplx.Abs(st.Sections[0].V[p] - want); d > exactTolerance {
					t.Fatalf("V(%.3f m) is off by %.3g V", z, d)
				}
			}
			for p, z := range st.Sections[0].ZI {
				_, want := standing(75, length, z, tt.source.Impedance(omega), tt.load.Impedance(omega), 2)
				if d := cmplx.Abs(st.Sections[0].I[p]-want) * 75; d > exactTolerance {
					t.Fatalf("Z0 I(%.3f m) is off by %.3g V", z, d)
				}
			}
			_, iin := standing(75, length, 0, tt.source.Impedance(omega), tt.load.Impedance(omega), 2)
			if d := cmplx.Abs(st.Source-iin) * 75; d > exactTolerance {
				t.Errorf("Z0 times the source current is off by %.3g V", d)
			}
		})
	}
}

// settled runs to steady state at rounding level.
func settled(t testing.TB, net *network.Network, g Grid, tolerance float64) *Steady {
	t.Helper()
	st, err := Settle(context.Background(), net, g, Settings{Tolerance: tolerance})
	if err != nil {
		t.Fatal(err)
	}
	if !st.Settling.Settled {
		t.Fatalf("not settled after %d periods, residual %.3g, mean %.3g, harmonic %.3g", st.Settling.Periods, st.Settling.Residual, st.Settling.Mean, st.Settling.Harmonic)
	}
	return st
}

// TestExactRing: four quarter-wave lines in a ring, fed at one corner through
// 50 ohm and loaded at the others. Two paths of equal length lead to the far
// corner, so it is a line of half the impedance; the others follow from
// symmetry: a ladder of two quarter waves of z0/2 with loads.
func TestExactRing(t *testing.T) {
	const z0, side, far = 100.0, 150.0, 40.0
	quarter := wavelength / 4
	net := &network.Network{
		Frequency: testFrequency, Junctions: []string{"a", "b", "c", "d"},
		Source: network.Source{At: 0, EMF: 1, Series: network.Series{R: 50}},
	}
	for _, p := range [][2]int{{0, 1}, {1, 2}, {2, 3}, {3, 0}} {
		net.Sections = append(net.Sections, network.Section{From: p[0], To: p[1], Length: quarter, Line: air(z0)})
	}
	for j, r := range map[int]float64{1: side, 2: far, 3: side} {
		net.Branches = append(net.Branches, network.Branch{A: j, B: network.Ground, Series: network.Series{R: r}})
	}
	st := settled(t, net, fixedGrid(net, 40), 1e-12)
	// By hand: quarter waves of z0/2 = 50 ohm. At the sides (two in
	// parallel): 50^2/far || side/2; at the source: 50^2 over that.
	atSides := 1 / (far/2500 + 2/side)
	zin := 2500 / atSides
	va := complex(zin/(50+zin), 0)
	vb := va * complex(0, -atSides/50) // V at the far end of a quarter wave is -j ZL/Z0 times that at its input
	vc := vb * complex(0, -far/50)
	for j, want := range []complex128{va, vb, vc, vb} {
		if d := cmplx.Abs(st.Junctions[j] - want); d > exactTolerance {
			t.Errorf("junction %s: %v, want %v (off by %.3g)", net.Junctions[j], st.Junctions[j], want, d)
		}
	}
}

// TestStiffTrap: "an explicit inductor at a junction overflows at S = 1". The
// companion form must not, with parts far out of proportion.
func TestStiffTrap(t *testing.T) {
	for _, l := range []float64{1e-12, 1e-9, 1e-6, 1e-3} {
		net := &network.Network{
			Frequency: testFrequency, Junctions: []string{"a", "b"},
			Sections: []network.Section{{From: 0, To: 1, Length: wavelength / 2, Line: air(50)}},
			Branches: []network.Branch{{A: 1, B: network.Ground, Series: network.Series{R: 50, L: l}}},
			Source:   network.Source{EMF: 1, Series: network.Series{R: 50, C: 1e-9}},
		}
		st, err := Settle(context.Background(), net, fixedGrid(net, 40), Settings{})
		if err != nil {
			t.Fatal(err)
		}
		omega := 2 * math.Pi * testFrequency
		for p, z := range st.Sections[0].ZV {
			want, _ := standing(50, wavelength/2, z, net.Source.Impedance(omega), net.Branches[0].Impedance(omega), 1)
			if d := cmplx.Abs(st.Sections[0].V[p] - want); !st.Settling.Settled || d > 2e-4 { // twice the settling tolerance
				t.Fatalf("L = %g H, z = %.3f m: V = %v, want %v; settled %v", l, z, st.Sections[0].V[p], want, st.Settling.Settled)
			}
		}
	}
}
