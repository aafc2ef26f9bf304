package sim

import (
	"math"

	"linewitness/sim/design"
	"linewitness/sim/record"
)

// record judges and writes down: the value is that of the worse witness, met
// if all that it may be is inside the limits, missed if all is outside, not
// shown if it straddles a limit. The uncertainty is the one towards the limit.
func (j *judgement) record() record.Requirement {
	s := scaleFor(j.limitUnit())
	out := record.Requirement{
		ID: j.req.ID, Text: j.req.Text, Source: j.req.Document,
		Quantity: string(j.req.Quantity), Section: j.req.Section, Subject: j.subject,
		Unit: s.unit, Limit: j.limitText(), Note: j.note,
	}
	out.Min, out.Max = scaled(j.min, s), scaled(j.max, s)
	out.Margin = math.Inf(1)
	for _, w := range j.values {
		v := s.from(w.value)
		m, limit := margin(v, out.Min, out.Max)
		if m < out.Margin || math.IsNaN(v) || out.Method == "" {
			out.Value, out.Margin, out.Method = v, m, w.method
			out.MarginDB = marginDB(s.unit, limit, v, m)
			out.MarginPercent = percent(s.unit, m, limit)
			low, high := s.from(w.low), s.from(w.high)
			out.Uncertainty = towards(limit, v, low, high)
			out.Verdict = outcome(v, low, high, out.Min, out.Max)
		}
	}
	if j.unfinished {
		out.Verdict = atMostNotShown(out.Verdict)
	}
	return out
}

// towards is how far a value may be off on the side of a limit; NaN where that
// is no number.
func towards(limit, v, low, high float64) float64 {
	u := v - low
	if limit > v {
		u = high - v
	}
	switch {
	case math.IsInf(v, 0) && low == v && high == v:
		return 0
	case math.IsInf(u, 0):
		return math.NaN()
	}
	return u
}

// outcome is the verdict on a value that may be anything from low to high.
func outcome(v, low, high float64, min, max *float64) record.RequirementVerdict {
	inside := (min == nil || low >= *min) && (max == nil || high <= *max)
	outside := min != nil && high < *min || max != nil && low > *max
	switch {
	case math.IsNaN(v), math.IsNaN(low), math.IsNaN(high):
		return record.NotShownReq
	case inside:
		return record.Met
	case outside:
		return record.MissedReq
	}
	return record.NotShownReq
}

// atMostNotShown is the verdict on a value that may yet grow.
func atMostNotShown(v record.RequirementVerdict) record.RequirementVerdict {
	if v == record.Met {
		return record.NotShownReq
	}
	return v
}

func (j *judgement) limitUnit() string {
	for _, l := range []*design.Limit{j.max, j.min} {
		if l != nil && l.Unit != "" {
			return l.Unit
		}
	}
	return j.unit
}

// limitText is the limit in words, as the design file has it.
func (j *judgement) limitText() string {
	switch {
	case j.min != nil && j.max != nil:
		return j.min.Text + " to " + j.max.Text
	case j.max != nil:
		return "at most " + j.max.Text
	case j.min != nil:
		return "at least " + j.min.Text
	}
	return "no limit"
}

func scaled(l *design.Limit, s scale) *float64 {
	if l == nil {
		return nil
	}
	v := s.from(l.SI)
	return &v
}

// margin is the distance to the nearer limit, negative outside, and that
// limit.
func margin(v float64, min, max *float64) (m, limit float64) {
	m, limit = math.Inf(1), math.NaN()
	if max != nil {
		m, limit = *max-v, *max
	}
	if min != nil && !(v-*min >= m) {
		m, limit = v-*min, *min
	}
	return m, limit
}

func marginDB(unit string, limit, v, m float64) float64 {
	d := deciBels(unit, limit, v)
	if math.IsNaN(d) {
		return d
	}
	return math.Copysign(d, m)
}

// percent is a margin in per cent of its limit; NaN where that says nothing,
// as of a level or an angle.
func percent(unit string, m, limit float64) float64 {
	if unit == "dB" || unit == "dBm" || unit == "deg" || limit == 0 || math.IsNaN(limit) || math.IsInf(m, 0) {
		return math.NaN()
	}
	return 100 * m / math.Abs(limit)
}
