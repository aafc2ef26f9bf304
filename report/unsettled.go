package report

import (
	"linewitness/report/format"
	"linewitness/sim/record"
)

// unsettled says what is known of a case that reached no steady state.
func (d *document) unsettled(c *record.Case) {
	s := c.Settling
	d.b.Subheading("No steady state was reached", 60)
	d.b.Paragraph("The time-domain solution was stopped after " + format.Plural(int64(s.Periods), "period") + " (" + format.SI(s.Time, "s") +
		") without having shown that it is steady. Steady values of the time domain in this case are what was last measured, not a result; nothing that rests on them is shown.")
	if s.Decay != "" {
		d.b.Paragraph("Measured: " + s.Decay + ".")
	}
	d.b.Paragraph("The amplitude kept over the longest round trip (" + format.SI(s.RoundTrip, "s") + ") is " + format.Number(s.LoopFactor) +
		", the estimated remaining error " + format.Percent(s.Residual) + " against a tolerance of " + format.Percent(d.r.Design.Tolerance) + ".")
}
