// Package sheet lays out a paged document: headings, paragraphs, tables and
// rectangles for figures, one under the other, breaking pages where a block
// does not fit. Headings are never left alone at the foot of a page, tables
// repeat their head, and running headers and footers are drawn last, when the
// number of pages is known.
//
// Lengths are in points, y grows upwards. The first error is kept and returned
// by [Book.Write].
package sheet
