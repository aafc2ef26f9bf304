package line

import (
	"math"
	"testing"
)

// ELL m0188 (see conductor_test.go) prints 298 ohm by the approximation
// ln(2D/d); the exact value was computed.
func TestTwoWire(t *testing.T) {
	g := mustGeometry(t, TwoWire{1e-3, 6e-3, 1, 0, copper})
	near(t, "Z0, computed", g.Z0, 297.1409, 0.00005)
	approximate := eta0 / math.Pi * math.Log(12)
	near(t, "approximate Z0, ELL", approximate, 298, 0.5)
	near(t, "Z0 over the approximation", g.Z0/approximate, 1, 0.003)
	near(t, "permittivity", mustGeometry(t, TwoWire{1e-3, 6e-3, 4, 0, copper}).Z0, g.Z0/2, roundTol*300)
}

// The formula is from memory; the value was computed from it. The second check
// does not depend on it: it is half of a two-wire line.
func TestWireOverGround(t *testing.T) {
	g := mustGeometry(t, WireOverGround{1e-3, 10e-3, 1, 0, copper, copper})
	near(t, "Z0, computed", g.Z0, 179.4691, 0.00005)
	pair := mustGeometry(t, TwoWire{2e-3, 20e-3, 1, 0, copper})
	near(t, "Z0 of the pair", pair.Z0/g.Z0, 2, roundTol*10)
	near(t, "field of the pair", g.PeakField/pair.PeakField, 2, roundTol*10)
	perfect := Conductor{Conductivity: math.Inf(1)}
	g = mustGeometry(t, WireOverGround{1e-3, 10e-3, 1, 0, copper, perfect})
	near(t, "R of the pair", pair.Resistance(1e6)/g.Resistance(1e6), 2, roundTol*10)
}

// TestRecedingWalls: the resistance is Rs/mu0 times the change of the
// inductance as the walls recede, which is taken from Z0 by differences.
func TestRecedingWalls(t *testing.T) {
	const f, n = 10e6, 1e-8
	const differenceTol = 1e-6
	perfect := Conductor{Conductivity: math.Inf(1)}
	rs := copper.SurfaceResistance(f)
	slope := func(z0 func(n float64) float64) float64 { return (z0(n) - z0(-n)) / (2 * n) / C0 / mu0 * rs }
	for _, row := range []struct {
		name string
		s    shape
		z0   func(n float64) float64
	}{
		{"two-wire", TwoWire{1e-3, 1.3e-3, 1, 0, copper}, func(n float64) float64 {
			return mustGeometry(t, TwoWire{1e-3 - 2*n, 1.3e-3, 1, 0, copper}).Z0
		}},
		{"over ground", WireOverGround{1e-3, 1.3e-3, 1, 0, copper, perfect}, func(n float64) float64 {
			return mustGeometry(t, WireOverGround{1e-3 - n, 1.3e-3, 1, 0, copper, copper}).Z0
		}},
		{"ground", WireOverGround{1e-3, 1.3e-3, 1, 0, perfect, copper}, func(n float64) float64 {
			return mustGeometry(t, WireOverGround{1e-3, 1.3e-3 + n, 1, 0, copper, copper}).Z0
		}},
		{"coax", Coax{1e-3, 1.3e-3, 0, 1, 0, copper, copper}, func(n float64) float64 {
			return mustGeometry(t, Coax{1e-3 - n, 1.3e-3 + n, 0, 1, 0, copper, copper}).Z0
		}},
	} {
		near(t, row.name, mustGeometry(t, row.s).Conductor(f)/slope(row.z0), 1, differenceTol)
	}
}

// TestPeakFieldOfWires: the field by differences of the potential of two line
// charges, ln(r2/r1), over the voltage between the surfaces.
func TestPeakFieldOfWires(t *testing.T) {
	const differenceTol = 1e-6
	for _, ratio := range []float64{1.1, 2, 6, 50} {
		const a = 1.0
		axis := ratio * a               // of the wire, from the middle
		s := math.Sqrt(axis*axis - a*a) // of the line charge
		potential := func(x float64) float64 { return math.Log((s + x) / (s - x)) }
		surface := axis - a
		const h = 1e-6
		field := (potential(surface+h) - potential(surface-h)) / (2 * h)
		g := mustGeometry(t, TwoWire{2 * a, 2 * axis, 1, 0, copper})
		near(t, "field per volt", g.PeakField/(field/(2*potential(surface))), 1, differenceTol)
	}
}
