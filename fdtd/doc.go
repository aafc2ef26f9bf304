// Package fdtd is the time-domain witness: the telegrapher's equations
// stepped in time by leapfrog finite differences, from rest to steady state.
//
// # Cells
//
// A section of length l has n cells of width dx = l/n. The voltage lives at
// the n+1 cell edges and at whole steps, V[i] at z = i dx and t = m dt; the
// current lives at the n cell centres and at half steps, I[i] at
// z = (i+1/2) dx and t = (m+1/2) dt. The arrays hold W = I sqrt(L/C), in volts,
// so that both updates carry the Courant number S = v dt/dx, v = 1/sqrt(LC):
//
//	W[i] <- (1-r)/(1+r) W[i] - S/(1+r) (V[i+1] - V[i]),  r = R dt/(2L)
//	V[i] <- (1-g)/(1+g) V[i] - S/(1+g) (W[i] - W[i-1]),  g = G dt/(2C)
//
// which is stable for S <= 1 whatever the loss. At S = 1 without loss it is
// exact: a wave moves one cell a step.
//
// # Junctions
//
// A junction owns the half cells of the sections that meet in it and its
// lumped branches. Every branch, the source included, is a series R-L-C in its
// trapezoidal companion form, so Kirchhoff's current law, taken at the half
// step, is one small constant matrix for the whole network; it is factored
// once. Shorts and ideal sources are exact constraints, not small resistors.
// Inductors and capacitors are pre-warped by x/tan x, x = pi/N, which makes
// their reactance exact at the source frequency.
//
// # Two runs
//
// Settle starts gently, shows that steady state was reached and gives the
// phasors. Stress starts as the design starts and gives the peaks. A peak is
// never taken from the first, nor a phasor from the second.
//
// Sources: K. S. Yee, IEEE Trans. Antennas Propag. 14(3), 1966, in one
// dimension; A. Taflove, Computational Electrodynamics, for the semi-implicit
// loss and the dispersion relation; L. O. Chua and P.-M. Lin, Computer-Aided
// Analysis of Electronic Circuits, for companion forms (all from memory).
package fdtd
