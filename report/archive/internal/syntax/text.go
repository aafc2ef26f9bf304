package syntax

import (
	"bytes"
	"encoding/hex"
	"strings"
)

// name reads a name (7.3.5).
func (l *lexer) name() (Name, error) {
	l.i++
	w := l.word()
	if !strings.Contains(w, "#") {
		return Name(w), nil
	}
	var b strings.Builder
	for i := 0; i < len(w); i++ {
		if w[i] != '#' {
			b.WriteByte(w[i])
			continue
		}
		var c [1]byte
		if i+2 >= len(w) {
			return "", damaged("name %q", w)
		}
		if _, err := hex.Decode(c[:], []byte(w[i+1:i+3])); err != nil {
			return "", damaged("name %q", w)
		}
		b.WriteByte(c[0])
		i += 2
	}
	return Name(b.String()), nil
}

// hex reads a string in hexadecimal digits (7.3.4.3).
func (l *lexer) hex() (String, error) {
	end := bytes.IndexByte(l.b[l.i:], '>')
	if end < 0 {
		return "", damaged("open string at %q", l.context())
	}
	digits := make([]byte, 0, end)
	for _, c := range l.b[l.i+1 : l.i+end] {
		if !isSpace(c) {
			digits = append(digits, c)
		}
	}
	if len(digits)%2 == 1 {
		digits = append(digits, '0')
	}
	out := make([]byte, len(digits)/2)
	if _, err := hex.Decode(out, digits); err != nil {
		return "", damaged("string at %q", l.context())
	}
	l.i += end + 1
	return String(out), nil
}

// literal reads a string in parentheses (7.3.4.2).
func (l *lexer) literal() (String, error) {
	start := l.i
	var b strings.Builder
	for open := 0; l.i < len(l.b); {
		c := l.b[l.i]
		l.i++
		switch c {
		case '\\':
			l.escape(&b)
			continue
		case '(':
			if open++; open == 1 {
				continue
			}
		case ')':
			if open--; open == 0 {
				return String(b.String()), nil
			}
		case '\r': // an end of line of any kind is a line feed
			l.take("\n")
			c = '\n'
		}
		b.WriteByte(c)
	}
	l.i = start
	return "", damaged("open string at %q", l.context())
}

// escape reads what follows a reverse solidus (table 3).
func (l *lexer) escape(b *strings.Builder) {
	c := l.peek()
	if '0' <= c && c <= '7' {
		l.octal(b)
		return
	}
	l.i = min(l.i+1, len(l.b))
	if k := strings.IndexByte("nrtbf", c); k >= 0 {
		b.WriteByte("\n\r\t\b\f"[k])
		return
	}
	switch c {
	case '\r': // the line goes on
		l.take("\n")
	case '\n':
	default:
		b.WriteByte(c)
	}
}

func (l *lexer) octal(b *strings.Builder) {
	n := 0
	for k := 0; k < 3 && '0' <= l.peek() && l.peek() <= '7'; k++ {
		n = 8*n + int(l.peek()-'0')
		l.i++
	}
	b.WriteByte(byte(n))
}
