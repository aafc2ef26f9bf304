package syntax

import (
	"bytes"
	"strings"
)

// A lexer stands in a piece of a file, before a token.
type lexer struct {
	b []byte
	i int
	n *int // values that may still be read
	d int  // levels that may still be opened
}

func isSpace(c byte) bool { return strings.IndexByte("\x00\t\n\f\r ", c) >= 0 }
func isDelim(c byte) bool { return strings.IndexByte("()<>[]{}/%", c) >= 0 }
func isDigit(c byte) bool { return '0' <= c && c <= '9' }

// space passes white space and comments (7.2.3).
func (l *lexer) space() {
	for l.i < len(l.b) {
		switch c := l.b[l.i]; {
		case isSpace(c):
			l.i++
		case c == '%':
			for l.i < len(l.b) && l.b[l.i] != '\n' && l.b[l.i] != '\r' {
				l.i++
			}
		default:
			return
		}
	}
}

// peek returns the next byte, 0 at the end.
func (l *lexer) peek() byte {
	if l.i < len(l.b) {
		return l.b[l.i]
	}
	return 0
}

// take passes s if it comes next.
func (l *lexer) take(s string) bool {
	if bytes.HasPrefix(l.b[l.i:], []byte(s)) {
		l.i += len(s)
		return true
	}
	return false
}

// keyword passes white space and the word s if it comes next and ends there.
func (l *lexer) keyword(s string) bool {
	l.space()
	start := l.i
	if l.word() == s {
		return true
	}
	l.i = start
	return false
}

// word returns the regular characters that come next.
func (l *lexer) word() string {
	start := l.i
	for l.i < len(l.b) && !isSpace(l.b[l.i]) && !isDelim(l.b[l.i]) {
		l.i++
	}
	return string(l.b[start:l.i])
}

// integer returns the digits that come next after white space as a number of
// at most 10 digits, or false without moving.
func (l *lexer) integer() (int, bool) {
	start := l.i
	l.space()
	w, n := l.word(), 0
	for _, c := range []byte(w) {
		if !isDigit(c) || len(w) > 10 {
			l.i = start
			return 0, false
		}
		n = 10*n + int(c-'0')
	}
	if w == "" {
		l.i = start
	}
	return n, w != ""
}

// context is what stands here, for an error.
func (l *lexer) context() string {
	const few = 20
	return string(l.b[l.i:min(l.i+few, len(l.b))])
}
