package line

import "math"

// Coax is a coaxial line: a round wire in a round tube.
type Coax struct {
	Inner, Outer              float64 // m: radius of the wire, inner radius of the tube
	Wall                      float64 // m: thickness of the tube; 0 if not known
	Permittivity, LossTangent float64
	InnerMetal, OuterMetal    Conductor
}

// Geometry gives, with a and b for the radii and Rs for the surface
// resistances:
//
//	Z0 = eta0/(2 pi sqrt(er)) ln(b/a)
//	R  = (Rs_a/a + Rs_b/b)/(2 pi)
//	peak field = V/(a ln(b/a)), at the wire
//	TE11: fc = kc c/(2 pi sqrt(er)), kc near 2/(a + b)
//
// They are exact for smooth concentric conductors much thicker than the skin
// depth; a braid has more resistance than a tube. Sources: D.M. Pozar,
// Microwave Engineering, 4th ed. (2012), table 2.1 and section 3.5 (from a
// digest); S.W. Ellingson, Electromagnetics Vol. 2 (2020), modules m0189 and
// m0190. The error is a *GeometryError.
func (x Coax) Geometry() (Geometry, error) {
	if err := x.check(); err != nil {
		return Geometry{}, err
	}
	ratio := math.Log(x.Outer / x.Inner)
	g := homogeneous(eta0/(2*math.Pi)*ratio, x.Permittivity, x.LossTangent)
	g.PeakField = 1 / (x.Inner * ratio)
	g.CutOff = te11(x.Inner, x.Outer) * C0 / (2 * math.Pi * math.Sqrt(x.Permittivity))
	g.surfaces = []surface{
		{"inner conductor", x.InnerMetal, 1 / (2 * math.Pi * x.Inner), x.Inner, radiusOf},
		{"outer conductor", x.OuterMetal, 1 / (2 * math.Pi * x.Outer), x.Wall, "its wall"},
	}
	g.excess = wireDC(x.InnerMetal, x.Inner) / 4
	if x.Wall > 0 {
		g.DCResistance = wireDC(x.InnerMetal, x.Inner) +
			1/(math.Pi*x.OuterMetal.Conductivity*x.Wall*(2*x.Outer+x.Wall))
	}
	return g, nil
}

func (x Coax) check() error {
	checks := []check{
		positiveLength("Inner", "inner radius", x.Inner),
		positiveLength("Outer", "outer radius", x.Outer),
		{"Outer", x.Outer > x.Inner, "the outer conductor must be wider inside than the inner conductor"},
		{"Wall", x.Wall >= 0 && !math.IsInf(x.Wall, 1), "the wall of the outer conductor must not be below 0"},
	}
	checks = append(checks, dielectric(x.Permittivity, x.LossTangent)...)
	checks = append(checks, metal("InnerMetal", "inner conductor", x.InnerMetal)...)
	return firstFault(append(checks, metal("OuterMetal", "outer conductor", x.OuterMetal)...)...)
}

// wireDC is the resistance of a round wire at direct current, ohm/m.
func wireDC(c Conductor, radius float64) float64 {
	return 1 / (math.Pi * radius * radius * c.Conductivity)
}
