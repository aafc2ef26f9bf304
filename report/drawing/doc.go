// Package drawing lays out and draws the network of a case: the source at the
// left, the line sections as double lines to the right of it, junctions as
// named dots on their reference planes, loads and elements as symbols. Lengths
// are drawn in three classes, see [ScaleNote].
//
// Everything has a cell of a grid to itself, so that labels cannot meet:
//
//   - a depth-first tree from the source decides the columns; the deepest
//     branch runs straight on, the others take rows below it;
//   - loads and elements are branches that end in a symbol;
//   - a section that closes a loop runs in a row of its own below what it
//     spans and turns up into its far junction; where that way is blocked it
//     ends in an arrow that names the junction;
//   - what is too wide or too tall for a band goes on in another band, which
//     begins with the letter that the first one ends with.
package drawing
