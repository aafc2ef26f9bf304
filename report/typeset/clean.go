package typeset

import (
	"fmt"
	"strings"
	"unicode"
	"unicode/utf8"
)

// Clean returns a text of the user as one line: white space and control
// characters become single spaces, bytes that are not UTF-8 are dropped, as
// are the private characters that this package reads as markup.
func Clean(s string) string {
	s = strings.Map(func(r rune) rune {
		switch {
		case r == '\u00a0':
			return r
		case unicode.IsSpace(r), unicode.IsControl(r):
			return ' '
		case r == utf8.RuneError, unicode.Is(unicode.Co, r):
			return -1
		}
		return r
	}, s)
	return strings.Join(strings.Fields(s), " ")
}

// Listing returns a line of a file as it is listed: tabs to the next multiple
// of four columns, and what the face cannot print as its number in Unicode,
// "<U+6F22>", or as its byte, "<0xFF>". Nothing is left out.
func Listing(s string) string {
	var b strings.Builder
	column := 0
	put := func(t string) { b.WriteString(t); column += utf8.RuneCountInString(t) }
	for i, w := 0, 0; i < len(s); i += w {
		var r rune
		r, w = utf8.DecodeRuneInString(s[i:])
		switch {
		case r == '\t':
			put(strings.Repeat(" ", 4-column%4))
		case r == utf8.RuneError && w == 1:
			put(fmt.Sprintf("<0x%02X>", s[i]))
		case !unicode.IsPrint(r) || !Mono.Has(r):
			put(fmt.Sprintf("<%U>", r))
		default:
			put(string(r))
		}
	}
	return b.String()
}
