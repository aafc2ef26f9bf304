// Package phasor is the closed-form witness: the sinusoidal steady state of
// a network of uniform lines and lumped branches, solved as one linear system
// in travelling-wave form.
//
// On section k, of length l, the voltage and the current are
//
//	V(z) = P e^{-gz} + M e^{-g(l-z)}
//	I(z) = (P e^{-gz} - M e^{-g(l-z)})/Zc
//
// with g = sqrt(Z' Y') and Zc = Z'/g, Z' = R + jwL + K sqrt(jw) and
// Y' = G + jwC + ... as package line has them, in exact form. P is the forward wave at
// the From end and M the backward wave at the To end, so no exponential is
// larger than 1: a long lossy line cannot overflow, and a half-wave lossless
// line is not singular as it is in an admittance form.
//
// The unknowns are the junction voltages, P and M of every section and the
// current of every branch and of the source; the equations are continuity of
// the voltage at both ends of every section, Kirchhoff's current law at every
// junction and the law of every branch. Any graph will do: cascades, stubs,
// branches, rings, parallel sections.
//
// Source: the general solution of the telegrapher's equations, for example
// D. M. Pozar, Microwave Engineering, 4th ed., section 2.1 (from memory).
package phasor
