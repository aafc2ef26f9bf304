package report

import (
	"math"
	"slices"
	"strings"
	"testing"

	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
	"gonum.org/v1/plot/vg/recorder"
	"linewitness/sim/record"
)

// spectral is a case with a spectrum of some lines in volts.
func spectral(amplitudes ...float64) *record.Case {
	c := &record.Case{Model: record.Model{Frequency: 1e6}, Spectrum: record.Spectrum{Where: "tx", Periods: 2}}
	for k, a := range amplitudes {
		c.Spectrum.Frequency = append(c.Spectrum.Frequency, float64(k)*0.5e6)
		c.Spectrum.Amplitude = append(c.Spectrum.Amplitude, a)
	}
	return c
}

func TestSpectrumFinding(t *testing.T) {
	for _, c := range []struct {
		in   *record.Case
		want string
	}{
		{spectral(0, 0, 10, 0, 0.1), "hold 10.00 V at 1.000 MHz; the next largest, the line at 2.000 MHz (2f), is −40.00 dB to it."},
		{spectral(1e-3, 0, 10, 1e-5), "the next largest, the mean, is −80.00 dB to it."},
		{spectral(0, 0, 10, 1e-5), "the next largest, the line at 1.500 MHz, is −120.00 dB to it."},
		{spectral(0, 20, 10, 1e-5), "the next largest, the line at 500.0 kHz, is 6.02 dB to it."}, // the fundamental is not the largest
		{spectral(0, 0, 10, 0), "no other line reaches −200 dB to it."},
		{spectral(0, 0, 10, math.NaN(), 1e-12), "no other line reaches −200 dB to it."},
	} {
		if got := plain(spectrumFinding(c.in)); !strings.HasSuffix(got, c.want) {
			t.Errorf("finding %q, want %q", got, c.want)
		}
	}
}

// Lines stand as high as their level, on a scale in dB; what has no fundamental
// has no panel.
func TestSpectrumPanel(t *testing.T) {
	var rec recorder.Canvas
	spectrumPanel(spectral(0, 0, 10, 0, 0.1, 0, 0, 0, 1e-30)).Draw(draw.NewCanvas(&rec, vg.Points(300), vg.Points(140)))
	var heights []float64 // of upright lines
	var marks int
	for _, a := range rec.Actions {
		switch a := a.(type) {
		case *recorder.Stroke:
			if p := a.Path; len(p) == 2 && p[0].Pos.X == p[1].Pos.X {
				heights = append(heights, (p[1].Pos.Y - p[0].Pos.Y).Points())
			}
		case *recorder.FillString:
			if strings.HasSuffix(a.String, "f") {
				marks++
			}
		}
	}
	whole := slices.Max(heights) // a line of the grid
	for _, level := range []float64{0, -40} {
		want := whole * (level - spectrumFloor) / (spectrumHead - spectrumFloor)
		if !slices.ContainsFunc(heights, func(h float64) bool { return math.Abs(h-want) < 0.01 }) {
			t.Errorf("no line is %v high, as %v dB of %v would be: %v", want, level, whole, heights)
		}
	}
	if marks != 3 { // 2f, 3f, 4f: the spectrum ends there
		t.Errorf("%d harmonics are marked", marks)
	}
	for _, c := range []*record.Case{spectral(), spectral(0, 0, 0), spectral(1), spectral(0, 0, math.NaN()), spectral(0, 0, math.Inf(1))} {
		if spectrumPanel(c) != nil {
			t.Errorf("a panel of %v", c.Spectrum.Amplitude)
		}
	}
}
