package canvas

import "strconv"

// fine writes a length in points to 0.01 pt, finer than any press prints.
func fine(v float64) string { return string(number(nil, v, 2)) }

// exact is for translations, which add up.
func exact(v float64) string { return string(number(nil, v, 4)) }

// precise is for factors of a transformation.
func precise(v float64) string { return string(number(nil, v, 6)) }

// channel writes one colour channel as a fraction.
func channel(v uint8) string { return string(number(nil, float64(v)/255, 3)) }

// number appends v with at most the given decimals, without trailing zeros
// and without a negative zero.
func number(b []byte, v float64, decimals int) []byte {
	start := len(b)
	b = strconv.AppendFloat(b, v, 'f', decimals, 64)
	for decimals > 0 && b[len(b)-1] == '0' {
		b = b[:len(b)-1]
	}
	if b[len(b)-1] == '.' {
		b = b[:len(b)-1]
	}
	if string(b[start:]) == "-0" {
		b = append(b[:start], '0')
	}
	return b
}
