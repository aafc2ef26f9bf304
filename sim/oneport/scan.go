package oneport

import (
	"fmt"
	"strings"
)

// A line is one that has more than a comment, without its comment.
type line struct {
	number int
	text   string
}

// A word is what stands between blanks.
type word struct {
	text   string
	column int // from 1
}

// scan cuts a file into its lines, which end with LF, CR LF or CR. A character
// beyond ASCII is refused in comments too, as the format has it.
func scan(name string, src []byte) ([]line, error) {
	text := strings.ReplaceAll(string(src), "\r\n", "\n")
	text = strings.ReplaceAll(text, "\r", "\n")
	var out []line
	for i, s := range strings.Split(text, "\n") {
		if column, hint := foreign(s); column > 0 {
			return nil, &Error{name, i + 1, column, fmt.Sprintf("the byte 0x%02x is not allowed: the format is plain ASCII", s[column-1]), hint}
		}
		s, _, _ = strings.Cut(s, "!")
		if strings.Trim(s, " \t") != "" {
			out = append(out, line{i + 1, s})
		}
	}
	return out, nil
}

// foreign gives the column of the first character that a file may not have; 0
// if there is none.
func foreign(s string) (int, string) {
	for i := range len(s) {
		switch c := s[i]; {
		case c == 0xef && strings.HasPrefix(s[i:], "\ufeff"):
			return i + 1, "save the file without a byte order mark"
		case c > '~':
			return i + 1, "write ohm or deg in letters, also in comments"
		case c < ' ' && c != '\t':
			return i + 1, "is it a text file?"
		}
	}
	return 0, ""
}

// words cuts the rest of a line, from the given byte on, at its blanks. The
// character # is a word of its own.
func (l line) words(from int) []word {
	var out []word
	start := -1
	for i := from; i <= len(l.text); i++ {
		blank := i == len(l.text) || l.text[i] == ' ' || l.text[i] == '\t'
		if start >= 0 && (blank || l.text[start] == '#') {
			out = append(out, word{l.text[start:i], start + 1})
			start = -1
		}
		if start < 0 && !blank {
			start = i
		}
	}
	return out
}
