package report

import (
	"math"
	"slices"

	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
	"linewitness/report/figure"
	"linewitness/report/format"
	"linewitness/report/ink"
	"linewitness/sim/record"
)

// The heights of the panels about the settling.
const (
	settlingHeight  = 112.0 // of the window changes and the spectrum
	departureHeight = 138.0 // of the departures over the full width
	ruleRoom        = 190.0 // of the table of the rule, which is not broken
)

// settling writes how steady state was shown: the rule, the times, and the
// figures with the spectrum of what is left.
func (d *document) settling(c *record.Case) {
	s := c.Settling
	proof := len(s.Curve) > 0 || len(s.Places) > 0
	if !proof && spectrumPanel(c) == nil {
		return
	}
	title, keep := "Proof of settling", ruleRoom
	if !proof {
		title, keep = "Spectrum", settlingHeight+2*figure.KeyHeight
	}
	if proof && !d.proven(c) {
		keep = settlingHeight + 2*figure.KeyHeight + 40
	}
	d.b.Subheading(title, keep)
	if proof && !d.proven(c) {
		d.b.Note(d.settlingWords(c))
		d.leave("the tables of the settling")
	} else if proof {
		d.b.Table(d.settlingRule(c))
		d.b.Note(factorNote(s, d.r.Design.Tolerance))
		d.settlingTimes(c)
		d.resonance(c)
	}
	if c == d.nominal() {
		d.departures(c)
		d.settlingPanels(c, nil)
		return
	}
	d.settlingPanels(c, d.departurePanel(c))
}

// settlingWords says in a sentence how the rule was kept.
func (d *document) settlingWords(c *record.Case) string {
	s, most := c.Settling, format.Percent(d.r.Design.Tolerance)
	words := "Steady after " + format.SI(s.Time, "s") + ", " + format.Plural(int64(s.Periods), "period") + ": remaining error " + format.Percent(s.Residual) +
		", mean " + format.Percent(s.Mean) + ", second and third harmonic " + format.Percent(s.Harmonic) + ", each at most " + most
	if s.Passes > 0 {
		words += ", in " + format.Plural(int64(s.Passes), "window") + " in a row"
	}
	return words + ". Amplitude kept over the longest round trip: " + format.Number(s.LoopFactor) + " measured, " + format.Number(s.Predicted.LoopFactor) + " predicted."
}

// factorNote says why the measured loop factor is not the predicted one, where
// so little was left that it may be of something else than the slowest mode.
func factorNote(s record.Settling, tolerance float64) string {
	const near = 2.0 // times
	p, m := s.Predicted.LoopFactor, s.LoopFactor
	_, last := lastWindows(s)
	if !(p > 0 && m > 0) || m < near*p && p < near*m || !(last.Change < tolerance) {
		return ""
	}
	return "The loop factor is measured on the change that was left, " + format.Percent(last.Change) +
		". So far below the tolerance it need not be that of the slowest mode, which is the one predicted. The measured time constant and Q follow from it."
}

// resonance says what the network holds and how fast it fills and empties.
func (d *document) resonance(c *record.Case) {
	p, a, f := c.Settling.Predicted, c.Power.Phasor, c.Power.FDTD
	text := ""
	if a.Stored > 0 {
		text = "In steady state the network holds " + format.SI(a.Stored, "J") + " (time domain " + format.SI(f.Stored, "J") +
			"), which is " + format.Number(a.Q) + " times the energy that it takes in over a radian."
	}
	if p.TimeConstant > 0 {
		text += " Its slowest mode near the frequency of the source has the loaded Q " + format.Number(p.Q) + ", fills and empties with the time constant " +
			format.SI(p.TimeConstant, "s") + ", and falls by 60" + format.Space + "dB within " + format.SI(p.RingDown60, "s") + " of a stop (predicted)."
	}
	if text = trimmed(text); text != "" {
		d.b.Note(text)
	}
}

// settlingPanels draws the changes from window to window and the spectrum side
// by side, and before them the departures where these have no figure of their
// own.
func (d *document) settlingPanels(c *record.Case, first *figure.Panel) {
	var panels []*figure.Panel
	var entries []figure.Entry
	finding, tolerance := "", d.r.Design.Tolerance
	if first != nil {
		panels, finding = append(panels, first), "Left: "+departureFinding(c)
	}
	if p := settlingPanel(c.Settling, tolerance); p != nil {
		finding = trimmed(finding + " " + where(len(panels), first != nil) + settlingFinding(c.Settling, tolerance))
		panels, entries = append(panels, p), settlingKey(c.Settling, tolerance)
	}
	if p := spectrumPanel(c); p != nil {
		finding = trimmed(finding + " Right: " + spectrumFinding(c))
		panels = append(panels, p)
	}
	if len(panels) == 0 {
		return
	}
	p := picture{
		name: pictureName(c, "settling"), finding: finding, height: settlingHeight, key: entries,
		paint: func(cv draw.Canvas) {
			for i, p := range panels {
				p.Draw(share(cv, i, len(panels), first != nil))
			}
		},
	}
	d.b.Need(p.full(d.b.Width()) + d.b.CaptionHeight("Figure 00", finding))
	if len(entries) > 0 {
		d.key(entries)
	}
	d.show(p)
}

// where names the place of the settling run's panel in its row.
func where(before int, first bool) string {
	if first && before > 0 {
		return "Middle: "
	}
	return "Left: "
}

// share is a column of n, of which the first is wider if it is a departure
// panel, whose curves carry names.
func share(c draw.Canvas, i, n int, first bool) draw.Canvas {
	if !first || n < 2 {
		return column(c, i, n)
	}
	const wide = 0.44
	split := c.Size().X * vg.Length(wide)
	if i == 0 {
		return draw.Crop(c, 0, split-c.Size().X, 0, 0)
	}
	return column(draw.Crop(c, split, 0, 0, 0), i-1, n-1)
}

func settlingKey(s record.Settling, tolerance float64) []figure.Entry {
	entries := []figure.Entry{
		{Style: ink.FDTDLine, Text: "change over a round trip, of the section's largest value"},
		{Style: ink.MarkLine, Text: "multiples of the longest round trip"},
	}
	if estimated(s, tolerance) {
		entries = slices.Insert(entries, 1, figure.Entry{Style: ink.PhasorLine, Text: "estimated error left"})
	}
	return entries
}

// measuredTime returns the time constant that the measured loop factor stands
// for; NaN if nothing was measured or nothing decays.
func measuredTime(s record.Settling) float64 {
	if !(s.LoopFactor > 0 && s.LoopFactor < 1 && s.RoundTrip > 0) {
		return math.NaN()
	}
	return s.RoundTrip / -math.Log(s.LoopFactor)
}
