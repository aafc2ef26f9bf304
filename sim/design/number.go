package design

import (
	"strconv"
	"strings"
)

// A fault is what is wrong with a piece of text. It has no place; whoever
// reads the text knows that.
type fault struct {
	message string
	hint    hint
}

func newFault(h hint, format string, args ...any) *fault {
	return &fault{sprintf(format, args...), h}
}

// A number is a decimal number as written: its value is mantissa 10^exp.
// Keeping the digits lets a unit prefix join the exponent, so that the value
// is rounded once: 900 mm is the double nearest to 0.9.
type number struct {
	mantissa string
	exp      int
}

// The range of sizes a quantity may have, in SI units. Anything physical lies
// well inside, and products of a few such values stay finite.
const smallest, largest = 1e-40, 1e40

// scanNumber reads the number at the start of text and returns what follows.
// Its grammar is narrower than that of strconv.ParseFloat, which takes NaN,
// Inf, hexadecimal digits and digit underscores:
//
//	[+-] (0 | [1-9][0-9]*) [. [0-9]*] [e [+-] [0-9]+]   or   [+-] . [0-9]+ ...
func scanNumber(text string) (n number, rest string, f *fault) {
	i := 0
	if strings.HasPrefix(text, "+") || strings.HasPrefix(text, "-") {
		i = 1
	}
	whole := digits(text[i:])
	end := i + whole
	fraction := 0
	if strings.HasPrefix(text[end:], ".") {
		fraction = digits(text[end+1:])
		end += 1 + fraction
	}
	if whole+fraction == 0 {
		return n, text, newFault(numberHint(text), "%q is not a number", text)
	}
	if whole > 1 && text[i] == '0' {
		return n, text, newFault(say("write %s", strings.TrimLeft(text[i:], "0")), "%q begins with a needless zero", text)
	}
	n.mantissa, rest = text[:end], text[end:]
	if rest != "" && strings.ContainsAny(rest[:1], "_,xX") {
		return n, text, newFault(numberHint(text), "%q is not a number", text)
	}
	n.exp, rest = scanExponent(rest)
	return n, rest, nil
}

func numberHint(text string) hint {
	lower := strings.ToLower(strings.TrimLeft(text, "+-."))
	switch {
	case strings.HasPrefix(text, "\u2212"):
		return say("write the minus sign as -")
	case strings.HasPrefix(lower, "nan"), strings.HasPrefix(lower, "inf"):
		return say("values are finite; an impedance can be open or short")
	case strings.HasPrefix(lower, "0x"):
		return say("write it in decimal digits")
	case strings.Contains(text, "_"):
		return say("write the digits without _")
	case strings.Contains(text, ","):
		return say("the decimal sign is a point, and digits are not grouped")
	default:
		return say("write digits with a decimal point, 1.5 or 1.5e3")
	}
}

func scanExponent(text string) (exp int, rest string) {
	if !strings.HasPrefix(text, "e") && !strings.HasPrefix(text, "E") {
		return 0, text
	}
	i := 1
	if strings.HasPrefix(text[i:], "+") || strings.HasPrefix(text[i:], "-") {
		i++
	}
	n := digits(text[i:])
	if n == 0 {
		return 0, text // a unit that begins with e
	}
	exp, err := strconv.Atoi(text[1 : i+n])
	if err != nil || exp > 999 || exp < -999 {
		exp = max(-999, min(exp, 999)) // beyond the range of sizes anyway
	}
	return exp, text[i+n:]
}

func digits(text string) int {
	return len(text) - len(strings.TrimLeft(text, "0123456789"))
}

// float is the value of n times 10^exp, rounded once. It may be infinite.
func (n number) float(exp int) float64 {
	v, _ := strconv.ParseFloat(n.mantissa+"e"+strconv.Itoa(n.exp+exp), 64)
	return v
}

// plainNumber reads text that is a number and nothing else.
func plainNumber(text string) (float64, *fault) {
	n, rest, f := scanNumber(text)
	if f == nil && rest != "" {
		f = newFault(say("write digits only: this value has no unit"), "%q is not a plain number", text)
	}
	if f != nil {
		return 0, f
	}
	return inRange(n.float(0), n, text)
}

// inRange refuses sizes that overflow or vanish.
func inRange(v float64, n number, text string) (float64, *fault) {
	size := max(v, -v)
	switch {
	case size > largest:
		return 0, newFault(say("check the exponent and the unit prefix"), "%q is too large", text)
	case size < smallest && strings.Trim(n.mantissa, "+-.0") != "":
		return 0, newFault(say("check the exponent and the unit prefix"), "%q is too small", text)
	}
	return v + 0, nil // + 0 turns -0 into 0
}
