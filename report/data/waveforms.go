package data

import (
	"fmt"
	"math"

	"linewitness/sim/record"
)

// waveformHeader: a row of part "run" is a sample of the stress run, one of
// part "tail" a sample of its last periods with the phasor's own waveform.
var waveformHeader = []string{
	"case", "waveform", "where", "part", "time_s",
	"fdtd_v", "phasor_v", "fdtd_a", "phasor_a",
}

func waveformRows(t *table, c *record.Case) error {
	for _, w := range c.Waveforms {
		if n := len(w.Tail.Phasor); n > 0 && n != len(w.Tail.Samples) {
			return fmt.Errorf("%q has %d samples and %d of the phasor", w.Name, len(w.Tail.Samples), n)
		}
		for i, y := range w.Samples {
			waveformRow(t, c.Name, &w, "run", w.Start+float64(i)*w.Step, y, math.NaN())
		}
		for i, y := range w.Tail.Samples {
			p := math.NaN()
			if w.Tail.Phasor != nil {
				p = w.Tail.Phasor[i]
			}
			waveformRow(t, c.Name, &w, "tail", w.Tail.Start+float64(i)*w.Tail.Step, y, p)
		}
	}
	return nil
}

func waveformRow(t *table, name string, w *record.Waveform, part string, time, fdtd, phasor float64) {
	t.text(name, w.Name, w.Where, part)
	t.numbers(time)
	if w.Quantity == "current" {
		t.digits(sampleDigits, math.NaN(), math.NaN(), fdtd, phasor)
	} else {
		t.digits(sampleDigits, fdtd, phasor, math.NaN(), math.NaN())
	}
	t.end()
}
