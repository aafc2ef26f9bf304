package report

import "linewitness/report/typeset"

// Printable returns a [*SignError] for the first text with a character that the
// document's fonts do not have, and nil if there is none. Who asks before a design
// is solved is spared a run whose record cannot be written.
func Printable(texts ...string) error {
	for _, text := range texts {
		text = typeset.Clean(text)
		for _, r := range text {
			if r != '\u00a0' && !typeset.Sans.Has(r) {
				return &SignError{Sign: r, Text: text}
			}
		}
	}
	return nil
}
