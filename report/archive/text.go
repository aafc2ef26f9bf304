package archive

import (
	"strings"
	"time"
	"unicode/utf16"

	"linewitness/report/archive/internal/syntax"
)

const (
	markUTF16 = "\xFE\xFF"
	markUTF8  = "\xEF\xBB\xBF"
)

// textString is s as a text string (ISO 32000-1, 7.9.2.2): as it is if it is
// printable ASCII, else in UTF-16.
func textString(s string) syntax.String {
	if s == ascii(s) {
		return syntax.String(s)
	}
	b := []byte(markUTF16)
	for _, u := range utf16.Encode([]rune(s)) {
		b = append(b, byte(u>>8), byte(u))
	}
	return syntax.String(b)
}

// ascii is s with a low line in place of what is not printable ASCII.
func ascii(s string) string {
	return strings.Map(func(r rune) rune {
		if r < ' ' || r > '~' {
			return '_'
		}
		return r
	}, s)
}

// plainText reads a text string. Without a mark it is taken for ISO 8859-1,
// with which PDFDocEncoding agrees where printable.
func plainText(t syntax.String) string {
	s := string(t)
	if rest, ok := strings.CutPrefix(s, markUTF8); ok {
		return strings.ToValidUTF8(rest, "\uFFFD")
	}
	rest, ok := strings.CutPrefix(s, markUTF16)
	if !ok {
		var b strings.Builder
		for _, c := range []byte(s) {
			b.WriteRune(rune(c))
		}
		return b.String()
	}
	var units []uint16
	for ; len(rest) >= 2; rest = rest[2:] {
		units = append(units, uint16(rest[0])<<8|uint16(rest[1]))
	}
	return string(utf16.Decode(units))
}

// dateString is a date (ISO 32000-1, 7.9.4) in UTC, with the apostrophe at its
// end that strict readers of older versions ask for.
func dateString(t time.Time) syntax.String {
	return syntax.String(t.UTC().Format("D:20060102150405") + "+00'00'")
}
