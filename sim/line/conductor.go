package line

import (
	"math"
	"strings"
)

// mu0 and eta0 are the permeability and the wave impedance of vacuum. The
// value 4 pi 1e-7 H/m is that of the SI before 2019; the difference, 1e-10,
// is far below what any dimension is known to.
const (
	mu0  = 4e-7 * math.Pi
	eta0 = mu0 * C0
)

// A Conductor is the metal of one conductor of a line.
type Conductor struct {
	Conductivity float64 // S/m; +Inf is a perfect conductor
	Roughness    float64 // m rms of the surface; 0 is smooth
}

// The conductivities that have a source, S/m at 20 degrees C. Silver, brass and
// others differ with purity and alloy, and are given by value.
//
//	copper     100 % IACS, 58 MS/m (ASTM E1004 and IEC 60028, as quoted)
//	gold       4.4e7, S.W. Ellingson, Electromagnetics Vol. 2 (2020), appendix
//	aluminium  3.7e7, the same (module m0137)
var metals = map[string]float64{"copper": 58e6, "gold": 44e6, "aluminium": 37e6}

// Metal gives the conductivity of a metal by its name, S/m.
func Metal(name string) (conductivity float64, ok bool) {
	name = strings.ToLower(name)
	if name == "aluminum" {
		name = "aluminium"
	}
	conductivity, ok = metals[name]
	return conductivity, ok
}

// MetalNames are the names that Metal knows.
func MetalNames() []string { return []string{"copper", "gold", "aluminium"} }

// SkinDepth is sqrt(1/(pi f mu0 sigma)), m, at f in Hz.
func (c Conductor) SkinDepth(f float64) float64 {
	return 1 / math.Sqrt(math.Pi*f*mu0*c.Conductivity)
}

// SurfaceResistance is sqrt(pi f mu0/sigma), ohm, at f in Hz, times what the
// roughness adds.
func (c Conductor) SurfaceResistance(f float64) float64 {
	return math.Sqrt(math.Pi*f*mu0/c.Conductivity) * c.roughnessFactor(f)
}

// roughnessFactor is 1 + (2/pi) atan[1.4 (roughness/skin depth)^2], from 1 to
// 2. Source: E. Hammerstad and O. Jensen, IEEE MTT-S Symposium 1980, pp.
// 407-409, from memory.
func (c Conductor) roughnessFactor(f float64) float64 {
	if c.Roughness == 0 {
		return 1
	}
	ratio := c.Roughness / c.SkinDepth(f)
	return 1 + 2/math.Pi*math.Atan(1.4*ratio*ratio)
}
