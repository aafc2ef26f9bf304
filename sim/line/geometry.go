package line

import (
	"fmt"
	"math"
)

// A Geometry is what the dimensions and materials of a line give: what holds
// at every frequency as fields, the rest by methods. Coax, TwoWire,
// WireOverGround, Microstrip and Stripline make it.
type Geometry struct {
	Z0             float64  // ohm, of perfect conductors
	VelocityFactor float64  // 1/sqrt(Permittivity)
	Permittivity   float64  // relative, effective
	LossTangent    float64  // effective, G/(wC)
	DCResistance   float64  // ohm/m of both conductors; 0 if not known
	PeakField      float64  // 1/m: largest field in V/m per volt; 0 if not known
	CutOff         float64  // Hz of the next mode, TE11; 0 if not known
	Warnings       []string // of dimensions outside the range of the formulas

	surfaces []surface
	excess   float64 // ohm/m, see Resistance
	quasi    func(f float64) string
}

// A surface is what one conductor adds to the resistance.
type surface struct {
	name  string
	metal Conductor
	// perMetre times the surface resistance is the resistance, 1/m.
	perMetre float64
	// size is what the skin depth must be small against, m, and what it is; 0
	// if it is not known.
	size    float64
	against string
}

// Conductor is the resistance of the skin effect at f in Hz, ohm/m: the part
// that grows as the square root of the frequency, save for the roughness.
func (g Geometry) Conductor(f float64) float64 {
	var r float64
	for _, s := range g.surfaces {
		r += s.perMetre * s.metal.SurfaceResistance(f)
	}
	return r
}

// Resistance is the series resistance at f in Hz, ohm/m: Conductor and the
// next term of the skin effect in round wires, a quarter of their resistance
// at direct current, which does not depend on frequency.
func (g Geometry) Resistance(f float64) float64 { return g.Conductor(f) + g.excess }

// Dielectric is the shunt conductance of the loss tangent at f in Hz, S/m.
func (g Geometry) Dielectric(f float64) float64 {
	return 2 * math.Pi * f * g.capacitance() * g.LossTangent
}

func (g Geometry) capacitance() float64 { return 1 / (g.Z0 * g.VelocityFactor * C0) }

// At gives the primary constants at f in Hz. Z0 is that of perfect conductors,
// so the inductance is Z0/v and, on top of it, that of the field inside the
// conductors, whose reactance is as large as the resistance of the skin
// effect:
//
//	L = Z0/v + Conductor/w,  C = 1/(Z0 v),  R = Resistance,  G = Dielectric
//
// Disperse(g.At(f), w, g.Conductor(f), g.Dielectric(f)) makes it dispersive.
func (g Geometry) At(f float64) Constants {
	v := g.VelocityFactor * C0
	return Constants{
		R: g.Resistance(f),
		L: g.Z0/v + g.Conductor(f)/(2*math.Pi*f),
		G: g.Dielectric(f),
		C: g.capacitance(),
	}
}

// WarningsAt tells what limits the results at f in Hz, besides Warnings: a
// skin depth that is not small, a higher mode, a wave that is not TEM.
func (g Geometry) WarningsAt(f float64) []string {
	var out []string
	for _, s := range g.surfaces {
		if w := s.thin(f); w != "" {
			out = append(out, w)
		}
	}
	if g.CutOff > 0 && f > modeMargin*g.CutOff {
		out = append(out, fmt.Sprintf("the frequency is not below %g of the cut-off of the TE11 mode, %.4g GHz: other waves than TEM may travel", modeMargin, g.CutOff/1e9))
	}
	if g.quasi != nil {
		if w := g.quasi(f); w != "" {
			out = append(out, w)
		}
	}
	return out
}

// modeMargin is how near to the cut-off of TE11 a coaxial line is used:
// common practice, as in D.M. Pozar, Microwave Engineering, 4th ed. (2012),
// Example 3.3 (from a digest).
const modeMargin = 0.95

// thinLimit is how many skin depths a conductor must have for the law of the
// square root: with three, a round wire's resistance is 18 % above the law,
// and 1.3 % above what Resistance gives.
const thinLimit = 3

// radiusOf is what a round wire is measured by.
const radiusOf = "its radius"

func (s surface) thin(f float64) string {
	depth := s.metal.SkinDepth(f)
	if s.size == 0 || s.size >= thinLimit*depth {
		return ""
	}
	out := fmt.Sprintf("the skin depth of the %s, %s, is not small against %s, %s: the resistance does not follow the square root of the frequency",
		s.name, metres(depth), s.against, metres(s.size))
	if s.against == radiusOf {
		exact := real(WireImpedance(s.metal.Conductivity, s.size, f))
		law := s.metal.SurfaceResistance(f) / (2 * math.Pi * s.size)
		out += fmt.Sprintf(", and that of such a wire is %.3g times what the law gives", exact/law)
	}
	return out
}

// metres prints a length with the unit that suits it.
func metres(x float64) string {
	switch {
	case x >= 1:
		return fmt.Sprintf("%.3g m", x)
	case x >= 1e-3:
		return fmt.Sprintf("%.3g mm", x*1e3)
	}
	return fmt.Sprintf("%.3g um", x*1e6)
}

// A GeometryError tells which dimension or material makes no line.
type GeometryError struct {
	Field   string // as in the Go struct: "Inner", "Permittivity"
	Message string
}

// Error is the message, which names the field in words.
func (e *GeometryError) Error() string { return e.Message }

// A check is a condition on a field.
type check struct {
	field string
	ok    bool
	say   string
}

// firstFault gives the error of the first check that fails.
func firstFault(checks ...check) error {
	for _, c := range checks {
		if !c.ok {
			return &GeometryError{c.field, c.say}
		}
	}
	return nil
}

func positiveLength(field, name string, x float64) check {
	return check{field, x > 0 && !math.IsInf(x, 1), "the " + name + " must be above 0"}
}

func dielectric(permittivity, lossTangent float64) []check {
	return []check{
		{"Permittivity", permittivity >= 1 && !math.IsInf(permittivity, 1), "the permittivity must be at least 1: it is relative to vacuum"},
		{"LossTangent", lossTangent >= 0 && lossTangent < 1, "the loss tangent must be at least 0 and below 1"},
	}
}

func metal(field, name string, c Conductor) []check {
	return []check{
		{field, c.Conductivity > 0, "the conductivity of the " + name + " must be above 0"},
		{field, c.Roughness >= 0 && !math.IsInf(c.Roughness, 1), "the roughness of the " + name + " must be at least 0"},
	}
}

// homogeneous starts the geometry of a TEM line in one dielectric, of which
// air is the impedance in vacuum.
func homogeneous(air, permittivity, lossTangent float64) Geometry {
	n := math.Sqrt(permittivity)
	return Geometry{Z0: air / n, VelocityFactor: 1 / n, Permittivity: permittivity, LossTangent: lossTangent}
}
