package report

import (
	"math"

	"linewitness/report/format"
	"linewitness/sim/record"
)

// unsettled says what is known of a case that reached no steady state.
func (d *document) unsettled(c *record.Case) {
	s := c.Settling
	d.b.Subheading("No steady state was reached", 60)
	d.b.Paragraph("The time-domain solution was stopped after " + format.Plural(int64(s.Periods), "period") + " (" + format.SI(s.Time, "s") +
		") without having shown that it is steady. Steady values of the time domain in this case are what was last measured, not a result; nothing that rests on them is shown.")
	d.b.Paragraph("Measured: the amplitude kept over the longest round trip (" + format.SI(s.RoundTrip, "s") + ") is " + format.Number(s.LoopFactor) +
		", the estimated remaining error " + format.Percent(s.Residual) + " against a tolerance of " + format.Percent(d.r.Design.Tolerance) + ".")
	switch text := predictedEnd(c); {
	case text != "":
		d.b.Paragraph(text)
	case s.Decay != "":
		d.b.Paragraph(capital(s.Decay) + ".")
	}
}

// predictedEnd says when the closed form expects steady state; empty if it was
// not predicted.
func predictedEnd(c *record.Case) string {
	p := c.Settling.Predicted
	if !(p.LoopFactor > 0) {
		return ""
	}
	text := "Predicted by the closed form: the slowest mode near the frequency of the source keeps " + format.Number(p.LoopFactor) +
		" of its amplitude over the longest round trip"
	switch {
	case p.Settled > 0 && !math.IsInf(p.Settled, 0):
		text += "; steady state would be shown after " + format.SI(p.Settled, "s")
		if n := p.Settled * c.Model.Frequency; n < math.MaxInt32 {
			text += ", " + format.Plural(int64(math.Ceil(n)), "period")
		}
	case p.LoopFactor >= 1:
		text += ", so that it never settles"
	}
	return text + "."
}
