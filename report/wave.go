package report

import (
	"math"
	"math/cmplx"
	"slices"

	"linewitness/sim/record"
)

// propagation is the propagation constant of a section at the design frequency,
// sqrt((R + jwL)(G + jwC)), in nepers and radians a metre.
func propagation(s record.ModelSection, frequency float64) complex128 {
	w := 2 * math.Pi * frequency
	return cmplx.Sqrt(complex(s.R, w*s.L) * complex(s.G, w*s.C))
}

// between returns the value at z of a wave along a line that is known at zs,
// which ascend: between two points it is what two waves of the propagation
// constant make of their values. It is NaN outside the points, and where they
// are so far apart, near half a wavelength, that their values do not tell.
func between(zs []float64, vs []complex128, gamma complex128, z float64) complex128 {
	n := min(len(zs), len(vs))
	i, found := slices.BinarySearch(zs[:n], z)
	if found {
		return vs[i]
	}
	if i == 0 || i == n {
		return cmplx.NaN()
	}
	apart := complex(zs[i]-zs[i-1], 0) * gamma
	const most = 0.8 * math.Pi // radians between two points
	if !(math.Abs(imag(apart)) < most) {
		return cmplx.NaN()
	}
	a, b := cmplx.Sinh(gamma*complex(zs[i]-z, 0)), cmplx.Sinh(gamma*complex(z-zs[i-1], 0))
	return (vs[i-1]*a + vs[i]*b) / cmplx.Sinh(apart)
}

// finiteC reports whether a complex number is finite.
func finiteC(z complex128) bool { return !cmplx.IsNaN(z) && !cmplx.IsInf(z) }

// sectionState returns the steady state of a section by its name; nil if it is
// not there.
func sectionState(s record.Steady, name string) *record.SteadySection {
	for i := range s.Sections {
		if s.Sections[i].Name == name {
			return &s.Sections[i]
		}
	}
	return nil
}
