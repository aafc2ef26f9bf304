package format

import (
	"math"
	"strings"
)

// A Scale is a unit with its prefix and a number of decimals, in which several
// values of one quantity are printed alike.
type Scale struct {
	Factor   float64
	Unit     string // "kV", "10⁻³" in markup, "1"
	decimals int
}

// mostDigits is how many significant digits a scale gives a value at most:
// beyond, digits are those of the arithmetic.
const mostDigits = 9

// NewScale returns the scale for values as large as size in which a change of
// step shows with two significant digits. The qualifier of the unit is left
// out: "V peak" is printed in V.
func NewScale(size, step float64, unit string) Scale {
	base, _, _ := strings.Cut(Unit(unit), " ")
	if base == "1" {
		base = ""
	}
	size = math.Abs(size)
	p := Prefix{Factor: 1}
	s := Scale{Unit: base}
	if prefixed[base] {
		p = PrefixFor(size)
		s.Unit = p.Symbol + base
	} else if p.Factor = thousands(size); p.Factor != 1 {
		s.Unit = strings.TrimSpace(strings.TrimSuffix(Pow10(int(math.Round(math.Log10(p.Factor))))+Space+base, Space))
	}
	if s.Unit == "" {
		s.Unit = "1"
	}
	s.Factor = p.Factor
	s.decimals = decimalsOf(size/s.Factor, step/s.Factor)
	return s
}

// ErrorScale returns the scale in which an error or an uncertainty as large as
// size has three significant digits. Levels in dBm differ by dB.
func ErrorScale(size float64, unit string) Scale {
	return NewScale(size, math.Abs(size)/10, difference(unit))
}

// thousands returns the power of a thousand for a number without prefixes, 1
// where it can be read as it is.
func thousands(size float64) float64 {
	if size == 0 || math.IsNaN(size) || math.IsInf(size, 0) || size >= 0.00995 && size < 1e6 {
		return 1
	}
	_, exponent := split(size, 2)
	return math.Pow10(3 * int(math.Floor(float64(exponent)/3)))
}

// decimalsOf returns the decimals that show step with two digits and give size
// no more than mostDigits.
func decimalsOf(size, step float64) int {
	if !(step > 0) || math.IsInf(step, 0) {
		return 0
	}
	_, exponent := split(step, 2)
	decimals := max(1-exponent, 0)
	if size > 0 && !math.IsInf(size, 0) {
		_, top := split(size, 2)
		decimals = min(decimals, max(mostDigits-1-top, 0))
	}
	return min(decimals, mostDigits)
}

// Number returns v in the scale; zero as "0", and what is not zero but would
// print as zero as less than the last digit.
func (s Scale) Number(v float64) string {
	if t, special := notFinite(v); special {
		return t
	}
	if v == 0 {
		return "0"
	}
	t := plain(v/s.Factor, s.decimals)
	if strings.Trim(t, "0.") == "" {
		return "<" + Space + plain(math.Pow10(-s.decimals), s.decimals)
	}
	return t
}
