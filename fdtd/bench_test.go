package fdtd

import (
	"context"
	"fmt"
	"math"
	"testing"

	"linewitness/sim/line"
	"linewitness/sim/network"
)

// benchmarkLine is a line of about cells cells at 40 steps per period.
func benchmarkLine(cells int, loss string) (*network.Network, Grid) {
	net := matchedLine(float64(cells) / 40 * wavelength * 1.0001)
	net.Branches[0].R = 150
	sec := &net.Sections[0]
	switch loss {
	case "constant":
		sec.Line.R, sec.Line.G = 0.1, 1e-6
	case "skin":
		sec.Line.R = 0.1
		sec.Line, sec.Dispersion = line.Disperse(sec.Line, net.Omega(), 0.1, 0)
	case "skin+dielectric":
		sec.Line.R, sec.Line.G = 0.1, 1e-6
		sec.Line, sec.Dispersion = line.Disperse(sec.Line, net.Omega(), 0.1, 1e-6)
	}
	return net, fixedGrid(net, 40)
}

// BenchmarkStep is the rate of the settling run (one lane) and of the stress
// run (two lanes and the running peaks, each lane counted). Skin effect alone has
// nine poles, two a decade over the four decades that they stand for.
func BenchmarkStep(b *testing.B) {
	for _, cells := range []int{200, 3_000, 200_000} {
		for _, loss := range []string{"none", "constant", "skin", "skin+dielectric"} {
			net, g := benchmarkLine(cells, loss)
			net.Source.Start.Worst = true
			m, err := newModel(net, g)
			if err != nil {
				b.Fatal(err)
			}
			b.Run(fmt.Sprintf("run=settle/cells=%d/loss=%s", cells, loss), func(b *testing.B) {
				l := m.newLane()
				for b.Loop() {
					l.step(1)
				}
				rate(b, g.TotalCells())
			})
			b.Run(fmt.Sprintf("run=stress/cells=%d/loss=%s", cells, loss), func(b *testing.B) {
				d := newDrive(net.Source, g, 0)
				r := m.newRun(context.Background(), Settings{}, d, newDrive(net.Source, g, -math.Pi/2))
				s := &stresser{m: m, run: r, final: &Steady{Junctions: make([]complex128, 2)}, worst: true}
				s.prepare([]float64{0, -math.Pi / 2})
				for b.Loop() {
					r.n++
					for i, l := range r.lanes {
						l.step(r.drives[i].at(r.n))
					}
					s.look()
				}
				rate(b, 2*g.TotalCells())
			})
		}
	}
}

func rate(b *testing.B, cells int) {
	b.ReportMetric(float64(cells)*float64(b.N)/b.Elapsed().Seconds(), "cells/s")
}

// BenchmarkSettle is a whole settling run of the mismatched line.
func BenchmarkSettle(b *testing.B) {
	net, g := benchmarkLine(3_000, "constant")
	for b.Loop() {
		if _, err := Settle(context.Background(), net, g, Settings{}); err != nil {
			b.Fatal(err)
		}
	}
}
