package phasor

import (
	"errors"
	"math"
	"math/cmplx"
	"testing"

	"pgregory.net/rapid"

	"linewitness/sim/line"
	"linewitness/sim/network"
	"linewitness/sim/network/networktest"
)

// identityTolerance is relative to the largest amplitude: the rounding of one
// dense solution with a condition number of up to some 1e5.
const identityTolerance = 1e-10

func solved(t interface{ Fatal(...any) }, net *network.Network) *Solution {
	s, err := Solve(net)
	if err != nil {
		t.Fatal(err)
	}
	return s
}

func watts(v, i complex128) float64 { return real(v*cmplx.Conj(i)) / 2 }

// TestPowerBalance: what the source delivers is dissipated in sections and
// branches. The dissipation along a section is integrated from R and G, not
// taken from its ends.
func TestPowerBalance(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		net := networktest.DrawTransformer(t)
		s := solved(t, net)
		in := watts(s.Junction(net.Source.At), s.Source())
		out := 0.0
		for b, br := range net.Branches {
			i := s.Branch(b)
			out += br.R * (real(i)*real(i) + imag(i)*imag(i)) / 2
		}
		for k, sec := range net.Sections {
			out += dissipated(s, k, sec)
		}
		scale := net.Source.EMF * cmplx.Abs(s.Source()) / 2
		if d := math.Abs(in - out); d > 1e-8*scale { // Simpson's rule with 200 points a section
			t.Fatalf("delivered %.12g W, dissipated %.12g W", in, out)
		}
	})
}

// dissipated is the integral of (R|I|^2 + G|V|^2)/2 by Simpson's rule.
func dissipated(s *Solution, k int, sec network.Section) float64 {
	const n = 200
	sum := 0.0
	for i := 0; i <= n; i++ {
		z := sec.Length * float64(i) / n
		v, c := cmplx.Abs(s.Voltage(k, z)), cmplx.Abs(s.Current(k, z))
		w := 2.0 + 2*float64(i%2)
		if i == 0 || i == n {
			w = 1
		}
		sum += w * (sec.Line.R*c*c + sec.Line.G*v*v) / 2
	}
	return sum * sec.Length / n / 3
}

// TestModelsAgreeAtTheDesignFrequency: a line's steady state at the frequency
// it is specified at does not depend on how it is said to depend on frequency.
func TestModelsAgreeAtTheDesignFrequency(t *testing.T) {
	const tolerance = 1e-9 // of the EMF
	rapid.Check(t, func(t *rapid.T) {
		dispersive := networktest.DrawDispersive(t)
		constant := *dispersive
		constant.Sections = append([]network.Section(nil), dispersive.Sections...)
		for k := range constant.Sections {
			s := &constant.Sections[k]
			s.Line, s.Dispersion = s.At(dispersive.Omega()), line.Dispersion{}
		}
		a, b := solved(t, dispersive), solved(t, &constant)
		for j := range dispersive.Junctions {
			if d := cmplx.Abs(a.Junction(j) - b.Junction(j)); d > tolerance*dispersive.Source.EMF {
				t.Fatalf("junction %d differs by %.3g V", j, d)
			}
		}
	})
}

// TestTransformer: an ideal transformer keeps the power, multiplies the voltage
// by its ratio and shows an impedance divided by its square.
func TestTransformer(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		n := rapid.Float64Range(0.1, 10).Draw(t, "ratio")
		load := network.Series{R: rapid.Float64Range(1, 500).Draw(t, "r"), L: rapid.Float64Range(1e-9, 1e-6).Draw(t, "l")}
		net := &network.Network{
			Frequency: 10e6, Junctions: []string{"a", "b"},
			Branches: []network.Branch{
				{A: 0, B: 1, Ratio: n},
				{A: 1, B: network.Ground, Series: load},
			},
			Source: network.Source{EMF: 1, Series: network.Series{R: 50}},
		}
		s := solved(t, net)
		z := load.Impedance(net.Omega()) / complex(n*n, 0)
		if want := z / (z + 50); cmplx.Abs(s.Junction(0)-want) > identityTolerance {
			t.Fatalf("primary %v V, want %v V", s.Junction(0), want)
		}
		if d := cmplx.Abs(s.Junction(1) - complex(n, 0)*s.Junction(0)); d > identityTolerance*n {
			t.Fatalf("secondary %v V for %v V at a ratio of %g", s.Junction(1), s.Junction(0), n)
		}
		if in, out := watts(s.Junction(0), s.Source()), watts(s.Junction(1), s.Branch(1)); math.Abs(in-out) > identityTolerance*in {
			t.Fatalf("%v W in, %v W out", in, out)
		}
	})
}

