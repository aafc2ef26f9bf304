package sim

import (
	"math"
	"strings"
)

// A scale turns an SI value into the unit in which a requirement is judged
// and printed. Prefixes are left out: "kV rms" is judged in "V rms".
type scale struct {
	unit string
	from func(si float64) float64
}

// asItIs leaves a value in SI units.
var asItIs = scale{from: func(v float64) float64 { return v }}

// scaleFor gives the scale of a limit's unit.
func scaleFor(unit string) scale {
	linear := func(name string, factor float64) scale {
		return scale{name, func(v float64) float64 { return v * factor }}
	}
	for _, base := range []string{"V", "A"} {
		for how, factor := range map[string]float64{"peak": 1, "rms": 1 / math.Sqrt2, "pp": 2} {
			if strings.HasSuffix(unit, base+" "+how) {
				return linear(base+" "+how, factor)
			}
		}
	}
	switch {
	case unit == "dBm":
		return scale{unit, func(w float64) float64 { return 10 * math.Log10(math.Max(0, w)/1e-3) }} // a power of rounding may be negative
	case unit == "dB":
		return linear(unit, 1)
	case unit == "%":
		return linear(unit, 100)
	case unit == "deg", unit == "rad":
		return linear("deg", 180/pi)
	case strings.HasSuffix(unit, "W"):
		return linear("W", 1)
	case strings.HasSuffix(unit, "ohm"):
		return linear("ohm", 1)
	case unit == "periods", unit == "period", strings.HasSuffix(unit, "s"):
		return linear("s", 1)
	default:
		return linear("1", 1)
	}
}

// deciBels is a margin between two sizes as a ratio in dB: 20 lg for
// amplitudes, 10 lg for powers, NaN for what is no size.
func deciBels(unit string, limit, value float64) float64 {
	if limit <= 0 || value <= 0 {
		return math.NaN()
	}
	switch {
	case strings.HasPrefix(unit, "V "), strings.HasPrefix(unit, "A "):
		return 20 * math.Log10(limit/value)
	case unit == "W":
		return 10 * math.Log10(limit/value)
	}
	return math.NaN()
}
