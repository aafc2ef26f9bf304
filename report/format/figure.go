package format

import (
	"math"
	"math/cmplx"
	"strings"
)

// Phasor returns a complex value in the unit of a requirement: an impedance or
// an admittance as real and imaginary part, anything else as size and angle,
// "1.315 kV rms at −59.10°".
func Phasor(z complex128, unit string) string {
	base, _, _ := strings.Cut(Unit(unit), " ")
	switch {
	case base == "Ω" || base == "S":
		return Complex(z, base)
	case cmplx.IsInf(z):
		return Infinite
	case cmplx.IsNaN(z):
		return Missing
	case z == 0:
		return Quantity(0, unit)
	}
	return Quantity(cmplx.Abs(z), unit) + " at" + Space + Angle(cmplx.Phase(z)*180/math.Pi)
}

// Change returns a difference in the unit of a requirement, with its sign and
// without the unit's qualifier: "+12.30 V", "−0.42 dB".
func Change(v float64, unit string) string {
	s := Bare(v, unit)
	if v > 0 && s != Bare(0, unit) {
		return "+" + s
	}
	return s
}

// Qualifier returns what a unit says besides the unit itself, if it is not the
// peak value that amplitudes are by default: "rms" of "kV rms".
func Qualifier(unit string) string {
	_, q, _ := strings.Cut(unit, " ")
	if q == "peak" {
		return ""
	}
	return q
}
