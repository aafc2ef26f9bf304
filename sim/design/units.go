package design

import "strings"

// A unit turns digits into an SI value: number 10^exp factor.
type unit struct {
	name   string
	exp    int
	factor float64 // not a power of ten; 1 for most
	of     unitOf
}

// unitOf tells units of one dimension apart that need data from elsewhere in
// the file, or that are not linear.
type unitOf int

const (
	si          unitOf = iota
	wavelengths        // a length, in wavelengths
	delay              // a length, as a delay in s
	periods            // a time, in periods of the source
	bare               // a ratio without unit
	percent            // a ratio
	decibels           // a level in dB
	dBm                // a power level
	unclear            // V or A without peak, rms or pp
)

// A dimension is a kind of quantity and the units it may be written in.
type dimension struct {
	name    string
	units   map[string]unit
	accepts string // for hints
	example string
}

// The factors between a foot, an inch and the metre are exact (international
// yard and pound agreement, 1959). The factors of rms and peak to peak are
// those of a sinusoid.
const (
	metresPerFoot = 0.3048
	metresPerInch = 0.0254
	peakPerRMS    = 1.4142135623730950488
	peakPerPP     = 0.5
)

// The dimensions.
var (
	frequency = &dimension{"frequency", prefixed("Hz", "", "k", "M", "G"), "Hz, kHz, MHz, GHz", "1.6 MHz"}
	length    = &dimension{
		"length", lengthUnits(),
		"m, cm, mm, km, ft, in, or electrically deg, wavelengths, or as a delay ns, us, ps", "85 m",
	}
	timeSpan = &dimension{
		"time", merged(prefixed("s", "", "m", "u", "n", "p"), units(periods, 0, 1, "periods", "period")),
		"s, ms, us, ns, ps, periods", "15 us",
	}
	voltage    = &dimension{"voltage", amplitudes("V"), "V, kV, mV, uV or MV, each followed by peak, rms or pp", "300 V peak"}
	current    = &dimension{"current", amplitudes("A"), "A, kA, mA, uA or MA, each followed by peak, rms or pp", "6 A peak"}
	power      = &dimension{"power", merged(prefixed("W", "", "k", "m", "M", "u"), units(dBm, 0, 1, "dBm")), "W, kW, mW, MW, uW, dBm", "250 W"}
	resistance = &dimension{"resistance", prefixed("ohm", "", "m", "k", "M"), "ohm, mohm, kohm, Mohm", "50 ohm"}
	inductance = &dimension{"inductance", prefixed("H", "", "m", "u", "n", "p"), "H, mH, uH, nH, pH", "1.2 uH"}
	capacity   = &dimension{"capacitance", prefixed("F", "", "m", "u", "n", "p"), "F, mF, uF, nF, pF", "120 pF"}
	admittance = &dimension{"admittance", prefixed("S", "", "m", "u", "n"), "S, mS, uS, nS", "8 mS"}
	angle      = &dimension{"angle", merged(units(si, 0, degree, "deg"), units(si, 0, 1, "rad")), "deg, rad", "30 deg"}

	seriesR = &dimension{"resistance per length", perLength("ohm", "", "m", "u", "k"), "ohm/m, mohm/m, uohm/m, kohm/m, or the same per km or per ft", "20 mohm/m"}
	seriesL = &dimension{"inductance per length", perLength("H", "", "m", "u", "n"), "H/m, mH/m, uH/m, nH/m, or the same per km or per ft", "1.7 uH/m"}
	shuntG  = &dimension{"conductance per length", perLength("S", "", "m", "u", "n", "p"), "S/m, mS/m, uS/m, nS/m, pS/m, or the same per km or per ft", "2 nS/m"}
	shuntC  = &dimension{"capacitance per length", perLength("F", "", "u", "n", "p"), "F/m, uF/m, nF/m, pF/m, or the same per km or per ft", "6.7 pF/m"}
	slowing = &dimension{"delay per length", perLength("s", "u", "n", "p"), "ns/m, us/m, ps/m, or the same per km or per ft", "5.05 ns/m"}
	fading  = &dimension{"attenuation", attenuations(), "dB/m, dB/100m, dB/km, dB/ft, dB/100ft, Np/m, Np/km", "2.0 dB/100m"}

	size         = &dimension{"dimension", sizes(), "mm, m, cm, um, in, mil, ft", "5.5 mm"}
	conductivity = &dimension{"conductivity", prefixed("S/m", "", "m", "k", "M"), "S/m, mS/m, kS/m, MS/m", "58 MS/m"}
	plain        = &dimension{"ratio", units(bare, 0, 1, ""), "a plain number", "2.25"}

	percentage = &dimension{"percentage", units(percent, -2, 1, "%"), "%", "0.5 %"}
	fraction   = &dimension{"ratio", merged(units(bare, 0, 1, ""), units(percent, -2, 1, "%")), "a plain number or %", "0.66"}
	vswrRatio  = &dimension{"VSWR", units(bare, 0, 1, "", ":1"), "a plain number", "1.5"}
	reflected  = &dimension{"reflection coefficient", merged(units(bare, 0, 1, ""), units(percent, -2, 1, "%")), "a plain number or %", "0.2"}
	level      = &dimension{"level", units(decibels, 0, 1, "dB"), "dB", "20 dB"}
	spread     = &dimension{"radius", merged(prefixed("ohm", "", "m", "k", "M"), units(percent, -2, 1, "%")), "ohm, mohm, kohm, Mohm, %", "2 ohm"}
)

