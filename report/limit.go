package report

import (
	"math"
	"strings"

	"linewitness/report/format"
	"linewitness/sim/record"
)

// limit is a limit on a voltage or a current along a section.
type limit struct {
	label string
	id    string
	value float64 // peak, V or A
	upper bool    // values above it are not allowed
	peak  bool    // on the peak over all time; else on the steady amplitude
}

// limitsOf returns the limits on a quantity ("voltage" or "current") that
// apply to a section: those about it, and those about the whole network.
func limitsOf(c *record.Case, section, quantity string) []limit {
	var out []limit
	for _, q := range c.Requirements {
		kind, name, _ := strings.Cut(q.Quantity, "_")
		if name != quantity || (kind != "peak" && kind != "steady") || !concerns(c.Model, q, section) {
			continue
		}
		factor, ok := toPeak(q.Unit)
		if !ok {
			continue
		}
		for _, bound := range []struct {
			v     *float64
			upper bool
		}{{q.Max, true}, {q.Min, false}} {
			if bound.v != nil {
				l := limit{id: q.ID, value: *bound.v * factor, upper: bound.upper, peak: kind == "peak"}
				l.label = l.id + ", " + kind + format.Space + format.SI(l.value, unitOf(quantity))
				out = append(out, l)
			}
		}
	}
	return out
}

func unitOf(quantity string) string {
	if quantity == "current" {
		return "A"
	}
	return "V"
}

// concerns reports whether a requirement is about a section: its subject names
// the section, or no part of the network at all.
func concerns(m record.Model, q record.Requirement, section string) bool {
	subject, _, _ := strings.Cut(q.Subject, ",")
	subject = strings.TrimPrefix(strings.TrimPrefix(subject, "along "), "section ")
	if subject == section {
		return true
	}
	for _, s := range m.Sections {
		if s.Name == subject {
			return false
		}
	}
	subject = strings.TrimPrefix(subject, "at ")
	for _, j := range m.Junctions {
		if j == subject {
			return false
		}
	}
	for _, l := range m.Loads {
		if l.Name == subject {
			return false
		}
	}
	return true
}

// toPeak returns the factor from a unit such as "V peak", "kV peak" or "A rms"
// to peak volts or amperes.
func toPeak(unit string) (factor float64, ok bool) {
	base, kind, _ := strings.Cut(unit, " ")
	factor = 1
	switch kind {
	case "", "peak":
	case "rms":
		factor = math.Sqrt2
	case "pp":
		factor = 0.5
	default:
		return 0, false
	}
	prefix, found := strings.CutSuffix(base, "V")
	if !found {
		prefix, found = strings.CutSuffix(base, "A")
	}
	if !found {
		return 0, false
	}
	p, ok := format.Factor(prefix)
	return factor * p, ok
}

// finding says how far the curve that the limit is on stays from it.
func (l limit) finding(t *track) string {
	value := largestOf(t.phasor)
	if l.peak {
		value = largestOf(t.peak)
	}
	gap := (l.value - value) / l.value
	side := "below"
	if gap < 0 {
		side = "above"
	}
	return format.Share(math.Abs(gap)) + " " + side + " the limit of " + l.id + ", " + format.SI(l.value, t.unit)
}
