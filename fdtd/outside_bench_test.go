package fdtd

import (
	"testing"

	"linewitness/sim/network"
)

// A bench steps a network with any EMF.
type bench struct {
	*lane
	n int // steps done
}

func newBench(t *testing.T, net *network.Network, g Grid) *bench {
	t.Helper()
	m, err := newModel(net, g)
	if err != nil {
		t.Fatal(err)
	}
	return &bench{lane: m.newLane()}
}

// advance takes one step with the EMF e(t), t in s.
func (b *bench) advance(e func(t float64) float64) {
	b.n++
	b.step(e(float64(b.n) * b.m.grid.Step))
}
