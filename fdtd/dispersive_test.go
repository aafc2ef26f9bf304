package fdtd

import (
	"math"
	"math/cmplx"
	"math/rand/v2"
	"testing"

	"pgregory.net/rapid"

	"linewitness/sim/line"
	"linewitness/sim/network"
	"linewitness/sim/network/networktest"
)

// dispersiveCascade is lossyCascade with its losses as skin effect and
// dielectric loss.
func dispersiveCascade() *network.Network {
	net := lossyCascade()
	for k := range net.Sections {
		s := &net.Sections[k]
		s.Line, s.Dispersion = line.Disperse(s.Line, net.Omega(), s.Line.R, s.Line.G)
	}
	return net
}

// TestDispersiveOrder: the relaxations keep the second order.
func TestDispersiveOrder(t *testing.T) {
	net := dispersiveCascade()
	g := fixedGrid(net, 24)
	var load []complex128
	for r := range 4 {
		load = append(load, settled(t, net, g.Refine(r), 1e-9).Junctions[2])
	}
	for r := 1; r < len(load)-1; r++ {
		p := math.Log2(cmplx.Abs(load[r-1]-load[r]) / cmplx.Abs(load[r]-load[r+1]))
		if math.Abs(p-2) > 0.2 {
			t.Errorf("observed order %.3f, want 2 within 0.2", p)
		}
	}
}

// talbot is the inverse Laplace transform of f at t by the fixed Talbot
// contour with m points, good to some m/2 figures for smooth functions.
//
// Source: J. Abate and P. P. Valko, Int. J. Numer. Meth. Engng 60, 2004
// (from memory; checked here against the erfc form).
func talbot(f func(complex128) complex128, t float64) float64 {
	const m = 24
	r := 2 * m / (5 * t)
	sum := real(f(complex(r, 0))) * math.Exp(r*t) / 2
	for k := 1; k < m; k++ {
		th := float64(k) * math.Pi / m
		cot := 1 / math.Tan(th)
		s := complex(r*th*cot, r*th)
		sigma := th + (th*cot-1)*cot
		sum += real(cmplx.Exp(s*complex(t, 0)) * f(s) * complex(1, sigma))
	}
	return sum * r / m
}

// TestSkinStep: the step response of a line with skin effect is, for low loss,
//
//	v(l, t) = erfc(K l/(4 Z0 sqrt(t - T)))
//
// Source: R. L. Wigington and N. S. Nahman, Proc. IRE 45, 1957, pp. 166-174
// (formula from memory; the values of the table were recomputed by numerical
// Laplace inversion). 3 dB at 1 GHz on 50 ohm: K l = 6.162146e-4 ohm sqrt(s).
// The exact response is inverted from e^{-g l}/s here.
func TestSkinStep(t *testing.T) {
	const kl = 6.162146e-4
	const length, tail, f = 1.5, 0.15, 1e9
	v := 2e8
	c := line.Constants{L: 50 / v, C: 1 / (50 * v)}
	d := line.Dispersion{Skin: kl / length}
	net := &network.Network{
		Frequency: f, Junctions: []string{"a", "b", "c"},
		Sections: []network.Section{
			{From: 0, To: 1, Length: length, Line: c, Dispersion: d},
			{From: 1, To: 2, Length: tail, Line: c, Dispersion: d}, // its echo comes 1.5 ns late
		},
		Branches: []network.Branch{{A: 2, B: network.Ground, Series: network.Series{R: 50}}},
		Source:   network.Source{EMF: 1},
	}
	g := fixedGrid(net, 400) // 2.5 ps a step
	m, err := newModel(net, g)
	if err != nil {
		t.Fatal(err)
	}
	l := m.newLane()
	var got []float64
	for range 3450 {
		l.step(1)
		got = append(got, l.j[1])
	}
	front := length / v
	exact := func(after float64) float64 {
		return talbot(func(s complex128) complex128 {
			z := s*complex(c.L, 0) + d.Series(s)
			gamma := cmplx.Sqrt(z) * cmplx.Sqrt(s*complex(c.C, 0))
			return cmplx.Exp(s*complex(front, 0)-gamma*complex(length, 0)) / s
		}, after)
	}
	// The rational form and the curvature over a step, on grid; the low-loss expansion on formula, K/(L sqrt(w)) of it at most.
	const grid, formula = 1e-3, 0.005
	for _, row := range []struct{ after, want float64 }{
		{30e-12, 0.4263055}, {100e-12, 0.6630330}, {1e-9, 0.8904066},
	} {
		if v := math.Erfc(kl / (4 * 50 * math.Sqrt(row.after))); math.Abs(v-row.want) > 6e-8 {
			t.Errorf("formula gives %.7f, want %.7f", v, row.want)
		}
		at := (front+row.after)/g.Step + 0.5 // the edge rises from step 0 to step 1
		i := int(at)
		v := got[i-1] + (at-float64(i))*(got[i]-got[i-1])
		t.Logf("%g s after the front: %.5f, exactly %.5f, low loss %.5f", row.after, v, exact(row.after), row.want)
		if math.Abs(v-exact(row.after)) > grid {
			t.Errorf("%g s after the front: %.5f, want %.5f", row.after, v, exact(row.after))
		}
		if math.Abs(v-row.want) > formula {
			t.Errorf("%g s after the front: %.5f, low-loss formula %.5f", row.after, v, row.want)
		}
	}
}