// TestReciprocity: an EMF at a in series with z gives at b, through a branch of
// the same z, the current that the same EMF at b gives at a.
func TestReciprocity(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		net := networktest.Draw(t)
		part := network.Series{R: 30}
		a, b := 0, len(net.Junctions)-1
		transfer := func(from, to int) complex128 {
			n := *net
			n.Source = network.Source{At: from, EMF: 1, Series: part}
			n.Branches = append(append([]network.Branch(nil), net.Branches...), network.Branch{A: to, B: network.Ground, Series: part})
			return solved(t, &n).Branch(len(n.Branches) - 1)
		}
		ab, ba := transfer(a, b), transfer(b, a)
		if d := cmplx.Abs(ab - ba); d > identityTolerance/30 {
			t.Fatalf("a to b %v A, b to a %v A", ab, ba)
		}
	})
}

// TestReversal: turning every section round changes the sign of its current
// and nothing else.
func TestReversal(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		net := networktest.Draw(t)
		back := *net
		back.Sections = append([]network.Section(nil), net.Sections...)
		for k := range back.Sections {
			s := &back.Sections[k]
			s.From, s.To = s.To, s.From
		}
		f, r := solved(t, net), solved(t, &back)
		for j := range net.Junctions {
			if d := cmplx.Abs(f.Junction(j) - r.Junction(j)); d > identityTolerance*net.Source.EMF {
				t.Fatalf("junction %d differs by %.3g V", j, d)
			}
		}
		for k, s := range net.Sections {
			z := s.Length / 3
			if d := cmplx.Abs(f.Current(k, z) + r.Current(k, s.Length-z)); d > identityTolerance*net.Source.EMF {
				t.Fatalf("current of section %d differs by %.3g A", k, d)
			}
		}
	})
}

// TestDivision: cutting a section in two by a junction changes nothing.
func TestDivision(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		net := networktest.Draw(t)
		cut := *net
		cut.Sections = append([]network.Section(nil), net.Sections...)
		cut.Junctions = append(append([]string(nil), net.Junctions...), "cut")
		at := rapid.Float64Range(0.01, 0.99).Draw(t, "at")
		first := &cut.Sections[0]
		second := *first
		first.To, first.Length = len(net.Junctions), first.Length*at
		second.From, second.Length = len(net.Junctions), second.Length*(1-at)
		cut.Sections = append(cut.Sections, second)
		a, b := solved(t, net), solved(t, &cut)
		for j := range net.Junctions {
			if d := cmplx.Abs(a.Junction(j) - b.Junction(j)); d > identityTolerance*net.Source.EMF {
				t.Fatalf("junction %d differs by %.3g V", j, d)
			}
		}
		v := a.Voltage(0, net.Sections[0].Length*at)
		if d := cmplx.Abs(v - b.Junction(len(net.Junctions))); d > identityTolerance*net.Source.EMF {
			t.Fatalf("at the cut: %v and %v", v, b.Junction(len(net.Junctions)))
		}
	})
}

// TestLinear: twice the EMF is twice everything.
func TestLinear(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		net := networktest.Draw(t)
		a := solved(t, net)
		net.Source.EMF *= 2
		b := solved(t, net)
		for j := range net.Junctions {
			if d := cmplx.Abs(2*a.Junction(j) - b.Junction(j)); d > identityTolerance*net.Source.EMF {
				t.Fatalf("junction %d: %v and %v", j, a.Junction(j), b.Junction(j))
			}
		}
	})
}

