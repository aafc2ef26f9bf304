package report

import (
	"math"

	"linewitness/report/figure"
	"linewitness/report/format"
	"linewitness/report/ink"
	"linewitness/sim/record"
)

// The range of a spectrum: dB relative to the fundamental, and up to the highest
// harmonic that is shown and a little beyond.
const (
	spectrumFloor = -160.0
	spectrumHead  = 28.0 // above the fundamental, for its label
	harmonics     = 8
)

// spectrumLines is how many lines a panel shows apart.
const spectrumLines = 200

// fundamental returns the index of the line at the frequency of the source; -1 if
// the spectrum has none, or nothing in it.
func fundamental(c *record.Case) int {
	s, at := c.Spectrum, -1
	for i := range min(len(s.Frequency), len(s.Amplitude)) {
		if at < 0 || math.Abs(s.Frequency[i]-c.Model.Frequency) < math.Abs(s.Frequency[at]-c.Model.Frequency) {
			at = i
		}
	}
	const apart = 0.1 // of the frequency
	if at < 0 || math.Abs(s.Frequency[at]-c.Model.Frequency) > apart*c.Model.Frequency || !(s.Amplitude[at] > 0) || math.IsInf(s.Amplitude[at], 0) {
		return -1
	}
	return at
}

// levels returns the lines in dB relative to the fundamental; zero is minus
// infinity.
func levels(s record.Spectrum, at int) []float64 {
	out := make([]float64, min(len(s.Frequency), len(s.Amplitude)))
	for i := range out {
		out[i] = 20 * math.Log10(s.Amplitude[i]/s.Amplitude[at])
	}
	return out
}

// spectrumPanel returns nil if there is no spectrum.
func spectrumPanel(c *record.Case) *figure.Panel {
	at := fundamental(c)
	if at < 0 {
		return nil
	}
	s := c.Spectrum
	f := c.Model.Frequency
	last := min(s.Frequency[len(s.Frequency)-1], (harmonics+0.4)*f)
	p := figure.New("Spectrum, dB", "at "+s.Where,
		figure.Axis{Label: "frequency", Unit: "Hz", Max: last}, figure.Axis{Min: spectrumFloor, Max: spectrumHead})
	p.Marks(harmonicMarks(f, last), ink.MarkLine)
	xs, ys := span{0, last}.in(s.Frequency, levels(s, at))
	if len(ys) > spectrumLines {
		t := figure.Extremes(xs, ys, spectrumLines)
		xs, ys = t.X, t.Hi
	}
	for i := range min(len(xs), len(ys)) {
		if ys[i] > spectrumFloor {
			p.Line([]float64{xs[i], xs[i]}, []float64{spectrumFloor, ys[i]}, ink.TraceLine)
		}
	}
	// The caption says the frequency: a label with it would cross the harmonics.
	p.Spot(s.Frequency[at], 0, format.SI(s.Amplitude[at], "V"))
	return p
}

// harmonicMarks are upright lines at the harmonics from the second on, with
// their order.
func harmonicMarks(f, last float64) []figure.Mark {
	var out []figure.Mark
	for k := 2; k <= harmonics && float64(k)*f <= last; k++ {
		out = append(out, figure.Mark{At: float64(k) * f, Label: format.Count(int64(k)) + "f"})
	}
	return out
}

// spectrumFinding says how large the fundamental is and what stands next to it.
func spectrumFinding(c *record.Case) string {
	s, at := c.Spectrum, fundamental(c)
	text := "the last " + format.Plural(int64(s.Periods), "period") + " at " + s.Where + " hold " + format.SI(s.Amplitude[at], "V") + " at " + format.SI(s.Frequency[at], "Hz")
	next, most := -1, math.Inf(-1)
	for i, level := range levels(s, at) {
		if i != at && level > most && !math.IsInf(level, 0) {
			next, most = i, level
		}
	}
	const silence = -200.0 // dB: rounding
	if next < 0 || most < silence {
		return text + "; no other line reaches " + format.Fixed(silence, 0) + format.Space + "dB to it."
	}
	what := "the line at " + format.SI(s.Frequency[next], "Hz")
	if next == 0 && s.Frequency[0] == 0 {
		what = "the mean"
	}
	return text + "; the next largest, " + what + harmonicName(s.Frequency[next]/c.Model.Frequency) + ", is " + format.DB(most) + " to it."
}

// harmonicName says which harmonic a multiple of the frequency is.
func harmonicName(multiple float64) string {
	const near = 0.02
	n := math.Round(multiple)
	if n < 2 || math.Abs(multiple-n) > near {
		return ""
	}
	return " (" + format.Count(int64(n)) + "f)"
}
