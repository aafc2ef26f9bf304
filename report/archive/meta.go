package archive

import (
	"strings"
	"time"
	"unicode/utf8"
)

// Meta is what a document says about itself. What is empty is left out.
type Meta struct {
	Title, Author, Subject, Keywords string
	Creator, Producer                string
	Version                          string    // of the program, for the manifest
	Lang                             string    // of the text, as RFC 5646 has it: "en-GB"
	Created                          time.Time // zero: the document has no date
}

// cleaned returns m without what XML cannot hold, so that the two places that
// say these things say the same.
func (m Meta) cleaned() Meta {
	for _, s := range []*string{&m.Title, &m.Author, &m.Subject, &m.Keywords, &m.Creator, &m.Producer, &m.Version, &m.Lang} {
		*s = strings.TrimSpace(strings.Map(inXML, strings.ToValidUTF8(*s, "\uFFFD")))
	}
	return m
}

// inXML keeps the characters of XML 1.0, 2.2; ends of line become spaces.
func inXML(r rune) rune {
	switch {
	case r == '\t' || r == '\n' || r == '\r':
		return ' '
	case r < ' ', r == 0xFFFE, r == 0xFFFF:
		return utf8.RuneError
	}
	return r
}
