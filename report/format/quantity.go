package format

import (
	"math"
	"strings"
)

// SI returns a quantity, with an engineering prefix if its unit takes one:
// SI(1375, "V") is "1.375 kV".
func SI(v float64, unit string) string {
	if math.IsNaN(v) {
		return Missing
	}
	if !prefixed[unit] {
		return strings.TrimSuffix(Number(v)+Space+unit, Space)
	}
	p := PrefixFor(v)
	return Number(v/p.Factor) + Space + p.Symbol + unit
}

// Quantity returns v in the unit that a requirement is stated in: "V peak",
// "dB", "%", "deg", "1", ... Unknown units are printed as they are.
func Quantity(v float64, unit string) string {
	base, qualifier, _ := strings.Cut(Unit(unit), " ")
	if qualifier != "" {
		qualifier = Space + qualifier
	}
	switch {
	case base == "" || base == "1":
		return Number(v)
	case math.IsNaN(v):
		return Missing
	case base == "dB":
		return DB(v)
	case base == "°":
		return Angle(v)
	}
	return SI(v, base) + qualifier
}

// Uncertainty returns an uncertainty in the unit of a requirement, with two
// significant digits and without the unit's qualifier: "8.4 mA".
func Uncertainty(v float64, unit string) string {
	base, _, _ := strings.Cut(Unit(difference(unit)), " ")
	if math.IsNaN(v) || base == "1" {
		base = ""
	}
	p := Prefix{Factor: 1}
	if prefixed[base] {
		p = PrefixFor(v)
	}
	s := Digits(v/p.Factor, 2)
	if base == "" || base == "°" {
		return s + base
	}
	return s + Space + p.Symbol + base
}

// Bare is Quantity without the qualifier of the unit: "1.315 kV" in place of
// "1.315 kV peak", for margins, whose qualifier has been said.
func Bare(v float64, unit string) string {
	base, _, _ := strings.Cut(difference(unit), " ")
	return Quantity(v, base)
}

// difference returns the unit of a difference of two quantities: levels in
// dBm differ by dB.
func difference(unit string) string {
	if unit == "dBm" {
		return "dB"
	}
	return unit
}

// Unit returns a unit as it is printed: "ohm" as Ω, "deg" as °.
func Unit(unit string) string {
	switch unit {
	case "ohm":
		return "Ω"
	case "deg":
		return "°"
	}
	return unit
}

// VSWR returns a standing wave ratio, which may be infinite.
func VSWR(v float64) string { return Number(v) }

// DB returns a level or a loss with two decimals, small ones with three
// significant digits as far as five decimals go: what is less is the arithmetic
// of two equal levels.
func DB(v float64) string {
	const decimals = 5
	if math.IsNaN(v) {
		return Missing
	}
	if a := math.Abs(v); a > 0 && a < 0.095 {
		if a < 0.00095 {
			return Fixed(v, decimals) + Space + "dB"
		}
		return Digits(v, 3) + Space + "dB"
	}
	return Fixed(v, 2) + Space + "dB"
}

// Percent returns a fraction as a percentage with three significant digits.
func Percent(fraction float64) string {
	if math.IsNaN(fraction) {
		return Missing
	}
	if a := math.Abs(fraction); a > 0 && a < rounding {
		return "<" + Space + Pow10(-10) + Space + "%"
	}
	return Digits(100*fraction, 3) + Space + "%"
}

// Ratio returns an error over its uncertainty with two significant digits.
func Ratio(v float64) string {
	if v > 0 && v < 0.001 {
		return "<" + Space + "0.001"
	}
	return Digits(v, 2)
}

// Measure returns a difference measure of the feature selective validation,
// whose best grade ends at 0.1, with three decimals.
func Measure(v float64) string {
	if v > 0 && v < 0.0005 {
		return "<" + Space + "0.001"
	}
	return Fixed(v, 3)
}

// Index returns a percentage, as a grid convergence index is given, with two
// significant digits.
func Index(percent float64) string {
	if math.IsNaN(percent) {
		return Missing
	}
	if a := math.Abs(percent); a > 0 && a < 1e-6 {
		return "<" + Space + Pow10(-6) + Space + "%"
	}
	return Digits(percent, 2) + Space + "%"
}

// rounding is the size below which a relative difference of two numbers is
// the rounding of their arithmetic; its digits mean nothing.
const rounding = 1e-12

// Share returns a fraction as a percentage for running text: whole from 10 %
// on, two digits below.
func Share(fraction float64) string {
	if a := math.Abs(fraction); a >= 0.0995 && !math.IsInf(fraction, 0) {
		return Fixed(100*fraction, 0) + Space + "%"
	}
	if math.IsNaN(fraction) {
		return Missing
	}
	return Digits(100*fraction, 2) + Space + "%"
}

// Angle returns an angle in degrees with two decimals.
func Angle(deg float64) string {
	if math.IsNaN(deg) {
		return Missing
	}
	return Fixed(deg, 2) + "°"
}

// metresPerFoot is exact (international yard and pound agreement, 1959).
const metresPerFoot = 0.3048

// Feet returns a length in metres as feet.
func Feet(m float64) string { return Number(m/metresPerFoot) + Space + "ft" }

// Wavelengths returns an electrical length, with the letter lambda as unit.
func Wavelengths(v float64) string { return Number(v) + Space + "λ" }

// Electrical returns an electrical length in degrees, four significant
// digits.
func Electrical(deg float64) string {
	if math.Abs(deg) >= 1000 && !math.IsInf(deg, 0) {
		return Count(int64(math.Round(deg))) + "°"
	}
	return Number(deg) + "°"
}
