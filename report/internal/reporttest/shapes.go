package reporttest

import (
	"fmt"

	"linewitness/sim/record"
)

// One makes a record of one case from a network.
func One(title string, n Network, opt Options) *record.Record {
	r := newRecord(title, n)
	r.Cases = []record.Case{n.Case("nominal", opt)}
	finish(r)
	return r
}

// Single is one matched section.
func Single(wavelengths float64) Network {
	return Network{
		Frequency: 100e6, EMF: 100, Source: 50, At: "tx",
		Sections: []Section{{Name: "line", From: "tx", To: "rx", Length: 3 * wavelengths, Z0: 50, VF: 1, DB: 0.01}},
		Loads:    []Load{{Name: "load", At: "rx", R: 75, L: 20e-9}},
	}
}

// Cascade is n sections in a row with a stub at every fifth junction.
func Cascade(n int) Network {
	net := Network{Frequency: 30e6, EMF: 100, Source: 50, At: "j0"}
	for i := range n {
		from, to := fmt.Sprintf("j%d", i), fmt.Sprintf("j%d", i+1)
		net.Sections = append(net.Sections, Section{
			Name: fmt.Sprintf("s%d", i+1), From: from, To: to, Length: 2.5 + 0.3*float64(i%4), Z0: 50 + 25*float64(i%2), VF: 0.8, DB: 0.01,
		})
	}
	net.Loads = []Load{{Name: "end", At: fmt.Sprintf("j%d", n), R: 60, C: 90e-12}}
	return net
}

// Star is n branches from one junction, each with a load.
func Star(n int) Network {
	net := Network{Frequency: 100e6, EMF: 2, Source: 50, At: "reference"}
	net.Sections = []Section{{Name: "feed", From: "reference", To: "hub", Length: 3, Z0: 50, VF: 0.7, DB: 0.04}}
	for i := range n {
		end := fmt.Sprintf("receiver_%d", i+1)
		net.Sections = append(net.Sections, Section{
			Name: fmt.Sprintf("branch_%d", i+1), From: "hub", To: end, Length: 12 + 0.01*float64(i), Z0: 50, VF: 0.7, DB: 0.04,
		})
		net.Loads = append(net.Loads, Load{Name: fmt.Sprintf("rx_%d", i+1), At: end, R: 50})
	}
	return net
}

// Ring is a ring of n sections with a feed, a chord and a parallel pair.
func Ring(n int) Network {
	net := Network{Frequency: 50e6, EMF: 10, Source: 50, At: "in"}
	net.Sections = []Section{{Name: "feed", From: "in", To: "r0", Length: 1, Z0: 50, VF: 0.66, DB: 0.03}}
	for i := range n {
		net.Sections = append(net.Sections, Section{
			Name: fmt.Sprintf("arc_%d", i), From: fmt.Sprintf("r%d", i), To: fmt.Sprintf("r%d", (i+1)%n), Length: 1.1, Z0: 70, VF: 0.66, DB: 0.03,
		})
	}
	net.Sections = append(net.Sections,
		Section{Name: "twin", From: "in", To: "r0", Length: 1.5, Z0: 75, VF: 0.66, DB: 0.03})
	net.Loads = []Load{{Name: "out", At: fmt.Sprintf("r%d", n/2), R: 50}}
	net.Bridges = []Load{{Name: "pad", At: "r1", To: fmt.Sprintf("r%d", n-1), R: 100}}
	return net
}
