package line

import "fmt"

// capacitanceTolerance is how far a quoted capacitance may be from 1/(z0 v):
// datasheets round, and a difference of more than 3 % is an error in one of
// the three.
const capacitanceTolerance = 0.03

// CapacitanceError is C z0 v - 1: by what share a quoted capacitance in F/m is
// above the one that the impedance in ohm and the velocity factor give, C =
// 1/(z0 v).
func CapacitanceError(z0, velocityFactor, capacitance float64) float64 {
	return capacitance*z0*velocityFactor*C0 - 1
}

// CapacitanceWarning tells of a quoted capacitance that is more than 3 % from
// 1/(z0 v), in per cent; it is empty if they agree.
func CapacitanceWarning(z0, velocityFactor, capacitance float64) string {
	e := CapacitanceError(z0, velocityFactor, capacitance)
	if e >= -capacitanceTolerance && e <= capacitanceTolerance {
		return ""
	}
	const pico = 1e12
	return fmt.Sprintf("the capacitance %.4g pF/m is %+.1f %% from the %.4g pF/m of z0 and velocity factor, 1/(z0 v): one of the three is wrong",
		capacitance*pico, 100*e, pico/(z0*velocityFactor*C0))
}
