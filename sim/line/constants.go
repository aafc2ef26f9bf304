package line

// C0 is the speed of light in vacuum, m/s (exact, SI).
const C0 = 299_792_458.0

// NeperDB is one neper in decibels, 20/ln 10.
const NeperDB = 8.685889638065037

// Constants are the primary constants of a uniform line, per metre, taken as
// independent of frequency: series resistance R (ohm/m) and inductance L
// (H/m), shunt conductance G (S/m) and capacitance C (F/m).
//
//	dV/dz = -(R + jwL) I,  dI/dz = -(G + jwC) V
type Constants struct {
	R, L, G, C float64
}
