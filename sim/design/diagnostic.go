package design

import (
	"fmt"
	"io"
	"strings"
	"unicode"
)

// maxDiagnostics is how many problems are told; more would hide the first.
const maxDiagnostics = 20

// A Diagnostic is one problem of a design file.
type Diagnostic struct {
	File       string
	Pos        Pos
	Message    string
	SourceLine string // the line at Pos, without its line break
	Hint       string // how to mend it; may be empty
}

// Error is the short form, file:line:col: error: message.
func (d Diagnostic) Error() string {
	return fmt.Sprintf("%s: error: %s", d.place(), d.Message)
}

func (d Diagnostic) place() string {
	if d.Pos.Line == 0 {
		return d.File
	}
	return fmt.Sprintf("%s:%d:%d", d.File, d.Pos.Line, d.Pos.Column)
}

// Diagnostics is the error of Load: every problem of a file, in file order.
type Diagnostics struct {
	List []Diagnostic // at most 20
	More int          // how many there are besides
}

// Error is the short form of every problem, one a line.
func (ds Diagnostics) Error() string {
	var lines []string
	for _, d := range ds.List {
		lines = append(lines, d.Error())
	}
	if ds.More > 0 {
		lines = append(lines, ds.more())
	}
	return strings.Join(lines, "\n")
}

func (ds Diagnostics) more() string { return fmt.Sprintf("and %d more", ds.More) }

// Render writes every problem with its source line, a caret and its hint:
//
//	feeder.yaml:6:12: error: unknown key "lenght" in section "main"
//	    main: {from: tx, to: mast, lenght: 85 m, line: coax}
//	                               ^
//	    hint: did you mean "length"?
//
// Colour is by ANSI escape sequences and only if asked for.
func (ds Diagnostics) Render(w io.Writer, colour bool) error {
	var b strings.Builder
	for _, d := range ds.List {
		d.render(&b, colour)
	}
	if ds.More > 0 {
		b.WriteString(ds.more() + "\n")
	}
	_, err := io.WriteString(w, b.String())
	return err
}

func (d Diagnostic) render(b *strings.Builder, colour bool) {
	bold, red, green, off := "\x1b[1m", "\x1b[1;31m", "\x1b[32m", "\x1b[0m"
	if !colour {
		bold, red, green, off = "", "", "", ""
	}
	fmt.Fprintf(b, "%s%s:%s %serror:%s %s\n", bold, d.place(), off, red, off, d.Message)
	if d.Pos.Line > 0 && strings.TrimSpace(d.SourceLine) != "" {
		line, indent := snippet(d.SourceLine, d.Pos.Column)
		fmt.Fprintf(b, "    %s\n    %s%s^%s\n", line, indent, red, off)
	}
	if d.Hint != "" {
		fmt.Fprintf(b, "    %shint:%s %s\n", green, off, d.Hint)
	}
}

// The part of a long source line that is shown around the caret, in
// characters before and after it.
const snippetBefore, snippetAfter = 80, 60

// snippet returns what is shown of a source line and the blanks that bring a
// caret under the character in the given column (from 1). Tabs stay tabs in
// both, so that they line up at any tab width; a wide character counts two
// columns; a control character must not reach the terminal and is replaced.
func snippet(source string, column int) (line, indent string) {
	from, to := column-1-snippetBefore, column-1+snippetAfter
	var l, in strings.Builder
	if from > 0 {
		l.WriteString("...")
		in.WriteString("   ")
	}
	i := 0
	for _, c := range source {
		switch {
		case i == to:
			l.WriteString("...")
			return l.String(), in.String()
		case i >= from:
			writeChar(&l, &in, c, i < column-1)
		}
		i++
	}
	return l.String(), in.String()
}

// writeChar writes a character of a snippet and, if it stands before the
// caret, the blanks below it.
func writeChar(l, in *strings.Builder, c rune, before bool) {
	if c != '\t' && unicode.IsControl(c) {
		c = unicode.ReplacementChar
	}
	l.WriteRune(c)
	switch {
	case !before:
	case c == '\t':
		in.WriteRune('\t')
	default:
		in.WriteString(strings.Repeat(" ", displayWidth(c)))
	}
}

// displayWidth is the number of terminal columns a character takes: 0 for
// marks that combine with the character before them, 2 for East Asian wide
// and emoji, else 1. The ranges are the W and F blocks of Unicode UAX 11.
func displayWidth(c rune) int {
	switch {
	case unicode.In(c, unicode.Mn, unicode.Me, unicode.Cf):
		return 0
	case c >= 0x1100 && c <= 0x115f, c >= 0x2e80 && c <= 0xa4cf, c >= 0xac00 && c <= 0xd7a3,
		c >= 0xf900 && c <= 0xfaff, c >= 0xfe30 && c <= 0xfe6f, c >= 0xff00 && c <= 0xff60,
		c >= 0xffe0 && c <= 0xffe6, c >= 0x1f300 && c <= 0x1faff, c >= 0x20000 && c <= 0x3fffd:
		return 2
	default:
		return 1
	}
}
