package design

import (
	"math"
	"math/big"
	"strconv"
	"strings"
	"testing"

	"pgregory.net/rapid"
)

// twoRoundings bounds the relative error of a value with a factor that is no
// power of ten: digits to double, then times the factor.
const twoRoundings = 4e-16

func TestQuantity(t *testing.T) {
	for _, tt := range []struct {
		text string
		d    *dimension
		want float64
		of   unitOf
	}{
		{"1.6 MHz", frequency, 1.6e6, si},
		{"100000 kHz", frequency, 1e8, si},
		{"900 mm", length, 0.9, si}, // 900 times 1e-3 would be 0.9000000000000000222
		{"900mm", length, 0.9, si},
		{"  85 m", length, 85, si},
		{"1 ft", length, 0.3048, si}, // exact by definition
		{"1 in", length, 0.0254, si},
		{"90 deg", length, 0.25, wavelengths},
		{"0.25 wavelengths", length, 0.25, wavelengths},
		{"1 wavelength", length, 1, wavelengths},
		{"5 ns", length, 5e-9, delay},
		{"5 µs", length, 5e-6, delay},
		{"300 V peak", voltage, 300, si},
		{"300 V rms", voltage, 300 * math.Sqrt2, si},
		{"300 V pp", voltage, 150, si},
		{"1.95 kV peak", voltage, 1950, si},
		{"20 uA rms", current, 20e-6 * math.Sqrt2, si},
		{"250 W", power, 250, si},
		{"30 dBm", power, 1, dBm},
		{"0 dBm", power, 1e-3, dBm},
		{"50 Ω", resistance, 50, si}, // Greek capital omega
		{"50 \u2126", resistance, 50, si},
		{"4.7 kohm", resistance, 4700, si},
		{"1.2 uH", inductance, 1.2e-6, si},
		{"1.2 µH", inductance, 1.2e-6, si}, // U+00B5
		{"1.2 μH", inductance, 1.2e-6, si}, // U+03BC
		{"6.7 pF/m", shuntC, 6.7e-12, si},
		{"700 uH/km", seriesL, 700e-9, si},
		{"20 mohm/m", seriesR, 0.02, si},
		{"3.048 nS/ft", shuntG, 1e-8, si},
		{"8.685889638065037 dB/m", fading, 1, si},
		{"2.0 dB/100m", fading, 0.02 / line10, si},
		{"2.0 dB/100 m", fading, 0.02 / line10, si},
		{"6.1 dB/100ft", fading, 0.061 / line10 / 0.3048, si},
		{"2 Np/km", fading, 2e-3, si},
		{"180 deg", angle, math.Pi, si},
		{"-90°", angle, -math.Pi / 2, si},
		{"1 rad", angle, 1, si},
		{"0.5 %", percentage, 0.005, percent},
		{"66 %", fraction, 0.66, percent},
		{".66", fraction, 0.66, bare},
		{"1.5:1", vswrRatio, 1.5, bare},
		{"3 periods", timeSpan, 3, periods},
		{"1e-3 us", timeSpan, 1e-9, si},
		{"+5 V peak", voltage, 5, si},
		{"-0 dB", level, 0, decibels},
	} {
		q, f := parseQuantity(strings.TrimSpace(tt.text), tt.d)
		if f != nil {
			t.Errorf("%q: %s", tt.text, f.message)
			continue
		}
		if math.Abs(q.value-tt.want) > twoRoundings*math.Abs(tt.want) || q.unit.of != tt.of {
			t.Errorf("%q = %v of kind %d, want %v of kind %d", tt.text, q.value, q.unit.of, tt.want, tt.of)
		}
	}
}

// line10 is 20/ln 10, dB per neper.
const line10 = 20 / math.Ln10

// What strconv.ParseFloat takes and a design file must not.
func TestNumberGrammar(t *testing.T) {
	for _, text := range []string{
		"", " ", "nan", "NaN", "inf", "+Inf", "-inf", "infinity", ".inf", "0x1p-2", "0X10", "1_0", "1__0",
		"1,5", "1 000", "007", "00", "-01", "+", "-", ".", "e5", ".e5", "--1", "+-1", "١", "1e", "1e+", "½", "−1",
	} {
		if v, f := plainNumber(text); f == nil {
			t.Errorf("%q is taken for the number %v", text, v)
		}
	}
	for text, want := range map[string]float64{
		"0": 0, "-0": 0, "1": 1, "1.": 1, ".5": 0.5, "0.5": 0.5, "-1.5e3": -1500, "1E-3": 1e-3, "+2e+2": 200, "10": 10,
	} {
		if v, f := plainNumber(text); f != nil || v != want || math.Signbit(v) != math.Signbit(want) {
			t.Errorf("%q = %v, want %v", text, v, want)
		}
	}
}

func TestSizes(t *testing.T) {
	for text, want := range map[string]string{
		"1e41 m": "too large", "1e99999999999999999999 m": "too large", "1e-41 m": "too small",
		"-1e50 m": "too large", "1e-99999999999999999999 m": "too small",
	} {
		if _, f := parseQuantity(text, length); f == nil || !strings.Contains(f.message, want) {
			t.Errorf("%q: %v, want %s", text, f, want)
		}
	}
	if q, f := parseQuantity("0e-999 m", length); f != nil || q.value != 0 {
		t.Errorf("zero with an exponent: %v, %v", q.value, f)
	}
	if _, f := parseQuantity("4000 dBm", power); f == nil {
		t.Error("4000 dBm is taken for a power")
	}
}

