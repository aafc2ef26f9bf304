// Package typeset measures, breaks and draws the text of a record, in the
// Liberation faces that are built into the program. Lengths are in points.
//
// The same code sets the text of tables and of figures ([Handler] plugs it
// into gonum/plot), so that both measure a text alike, know the markup of
// package format and refuse a character that the faces do not have.
package typeset
