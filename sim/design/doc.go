// Package design reads design files: YAML 1.2 to positioned nodes by a
// library, then a strict walker of our own that knows every key, unit and
// rule, collects every problem in one pass and gives each its place, its
// source line and a hint.
//
// # What a loaded file is
//
// [Load] returns a [File] only if nothing at all is wrong, so nothing in a
// [Design] needs checking again: names resolve, the network hangs together,
// every value has its unit and a size that can be. Values are in SI units, with
// amplitudes as peak values, in the engineering convention e^{+jwt}.
//
// # Conventions
//
// Under convention: physics the complex numbers of the file mean e^{-iwt}. All
// that conjugation touches is turned on reading: complex impedances, the centre
// of a within circle, the angle of "71.2 ohm at -59 deg", the phase of the
// start, and the limits on phase, phase_difference and the x of an input
// impedance, whose min and max change places. Their texts say so. Series parts
// r, l and c mean the same in both conventions.
//
// # Lengths
//
// A length in degrees or wavelengths is turned into metres with the phase
// velocity at the design frequency, a delay with 1/sqrt(LC), once: on the
// nominal design. A case that changes the frequency or the line has the same
// piece of line in it and keeps those metres, unless it gives the length itself.
// Likewise a complex impedance with a reactance is known at one frequency only,
// so a case that changes the frequency must give such impedances anew.
//
// # Cases
//
// A case is a JSON Merge Patch (RFC 7396) on the nominal design and may touch
// the source, lines, sections, loads and elements. One rule goes beyond the RFC:
// a patch that gives one of two forms that exclude each other drops the
// inherited other form. The pairs are impedance or r, l, c of a part; at or
// between of an element; emf or available_power; z0, velocity_factor, loss or
// r, l, g, c of a line; and profile: abrupt drops rise.
//
// # Limits
//
// A file has at most 1 MiB, 32 levels, 500 lines, sections, loads, elements and
// requirements each, and 100 cases; names have at most 40 characters.
package design
