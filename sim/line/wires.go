package line

import (
	"fmt"
	"math"
)

// TwoWire is a line of two equal parallel round wires in one dielectric.
type TwoWire struct {
	Diameter, Spacing         float64 // m; Spacing from axis to axis
	Permittivity, LossTangent float64
	Metal                     Conductor
}

// Geometry gives, with d for the diameter and D for the spacing:
//
//	Z0 = eta0/(pi sqrt(er)) acosh(D/d)
//	R  = 2 Rs/(pi d) (D/d)/sqrt((D/d)^2 - 1)
//	peak field = V/(d acosh(D/d)) sqrt((D+d)/(D-d)), where the wires are nearest
//
// They are exact if the skin depth is small and the wires radiate nothing: the
// spacing must be small against the wavelength. Sources: S.W. Ellingson,
// Electromagnetics Vol. 2 (2020), module m0188, for Z0, there with the
// approximation ln(2D/d). R follows from dL/dn, the change of the inductance as
// the walls recede (H.A. Wheeler, Proc. IRE 30 (1942), pp. 412-424, from
// memory); its last factor is the crowding of the current. The field is that of
// the two line charges that the wires amount to. The error is a
// *GeometryError.
func (x TwoWire) Geometry() (Geometry, error) {
	checks := []check{
		positiveLength("Diameter", "diameter", x.Diameter),
		positiveLength("Spacing", "spacing", x.Spacing),
		{"Spacing", x.Spacing > x.Diameter, "the spacing of the axes must be above the diameter"},
	}
	checks = append(checks, dielectric(x.Permittivity, x.LossTangent)...)
	if err := firstFault(append(checks, metal("Metal", "wires", x.Metal)...)...); err != nil {
		return Geometry{}, err
	}
	a := x.Diameter / 2
	image := imageOf(x.Spacing / x.Diameter)
	g := homogeneous(eta0/math.Pi*image.acosh, x.Permittivity, x.LossTangent)
	g.PeakField = image.field / (2 * a)
	g.surfaces = []surface{{"wires", x.Metal, image.crowding / (math.Pi * a), a, radiusOf}}
	g.DCResistance = 2 * wireDC(x.Metal, a)
	g.excess = g.DCResistance / 4
	g.quasi = radiates("spacing", x.Spacing)
	return g, nil
}

// WireOverGround is a line of a round wire over a plane of metal, in one
// dielectric. The ground must be a good conductor: soil is none at radio
// frequencies.
type WireOverGround struct {
	Radius, Height            float64 // m; Height of the axis
	Permittivity, LossTangent float64
	Metal, Ground             Conductor
}

// Geometry gives, with a for the radius and h for the height:
//
//	Z0 = eta0/(2 pi sqrt(er)) acosh(h/a)
//	R  = Rs/(2 pi a) (h/a)/sqrt((h/a)^2 - 1) + Rs_ground/(2 pi a)/sqrt((h/a)^2 - 1)
//	peak field = V/(a acosh(h/a)) sqrt((h+a)/(h-a)), under the wire
//
// It is half of the two-wire line of the spacing 2h; see TwoWire. The formula
// for Z0 is from memory. The error is a *GeometryError.
func (x WireOverGround) Geometry() (Geometry, error) {
	checks := []check{
		positiveLength("Radius", "radius", x.Radius),
		positiveLength("Height", "height", x.Height),
		{"Height", x.Height > x.Radius, "the height of the axis must be above the radius"},
	}
	checks = append(checks, dielectric(x.Permittivity, x.LossTangent)...)
	checks = append(checks, metal("Metal", "wire", x.Metal)...)
	if err := firstFault(append(checks, metal("Ground", "ground", x.Ground)...)...); err != nil {
		return Geometry{}, err
	}
	image := imageOf(x.Height / x.Radius)
	g := homogeneous(eta0/(2*math.Pi)*image.acosh, x.Permittivity, x.LossTangent)
	g.PeakField = image.field / x.Radius
	g.surfaces = []surface{
		{"wire", x.Metal, image.crowding / (2 * math.Pi * x.Radius), x.Radius, radiusOf},
		{"ground", x.Ground, image.ground / (2 * math.Pi * x.Radius), x.Height, "the height of the wire"},
	}
	g.excess = wireDC(x.Metal, x.Radius) / 4
	g.quasi = radiates("height", x.Height)
	return g, nil
}

// An image is what the ratio of the distance of the axes to the sum of the
// radii makes of a round wire and its image.
type image struct {
	acosh    float64
	crowding float64 // of the current towards the other wire
	ground   float64 // the same in the plane between them
	field    float64 // at the nearest point, times (voltage to the image)/diameter
}

func imageOf(ratio float64) image {
	root := math.Sqrt(ratio*ratio - 1)
	acosh := math.Acosh(ratio)
	return image{acosh, ratio / root, 1 / root, math.Sqrt((ratio+1)/(ratio-1)) / acosh}
}

// radiates warns where a length across an open line is not small against the
// wavelength: above a twentieth it radiates by common practice.
func radiates(name string, across float64) func(float64) string {
	return func(f float64) string {
		share := across * f / C0
		if share <= 1./20 {
			return ""
		}
		return fmt.Sprintf("the %s is %.2g of a wavelength in air: the line radiates, which is not counted", name, share)
	}
}
