package recheck

import "math"

// A class is a way of comparing a kind of values. One without a law compares
// digit by digit.
type class struct {
	number law
	text   wording
	said   bool // told, and not counted
}

// A law says how far a number moved and how far it may. A plain number has no
// imaginary part; null is NaN.
type law func(at *place, then, now complex128) (change, allowed float64)

// A wording says whether a text or a flag that has changed is still the same.
type wording func(at *place, then, now string) bool

const (
	// rounding, relative: the digits of a double that sums in another order, or
	// a fused multiply-add, may change in some ten thousand operations are the last
	// five or six of sixteen.
	rounding = 1e-9
	// iterated, relative: what is found by iteration or by a fit is found to a part
	// in ten million and better.
	iterated = 1e-6
	// estimate, relative: an uncertainty, an index or a residual is an estimate, known
	// to one digit.
	estimate = 0.2
)

// by is the class of numbers that may move as far as f says. f is given the
// larger of the two sizes.
func by(f func(at *place, size float64) float64) class {
	return class{number: func(at *place, then, now complex128) (change, allowed float64) {
		size := math.Max(abs(then), abs(now))
		return abs(now - then), f(at, size) + rounding*size
	}}
}

func abs(z complex128) float64 { return math.Hypot(real(z), imag(z)) }

// orNothing is a number, 0 where there is none.
func orNothing(v float64) float64 {
	if math.IsNaN(v) {
		return 0
	}
	return v
}

var (
	// exact: digit by digit.
	exact = class{}
	// said: told, and not counted.
	said = class{said: true}
	// given: read from the design file; what may change is the rounding of the
	// change of unit.
	given = by(func(*place, float64) float64 { return 0 })
	// computed: a closed form, a fit or an iteration that no grid has a part in.
	computed = by(func(_ *place, size float64) float64 { return iterated * size })
	// period: a time that is read off a run.
	period = by(func(at *place, _ float64) float64 { return orNothing(at.period()) })
)

// own is the class of a number with its uncertainty under a key.
func own(key string) class {
	return by(func(at *place, _ float64) float64 { return orNothing(at.beside(key)) })
}

// ofSteady is the class of what is worked out from phasors.
func ofSteady(f func(s spread) float64) class {
	return by(func(at *place, _ float64) float64 { return f(at.spread()) })
}

// ofNetwork is the same for what belongs to no section.
func ofNetwork(f func(s spread) float64) class {
	return by(func(at *place, _ float64) float64 { return f(at.network()) })
}

// below is the class of a residual that has a tolerance: below it, it may be
// anything; above, it is an estimate.
func below(tolerance func(at *place) float64) class {
	return class{number: func(at *place, then, now complex128) (change, allowed float64) {
		size, limit := math.Max(abs(then), abs(now)), tolerance(at)
		if size <= limit {
			return abs(now - then), 2 * limit // from one sign to the other
		}
		return abs(now - then), estimate * size
	}}
}

// estimated is the class of an uncertainty or an index of the figure under one
// of the keys. Where both are the rounding of that figure they are the same.
func estimated(figures ...string) class {
	return by(func(at *place, size float64) float64 {
		for _, key := range figures {
			if v := at.figure(key); !math.IsNaN(v) {
				return math.Max(estimate*size, rounding*v)
			}
		}
		return estimate * size
	})
}

// figure is the size of a number, of a complex number or of the first of a list
// next to the value.
func (at *place) figure(key string) float64 {
	n := follow(at.now, key)
	if items := n.Items(); len(items) > 0 {
		n = items[0]
	}
	return abs(n.Complex())
}
