// Package networktest makes random networks for property tests: trees and
// rings, parallel sections, stubs, bridging parts, shorts and opens, ideal and
// reactive sources, junctions where no section ends. Every one has loss enough
// to come to rest.
package networktest

import (
	"fmt"

	"pgregory.net/rapid"

	"linewitness/sim/line"
	"linewitness/sim/network"
)

// Frequency is the source frequency of the random networks, Hz.
const Frequency = 100e6

// omega is 2 pi Frequency.
const omega = 2 * 3.141592653589793 * Frequency

// Draw draws a network of 1 to 7 sections.
func Draw(t *rapid.T) *network.Network {
	d := drawer{t: t, net: &network.Network{Frequency: Frequency, Junctions: []string{"source"}}}
	trunk := rapid.IntRange(1, 5).Draw(t, "tree sections")
	for range trunk {
		from := rapid.IntRange(0, len(d.net.Junctions)-1).Draw(t, "from")
		d.section(from, d.junction())
	}
	for range rapid.IntRange(0, 2).Draw(t, "closing sections") {
		a, b := d.pair()
		d.section(a, b)
	}
	d.loads()
	if rapid.Bool().Draw(t, "bridge") {
		a, b := d.pair()
		d.branch(network.Element, a, b, d.lossy())
	}
	if rapid.Bool().Draw(t, "hanging junction") {
		d.hanging()
	}
	d.source()
	return d.net
}

type drawer struct {
	t   *rapid.T
	net *network.Network
}

func (d drawer) float(lo, hi float64, what string) float64 {
	return rapid.Float64Range(lo, hi).Draw(d.t, what)
}

func (d drawer) junction() int {
	d.net.Junctions = append(d.net.Junctions, fmt.Sprintf("j%d", len(d.net.Junctions)))
	return len(d.net.Junctions) - 1
}

// pair draws two different junctions.
func (d drawer) pair() (a, b int) {
	n := len(d.net.Junctions)
	a = rapid.IntRange(0, n-1).Draw(d.t, "a")
	return a, (a + rapid.IntRange(1, n-1).Draw(d.t, "b-a")) % n
}

// section draws a line of 0.03 to 1.3 wavelengths with up to 1 dB of loss per
// wavelength.
func (d drawer) section(from, to int) {
	z0 := d.float(20, 300, "z0")
	v := d.float(0.5, 1, "velocity factor") * line.C0
	wave := v / Frequency
	a := d.float(0.002, 0.1, "nepers per wavelength") / wave
	share := d.float(0, 1, "dielectric share")
	d.net.Sections = append(d.net.Sections, network.Section{
		Name: fmt.Sprintf("s%d", len(d.net.Sections)), From: from, To: to,
		Length: d.float(0.03, 1.3, "wavelengths") * wave,
		Line: line.Constants{
			R: 2 * a * z0 * (1 - share), L: z0 / v,
			G: 2 * a * share / z0, C: 1 / (z0 * v),
		},
	})
}

func (d drawer) branch(kind network.Kind, a, b int, s network.Series) {
	d.net.Branches = append(d.net.Branches, network.Branch{
		Name: fmt.Sprintf("b%d", len(d.net.Branches)), Kind: kind, A: a, B: b, Series: s,
	})
}

// lossy draws a series combination with a resistor and reactances of up to
// 200 ohm.
func (d drawer) lossy() network.Series {
	s := network.Series{R: d.float(10, 300, "ohm")}
	if rapid.Bool().Draw(d.t, "has l") {
		s.L = d.float(1, 200, "ohm of l") / omega
	}
	if rapid.Bool().Draw(d.t, "has c") {
		s.C = 1 / (omega * d.float(1, 200, "ohm of c"))
	}
	return s
}

// loads puts one load with loss at the end of the tree and, at some other
// junctions, loads, shorts, opens and pure reactances.
func (d drawer) loads() {
	d.branch(network.Load, len(d.net.Junctions)-1, network.Ground, d.lossy())
	for j := 1; j < len(d.net.Junctions)-1; j++ {
		switch rapid.IntRange(0, 5).Draw(d.t, "load kind") {
		case 0:
			d.branch(network.Load, j, network.Ground, d.lossy())
		case 1:
			d.branch(network.Load, j, network.Ground, network.Series{})
		case 2:
			d.branch(network.Load, j, network.Ground, network.Series{})
			d.net.Branches[len(d.net.Branches)-1].Open = true
		case 3:
			d.branch(network.Element, j, network.Ground, network.Series{C: 1 / (omega * d.float(20, 200, "ohm of shunt c"))})
		}
	}
}

// hanging adds a junction where no section ends, reached by a part and loaded
// by another.
func (d drawer) hanging() {
	at := rapid.IntRange(0, len(d.net.Junctions)-1).Draw(d.t, "hangs from")
	j := d.junction()
	d.branch(network.Element, at, j, network.Series{
		R: d.float(1, 50, "ohm of choke"), L: d.float(1, 200, "ohm of choke l") / omega,
	})
	d.branch(network.Load, j, network.Ground, d.lossy())
}

func (d drawer) source() {
	s := network.Source{At: 0, EMF: d.float(1, 1000, "emf"), Start: network.Start{Worst: true}}
	switch rapid.IntRange(0, 3).Draw(d.t, "source kind") {
	case 0: // ideal
	case 1:
		s.Series = d.lossy()
	default:
		s.R = d.float(5, 200, "source ohm")
	}
	d.net.Source = s
}