// Every unit with a power of ten rounds once: the value is the double nearest
// to the decimal as written, which big.Rat gives exactly.
func TestPrefixesRoundOnce(t *testing.T) {
	dims := []*dimension{frequency, length, power, resistance, inductance, capacity, seriesR, seriesL, shuntG, shuntC, timeSpan}
	rapid.Check(t, func(t *rapid.T) {
		d := rapid.SampledFrom(dims).Draw(t, "dimension")
		var linear []string
		for _, name := range sortedUnits(d) {
			if u := d.units[name]; u.factor == 1 && u.of != dBm {
				linear = append(linear, name)
			}
		}
		name := rapid.SampledFrom(linear).Draw(t, "unit")
		digits := strconv.FormatFloat(rapid.Float64Range(1e-6, 1e6).Draw(t, "v"), 'f', rapid.IntRange(0, 9).Draw(t, "places"), 64)
		q, f := parseQuantity(digits+" "+name, d)
		if f != nil {
			t.Fatalf("%s %s: %s", digits, name, f.message)
		}
		exact, ok := new(big.Rat).SetString(digits + "e" + strconv.Itoa(d.units[name].exp))
		if !ok {
			t.Fatal("bad test")
		}
		if want, _ := exact.Float64(); q.value != want {
			t.Fatalf("%s %s = %v, want %v", digits, name, q.value, want)
		}
	})
}

// A printed double comes back as it was, in every linear unit without prefix.
func TestQuantityRoundTrip(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		v := rapid.Float64Range(-1e30, 1e30).Filter(func(v float64) bool { return v == 0 || math.Abs(v) >= smallest }).Draw(t, "v")
		for _, format := range []byte{'g', 'e', 'f'} {
			text := strconv.FormatFloat(v, format, -1, 64) + " ohm"
			q, f := parseQuantity(text, resistance)
			if f != nil || q.value != v {
				t.Fatalf("%s = %v, want %v", text, q.value, v)
			}
		}
	})
}

func sortedUnits(d *dimension) (names []string) {
	for name := range d.units {
		names = append(names, name)
	}
	// A fixed order, so that a failure found can be replayed.
	for i := range names {
		for j := i; j > 0 && names[j] < names[j-1]; j-- {
			names[j], names[j-1] = names[j-1], names[j]
		}
	}
	return names
}

// Every unit that a hint promises is a unit.
func TestHintsListUnits(t *testing.T) {
	for _, d := range allDimensions {
		if _, f := parseQuantity(d.example, d); f != nil {
			t.Errorf("the example %q of %s is no good: %s", d.example, d.name, f.message)
		}
		for _, word := range strings.FieldsFunc(d.accepts, func(c rune) bool { return c == ',' || c == ' ' }) {
			if prose[word] {
				continue
			}
			if _, ok := d.units[word]; !ok {
				t.Errorf("the hint for %s lists %q, which is no unit", d.name, word)
			}
		}
	}
}

var prose = map[string]bool{
	"or": true, "electrically": true, "as": true, "a": true, "delay": true, "each": true, "followed": true, "by": true,
	"peak": true, "rms": true, "pp": true, "the": true, "same": true, "per": true, "km": true, "ft": true, "plain": true, "number": true,
}

var allDimensions = []*dimension{
	frequency, length, timeSpan, voltage, current, power, resistance, inductance, capacity, angle,
	seriesR, seriesL, shuntG, shuntC, fading, admittance, slowing, size, conductivity, plain, percentage, fraction, vswrRatio, reflected, level, spread,
	watts, bands[vswrRatio], bands[resistance], bands[voltage], bands[power], bands[timeSpan], bands[level], bands[percentage], bands[angle],
}

// FuzzQuantity: no text makes the parser panic or return what is not finite,
// and what is taken stays what it is with blanks in front of the unit.
func FuzzQuantity(f *testing.F) {
	for _, seed := range []string{"1.6 MHz", "900 mm", "300 V peak", "2.0 dB/100 m", "30 dBm", "1e-3 us", "90°", "50 Ω", "1e999 m", "0x1p-2 m", "1.5:1", "٣ m"} {
		f.Add(seed)
	}
	f.Fuzz(func(t *testing.T, text string) {
		for _, d := range allDimensions {
			q, fault := parseQuantity(text, d)
			if fault != nil {
				if fault.message == "" {
					t.Errorf("%q is refused without a word", text)
				}
				fault.hint()
				continue
			}
			if math.IsNaN(q.value) || math.Abs(q.value) > largest {
				t.Errorf("%q = %v", text, q.value)
			}
			_, rest, _ := scanNumber(text)
			spaced := strings.TrimSuffix(text, rest) + "  " + strings.TrimLeft(rest, " \t")
			if again, fault := parseQuantity(spaced, d); fault != nil || again != q {
				t.Errorf("%q = %v, but %q = %v", text, q, spaced, again)
			}
		}
	})
}
