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
	name  string  // in a finding: "the limit of R2, 1.950 kV"
	value float64 // peak, V or A
	upper bool    // values above it are not allowed
	on    kind    // which curve it is on
	mild  bool    // a rating before its derating: shown, and no finding
}

// kind is the curve that a limit is on.
type kind int

const (
	onSteady kind = iota // the steady amplitude
	onPeak               // the peak over all time
	onBoth               // whichever is larger: ratings
)

// limitsOf returns the limits on a quantity ("voltage" or "current") that
// apply to a section: requirements about it, requirements about the whole
// network, and its ratings.
func limitsOf(c *record.Case, section, quantity string) []limit {
	var out []limit
	for _, q := range c.Requirements {
		if concerns(c.Model, q, section) {
			out = append(out, requiredLimits(q, quantity)...)
		}
	}
	for _, r := range c.Ratings {
		if r.Section == section && r.Quantity == quantity {
			out = append(out, ratedLimits(r)...)
		}
	}
	return out
}

// requiredLimits returns the limits that a requirement puts on a quantity.
func requiredLimits(q record.Requirement, quantity string) []limit {
	which, name, _ := strings.Cut(q.Quantity, "_")
	factor, ok := toPeak(q.Unit)
	if name != quantity || (which != "peak" && which != "steady") || !ok {
		return nil
	}
	on := onSteady
	if which == "peak" {
		on = onPeak
	}
	var out []limit
	for _, bound := range []struct {
		v     *float64
		upper bool
	}{{q.Max, true}, {q.Min, false}} {
		if bound.v != nil {
			value := *bound.v * factor
			text := format.SI(value, unitOf(quantity))
			out = append(out, limit{
				label: q.ID + ", " + which + format.Space + text, name: "the limit of " + q.ID + ", " + text,
				value: value, upper: bound.upper, on: on,
			})
		}
	}
	return out
}

// ratedLimits returns the limit that a rating allows, and the rating itself
// where it was derated.
func ratedLimits(r record.Rating) []limit {
	allowed, rated := format.SI(r.Allowed, r.Unit), format.SI(r.Rated, r.Unit)
	from := ""
	if r.Advisory {
		from = " (cable table)"
	}
	if r.Derating == 0 {
		return []limit{{label: "rated" + format.Space + rated + from, name: "the rated " + rated + from, value: r.Rated, upper: true, on: onBoth}}
	}
	return []limit{
		{
			label: "allowed" + format.Space + allowed + from, name: "the allowed " + allowed + " (" + r.Text + " less " + format.DB(r.Derating) + ")",
			value: r.Allowed, upper: true, on: onBoth,
		},
		{label: "rated" + format.Space + rated + from, value: r.Rated, upper: true, on: onBoth, mild: true},
	}
}

func unitOf(quantity string) string {
	if quantity == "current" {
		return "A"
	}
	return "V"
}

// concerns reports whether a requirement is about a section: it names the
// section, or no part of the network at all.
func concerns(m record.Model, q record.Requirement, section string) bool {
	if q.Section != "" {
		return q.Section == section
	}
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
	return distance(l.valueOn(t), l.value) + " " + l.name
}

// valueOn is the largest value of the curve that the limit is on.
func (l limit) valueOn(t *track) float64 {
	value := largestOf(t.phasor)
	if t.top.Value > value && !math.IsInf(t.top.Value, 0) {
		value = t.top.Value
	}
	switch l.on {
	case onPeak:
		value = largestOf(t.peak)
	case onBoth:
		value = max(value, largestOf(t.fdtd), largestOf(t.peak))
	}
	return value
}

// distance says how far a value is from a limit: in per cent of the limit, or
// in dB where it is less than a tenth of it.
func distance(value, limit float64) string {
	gap := (limit - value) / limit
	switch {
	case gap > 0.9 && value > 0:
		return format.Fixed(20*math.Log10(limit/value), 0) + format.Space + "dB below"
	case gap < 0:
		return format.Share(-gap) + " above"
	}
	return format.Share(gap) + " below"
}
