package archive

import (
	"errors"
	"fmt"
)

// What can be wrong with a file that [Open] is given. The errors it returns wrap
// one of these and say the place; errors.Is tells them apart.
var (
	ErrNotPDF    = errors.New("not a PDF file")
	ErrNotRecord = errors.New("not a record of linewitness")
	ErrNewer     = errors.New("made by a newer linewitness")
	ErrDamaged   = errors.New("damaged PDF file")
	ErrMissing   = errors.New("an attached file is missing")
	ErrTampered  = errors.New("an attached file is not what the record was made with")
	ErrTooLarge  = errors.New("too large to be a record")
)

// fault is an error of this package in its own words.
func fault(format string, args ...any) error {
	return fmt.Errorf("archive: "+format, args...)
}

// because wraps one of the errors above with the place and the reason.
func because(kind error, format string, args ...any) error {
	return fmt.Errorf("%w: %s", kind, fmt.Sprintf(format, args...))
}
