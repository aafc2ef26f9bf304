package format

import "math"

// A Prefix is an engineering prefix: a quantity is its number times Factor.
type Prefix struct {
	Factor float64
	Symbol string
}

// prefixes runs from atto to exa; prefixes[zeroth] is none.
var prefixes = []Prefix{
	{1e-18, "a"},
	{1e-15, "f"},
	{1e-12, "p"},
	{1e-9, "n"},
	{1e-6, "µ"},
	{1e-3, "m"},
	{1, ""},
	{1e3, "k"},
	{1e6, "M"},
	{1e9, "G"},
	{1e12, "T"},
	{1e15, "P"},
	{1e18, "E"},
}

const zeroth = 6

// PrefixFor returns the prefix under which v prints with one to three digits
// before the point. Zero and what is not finite take none; what is beyond the
// prefixes takes the last.
func PrefixFor(v float64) Prefix {
	if v == 0 || math.IsNaN(v) || math.IsInf(v, 0) {
		return prefixes[zeroth]
	}
	_, exponent := split(v, significant)
	i := zeroth + int(math.Floor(float64(exponent)/3))
	return prefixes[min(max(i, 0), len(prefixes)-1)]
}

// prefixed holds the units that take a prefix.
var prefixed = map[string]bool{
	"V": true, "A": true, "W": true, "s": true, "m": true, "Hz": true, "Ω": true,
	"S": true, "H": true, "F": true, "J": true, "Ω/m": true, "S/m": true, "H/m": true, "F/m": true, "V/m": true,
}

// Factor returns the factor of an engineering prefix by its symbol, "" for
// none.
func Factor(symbol string) (factor float64, ok bool) {
	if symbol == "u" {
		symbol = "µ"
	}
	for _, p := range prefixes {
		if p.Symbol == symbol {
			return p.Factor, true
		}
	}
	return 0, false
}
