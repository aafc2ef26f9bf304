// Package truetype reads and rebuilds the table directory of a TrueType program,
// as far as a program embedded in a document needs it.
package truetype
