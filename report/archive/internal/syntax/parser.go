package syntax

import "strings"

// value reads the next value.
func (l *lexer) value() (Value, error) {
	if *l.n--; *l.n < 0 {
		return nil, ErrLimit
	}
	l.space()
	switch c := l.peek(); {
	case l.take("<<"):
		return l.within(func() (Value, error) { return l.dict() })
	case c == '<':
		return l.hex()
	case c == '(':
		return l.literal()
	case c == '/':
		return l.name()
	case l.take("["):
		return l.within(func() (Value, error) { return l.array() })
	case isDigit(c):
		if r, ok, err := l.reference(); ok || err != nil {
			return r, err
		}
	}
	return l.atom()
}

// within reads what stands one level deeper.
func (l *lexer) within(read func() (Value, error)) (Value, error) {
	if l.d--; l.d < 0 {
		return nil, ErrLimit
	}
	v, err := read()
	l.d++
	return v, err
}

// reference reads "12 0 R"; ok is false, and nothing is passed, where another
// thing stands.
func (l *lexer) reference() (r Ref, ok bool, err error) {
	start := l.i
	n, first := l.integer()
	g, second := l.integer()
	if !first || !second || !l.keyword("R") {
		l.i = start
		return 0, false, nil
	}
	if g != 0 || n == 0 {
		return 0, false, damaged("reference to object %d of generation %d", n, g)
	}
	return Ref(n), true, nil
}

// atom reads a number, true, false or null.
func (l *lexer) atom() (Value, error) {
	start := l.i
	w := l.word()
	switch {
	case w == "true":
		return Bool(true), nil
	case w == "false":
		return Bool(false), nil
	case w == "null":
		return Null{}, nil
	case isNumber(w):
		return Number(w), nil
	}
	l.i = start
	return nil, damaged("no value at %q", l.context())
}

// isNumber tells numbers as in 7.3.3 from other words.
func isNumber(w string) bool {
	w = strings.TrimLeft(w, "+-")
	digits, points := 0, 0
	for _, c := range []byte(w) {
		switch {
		case isDigit(c):
			digits++
		case c == '.':
			points++
		default:
			return false
		}
	}
	return digits > 0 && points <= 1
}

func (l *lexer) array() (Array, error) {
	a := Array{}
	for {
		l.space()
		if l.take("]") {
			return a, nil
		}
		v, err := l.value()
		if err != nil {
			return nil, err
		}
		a = append(a, v)
	}
}

func (l *lexer) dict() (Dict, error) {
	d := Dict{}
	for {
		l.space()
		if l.take(">>") {
			return d, nil
		}
		if l.peek() != '/' {
			return nil, damaged("no key of a dictionary at %q", l.context())
		}
		k, err := l.name()
		if err != nil {
			return nil, err
		}
		v, err := l.value()
		if err != nil {
			return nil, err
		}
		if _, twice := d[k]; twice {
			return nil, damaged("key %q stands twice in a dictionary", string(k))
		}
		d[k] = v
	}
}
