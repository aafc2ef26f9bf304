package report

import (
	"math"

	"linewitness/report/format"
	"linewitness/report/sheet"
	"linewitness/sim/record"
)

// passesNeeded is how many windows in a row must pass every test.
const passesNeeded = 2

// settlingRule is the table of the rule: what it asks for, what the closed
// form predicts, and what the last two windows of the settling run gave.
func (d *document) settlingRule(c *record.Case) sheet.Table {
	s := c.Settling
	before, last := lastWindows(s)
	t := sheet.Table{Size: 7, Columns: []sheet.Column{
		left("Rule"), left("Required"), right("Predicted"), right("Measured, window before"), right("Measured, last window"),
	}}
	for _, r := range d.ruleRows(c, before, last) {
		t.Rows = append(t.Rows, sheet.Row(r[:]...))
		t.Rows[len(t.Rows)-1][0].Bold = true
	}
	t.Rows = append(t.Rows, []sheet.Cell{
		{Text: "Every test passed", Bold: true},
		{Text: format.Plural(passesNeeded, "window") + " in a row"},
		{Text: format.Missing},
		passed(s, before, ""),
		passed(s, last, inARow(s)),
	})
	return t
}

// ruleRow is a rule, what is required, predicted, and measured twice.
type ruleRow [5]string

func (d *document) ruleRows(c *record.Case, before, last record.SettlingPoint) []ruleRow {
	s, p := c.Settling, c.Settling.Predicted
	const none = format.Missing
	period := 1 / c.Model.Frequency
	tolerance := "at most " + format.Percent(d.r.Design.Tolerance)
	most := float64(d.r.Design.MaxPeriods) * period
	tau := measuredTime(s)
	return []ruleRow{
		{"Window begins", "from " + format.SI(s.Earliest, "s") + " on (rise " + format.SI(s.Ramp, "s") + ", then a round trip)", none, format.SI(before.Time-period, "s"), format.SI(last.Time-period, "s")},
		{"Windows compared, apart", "at least the longest round trip, " + format.SI(s.RoundTrip, "s") + "; path " + format.SI(s.LongPath, "s"), none, format.SI(before.Gap, "s"), format.SI(last.Gap, "s")},
		{"Change between them", none, none, format.Percent(before.Change), format.Percent(last.Change)},
		{"Loop factor, amplitude a round trip", "below 1", format.Number(p.LoopFactor), none, format.Number(s.LoopFactor)},
		{"Time constant", none, format.SI(p.TimeConstant, "s"), none, format.SI(tau, "s")},
		{"Q, loaded", none, format.Number(p.Q), none, format.Number(math.Pi * c.Model.Frequency * tau)},
		{"Remaining error, estimated", tolerance, none, format.Percent(before.Estimate), format.Percent(s.Residual)},
		{"Mean", tolerance, none, format.Percent(before.Mean), format.Percent(s.Mean)},
		{"Second and third harmonic", tolerance, none, format.Percent(before.Harmonic), format.Percent(s.Harmonic)},
		{"End of the run", "within " + format.SI(most, "s"), format.SI(p.Settled, "s"), none, format.SI(s.Time, "s") + ", " + format.Plural(int64(s.Periods), "period")},
	}
}

// lastWindows returns the last two comparisons; NaN throughout where there is
// none.
func lastWindows(s record.Settling) (before, last record.SettlingPoint) {
	nan := math.NaN()
	before = record.SettlingPoint{Time: nan, Gap: nan, Change: nan, Estimate: nan, Mean: nan, Harmonic: nan}
	last = before
	if n := len(s.Curve); n > 0 {
		last = s.Curve[n-1]
		if n > 1 {
			before = s.Curve[n-2]
		}
	}
	return before, last
}

// passed says whether a window passed. A settled run without a window that
// passed is one whose tests were not kept.
func passed(s record.Settling, p record.SettlingPoint, more string) sheet.Cell {
	switch {
	case math.IsNaN(p.Time), s.Settled && s.Passes == 0:
		return sheet.Cell{Text: format.Missing}
	case p.Passed:
		return sheet.Cell{Text: "passed" + more}
	}
	return sheet.Cell{Text: "not passed", Bold: true}
}

func inARow(s record.Settling) string {
	if s.Passes == 0 {
		return ""
	}
	return ", " + format.Count(int64(s.Passes)) + " in a row"
}
