package typeset

import (
	"strings"
	"unicode"
)

// piece is a text in one face.
type piece struct {
	text string
	face Face
}

// shaped parts a text of a formula into what is upright and what is italic.
func shaped(s string) []piece {
	var out []piece
	put := func(text string, face Face) {
		if n := len(out); n > 0 && out[n-1].face == face {
			out[n-1].text += text
			return
		}
		out = append(out, piece{text, face})
	}
	for s != "" {
		n := strings.IndexFunc(s, func(r rune) bool { return !asciiLetter(r) })
		if n < 0 {
			n = len(s)
		}
		if n > 0 {
			letters(s[:n], put)
			s = s[n:]
			continue
		}
		r := []rune(s)[0]
		face := Sans
		if r == 'ℓ' || unicode.Is(unicode.Greek, r) && unicode.IsLower(r) {
			face = Italic
		}
		put(string(r), face)
		s = s[len(string(r)):]
	}
	return out
}

func asciiLetter(r rune) bool { return r < unicode.MaxASCII && unicode.IsLetter(r) }

// short are words and names of two letters; longer ones are told by their
// length from products of quantities, which have two letters at most.
const short = " ln lg lb if at or as of Re Im is in Lo Hi DC "

// letters puts a word or a name of a function upright, quantities italic, and
// upright the d of a differential and the j of the imaginary unit.
func letters(s string, put func(string, Face)) {
	if len(s) > 2 || strings.Contains(short, " "+s+" ") {
		put(s, Sans)
		return
	}
	for i, r := range s {
		differential := r == 'd' && i+1 < len(s)
		if differential || r == 'j' {
			put(string(r), Sans)
			continue
		}
		put(string(r), Italic)
	}
}