// TestCausality: at Courant number 1 nothing arrives before the delay of the
// highest frequencies, not a rounding.
func TestCausality(t *testing.T) {
	net := dispersiveCascade()
	net.Sections = net.Sections[:1]
	net.Branches = []network.Branch{{A: 1, B: network.Ground, Series: network.Series{R: 60}}}
	net.Junctions = net.Junctions[:2]
	net.Sections[0].Length = 3 / testFrequency * net.Sections[0].Line.FrontVelocity()
	g := fixedGrid(net, 40)
	if g.Courant[0] != 1 {
		t.Fatalf("Courant number %v", g.Courant[0])
	}
	m, err := newModel(net, g)
	if err != nil {
		t.Fatal(err)
	}
	l := m.newLane()
	for n := 1; n <= 130; n++ {
		l.step(1)
		arrived := l.j[1] != 0
		if want := n > 120; arrived != want {
			t.Fatalf("after step %d of a delay of 120 steps: %v V", n, l.j[1])
		}
	}
}

// TestPassive: whatever the source does, a network at rest never gives back
// more energy than it was given, step by step; in the discrete sense too, with
// no tolerance but rounding.
func TestPassive(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		net := networktest.DrawDispersive(t)
		g, err := NewGrid(net, 12)
		if err != nil {
			t.Fatal(err)
		}
		m, err := newModel(net, g)
		if err != nil {
			t.Fatal(err)
		}
		l := m.newLane()
		random := rand.New(rand.NewPCG(rapid.Uint64().Draw(t, "seed"), 0))
		given, top := 0.0, 0.0
		for range 2000 {
			e0 := l.e0
			e1 := random.NormFloat64()
			l.step(e1)
			// The EMF drives minus the current of the source's companion.
			given -= (e0 + e1) / 2 * l.avg[m.source]
			top = math.Max(top, given)
			if given < -1e-9*top {
				t.Fatalf("the network has given back %.3g of %.3g", -given, top)
			}
		}
	})
}

// TestDispersiveRingsDown: after a burst the energy of a dispersive network
// dies away; nothing feeds itself.
func TestDispersiveRingsDown(t *testing.T) {
	net := dispersiveCascade()
	net.Source.Start.Rise = 3 / testFrequency
	net.Source.Stop = &network.Stop{At: 20 / testFrequency, Fall: 3 / testFrequency}
	if s := stressed(t, net, fixedGrid(net, 40)); !s.Complete {
		t.Error("the network did not come to rest")
	}
}
