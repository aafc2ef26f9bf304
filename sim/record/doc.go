// Package record is the outcome of a verification: everything that the
// record document prints, draws or stores, and nothing that computes it.
// package sim fills a Record; package report writes it.
//
// # Units
//
// SI units throughout; amplitudes are peak; phasors are relative to the EMF
// of the source, e^{+jwt}; angles in the JSON form are in degrees.
package record
