package typeset

import (
	"strings"
	"unicode/utf8"
)

// ellipsis stands for what Fit left out.
const ellipsis = "…"

// Wrap breaks s into lines of at most the given width, at its spaces and, in
// a word that is too wide by itself, between characters. A no-break space is
// part of its word. There is at least one line.
func (st Style) Wrap(s string, width float64) []string {
	var lines []string
	line := ""
	for _, word := range strings.Split(s, " ") {
		joined := word
		if line != "" {
			joined = line + " " + word
		}
		if st.Width(joined) <= width {
			line = joined
			continue
		}
		if line != "" {
			lines = append(lines, line)
		}
		for st.Width(word) > width {
			n := st.prefix(word, width)
			if n == len(word) {
				break // a single character is as narrow as it gets
			}
			lines, word = append(lines, word[:n]), word[n:]
		}
		line = word
	}
	return append(lines, line)
}

// Fit returns s, shortened with an ellipsis if it is wider than width.
func (st Style) Fit(s string, width float64) string {
	if st.Width(s) <= width {
		return s
	}
	room := width - st.Width(ellipsis)
	if room <= 0 {
		return ""
	}
	n := st.prefix(s, room)
	if st.Width(s[:n]) > room {
		return ellipsis
	}
	return strings.TrimRight(s[:n], " ") + ellipsis
}

// prefix returns the length in bytes of the longest start of s that is not
// wider than width, and of one character at least.
func (st Style) prefix(s string, width float64) int {
	n := 0
	for i, r := range s {
		end := i + utf8.RuneLen(r)
		if n > 0 && st.Width(s[:end]) > width {
			break
		}
		n = end
	}
	return n
}
