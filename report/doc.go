// Package report writes a record as a document: the PDF that is filed with a
// design review.
//
// The document is a function of the record alone - no clock, no environment -
// so that two runs of one toolchain give equal bytes. Every figure's caption
// states its finding, computed from the data it shows. A record that cannot be
// printed truthfully (a character without a glyph) is an error, never a gap.
//
// The parts: package format makes text of numbers, typeset sets text, ink
// holds colours and line styles, sheet lays out pages, figure draws panels,
// drawing draws the network, canvas puts it all on gofpdf's pages, and archive gives
// the file the form in which it is kept and attaches the design and the outcome.
package report
