// Package design reads design files: YAML 1.2 to positioned nodes by a
// library, then a strict walker of our own that knows every key, unit and
// rule, collects every problem in one pass and gives each its place, its
// source line and a hint.
//
// # What a loaded file is
//
// [LoadWith] returns a [File] only if nothing at all is wrong, so nothing in a
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
// impedance, whose min and max change places. Their texts say so. The values of
// claims are turned likewise, and their texts stay as written. Series parts r, l
// and c mean the same in both conventions.
//
// # Lines
//
// A line is given by z0, its velocity and its loss, by r, l, g, c, as a row of
// the cable table or by its dimensions. All of it holds at the design frequency,
// where every line has its Constants. With a loss, a line is dispersive unless
// model: constant is asked for: its resistance is skin effect and its conductance
// a constant loss tangent, and Base and Dispersion say what it is elsewhere. Only
// r, l, g, c are constant unless model: dispersive is asked for. A loss too high
// for these laws leaves the line constant, with a warning.
//
// A case that changes the frequency has the same line in it: the data hold at the
// frequency of the nominal design, and the line is evaluated at that of the case.
// The same goes for the resistance that q gives a coil or a capacitor.
//
// What a line was given as and what was assumed is in its Pedigree. A rating is
// inherited key by key: from the cable table to the line, from the line to its
// sections.
//
// # Loads and elements
//
// A part is a complex impedance or admittance, r, l and c in series, a tree of
// series and parallel combinations, a table of impedances or a one-port file.
// Admittances, tables and files become the complex impedance at the design
// frequency; in a case at another frequency, tables and files are read there. An
// element with a ratio is an ideal transformer. The impedance of the source may be
// a table or a file too: that of the antenna whose EMF it is.
//
// Files are named by a path inside the folder of the design, so that a record
// can be repeated from a copy of that folder. They are kept with the File.
//
// # Lengths
//
// A length in degrees or wavelengths is turned into metres with the phase
// velocity at the design frequency (for z0 and a velocity, that velocity), a
// delay with 1/sqrt(LC) there, once: on the nominal design. A case that changes the frequency or the line has the same
// piece of line in it and keeps those metres, unless it gives the length itself.
// Likewise a complex impedance with a reactance is known at one frequency only,
// so a case that changes the frequency must give such impedances anew.
//
// # Cases
//
// A case is a JSON Merge Patch (RFC 7396) on the nominal design and may touch
// the source, lines, sections, loads and elements. One rule goes beyond the RFC:
// a patch that gives one of two forms that exclude each other drops the
// inherited other form. They are: impedance, r, l, c (with q, esr), series,
// parallel, admittance, table, file and ratio of a part; q and esr; at, between,
// and from and to of an element; emf and available_power; of a line z0 with what
// goes with it, r, l, g, c, cable and geometry, among them velocity_factor,
// permittivity and delay, and the kinds of geometry; and profile: abrupt drops
// rise. A list is replaced as a whole.
//
// # Claims
//
// A claim is a figure of the designer's own, made of one case. A percentage as
// its tolerance is of the size of the value, of the power where that is in dBm,
// of the dB where it is a level; it is percentage points where the value itself
// is in %. A phase has none. Requirements and claims have one set of ids. Times
// in periods are in those of the case that is claimed of.
//
// # Dates
//
// A date, that of the record and those of its history, is year-month-day,
// 2026-03-31, and nothing else: no reader takes the day for the month.
//
// # Limits
//
// A file has at most 1 MiB, 32 levels, 500 lines, sections, loads, elements,
// requirements and claims each, and 100 cases; names have at most 40 characters. A
// combination has at most 64 parts and 8 levels, a table of impedances 500 rows, a
// loss table 100, a revision history 50; the files of a design have at most 16 MiB
// together.
package design
