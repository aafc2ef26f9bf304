package design

import (
	"math"
	"math/cmplx"
	"strings"
)

// String is the word for the convention in a design file.
func (c Convention) String() string {
	return [...]string{"engineering", "physics"}[c]
}

// letter is the imaginary unit of the convention.
func (c Convention) letter() string { return [...]string{"j", "i"}[c] }

func (c Convention) other() Convention { return 1 - c }

// sign is what an imaginary part or a phase of the file is multiplied by to
// come to the engineering convention. With e^{-iwt} in place of e^{+jwt} every
// phasor and every impedance is the complex conjugate.
func (c Convention) sign() float64 {
	if c == Physics {
		return -1
	}
	return 1
}

// A complexQuantity is a complex number with its unit.
type complexQuantity struct {
	value complex128 // in SI units, engineering convention
	unit  unit
	both  bool // an imaginary part or an angle is written, be it zero
}

// parseComplex reads an impedance or an admittance, as d says, in one of its
// three written forms and returns it in the engineering convention:
//
//	36.5 - j61.1 ohm    36.5-61.1j ohm    71.2 ohm at -59.1 deg
//
// Either part may be missing. Under the physics convention the letter is i.
func parseComplex(text string, d *dimension, c Convention) (complex128, *fault) {
	q, f := parseBoth(text, d, c)
	return q.value, f
}

// parseBoth is parseComplex for any dimension with units that are linear.
func parseBoth(text string, d *dimension, c Convention) (q complexQuantity, f *fault) {
	if size, at, polar := strings.Cut(text, " at "); polar {
		return parsePolar(strings.TrimSpace(size), strings.TrimSpace(at), d, c)
	}
	s := complexScanner{rest: text}
	re, im, f := s.parts()
	if f != nil {
		return q, f
	}
	if s.letter != "" && s.letter != c.letter() {
		return q, wrongLetter(text, s, c)
	}
	u, f := d.unit(strings.Join(strings.Fields(s.rest), " "), text)
	if f != nil {
		return q, f
	}
	r, f := inRange(re.float(u.exp)*u.factor, re, text)
	if f != nil {
		return q, f
	}
	x, f := inRange(im.float(u.exp)*u.factor, im, text)
	return complexQuantity{complex(r, c.sign()*x+0), u, s.letter != ""}, f
}

func parsePolar(size, at string, d *dimension, c Convention) (complexQuantity, *fault) {
	q, f := parseQuantity(size, d)
	if f != nil {
		return complexQuantity{}, f
	}
	phase, f := parseQuantity(at, angle)
	if f != nil {
		return complexQuantity{}, f
	}
	if q.value < 0 {
		return complexQuantity{}, newFault(say("turn the angle by 180 deg instead"), "the size %q of a complex value is negative", size)
	}
	return complexQuantity{rect(q.value, c.sign()*phase.value), q.unit, true}, nil
}

// rect is cmplx.Rect, exact on the axes: a quarter turn has no real part, not
// one of 6e-17 of its size.
func rect(size, phase float64) complex128 {
	quarters := phase / (math.Pi / 2)
	if quarters == math.Trunc(quarters) {
		return complex(size, 0) * [...]complex128{1, 1i, -1, -1i}[((int(math.Mod(quarters, 4))%4)+4)%4]
	}
	return cmplx.Rect(size, phase)
}

// wrongLetter says what a value written with the other convention's letter
// would have meant.
func wrongLetter(text string, s complexScanner, c Convention) *fault {
	flipped, term := "-", text[s.imaginary:]
	switch {
	case strings.HasPrefix(term, "-"):
		flipped, term = "+", term[1:]
	case strings.HasPrefix(term, "+"):
		term = term[1:]
	}
	meant := text[:s.imaginary] + flipped + strings.Replace(term, s.letter, c.letter(), 1)
	return newFault(
		say("write %s if the %s convention was meant, else put %s for %s", meant, c.other(), c.letter(), s.letter),
		"%q is written with %s, the %s convention, where it would mean %s; this file has the %s convention and %s",
		text, s.letter, c.other().String(), meant, c.String(), c.letter())
}

// complexScanner takes a complex number from the start of a text.
type complexScanner struct {
	rest      string
	letter    string // the imaginary unit it met
	imaginary int    // where the imaginary part begins in the text
}

// zero is the part that is not there.
var zero = number{mantissa: "0"}

// parts scans a real part, an imaginary part or both.
func (s *complexScanner) parts() (re, im number, f *fault) {
	text := s.rest
	first, imaginary, f := s.term()
	switch {
	case f != nil:
		return zero, zero, f
	case imaginary:
		re, im = zero, first
	default:
		re, im = first, zero
	}
	s.skipBlanks()
	if !strings.HasPrefix(s.rest, "+") && !strings.HasPrefix(s.rest, "-") {
		return re, im, nil
	}
	if !imaginary {
		s.imaginary = len(text) - len(s.rest)
	}
	second, again, f := s.term()
	switch {
	case f != nil:
		return zero, zero, f
	case imaginary || !again:
		return zero, zero, newFault(say("write the real part, then the imaginary part: 36.5 - j61.1 ohm, 36.5-61.1j ohm or 71.2 ohm at -59.1 deg"), "%q is not a complex number", text)
	}
	return re, second, nil
}

// term scans [sign] [letter] number [letter].
func (s *complexScanner) term() (n number, imaginary bool, f *fault) {
	text, sign := s.rest, ""
	if strings.HasPrefix(text, "+") || strings.HasPrefix(text, "-") {
		sign, s.rest = text[:1], text[1:]
	}
	s.skipBlanks()
	imaginary = s.takeLetter()
	if strings.HasPrefix(s.rest, "+") || strings.HasPrefix(s.rest, "-") {
		return zero, false, newFault(say("one sign is enough"), "%q has two signs in a row", text)
	}
	n, s.rest, f = scanNumber(s.rest)
	if f != nil {
		return zero, false, f
	}
	if !imaginary {
		s.skipBlanks()
		imaginary = s.takeLetter()
	}
	n.mantissa = sign + n.mantissa
	return n, imaginary, nil
}

// takeLetter takes an i or j that is not the first letter of a unit.
func (s *complexScanner) takeLetter() bool {
	for _, c := range []string{"i", "j"} {
		if rest, ok := strings.CutPrefix(s.rest, c); ok && !startsLower(rest) {
			s.letter, s.rest = c, rest
			s.skipBlanks()
			return true
		}
	}
	return false
}

func startsLower(s string) bool { return s != "" && s[0] >= 'a' && s[0] <= 'z' }

func (s *complexScanner) skipBlanks() { s.rest = strings.TrimLeft(s.rest, " \t") }
