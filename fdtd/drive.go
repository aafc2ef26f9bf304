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
