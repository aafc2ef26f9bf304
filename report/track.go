package report

import (
	"math"
	"slices"
	"strings"

	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
	"linewitness/report/figure"
	"linewitness/report/format"
	"linewitness/report/ink"
	"linewitness/sim/record"
)

// span is a part of a section, in metres from its From end.
type span struct{ from, to float64 }

// in returns the part of a curve on the span and one point beyond each end, so
// that the curve reaches the edges of its panel.
func (s span) in(xs, ys []float64) (x, y []float64) {
	n := min(len(xs), len(ys))
	from, _ := slices.BinarySearch(xs[:n], s.from)
	to, _ := slices.BinarySearch(xs[:n], s.to)
	from, to = max(from-1, 0), min(to+2, n)
	return xs[from:to], ys[from:to]
}

// draw draws a span: the envelope and below it the error.
func (t *track) draw(c draw.Canvas, s span) {
	upper, lower := t.stack(c)
	e := t.envelope(s)
	t.amplitudes(e, s)
	x, y := s.in(t.peakZ, t.peak)
	e.Line(x, y, ink.PeakLine)
	if largestAt(t.phasor) < 0 && largestAt(t.fdtd) < 0 {
		e.Say(nothingFinite)
	}
	e.Draw(upper)
	strip := t.strip(s)
	x, y = s.in(t.z, t.expected)
	strip.Line(x, y, ink.PhasorLine)
	x, y = s.in(t.z, t.found)
	strip.Line(x, y, ink.FDTDLine)
	strip.Draw(lower)
}

// amplitudes draws the amplitude by both solutions. Where a long section was
// thinned to so few points that lines between them would cut the crests off, the
// phasor's is what the wave is between them, and the time domain's are points.
func (t *track) amplitudes(e *figure.Panel, s span) {
	const sparse = 16 // points a wavelength
	x, y := s.in(t.z, t.phasor)
	if float64(len(t.z)) >= sparse*t.wavelengths {
		e.Line(x, y, ink.PhasorLine)
		x, y = s.in(t.z, t.fdtd)
		e.Line(x, y, ink.FDTDLine)
		return
	}
	const steps = 200
	var xs, ys []float64
	for k := range steps + 1 {
		z := s.from + (s.to-s.from)*float64(k)/steps
		xs, ys = append(xs, z), append(ys, t.fine(z))
	}
	e.Line(xs, ys, ink.PhasorLine)
	x, y = s.in(t.z, t.fdtd)
	e.Dots(x, y, ink.FDTDLine)
}

// drawBand draws the whole section by the extremes over half wavelengths.
func (t *track) drawBand(c draw.Canvas) {
	upper, lower := t.stack(c)
	s := span{0, t.length}
	n := windows(t.wavelengths)
	e := t.envelope(s)
	e.Band(figure.Extremes(t.z, t.phasor, n), ink.BandEdge)
	b := figure.Extremes(t.z, t.fdtd, n)
	e.Line(b.X, b.Lo, ink.FDTDLine)
	e.Line(b.X, b.Hi, ink.FDTDLine)
	b = figure.Extremes(t.peakZ, t.peak, n)
	e.Line(b.X, b.Hi, ink.PeakLine)
	e.Draw(upper)
	strip := t.strip(s)
	b = figure.Extremes(t.z, t.expected, n)
	strip.Line(b.X, b.Hi, ink.PhasorLine)
	b = figure.Extremes(t.z, t.found, n)
	strip.Line(b.X, b.Hi, ink.FDTDLine)
	strip.Draw(lower)
}

// nothingFinite stands in a panel whose data are NaN or infinite throughout.
const nothingFinite = "no finite value"

// stack splits a column into envelope and strip.
func (t *track) stack(c draw.Canvas) (upper, lower draw.Canvas) {
	return draw.Crop(c, 0, 0, vg.Points(stripHeight), 0), draw.Crop(c, 0, 0, 0, vg.Points(stripHeight)-c.Size().Y)
}

