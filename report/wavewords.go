package report

import (
	"math"
	"strings"

	"linewitness/report/format"
	"linewitness/sim/record"
)

// wavesFinding says what a figure of several waveforms shows: the largest value
// of each, and how near the last periods come to those of the phasors.
func wavesFinding(ws []record.Waveform) string {
	var most []string
	worst, of := math.NaN(), ""
	stopped := false
	for i := range ws {
		w := &ws[i]
		most = append(most, w.Name+" "+largestInWave(w, i == 0))
		stopped = stopped || largestAt(w.Samples) >= 0 && largestAt(w.Tail.Phasor) < 0
		if off := deviation(w.Tail) / steadyAmplitude(w); !math.IsNaN(off) && !math.IsInf(off, 0) && !(off <= worst) {
			worst, of = off, w.Name
		}
	}
	s := "Largest values: " + strings.Join(most, "; ") + "."
	switch {
	case of != "" && len(ws) > 1:
		s += " The last periods are within " + format.Percent(worst) + " of the phasor's waveforms, " + of + " the farthest."
	case of != "":
		s += " The last periods are within " + format.Percent(worst) + " of the phasor's waveform."
	}
	if stopped {
		s += " The source has stopped, so there is no steady waveform to compare with."
	}
	return s
}

// largestInWave says how large a waveform grows, when, and how many times its
// steady amplitude that is.
func largestInWave(w *record.Waveform, full bool) string {
	at := largestAt(w.Samples)
	if at < 0 {
		return "has no finite value"
	}
	most := math.Abs(w.Samples[at])
	s := format.SI(most, w.Unit) + " at " + format.SI(times(w)[at], "s")
	if a := steadyAmplitude(w); a > 0 && most > 0 {
		s += " (" + format.Number(most/a)
		if full {
			s += " of the steady amplitude"
		}
		s += ")"
	}
	return s
}

// steadyAmplitude is the amplitude of the phasor, 0 where there is none; the
// largest sample of its waveform stands for one that is not given.
func steadyAmplitude(w *record.Waveform) float64 {
	i := largestAt(w.Tail.Phasor)
	switch {
	case i < 0:
		return 0
	case w.Steady != 0:
		return w.Steady
	}
	return math.Abs(w.Tail.Phasor[i])
}

// waveformFinding says what a row shows: the largest value, and how near the
// last periods come to the phasor's waveform.
func waveformFinding(w *record.Waveform) string {
	ts, at := times(w), largestAt(w.Samples)
	if at < 0 {
		return w.Name + ": no finite value."
	}
	most := math.Abs(w.Samples[at])
	s := w.Name + ": largest " + format.SI(most, w.Unit) + " at " + format.SI(ts[at], "s")
	if largestAt(w.Tail.Phasor) < 0 {
		return s + "; the source has stopped, so there is no steady waveform to compare with."
	}
	amplitude := steadyAmplitude(w)
	if amplitude > 0 && most > 0 {
		s += ", " + format.Number(most/amplitude) + " of the steady amplitude"
	}
	if amplitude == 0 {
		return s + "; it has no steady amplitude."
	}
	return s + "; last periods within " + format.Percent(deviation(w.Tail)/amplitude) + " of the phasor's waveform."
}

func deviation(t record.Tail) (most float64) {
	for i := range min(len(t.Samples), len(t.Phasor)) {
		if e := math.Abs(t.Samples[i] - t.Phasor[i]); e > most {
			most = e
		}
	}
	return most
}
