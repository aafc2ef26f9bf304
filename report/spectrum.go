package report

import (
	"math"
	"slices"

	"linewitness/report/figure"
	"linewitness/report/format"
	"linewitness/report/ink"
	"linewitness/sim/record"
)

// spectrumPanel returns nil if there is no spectrum. Amplitudes are relative
// to the largest.
func spectrumPanel(c *record.Case) *figure.Panel {
	s := c.Spectrum
	top := largestOf(s.Amplitude)
	if len(s.Frequency) == 0 || top <= 0 {
		return nil
	}
	const floor = 1e-8
	last := s.Frequency[len(s.Frequency)-1]
	if c.Model.Frequency > 0 {
		last = min(last, harmonics*c.Model.Frequency)
	}
	p := figure.New("Spectrum", "at "+s.Where+", relative",
		figure.Axis{Label: "frequency", Unit: "Hz", Max: last}, figure.Axis{Min: floor, Max: 2, Log: true})
	xs, ys := span{0, last}.in(s.Frequency, s.Amplitude)
	if len(ys) > spectrumLines {
		t := figure.Extremes(xs, ys, spectrumLines)
		xs, ys = t.X, t.Hi
	}
	for i := range min(len(xs), len(ys)) {
		if ys[i] > floor*top {
			p.Line([]float64{xs[i], xs[i]}, []float64{floor, ys[i] / top}, ink.TraceLine)
		}
	}
	if i := largestAt(s.Amplitude); i >= 0 {
		p.Spot(s.Frequency[i], 1, format.SI(s.Frequency[i], "Hz"))
	}
	return p
}

// harmonics is how far the spectrum is drawn, in units of the frequency.
const harmonics = 8.2

// spectrumLines is how many lines a panel shows apart.
const spectrumLines = 200

func spectrumFinding(c *record.Case) string {
	s := c.Spectrum
	k := largestAt(s.Amplitude)
	rest := slices.Clone(s.Amplitude)
	for i := range rest {
		if i == k {
			rest[i] = 0
		}
	}
	next := largestAt(rest)
	text := "the last " + format.Plural(int64(s.Periods), "period") + " at " + s.Where + " hold " + format.SI(s.Amplitude[k], "V") + " at " + format.SI(s.Frequency[k], "Hz")
	const silence = 1e-10
	switch {
	case next < 0:
	case rest[next] < silence*s.Amplitude[k]:
		text += "; no other line reaches " + format.Fixed(20*math.Log10(silence), 0) + format.Space + "dB to it"
	default:
		text += "; the next largest line, at " + format.SI(s.Frequency[next], "Hz") + ", is " + format.DB(20*math.Log10(rest[next]/s.Amplitude[k])) + " to it"
	}
	return text + "."
}
