package line

import (
	"fmt"
	"math"
)

// Microstrip is a strip on a dielectric sheet over a ground plane, with air
// above.
type Microstrip struct {
	Width, Height, Thickness  float64 // m: of the strip, of the sheet, of the strip (0: not known)
	Permittivity, LossTangent float64 // of the sheet
	Metal                     Conductor
}

// Geometry gives the impedance and the effective permittivity by the formulas
// of E. Hammerstad and O. Jensen, IEEE MTT-S Symposium 1980, pp. 407-409 (two
// copies that agree), with their correction for the thickness. Claimed (from
// memory): within 0.03 % for the impedance in air with width/height up to 1000,
// within 0.2 % for the permittivity with width/height from 0.01 to 100 and a
// permittivity up to 128. They are of the static field: see WarningsAt.
//
// The loss tangent counts as far as the field is in the sheet,
//
//	tan d (er/ee) (ee - 1)/(er - 1)
//
// as in D.M. Pozar, Microwave Engineering, 4th ed. (2012), eq. 3.198 (from a
// digest). For the loss in the conductors see perMetre. The error is a
// *GeometryError.
func (x Microstrip) Geometry() (Geometry, error) {
	if err := x.check(); err != nil {
		return Geometry{}, err
	}
	u, t := x.Width/x.Height, x.Thickness/x.Height
	z0, ee := hammerstadJensen(u, t, x.Permittivity)
	g := homogeneous(z0*math.Sqrt(ee), ee, x.LossTangent*filling(u, ee, x.Permittivity)*x.Permittivity/ee)
	g.surfaces = []surface{{"strip", x.Metal, x.perMetre(), x.Thickness, "its thickness"}}
	g.Warnings = x.warnings(u)
	g.quasi = func(f float64) string { return x.dispersion(f, z0, ee) }
	return g, nil
}

func (x Microstrip) check() error {
	checks := []check{
		positiveLength("Width", "width", x.Width),
		positiveLength("Height", "height", x.Height),
		{"Thickness", x.Thickness >= 0, "the thickness must not be below 0"},
		{"Thickness", x.Thickness < x.Width && x.Thickness < x.Height, "the thickness must be below the width and the height"},
	}
	checks = append(checks, dielectric(x.Permittivity, x.LossTangent)...)
	return firstFault(append(checks, metal("Metal", "strip", x.Metal)...)...)
}

// warnings are of dimensions outside the range of the formulas.
func (x Microstrip) warnings(u float64) (out []string) {
	if u < 0.01 || u > 100 {
		out = append(out, fmt.Sprintf("width/height is %.3g; the formula for the permittivity is known to be good from 0.01 to 100", u))
	}
	if x.Permittivity > 128 {
		out = append(out, fmt.Sprintf("the permittivity %g is above 128, up to which the formula is known to be good", x.Permittivity))
	}
	if x.Thickness == 0 && !math.IsInf(x.Metal.Conductivity, 1) {
		out = append(out, "the thickness of the strip is not given: the current is taken as uniform across the width, and the conductor loss may be far off")
	}
	return out
}

// hammerstadJensen is the impedance and the effective permittivity for
// u = width/height and t = thickness/height.
func hammerstadJensen(u, t, er float64) (z0, ee float64) {
	if t == 0 {
		ee = stripPermittivity(u, er)
		return stripAir(u) / math.Sqrt(ee), ee
	}
	coth := 1 / math.Tanh(math.Sqrt(6.517*u))
	u1 := u + t/math.Pi*math.Log(1+4*math.E/(t*coth*coth))
	ur := u + (u1-u)/2*(1+1/math.Cosh(math.Sqrt(er-1)))
	e := stripPermittivity(ur, er)
	ratio := stripAir(u1) / stripAir(ur)
	return stripAir(ur) / math.Sqrt(e), e * ratio * ratio
}

// stripAir is the impedance of a thin strip in air.
func stripAir(u float64) float64 {
	f := 6 + (2*math.Pi-6)*math.Exp(-math.Pow(30.666/u, 0.7528))
	return eta0 / (2 * math.Pi) * math.Log(f/u+math.Sqrt(1+4/(u*u)))
}

// stripPermittivity is the effective permittivity of a thin strip.
func stripPermittivity(u, er float64) float64 {
	return (er+1)/2 + (er-1)/2*spread(u, er)
}

// spread is (1 + 10/u)^(-ab), from 0 for a thin wire to 1 for a wide strip.
func spread(u, er float64) float64 {
	u4 := u * u * u * u
	a := 1 + math.Log((u4+u*u/2704)/(u4+0.432))/49 + math.Log(1+math.Pow(u/18.1, 3))/18.7
	b := 0.564 * math.Pow((er-0.9)/(er+3), 0.053)
	return math.Pow(1+10/u, -a*b)
}

// filling is (ee - 1)/(er - 1), the share of the sheet in the capacitance over
// that in air; with no sheet, what it tends to.
func filling(u, ee, er float64) float64 {
	const airy = 1e-9 // where the quotient is rounding
	if er-1 < airy {
		return (1 + spread(u, er)) / 2
	}
	return (ee - 1) / (er - 1)
}

// perMetre is the resistance over the surface resistance, 1/m. With the
// thickness it follows from the change of the inductance as the walls of strip
// and ground recede by n:
//
//	R = (Rs/mu0) dL/dn,  L(width - 2n, height + 2n, thickness - 2n) in air
//
// (H.A. Wheeler, Proc. IRE 30 (1942), pp. 412-424, from memory), good where
// the strip is several skin depths thick. Without it the current is taken as
// uniform across the width in strip and ground, R = 2 Rs/width (D.M. Pozar,
// Microwave Engineering, 4th ed. (2012), eq. 3.199, from a digest), which is
// good for wide strips and too much for narrow ones.
func (x Microstrip) perMetre() float64 {
	if x.Thickness == 0 {
		return 2 / x.Width
	}
	inductance := func(n float64) float64 {
		h := x.Height + 2*n
		z0, _ := hammerstadJensen((x.Width-2*n)/h, (x.Thickness-2*n)/h, 1)
		return z0 / C0
	}
	step := x.Thickness * 1e-4
	return (inductance(step) - inductance(-step)) / (2 * step * mu0)
}

// dispersion warns where the effective permittivity is more than 1 % above
// the static one:
//
//	ee(f) = er - (er - ee)/(1 + G (f/fp)^2)
//	fp = Z0/(2 mu0 h),  G = (pi^2/12) (er - 1)/ee sqrt(2 pi Z0/eta0)
//
// Source: Hammerstad and Jensen (see Geometry), from memory.
func (x Microstrip) dispersion(f, z0, ee float64) string {
	fp := z0 / (2 * mu0 * x.Height)
	g := math.Pi * math.Pi / 12 * (x.Permittivity - 1) / ee * math.Sqrt(2*math.Pi*z0/eta0)
	rise := (x.Permittivity-(x.Permittivity-ee)/(1+g*f/fp*f/fp))/ee - 1
	if rise <= 0.01 {
		return ""
	}
	return fmt.Sprintf("the wave is not TEM any more: at this frequency the effective permittivity is about %.2g %% above that of the formulas", 100*rise)
}
