package line

import (
	"fmt"
	"math"
)

// Stripline is a strip midway between two ground planes in one dielectric.
type Stripline struct {
	Width, Spacing, Thickness float64 // m: of the strip, of the planes, of the strip (0: not known)
	Permittivity, LossTangent float64
	Metal                     Conductor
}

// Geometry gives, with w for the width and b for the spacing of the planes,
//
//	Z0 = eta0/(4 sqrt(er)) K(k)/K(k'),  k = sech(pi w/2b), k' = tanh(pi w/2b)
//
// which is exact for a strip of no thickness (S.B. Cohn, 1954, from a digest);
// a warning tells what the thickness changes. For the loss in the conductors
// see perMetre. The error is a *GeometryError.
func (x Stripline) Geometry() (Geometry, error) {
	if err := x.check(); err != nil {
		return Geometry{}, err
	}
	g := homogeneous(cohn(x.Width/x.Spacing), x.Permittivity, x.LossTangent)
	g.surfaces = []surface{{"strip", x.Metal, x.perMetre(g.Z0), x.Thickness, "its thickness"}}
	g.Warnings = x.warnings()
	return g, nil
}

// widest is the largest width in spacings that is taken; beyond it the line is
// a parallel-plate one, and k runs out of range near 450.
const widest = 100

func (x Stripline) check() error {
	checks := []check{
		positiveLength("Width", "width", x.Width),
		positiveLength("Spacing", "spacing", x.Spacing),
		{"Width", x.Width <= widest*x.Spacing, "the width must be at most 100 times the spacing of the planes"},
		{"Thickness", x.Thickness >= 0, "the thickness must not be below 0"},
		{"Thickness", x.Thickness < x.Width && x.Thickness < x.Spacing/2, "the thickness must be below the width and half the spacing"},
	}
	checks = append(checks, dielectric(x.Permittivity, x.LossTangent)...)
	return firstFault(append(checks, metal("Metal", "strip", x.Metal)...)...)
}

func (x Stripline) warnings() (out []string) {
	if x.Thickness == 0 {
		if !math.IsInf(x.Metal.Conductivity, 1) {
			out = append(out, "the thickness of the strip is not given: the current is taken as uniform across the width, and the conductor loss may be far off")
		}
		return out
	}
	if change := x.thicknessChange(); change > 0.01 {
		out = append(out, fmt.Sprintf("the impedance is that of a thin strip; the thickness lowers it by about %.2g %%", 100*change))
	}
	return out
}

// cohn is the impedance in vacuum for w/b. The complete elliptic integral of
// the modulus k is (pi/2)/agm(1, k'), so that neither k nor k' is ever taken
// from the other and the quotient is right for narrow and for wide strips.
func cohn(ratio float64) float64 {
	x := math.Pi / 2 * ratio
	return eta0 / 4 * agm(1/math.Cosh(x)) / agm(math.Tanh(x))
}

// agm is the arithmetic-geometric mean of 1 and x.
func agm(x float64) float64 {
	a, g := 1.0, x
	for math.Abs(a-g) > 1e-15*a {
		a, g = (a+g)/2, math.Sqrt(a*g)
	}
	return a
}

// perMetre is the resistance over the surface resistance, 1/m, by the formulas
// of D.M. Pozar, Microwave Engineering, 4th ed. (2012), eq. 3.181 (from a
// digest), which follow from Wheeler's rule of the receding walls and hold for
// a strip of several skin depths:
//
//	sqrt(er) Z0 < 120:  R = 2 Z0 2.7e-3 Rs er Z0 A/(30 pi (b - t))
//	                    A = 1 + 2w/(b-t) + (1/pi) (b+t)/(b-t) ln((2b-t)/t)
//	else:               R = 2 Z0 0.16 Rs B/(Z0 b)
//	                    B = 1 + b/(0.5w + 0.7t) (0.5 + 0.414 t/w + ln(4 pi w/t)/(2 pi))
//
// Without the thickness the current is taken as uniform on both faces and on
// the planes, R = Rs/w, a fifth too little for wide thin strips.
func (x Stripline) perMetre(z0 float64) float64 {
	w, b, t := x.Width, x.Spacing, x.Thickness
	switch {
	case t == 0:
		return 1 / w
	case math.Sqrt(x.Permittivity)*z0 < 120:
		a := 1 + 2*w/(b-t) + (b+t)/(b-t)/math.Pi*math.Log((2*b-t)/t)
		return 2 * z0 * 2.7e-3 * x.Permittivity * z0 * a / (30 * math.Pi * (b - t))
	}
	k := 1 + b/(0.5*w+0.7*t)*(0.5+0.414*t/w+math.Log(4*math.Pi*w/t)/(2*math.Pi))
	return 2 * 0.16 * k / b
}

// thicknessChange is by what share the thickness lowers the impedance. It is
// estimated from the capacitance of wide strips, w/(b-t) and the fringing field
// of their edges, with s = 1/(1 - t/b):
//
//	(1/pi) (2 s ln(s + 1) - (s - 1) ln(s^2 - 1))
//
// Source: S.B. Cohn, 1954, from memory; at t = 0 it is the 0.441 of Pozar's fit
// (eq. 3.179). Good from w/(b-t) = 0.35 on, an estimate below.
func (x Stripline) thicknessChange() float64 {
	s := 1 / (1 - x.Thickness/x.Spacing)
	fringe := (2*s*math.Log(s+1) - (s-1)*math.Log(s*s-1)) / math.Pi
	thin := x.Width/x.Spacing + 2*math.Ln2/math.Pi
	return 1 - thin/(x.Width/x.Spacing*s+fringe)
}
