package design

import (
	"bytes"
	"fmt"
	"unicode/utf8"
)

// maxBytes is the largest design file that is read.
const maxBytes = 1 << 20

// source is the text of a design file by lines.
type source struct {
	lines [][]byte
}

func newSource(src []byte) *source {
	src = bytes.TrimPrefix(src, []byte("\ufeff"))
	return &source{bytes.Split(src, []byte("\n"))}
}

// line returns a line, counted from 1, without its line break.
func (s *source) line(number int) string {
	if number < 1 || number > len(s.lines) {
		return ""
	}
	return string(bytes.TrimSuffix(s.lines[number-1], []byte("\r")))
}

// check refuses what is not plain text before the YAML parser sees it: the
// parser reports such characters without a place, and it takes some of them
// for line breaks, which would put every later diagnostic on the wrong line.
func (s *source) check(p *problems) {
	for i, line := range s.lines {
		column := 0
		line = bytes.TrimSuffix(line, []byte("\r"))
		for rest := line; len(rest) > 0; {
			c, size := utf8.DecodeRune(rest)
			rest = rest[size:]
			column++
			pos := Pos{i + 1, column}
			switch {
			case c == utf8.RuneError && size == 1:
				p.problem(pos, say("save the file as UTF-8"), "not UTF-8 text")
				return
			case isControl(c):
				p.problem(pos, say("delete it"), "control character %s in the file", fmt.Sprintf("%U", c))
				return
			}
		}
	}
}

// isControl reports the C0 and C1 controls but for the tab, and the line and
// paragraph separators.
func isControl(c rune) bool {
	return c < ' ' && c != '\t' || c >= 0x7f && c <= 0x9f || c == 0x2028 || c == 0x2029
}
