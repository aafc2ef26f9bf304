package line

import (
	"errors"
	"fmt"
	"math"
)

// CheckDispersion tells whether Disperse makes a line of the same arguments.
// What skin effect and dielectric loss add at omega is taken from the L and C
// there; with so much loss that nothing is left of one of them it gives an
// error. If what is left lets the wave front pass the speed of light, which
// means that impedance, velocity and loss do not belong together, it gives a
// warning.
func CheckDispersion(c Constants, omega, conductor, dielectric float64) (warning string, err error) {
	high, _ := Disperse(c, omega, conductor, dielectric)
	switch {
	case high.L <= 0:
		return "", fmt.Errorf("the conductor loss at this frequency is %.3g times the reactance of the line: it cannot be skin effect alone; use model: constant", conductor/(omega*c.L))
	case high.C <= 0:
		return "", errors.New("the dielectric loss at this frequency is too large for a constant loss tangent from 1 kHz to 1 THz; use model: constant")
	}
	// A velocity factor is rounded to three digits: an air line of 1 with a
	// little loss is no contradiction.
	const rounding = 1e-3
	if front := 1 / math.Sqrt(high.L*high.C) / C0; front > 1+rounding {
		return fmt.Sprintf("the dispersive model has a wave front at %.4g times the speed of light: z0, velocity factor and loss do not belong together", front), nil
	}
	return "", nil
}
