package fdtd

import (
	"math"

	"linewitness/sim/network"
)

// A drive is the EMF of the source at whole steps.
type drive struct {
	source network.Source
	dt     float64
	carry  []float64 // EMF cos(2 pi m/N + phase), one period
}

// newDrive makes the drive EMF r(t) cos(wt + phase), with r from the source.
func newDrive(src network.Source, g Grid, phase float64) *drive {
	d := &drive{source: src, dt: g.Step, carry: make([]float64, g.StepsPerPeriod)}
	for m := range d.carry {
		d.carry[m] = src.EMF * math.Cos(2*math.Pi*float64(m)/float64(g.StepsPerPeriod)+phase)
	}
	return d
}

// at is the EMF at step n, V; at step 0 it is 0 (see network.Source.Profile).
func (d *drive) at(n int) float64 {
	return d.source.Profile(float64(n)*d.dt) * d.carry[n%len(d.carry)]
}

// edgeSteps is the rise, in steps, of a jump that the source makes. A jump has
// frequencies that no grid carries: at Courant numbers below 1 they lag behind
// and swing over by a fifth and more of the jump, however fine the grid is. A
// rise of some steps has hardly any of them, and shrinks with the grid.
const edgeSteps = 6

// resolved gives a source that jumps a rise, or a fall, of edgeSteps, and tells
// which. A start at a zero of the EMF does not jump.
func resolved(src network.Source, g Grid) (network.Source, float64) {
	edge := edgeSteps * g.Step
	found := 0.0
	if src.StartJumps() {
		src.Start.Rise, found = edge, edge
	}
	if src.Stop != nil && src.Stop.Fall == 0 {
		stop := *src.Stop
		stop.Fall, found = edge, edge
		src.Stop = &stop
	}
	return src, found
}
