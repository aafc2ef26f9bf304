// Package canvas draws on a page of a gofpdf document through the drawing
// interface of gonum/plot: vector paths, embedded-font text and images.
//
// A [Canvas] covers a rectangle of the current page. It writes content
// operators in points with the page format's own lower-left origin, so that
// gonum coordinates need no flip, and it leaves the state that gofpdf keeps
// (font, colours, line width, position) as it was.
//
// What would print as a box or as nonsense is an error from [Canvas.Close]: a
// character without a glyph, a coordinate that is not finite.
//
// The package leans on two habits of gofpdf 1.16.2 that its interface does
// not promise: a template shares the fonts of its document, and the name of a
// font resource can be read from a template's bytes. A test holds both.
package canvas
