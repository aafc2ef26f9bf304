// Package icc makes the colour profile that a document of ours names as its
// output intent. It is computed from what IEC 61966-2-1 publishes of the sRGB
// colour space; nothing is copied from a profile.
package icc

import "math"

// chromaticity is a colour of luminance 1 with the coordinates x and y of CIE 1931.
func chromaticity(x, y float64) vector { return vector{x / y, 1, (1 - x - y) / y} }

var (
	// The white and the primaries of IEC 61966-2-1, table 1 (those of ITU-R BT.709).
	white = chromaticity(0.3127, 0.3290)
	red   = chromaticity(0.64, 0.33)
	green = chromaticity(0.30, 0.60)
	blue  = chromaticity(0.15, 0.06)

	// connection is D50, the illuminant of the profile connection space (ICC.1, 7.2.16).
	connection = vector{0.9642, 1, 0.8249}

	// bradford turns XYZ into the responses of the linear Bradford adaptation
	// (ICC.1, annex E).
	bradford = matrix{{0.8951, 0.2664, -0.1614}, {-0.7502, 1.7135, 0.0367}, {0.0389, -0.0685, 1.0296}}
)

// toXYZ is the matrix from linear R, G, B to X, Y, Z under the white of sRGB: the
// primaries, each so strong that all three together are that white.
func toXYZ() matrix {
	var m matrix
	for i, p := range []vector{red, green, blue} {
		for r := range p {
			m[r][i] = p[r]
		}
	}
	share := m.inverse().apply(white)
	for r := range m {
		for c := range m[r] {
			m[r][c] *= share[c]
		}
	}
	return m
}

// adapted is toXYZ with its white moved to that of the connection space.
func adapted() matrix {
	from, to := bradford.apply(white), bradford.apply(connection)
	scale := matrix{{to[0] / from[0]}, {0, to[1] / from[1]}, {0, 0, to[2] / from[2]}}
	return bradford.inverse().times(scale).times(bradford).times(toXYZ())
}

// linear is the intensity, 0 to 1, of a stored value, 0 to 1 (IEC 61966-2-1, 5.2).
func linear(v float64) float64 {
	if v <= 0.04045 {
		return v / 12.92
	}
	return math.Pow((v+0.055)/1.055, 2.4)
}
