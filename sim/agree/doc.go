// Package agree compares the steady states of the two witnesses and says how
// far apart they may be.
//
// The difference at a point is measured against the largest amplitude on its
// section: at a null of the standing wave a relative error would say nothing.
//
// # The expected error
//
// What the time-domain scheme does to a sinusoid is known exactly: on each
// section the wave has a slightly wrong propagation exponent and
// characteristic impedance, and nothing else is wrong (lumped parts are
// pre-warped). Equivalent puts those into a network that the closed form can
// solve; the difference of that solution from the true one is the error that
// the grid alone must cause, resonances and all. With the residual of the
// settling run it makes the expected error. A difference well above it is not
// explained by the grid, and is a disagreement whatever the limit.
package agree
