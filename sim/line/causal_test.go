package line

import (
	"math"
	"testing"
)

func TestCheckDispersion(t *testing.T) {
	omega := 2 * math.Pi * 1e6
	vacuum := 1 / (C0 * C0)
	for _, row := range []struct {
		name          string
		c             Constants
		warning, fail string
	}{
		{"air, no loss", Constants{L: 1, C: vacuum}, "", ""},
		{"coax", Constants{R: 0.02 * omega, L: 1, G: omega * 1e-3 * 2 * vacuum, C: 2 * vacuum}, "", ""},
		{"air with loss", Constants{R: 0.02 * omega, L: 1, C: vacuum}, "the dispersive model has a wave front at 1.01 times the speed of light: z0, velocity factor and loss do not belong together", ""},
		{"more loss than reactance", Constants{R: 1.5 * omega, L: 1, C: vacuum}, "", "the conductor loss at this frequency is 1.5 times the reactance of the line: it cannot be skin effect alone; use model: constant"},
		{"loss tangent 0.2", Constants{L: 1, G: omega * 0.2 * vacuum, C: vacuum}, "", "the dielectric loss at this frequency is too large for a constant loss tangent from 1 kHz to 1 THz; use model: constant"},
	} {
		warning, err := CheckDispersion(row.c, omega, row.c.R, row.c.G)
		fail := ""
		if err != nil {
			fail = err.Error()
		}
		if warning != row.warning || fail != row.fail {
			t.Errorf("%s: %q, %q; want %q, %q", row.name, warning, fail, row.warning, row.fail)
		}
	}
}
