// Package figure draws the panels of a record: curves over axes, in the line
// styles of package ink, and bars of one whole, on any gonum canvas.
//
// Data come in SI units; each axis picks its engineering prefix. Points that
// are not finite are left out. Long data are thinned to what shows: a curve
// denser than the page is drawn as the band between its extremes. All panels
// have the same inset, so that panels above each other line up.
package figure
