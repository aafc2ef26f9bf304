package line

import "math"

// Nominal is the datasheet form of a line. Z0 and VelocityFactor hold at the
// frequency at which the line is used; the loss is known at LossAt.
type Nominal struct {
	Z0              float64 // ohm, real
	VelocityFactor  float64 // phase velocity over C0
	LossAt          float64 // Hz; 0 means no loss given
	Attenuation     float64 // Np/m at LossAt
	DielectricShare float64 // 0..1, of Attenuation at LossAt
}

// At returns the primary constants at frequency f in Hz:
//
//	v = VelocityFactor C0      L = Z0/v        C = 1/(Z0 v)
//	R = 2 a Z0 (1-d) sqrt(f/f0)    G = 2 a d f/(f0 Z0)
//
// with the attenuation a in Np/m at f0 = LossAt and d = DielectricShare. Loss
// in the conductors grows as sqrt(f) (skin effect), loss in the dielectric as
// f (constant loss tangent). R and G come from a = R/(2 Z0) + G Z0/2, the low
// loss form of the attenuation; its error is of the order (a/beta)^2.
func (n Nominal) At(f float64) Constants {
	v := n.VelocityFactor * C0
	k := Constants{L: n.Z0 / v, C: 1 / (n.Z0 * v)}
	if n.LossAt > 0 {
		conductor := n.Attenuation * (1 - n.DielectricShare)
		dielectric := n.Attenuation * n.DielectricShare
		k.R = 2 * conductor * n.Z0 * math.Sqrt(f/n.LossAt)
		k.G = 2 * dielectric / n.Z0 * (f / n.LossAt)
	}
	return k
}

// Wavelength is VelocityFactor C0/f, m. The loss of a nominal line does not
// change it: the velocity factor is taken as the phase velocity.
func (n Nominal) Wavelength(f float64) float64 { return n.VelocityFactor * C0 / f }
