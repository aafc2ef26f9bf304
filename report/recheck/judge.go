package recheck

import (
	"math"
	"math/cmplx"

	"linewitness/report/result"
)

// A verdict is the comparison of one value.
type verdict struct {
	status          Status
	change, allowed float64 // of a number; NaN for what is none
}

// isNumber reports a number, a complex number or the null of a number that is
// infinite or has no meaning.
func isNumber(n *result.Node) bool {
	return n.Kind == result.Number || n.Kind == result.Null || n.IsComplex()
}

// numbers compares two numbers.
func numbers(at *place, r *rule, then, now *result.Node) verdict {
	if equalNumbers(then, now) {
		return verdict{status: Same}
	}
	none := verdict{Different, math.NaN(), math.NaN()}
	if r == nil || r.class.number == nil {
		if then.Kind == result.Null || now.Kind == result.Null {
			return none
		}
		return verdict{Different, cmplx.Abs(now.Complex() - then.Complex()), 0}
	}
	v := none
	v.change, v.allowed = r.class.number(at, then.Complex(), now.Complex())
	switch {
	case math.IsInf(v.allowed, 1): // no value at all can be told from another
		v.status = Within
	case v.change <= v.allowed:
		v.status = Within
	}
	return v
}

// equalNumbers compares digits, and so takes null for null.
func equalNumbers(a, b *result.Node) bool {
	if a.Kind != b.Kind {
		return false
	}
	if a.IsComplex() {
		return b.IsComplex() && a.Complex() == b.Complex()
	}
	return a.Kind == result.Null || !b.IsComplex() && a.Value == b.Value
}

// texts compares two texts or two flags.
func texts(at *place, r *rule, then, now *result.Node) verdict {
	v := verdict{Different, math.NaN(), math.NaN()}
	switch {
	case then.Text == now.Text:
		v.status = Same
	case r != nil && r.class.text != nil && r.class.text(at, then.Text, now.Text):
		v.status = Within
	}
	return v
}
