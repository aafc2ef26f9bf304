// Package oneport holds a one-port that is known at points of frequency: read
// from a measured file in the open Touchstone format, or typed as a table of
// impedances. It gives the impedance at a frequency within its range and
// refuses to give one outside it.
//
// Read takes one-port files of the format's versions 1.0, 1.1, 2.0 and 2.1.
// Sources: the text of the version 1.1 specification (IBIS Open Forum, draft
// of 2002); for versions 2.0 (ratified 2009) and 2.1 (2024) examples and notes
// on the changes.
//
// Touchstone is a registered trademark of its owner. This package reads the
// open file format and has no other connection with it.
package oneport
