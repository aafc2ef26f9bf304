package line

import "math"

// Storage gives the inductance, H/m, and the capacitance, F/m, that store
// energy at the angular frequency omega in a line with the high-frequency
// constants c: the mean energy of the peak phasors I and V is, per metre,
//
//	W' = (dX'/dw |I|^2 + dB'/dw |V|^2)/4
//
// with X' = Im Z'(jw) and B' = Im Y'(jw). Without dispersion they are L and C.
// With it they are smaller than X'/w and B'/w where the reactance grows more
// slowly than the frequency, as that of the skin effect does:
//
//	dX'/dw = L + K/(2 sqrt(2w)),  dB'/dw = C + Re d/ds(s D shape(s))
//
// In a medium that loses energy, what is stored is not a function of Z' and Y'
// at one frequency; the derivative is exact without loss and off in the second
// order of R'/X' and G'/B' for little of it. Sources: R. M. Foster, Bell Syst.
// Tech. J. 3, 1924, for networks; L. Brillouin's energy density of a dispersive
// medium, for example L. D. Landau and E. M. Lifshitz, Electrodynamics of
// Continuous Media, section 80 (both from memory).
func (d Dispersion) Storage(c Constants, omega float64) (inductance, capacitance float64) {
	inductance, capacitance = c.L, c.C
	if d.Skin != 0 {
		inductance += d.Skin / (2 * math.Sqrt(2*omega))
	}
	if d.Delta != 0 {
		s := complex(0, omega)
		slope := (1/(complex(d.W2, 0)+s) - 1/(complex(d.W1, 0)+s)) / complex(math.Log(d.W2/d.W1), 0)
		capacitance += d.Delta * real(d.shape(s)+s*slope)
	}
	return inductance, capacitance
}
