// Package slip is the catalogue of the slips that hand calculations of lines
// are known for, and what each makes of a network or of a reading.
//
// # Two kinds
//
// A [Change] is a slip in the design as it was calculated: a length in the
// wrong unit, a loss left out, a stub in series. It is made on the network that
// the witnesses read, by way of the propagation of a section at the source
// frequency, so that it serves every kind of line. A [Misreading] is a slip in
// the result: rms for peak, a conjugate, the wrong factor of a spectrum.
//
// Nothing is solved here.
//
// # Order
//
// The slips stand in the order of how usual they are, the most usual first. No
// count of them is known; the order is a judgement (common practice).
//
// # What a slip that fits is worth
//
// A real figure that is wrong by some other factor meets one of the slips by
// chance in one case of seven, at a tolerance of 1 % and on a feeder of three to
// five sections (84 of 600 random ones); a complex figure hardly ever (none of
// 444). Hence several claims are better than one, and a complex one better than
// its size.
package slip
