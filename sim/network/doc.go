// Package network is what both witnesses read: junctions, line sections,
// lumped branches and one source, all in SI units, with names only so that
// results can be labelled. It solves nothing.
//
// # Conventions
//
// Amplitudes are peak. Phasors follow e^{+jwt} and are relative to the EMF of
// the source, whose phasor is real and positive. A section runs from its From
// junction (z = 0) to its To junction (z = Length); its current is positive in
// that direction at both ends. A branch current flows from A to B. The source
// current flows out of the source into its junction.
package network