func vacuum(z0 float64) line.Constants {
	return line.Constants{L: z0 / line.C0, C: 1 / (z0 * line.C0)}
}

// TestHardLines: what admittance forms break on - a half-wave lossless line,
// and a line of 10 000 dB - is harmless here.
func TestHardLines(t *testing.T) {
	wave := line.C0 / 100e6
	net := &network.Network{
		Frequency: 100e6, Junctions: []string{"a", "b"},
		Sections: []network.Section{{From: 0, To: 1, Length: wave / 2, Line: vacuum(75)}},
		Branches: []network.Branch{{A: 1, B: network.Ground, Series: network.Series{R: 30}}},
		Source:   network.Source{EMF: 1, Series: network.Series{R: 50}},
	}
	if v := solved(t, net).Junction(0); cmplx.Abs(v-30.0/80) > identityTolerance {
		t.Errorf("half-wave line: %v, want 0.375", v)
	}
	net.Sections[0].Line.R = 2 * 75 * 10_000 / line.NeperDB / (wave / 2)
	s := solved(t, net)
	_, zc := s.Line(0)
	if v, want := s.Junction(0), zc/(zc+50); cmplx.Abs(v-want) > identityTolerance {
		t.Errorf("very long lossy line: %v, want %v", v, want)
	}
	if v := s.Junction(1); cmplx.Abs(v) > 1e-20 { // rounding of a number of size 1, refined once
		t.Errorf("at its end: %v", v)
	}
}

// TestSingular: a lossless line shorted at both ends, half a wave long and fed
// at no point of its own, resonates; there is no steady state.
func TestSingular(t *testing.T) {
	wave := line.C0 / 100e6
	net := &network.Network{
		Frequency: 100e6, Junctions: []string{"a", "b"},
		Sections: []network.Section{{From: 0, To: 1, Length: wave / 2, Line: vacuum(75)}},
		Branches: []network.Branch{{A: 1, B: network.Ground}},
		Source:   network.Source{EMF: 1},
	}
	if _, err := Solve(net); !errors.Is(err, ErrSingular) {
		t.Errorf("got %v, want ErrSingular", err)
	}
}

// TestExtremes: on a lossless line the largest and smallest voltages are
// |V+|(1 + |G|) and |V+|(1 - |G|), a quarter wave apart.
func TestExtremes(t *testing.T) {
	wave := line.C0 / 100e6
	net := &network.Network{
		Frequency: 100e6, Junctions: []string{"a", "b"},
		Sections: []network.Section{{From: 0, To: 1, Length: 0.81 * wave, Line: vacuum(50)}},
		Branches: []network.Branch{{A: 1, B: network.Ground, Series: network.Series{R: 30, L: 30e-9}}},
		Source:   network.Source{EMF: 2, Series: network.Series{R: 50}},
	}
	hi, lo := solved(t, net).VoltageExtremes(0)
	zl := net.Branches[0].Impedance(net.Omega())
	g := cmplx.Abs((zl - 50) / (zl + 50))
	const tolerance = 1e-9 // golden section stops at the root of the rounding: a value, not a place
	if math.Abs(hi.Value-(1+g)) > tolerance || math.Abs(lo.Value-(1-g)) > tolerance {
		t.Errorf("extremes %.9f and %.9f, want %.9f and %.9f", hi.Value, lo.Value, 1+g, 1-g)
	}
	if d := math.Abs(hi.At - lo.At); math.Abs(d-wave/4) > 1e-5*wave {
		t.Errorf("extremes %.6f wavelengths apart", d/wave)
	}
}

