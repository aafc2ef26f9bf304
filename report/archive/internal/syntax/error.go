package syntax

import (
	"errors"
	"fmt"
)

// The kinds of error; those of a damaged file wrap none of them.
var (
	ErrNotPDF    = errors.New("syntax: the file does not begin with %PDF-1")
	ErrEncrypted = errors.New("syntax: the file is encrypted")
	ErrLimit     = errors.New("syntax: the file passes a limit")
)

func damaged(format string, args ...any) error {
	return fmt.Errorf("syntax: "+format, args...)
}

func beyond(what string, limit int) error {
	return fmt.Errorf("%w: more than %d %s", ErrLimit, limit, what)
}

// Limits bound what a file may ask of its reader.
type Limits struct {
	Bytes    int // size of the file
	Objects  int // highest object number
	Depth    int // of arrays and dictionaries within each other, and of references
	Values   int // read altogether, a value of an array or of a dictionary being one
	Inflated int // bytes out of all streams together
	Updates  int // cross-reference sections
}