// degree is a degree in radians, pi/180.
const degree = 0.017453292519943295769

var prefixes = map[string]int{"": 0, "k": 3, "M": 6, "G": 9, "m": -3, "u": -6, "n": -9, "p": -12}

func units(of unitOf, exp int, factor float64, names ...string) map[string]unit {
	m := map[string]unit{}
	for _, name := range names {
		m[name] = unit{name, exp, factor, of}
	}
	return m
}

func prefixed(base string, with ...string) map[string]unit {
	m := map[string]unit{}
	for _, p := range with {
		m[p+base] = unit{p + base, prefixes[p], 1, si}
	}
	return m
}

func merged(sets ...map[string]unit) map[string]unit {
	m := map[string]unit{}
	for _, set := range sets {
		for name, u := range set {
			m[name] = u
		}
	}
	return m
}

func lengthUnits() map[string]unit {
	m := units(si, 0, metresPerFoot, "ft")
	return merged(m,
		units(si, 0, 1, "m"), units(si, -2, 1, "cm"), units(si, -3, 1, "mm"), units(si, 3, 1, "km"),
		units(si, 0, metresPerInch, "in"),
		units(wavelengths, 0, 1.0/360, "deg"), units(wavelengths, 0, 1, "wavelengths", "wavelength"),
		units(delay, -6, 1, "us"), units(delay, -9, 1, "ns"), units(delay, -12, 1, "ps"))
}

// sizes are the units of the dimensions of a line.
func sizes() map[string]unit {
	return merged(prefixed("m", "", "m", "u"), units(si, -2, 1, "cm"),
		units(si, 0, metresPerInch, "in"), units(si, -3, metresPerInch, "mil"), units(si, 0, metresPerFoot, "ft"))
}

func amplitudes(base string) map[string]unit {
	m := map[string]unit{}
	for name, u := range prefixed(base, "", "k", "m", "u", "M") {
		m[name+" peak"] = unit{name + " peak", u.exp, 1, si}
		m[name+" rms"] = unit{name + " rms", u.exp, peakPerRMS, si}
		m[name+" pp"] = unit{name + " pp", u.exp, peakPerPP, si}
		m[name] = unit{name, u.exp, 1, unclear}
	}
	return m
}

func perLength(base string, with ...string) map[string]unit {
	m := map[string]unit{}
	for name, u := range prefixed(base, with...) {
		m[name+"/m"] = unit{name + "/m", u.exp, 1, si}
		m[name+"/km"] = unit{name + "/km", u.exp - 3, 1, si}
		m[name+"/ft"] = unit{name + "/ft", u.exp, 1 / metresPerFoot, si}
	}
	return m
}

func attenuations() map[string]unit {
	m := map[string]unit{}
	for base, nepers := range map[string]float64{"dB": 1 / neperDB, "Np": 1} {
		for per, exp := range map[string]int{"/m": 0, "/100m": -2, "/100 m": -2, "/km": -3} {
			m[base+per] = unit{base + per, exp, nepers, si}
		}
		for per, exp := range map[string]int{"/ft": 0, "/100ft": -2, "/100 ft": -2} {
			m[base+per] = unit{base + per, exp, nepers / metresPerFoot, si}
		}
	}
	return m
}

// plainUnit writes the signs that keyboards and datasheets use in the ASCII
// form of the unit tables: micro sign and Greek mu, Greek omega and ohm sign,
// degree sign.
var plainUnit = strings.NewReplacer("µ", "u", "μ", "u", "Ω", "ohm", "\u2126", "ohm", "°", "deg")
