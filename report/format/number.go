package format

import (
	"math"
	"strconv"
	"strings"
)

// The characters that text is made of besides letters and digits.
const (
	Minus    = "\u2212"
	Space    = "\u00a0" // no-break: a number and its unit stay together
	Infinite = "infinite"
	Missing  = "\u2013" // what does not apply
)

// The markup runes, from the private use area.
const (
	Sup = '\ue000'
	Sub = '\ue001'
	End = '\ue002'
)

// significant is how many digits a result is printed with.
const significant = 4

// Number returns v with four significant digits, as a power of ten outside
// 1e-4 to 1e6.
func Number(v float64) string { return Digits(v, significant) }

// Digits returns v with n significant digits, as a power of ten outside 1e-4
// to 1e6.
func Digits(v float64, n int) string {
	if s, special := notFinite(v); special {
		return s
	}
	if v == 0 {
		return "0"
	}
	mantissa, exponent := split(v, n)
	if exponent < -4 || exponent >= 6 {
		return sign(mantissa) + Space + "×" + Space + Pow10(exponent)
	}
	return plain(v, n-1-exponent)
}

// Fixed returns v with the given number of decimals.
func Fixed(v float64, decimals int) string {
	if s, special := notFinite(v); special {
		return s
	}
	return plain(v, decimals)
}

// Pow10 returns ten to the power n, in markup.
func Pow10(n int) string {
	return "10" + string(Sup) + sign(strconv.Itoa(n)) + string(End)
}

// Short returns a number of few digits as it is, up to three significant ones:
// 1.25, 3.
func Short(v float64) string {
	s := Digits(v, 3)
	if strings.Contains(s, ".") && !strings.Contains(s, Space) {
		s = strings.TrimRight(strings.TrimRight(s, "0"), ".")
	}
	return s
}

// Count returns a whole number with its digits in groups of three.
func Count(n int64) string {
	digits, negative := strings.CutPrefix(strconv.FormatInt(n, 10), "-")
	var b strings.Builder
	if negative {
		b.WriteString(Minus)
	}
	for i, d := range digits {
		if left := len(digits) - i; i > 0 && left%3 == 0 && len(digits) > 4 {
			b.WriteString(Space)
		}
		b.WriteRune(d)
	}
	return b.String()
}

// Plural returns a count and its noun: "1 period", "20 000 periods".
func Plural(n int64, noun string) string {
	if n != 1 {
		noun += "s"
	}
	return Count(n) + Space + noun
}

// notFinite returns the word for a value that is not finite.
func notFinite(v float64) (s string, special bool) {
	switch {
	case math.IsNaN(v):
		return Missing, true
	case math.IsInf(v, 1):
		return Infinite, true
	case math.IsInf(v, -1):
		return Minus + Infinite, true
	}
	return "", false
}

// split returns the mantissa and the exponent of v rounded to n digits, so
// that 999.96 gives 1.000 and 3.
func split(v float64, n int) (mantissa string, exponent int) {
	s := strconv.FormatFloat(v, 'e', n-1, 64)
	mantissa, e, _ := strings.Cut(s, "e")
	exponent, err := strconv.Atoi(e)
	if err != nil {
		panic("format: no exponent in a number of exponent form")
	}
	return mantissa, exponent
}

// plain returns v with the given decimals, never as a negative zero.
func plain(v float64, decimals int) string {
	s := strconv.FormatFloat(v, 'f', max(decimals, 0), 64)
	if strings.Trim(s, "-0.") == "" {
		s = strings.TrimPrefix(s, "-")
	}
	return sign(s)
}

// Signed puts the minus sign in place of every hyphen that signs a number, in
// a text that was not made here: "-2 deg to 2 deg".
func Signed(s string) string {
	b := []byte(s)
	var out strings.Builder
	for i, c := range b {
		starts := i == 0 || b[i-1] == ' ' || b[i-1] == '('
		if c == '-' && starts && i+1 < len(b) && b[i+1] >= '0' && b[i+1] <= '9' {
			out.WriteString(Minus)
			continue
		}
		out.WriteByte(c)
	}
	return out.String()
}

// sign puts the minus sign in place of the hyphen.
func sign(s string) string {
	if rest, negative := strings.CutPrefix(s, "-"); negative {
		return Minus + rest
	}
	return s
}
