package phasor

import (
	"fmt"
	"testing"

	"linewitness/sim/network"
)

// comb is a trunk of n sections with an open stub at every joint.
func comb(n int) *network.Network {
	net := &network.Network{Frequency: 100e6, Junctions: []string{"a"}, Source: network.Source{EMF: 1, Series: network.Series{R: 50}}}
	last := 0
	for i := range n {
		net.Junctions = append(net.Junctions, fmt.Sprint(i))
		c := vacuum(50 + float64(i))
		c.R = 0.1
		from := last
		if i%2 == 0 {
			last = i + 1
		}
		net.Sections = append(net.Sections, network.Section{From: from, To: i + 1, Length: 1 + 0.01*float64(i), Line: c})
	}
	net.Branches = []network.Branch{{A: last, B: network.Ground, Series: network.Series{R: 60}}}
	return net
}

// BenchmarkSolve is one closed-form solution.
func BenchmarkSolve(b *testing.B) {
	for _, n := range []int{4, 40, 200} {
		b.Run(fmt.Sprintf("sections=%d", n), func(b *testing.B) {
			net := comb(n)
			for b.Loop() {
				if _, err := Solve(net); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}

// BenchmarkDecay is one prediction of the decay.
func BenchmarkDecay(b *testing.B) {
	for _, n := range []int{4, 40, 64} {
		b.Run(fmt.Sprintf("sections=%d", n), func(b *testing.B) {
			net := comb(n)
			for b.Loop() {
				Decay(net)
			}
		})
	}
}