// envelope returns the upper panel with the limits that fit on it.
func (t *track) envelope(s span) *figure.Panel {
	const air = 1.1
	var limits []figure.Limit
	for _, l := range t.limits {
		if t.shows(l) {
			limits = append(limits, figure.Limit{Value: l.value, Above: l.upper, Mild: l.mild, Label: l.label})
		}
	}
	top := max(max(largestOf(t.fdtd), largestOf(t.phasor), largestOf(t.peak))*air, headroom(limits))
	p := figure.New(t.section, t.symbol, figure.Axis{Min: s.from, Max: s.to, Unit: "m", Bare: true}, figure.Axis{Unit: t.unit, Max: top})
	p.Limits(limits)
	p.Second("λ", t.wavelengths/t.length)
	return p
}

// headroom returns the top of a panel that has room for the labels above the
// highest limit, which stack where limits are close.
func headroom(limits []figure.Limit) float64 {
	const label = figure.TagHeight / (envelopeHeight - 28) // over the height of the data area
	var highest float64
	for _, l := range limits {
		highest = max(highest, l.Value)
	}
	stacked := 0.0
	for _, l := range limits {
		if l.Above && l.Value > highest*(1-label) {
			stacked++
		}
	}
	return highest * (1 + 0.06 + label*max(stacked, 1))
}

// shows reports whether a limit is near enough to the curves to share their
// panel; a farther one would flatten them, and the caption names it.
func (t *track) shows(l limit) bool {
	const far = 2.5
	return l.value <= far*max(largestOf(t.phasor), largestOf(t.peak))
}

// showsMild reports whether a rating is drawn beside what it allows.
func (t *track) showsMild() bool {
	return slices.ContainsFunc(t.limits, func(l limit) bool { return l.mild && t.shows(l) })
}

// strip returns the panel of the error.
func (t *track) strip(s span) *figure.Panel {
	lo, hi := t.errorRange()
	p := figure.New("", "difference, relative", figure.Axis{Label: "distance", Unit: "m", Min: s.from, Max: s.to},
		figure.Axis{Min: lo, Max: hi, Log: true})
	p.Level(t.agreed, ink.LimitLine, "")
	return p
}

// errorRange returns whole decades that hold the errors that matter and the
// limit: four decades, or more if the largest error is lower.
func (t *track) errorRange() (lo, hi float64) {
	const decades, least = 4, 1e-13
	hi = max(largestOf(t.found), largestOf(t.expected), t.agreed, least)
	top := math.Ceil(math.Log10(hi*1.3) - 1e-9)
	found := max(largestOf(t.found), least)
	bottom := min(top-decades, math.Floor(math.Log10(found))-1)
	return math.Pow(10, bottom), math.Pow(10, top)
}

// envelopeFinding says what the panels of a section show.
func envelopeFinding(ts []*track) string {
	var parts []string
	for _, t := range ts {
		parts = append(parts, t.finding())
	}
	return ts[0].section + ": " + strings.Join(parts, "; ") + "."
}

func (t *track) finding() string {
	i := largestAt(t.phasor)
	if i < 0 {
		return t.symbol + " has no finite value"
	}
	top := record.Extreme{Value: t.phasor[i], At: t.z[i]}
	if t.top.Value >= top.Value && !math.IsInf(t.top.Value, 0) { // as in the table of the sections
		top = t.top
	}
	s := t.symbol + " up to " + format.SI(top.Value, t.unit) + " at " + place(top.At)
	if k := largestAt(t.peak); k >= 0 {
		s += ", peak " + format.SI(t.peak[k], t.unit)
	}
	for _, l := range t.limits {
		if !l.mild {
			s += ", " + l.finding(t)
		}
	}
	s += ", difference up to " + format.Percent(largestOf(t.found))
	if len(t.expected) > 0 {
		s += " (" + format.Percent(largestOf(t.expected)) + " expected)"
	}
	return s
}

func trimmed(s string) string { return strings.TrimSpace(s) }
