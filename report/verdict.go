package report

import (
	"fmt"
	"image/color"
	"strings"

	"linewitness/report/format"
	"linewitness/report/ink"
	"linewitness/report/sheet"
	"linewitness/sim/record"
)

// markOf returns the shape that goes with a verdict.
func markOf(v record.Verdict) sheet.Mark {
	switch v {
	case record.Verified:
		return sheet.Holds
	case record.NotShown:
		return sheet.Open
	case record.Missed:
		return sheet.Fails
	case record.Disagree:
		return sheet.Differs
	}
	return sheet.Unsettled
}

func colorOf(v record.Verdict) color.Color {
	switch v {
	case record.Verified:
		return ink.Good
	case record.NotShown:
		return ink.Doubt
	}
	return ink.Bad
}

func markOfRequirement(v record.RequirementVerdict) sheet.Mark {
	switch v {
	case record.Met:
		return sheet.Holds
	case record.MissedReq:
		return sheet.Fails
	}
	return sheet.Open
}

// tally counts requirements by their verdict.
type tally struct{ met, missed, open int }

func count(qs []record.Requirement) (t tally) {
	for _, q := range qs {
		switch q.Verdict {
		case record.Met:
			t.met++
		case record.MissedReq:
			t.missed++
		default:
			t.open++
		}
	}
	return t
}

func (t tally) String() string {
	if t == (tally{}) {
		return "none"
	}
	var parts []string
	for _, p := range []struct {
		n    int
		word string
	}{{t.met, "met"}, {t.missed, "missed"}, {t.open, "not shown"}} {
		if p.n > 0 {
			parts = append(parts, fmt.Sprintf("%d%s%s", p.n, format.Space, p.word))
		}
	}
	return strings.Join(parts, ", ")
}

// reason says in a sentence or two what the verdict of the record rests on.
func (d *document) reason() string {
	var parts []string
	for _, c := range d.r.Cases {
		if !c.Settling.Settled {
			parts = append(parts, "Case "+c.Name+" reached no steady state within "+format.Plural(int64(c.Settling.Periods), "period")+".")
		}
		if c.Verdict == record.Disagree {
			parts = append(parts, "In case "+c.Name+" the two solutions differ by "+format.Percent(largest(c.Agreement))+"; the limit is "+format.Percent(c.Agreement.Limit)+".")
		}
	}
	parts = append(parts, d.named(record.MissedReq, "missed")...)
	parts = append(parts, d.named(record.NotShownReq, "not shown")...)
	if len(parts) == 0 {
		parts = append(parts, d.allMet())
	}
	return strings.Join(parts, " ")
}

// named lists the requirements of one verdict with their cases.
func (d *document) named(v record.RequirementVerdict, word string) []string {
	var ids []string
	cases := map[string][]string{}
	for _, c := range d.r.Cases {
		for _, q := range c.Requirements {
			if q.Verdict != v {
				continue
			}
			if cases[q.ID] == nil {
				ids = append(ids, q.ID)
			}
			cases[q.ID] = append(cases[q.ID], c.Name)
		}
	}
	const most = 6 // more would push the table off the page; it has them all
	var parts []string
	for i, id := range ids {
		if i == most {
			parts = append(parts, fmt.Sprintf("%d further requirements are %s.", len(ids)-most, word))
			break
		}
		parts = append(parts, id+" is "+word+" in "+among(cases[id], most)+".")
	}
	return parts
}

// among joins names, naming at most n.
func among(names []string, n int) string {
	if len(names) > n {
		return strings.Join(names[:n], ", ") + fmt.Sprintf(" and %d further cases", len(names)-n)
	}
	return strings.Join(names, ", ")
}

func (d *document) allMet() string {
	n := 0
	var worst float64
	for _, c := range d.r.Cases {
		n += len(c.Requirements)
		worst = max(worst, largest(c.Agreement))
	}
	agree := "the two solutions differ by at most " + format.Percent(worst) + " of a section's largest value."
	if n == 0 {
		return "The design states no requirement; " + agree
	}
	return "Every requirement is met in every case that it applies to; " + agree
}

// largest returns the larger of the two agreement errors.
func largest(a record.Agreement) float64 { return max(a.Voltage, a.Current) }
