package oneport

import "fmt"

// An Error tells what is wrong with a file, where, and how to mend it.
type Error struct {
	File         string
	Line, Column int // from 1; 0 if it is the file as a whole
	Message      string
	Hint         string // may be empty
}

// Error is file:line:column: message; hint.
func (e *Error) Error() string {
	s := e.File + ":"
	if e.Line > 0 {
		s += fmt.Sprintf("%d:%d:", e.Line, e.Column)
	}
	s += " " + e.Message
	if e.Hint != "" {
		s += "; " + e.Hint
	}
	return s
}
