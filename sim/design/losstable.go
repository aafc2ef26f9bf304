package design

import (
	"fmt"

	"linewitness/sim/line"
)

// mostLossPoints bounds a loss table; datasheets have a dozen rows.
const mostLossPoints = 100

// lossTable reads the loss at several frequencies and fits the conductors' and
// the dielectric's part.
func (f *fields) lossTable(l *Line) {
	n := f.node("loss")
	rows, ok := f.rows("loss", n, lossPointTable, mostLossPoints)
	var points []line.LossPoint
	var texts []string
	for _, row := range rows {
		at, ok1 := row.value("at", frequency, positive)
		a, ok2 := row.value("attenuation", fading, positive)
		ok = ok && ok1 && ok2
		points = append(points, line.LossPoint{F: at.SI, Attenuation: a.SI})
		texts = append(texts, a.Text+" at "+at.Text)
	}
	if !ok {
		return
	}
	fit, err := line.FitLoss(points)
	if err != nil {
		f.w.fault(n, f.name("loss"), newFault(noHint, "%s", rawText(err.Error())))
		return
	}
	l.Text += fmt.Sprintf(", loss table of %d points", len(points))
	for _, text := range texts {
		l.trace("loss", text, Datasheet, "")
	}
	f.fitted(l, fit, texts)
}

// fitted gives a line the loss of a fit, whose points have the given texts.
func (f *fields) fitted(l *Line, fit line.LossFit, texts []string) {
	for i, p := range fit.Points {
		l.Fit = append(l.Fit, FitPoint{p.F, p.Attenuation, fit.Attenuation(p.F), texts[i]})
	}
	if ref := f.w.reference(); ref > 0 {
		*l.Nominal = fit.Nominal(l.Nominal.Z0, l.Nominal.VelocityFactor, ref)
	}
	if freq := f.w.design.Source.Frequency.SI; freq > 0 {
		l.Warnings = append(l.Warnings, fit.WarningsAt(freq)...)
	}
}
