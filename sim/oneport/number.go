package oneport

import (
	"math"
	"strconv"
	"strings"
)

// number reads a decimal number times ten to the power of shift, rounded once.
// It refuses what the format does not have: NaN, infinity, hexadecimal digits
// and digits with underscores, and numbers too large for a float64.
func number(s string, shift int) (float64, bool) {
	if strings.Trim(s, "0123456789+-.eE") != "" {
		return 0, false
	}
	mantissa, exponent := s, 0
	if i := strings.IndexAny(s, "eE"); i >= 0 {
		e, err := strconv.Atoi(s[i+1:])
		if err != nil || max(e, -e) > 9999 {
			return 0, false
		}
		mantissa, exponent = s[:i], e
	}
	x, err := strconv.ParseFloat(mantissa+"e"+strconv.Itoa(exponent+shift), 64)
	return x, err == nil
}

// polar is a complex number of a magnitude and an angle in degrees, exact at
// the multiples of 90 degrees: there lie opens and shorts.
func polar(magnitude, degrees float64) complex128 {
	switch math.Mod(degrees, 360) {
	case 0:
		return complex(magnitude, 0)
	case 90, -270:
		return complex(0, magnitude)
	case 180, -180:
		return complex(-magnitude, 0)
	case 270, -90:
		return complex(0, -magnitude)
	}
	sin, cos := math.Sincos(math.Mod(degrees, 360) * math.Pi / 180)
	return complex(magnitude*cos, magnitude*sin)
}