// TestDecay: a line keeps |Gs Gl| e^{-2 alpha l} of its amplitude a round
// trip, so it decays at -ln of that over the round trip time.
func TestDecay(t *testing.T) {
	for _, tt := range []struct{ rs, rl, nepers float64 }{
		{100, 150, 0}, {10, 5, 0}, {20, 200, 0.3}, {0, 500, 0.1},
	} {
		const length = 12.3
		c := vacuum(50)
		// Distortionless, so that the loss is the same at every frequency.
		c.R = tt.nepers / length * 50
		c.G = tt.nepers / length / 50
		net := &network.Network{
			Frequency: 100e6, Junctions: []string{"a", "b"},
			Sections: []network.Section{{From: 0, To: 1, Length: length, Line: c}},
			Branches: []network.Branch{{A: 1, B: network.Ground, Series: network.Series{R: tt.rl}}},
			Source:   network.Source{EMF: 1, Series: network.Series{R: tt.rs}},
		}
		rho := math.Abs((tt.rs - 50) / (tt.rs + 50) * (tt.rl - 50) / (tt.rl + 50) * math.Exp(-2*tt.nepers))
		want := -math.Log(rho) / (2 * length / line.C0)
		if got := Decay(net); math.Abs(got/want-1) > 1e-6 {
			t.Errorf("%+v: decay %.6g 1/s, want %.6g", tt, got, want)
		}
	}
}

// TestExtremesAmongCrests: on a line with a little loss the crests differ by
// less than a coarse scan misses them by, and the largest is still found: not
// below any of a very fine scan.
func TestExtremesAmongCrests(t *testing.T) {
	for _, length := range []float64{1.37, 4.11, 12.03} {
		c := vacuum(50)
		c.R = 0.2 // 0.002 Np/m
		s := solved(t, &network.Network{
			Frequency: 100e6, Junctions: []string{"a", "b"},
			Sections: []network.Section{{From: 0, To: 1, Length: length, Line: c}},
			Source:   network.Source{EMF: 2, Series: network.Series{R: 30}},
		})
		hi, lo := s.VoltageExtremes(0)
		const points = 200000
		for i := range points + 1 {
			v := cmplx.Abs(s.Voltage(0, length*float64(i)/points))
			if v > hi.Value*(1+1e-9) { // the crest is found to the square root of rounding in place, to rounding in size
				t.Fatalf("%g m: %.9g V at %.4f m, above the largest %.9g at %.4f", length, v, length*float64(i)/points, hi.Value, hi.At)
			}
			if v < lo.Value-1e-9*hi.Value {
				t.Fatalf("%g m: %.9g V at %.4f m, below the smallest %.9g at %.4f", length, v, length*float64(i)/points, lo.Value, lo.At)
			}
		}
	}
}

// TestDecayAtResonance: a resonant line has pairs of eigenvalues of one size,
// which the library cannot tell apart as they stand; the decay is that of the
// closed form all the same.
func TestDecayAtResonance(t *testing.T) {
	for _, quarters := range []int{1, 2, 3, 4, 8} {
		for _, tt := range []struct{ rs, rl float64 }{{10, 250}, {250, 10}, {2.5, 1000}, {10, 10}} {
			length := float64(quarters) * line.C0 / 100e6 / 4
			net := &network.Network{
				Frequency: 100e6, Junctions: []string{"a", "b"},
				Sections: []network.Section{{From: 0, To: 1, Length: length, Line: vacuum(50)}},
				Branches: []network.Branch{{A: 1, B: network.Ground, Series: network.Series{R: tt.rl}}},
				Source:   network.Source{EMF: 1, Series: network.Series{R: tt.rs}},
			}
			rho := math.Abs((tt.rs - 50) / (tt.rs + 50) * (tt.rl - 50) / (tt.rl + 50))
			want := -math.Log(rho) / (2 * length / line.C0)
			if got := Decay(net); !(math.Abs(got/want-1) < 1e-6) { // as TestDecay
				t.Errorf("%d quarter waves, %+v: decay %.6g 1/s, want %.6g", quarters, tt, got, want)
			}
		}
	}
}
