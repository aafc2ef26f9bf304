// Package data writes a record as JSON and as CSV, the two forms that other
// programs read.
//
// # Numbers
//
// Amplitudes are peak, units are SI, and a key or a column ends in its unit
// where it has one (at_m, time_s, power_w, phase_deg). Phases are relative to
// the EMF of the source under e^{+jwt}. The fields of a requirement alone are
// in the unit that the design file gave its limit in, and "unit" names it; the
// difference of two levels in dBm is in dB.
//
// JSON numbers have 12 significant digits and CSV numbers 9: more than either
// witness is good for, and few enough that the last bits of an arithmetic
// unit do not show.
//
// # What has no number
//
// JSON knows neither infinity nor NaN. A key of the format is always there,
// and its value is null where the quantity is infinite or has no meaning: the
// VSWR of a total reflection, the impedance where no current flows, the
// available power of an ideal source, the limit of a requirement that is a
// window or a circle. In a CSV file the field is empty.
package data
