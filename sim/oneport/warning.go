package oneport

import (
	"fmt"
	"math/cmplx"
)

// NonPassive gives the points whose |S| passes 1 by more than rounding (1e-6),
// where the one-port gives power: a fault of calibration or of sign, unless it
// is an amplifier.
func (t *Table) NonPassive() []Point {
	var out []Point
	for _, p := range t.points {
		if cmplx.Abs(p.S) > 1+passiveTolerance {
			out = append(out, p)
		}
	}
	return out
}

// coarse is the deviation of a chord from its arc that is worth a warning.
const coarse = 0.01

// sag is how far the reflection coefficient interpolated at f may lie from the
// true one if that runs on the unit circle, as that of a reactance does: the
// rise of the arc over the chord between the two points, about (length of the
// chord)^2/8. It is 0 at a point.
func (t *Table) sag(f float64) float64 {
	i, same := t.find(f)
	if same || i == 0 || i == len(t.points) {
		return 0
	}
	chord := cmplx.Abs(t.points[i].S - t.points[i-1].S)
	return chord * chord / 8
}

// Warnings tells what a reader of the value at f should know: points that are
// not passive, and points too far apart there for a straight line.
func (t *Table) Warnings(f float64) []string {
	var out []string
	if bad := t.NonPassive(); len(bad) > 0 {
		out = append(out, fmt.Sprintf("%d of %d points give power (|S| > 1), the first at %s with |S| = %.6g: check the calibration and the signs",
			len(bad), len(t.points), hertz(bad[0].F), cmplx.Abs(bad[0].S)))
	}
	if s := t.sag(f); s > coarse {
		i, _ := t.find(f)
		out = append(out, fmt.Sprintf("between %s and %s the reflection coefficient moves so far that its value at %s may be %.2g off: give more points",
			hertz(t.points[i-1].F), hertz(t.points[i].F), hertz(f), s))
	}
	return out
}
