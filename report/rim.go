package report

import (
	"math"
	"math/cmplx"
	"strings"

	"linewitness/report/format"
	"linewitness/sim/record"
)

// reflectionLimit is a limit on the size of the reflection coefficient, from a
// requirement on it, on the return loss or on the VSWR.
type reflectionLimit struct {
	id     string
	radius float64 // |Γ|
	least  bool    // the size must not be below it
	end    string  // "from", "to", or "" for either
}

// reflectionLimits returns the limits on a section. A requirement that is taken
// against another reference, or on a change from another case, has no circle
// here.
func reflectionLimits(c *record.Case, l *locus) []reflectionLimit {
	var out []reflectionLimit
	for _, q := range c.Requirements {
		name, rest, _ := strings.Cut(q.Subject, ",")
		if q.Section != l.section.Name && name != l.section.Name {
			continue
		}
		if strings.Contains(q.Subject, "reference") || strings.Contains(q.Subject, "change from") {
			continue
		}
		for _, bound := range []struct {
			v   *float64
			max bool
		}{{q.Max, true}, {q.Min, false}} {
			if bound.v == nil {
				continue
			}
			r, falls := radiusOf(q.Quantity, *bound.v)
			if r > 0 && r < 1 {
				end, _, _ := strings.Cut(strings.TrimSpace(rest), " ")
				out = append(out, reflectionLimit{id: q.ID, radius: r, least: bound.max == falls, end: end})
			}
		}
	}
	return out
}

// radiusOf returns the size of the reflection coefficient for a value of a
// quantity, 0 for another quantity, and whether it falls with it.
func radiusOf(quantity string, v float64) (r float64, falls bool) {
	switch quantity {
	case "vswr":
		return (v - 1) / (v + 1), false
	case "reflection":
		return v, false
	case "return_loss":
		return math.Pow(10, -v/20), true
	}
	return 0, false
}

// label names the circle by its constant VSWR.
func (m reflectionLimit) label() string {
	return m.id + ", VSWR" + format.Space + format.VSWR((1+m.radius)/(1-m.radius))
}

// finding says how far the curve is from the circle, at the end that the
// requirement is about.
func (m reflectionLimit) finding(l *locus) string {
	from, to := cmplx.Abs(l.near), cmplx.Abs(l.far)
	if l.turned {
		from, to = to, from
	}
	value, where := math.Max(from, to), ""
	if m.least {
		value = math.Min(from, to)
	}
	switch m.end {
	case "from":
		value, where = from, " at "+l.section.From
	case "to":
		value, where = to, " at "+l.section.To
	}
	return distance(value, m.radius) + " the circle of " + m.label() + where
}
