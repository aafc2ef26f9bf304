package data

import (
	"fmt"
	"math"
	"strings"

	"linewitness/sim/record"
)

// waveforms are the columns of the waveform file: one for each waveform that a
// case has, in the order in which the cases name them. A case without one leaves
// its fields empty.
type waveforms struct {
	header []string
	column map[waveformKey]int
}

type waveformKey struct{ name, where, quantity string }

func keyOf(w *record.Waveform) waveformKey { return waveformKey{w.Name, w.Where, w.Quantity} }

// timeColumns come before those of the waveforms.
var timeColumns = []string{"case", "part", "time_s"}

// newWaveforms finds the columns of a record.
func newWaveforms(r *record.Record) *waveforms {
	f := &waveforms{header: timeColumns, column: map[waveformKey]int{}}
	taken := map[string]bool{}
	for i := range r.Cases {
		for k := range r.Cases[i].Waveforms {
			w := &r.Cases[i].Waveforms[k]
			if _, known := f.column[keyOf(w)]; known {
				continue
			}
			f.column[keyOf(w)] = len(f.column)
			f.header = append(f.header, title(w, taken))
		}
	}
	return f
}

// size is about that of the file, in bytes: a buffer that gets its room at once
// takes a third of one that grows by itself.
func (f *waveforms) size(r *record.Record) (n int) {
	const (
		sample = 10 // with its comma
		row    = 32 // before the samples, with the commas of empty fields
	)
	for i := range r.Cases {
		longest := 0
		for _, w := range r.Cases[i].Waveforms {
			n += sample * (len(w.Samples) + len(w.Tail.Samples) + len(w.Tail.Phasor))
			longest = max(longest, len(w.Samples)+len(w.Tail.Samples)+len(w.Tail.Phasor))
		}
		n += 2 * row * longest
	}
	return n
}

// title is the head of a column: the waveform's name with its unit in place of
// its quantity, and where that is taken with its place too.
func title(w *record.Waveform, taken map[string]bool) string {
	suffix := "_v"
	if w.Quantity == "current" {
		suffix = "_a"
	}
	name := strings.TrimSuffix(w.Name, " "+w.Quantity)
	if taken[name+suffix] {
		name += " at " + w.Where
	}
	for taken[name+suffix] {
		name += "\u2032" // prime
	}
	taken[name+suffix] = true
	return name + suffix
}

func (f *waveforms) rows(t *table, c *record.Case) error {
	for i := range c.Waveforms {
		w := &c.Waveforms[i]
		if n := len(w.Tail.Phasor); n > 0 && n != len(w.Tail.Samples) {
			return fmt.Errorf("%q has %d samples and %d of the phasor", w.Name, len(w.Tail.Samples), n)
		}
	}
	for _, s := range spans {
		s.rows(t, f, c)
	}
	return nil
}

// A span is a part of the waveforms of a case.
type span struct {
	name string
	of   func(*record.Waveform) series
}

// The rows of part "run" are the stress run, those of part "tail" its last periods,
// and those of part "phasor" the closed form at the times of the tail.
var spans = []span{
	{"run", func(w *record.Waveform) series { return series{w.Start, w.Step, w.Samples} }},
	{"tail", func(w *record.Waveform) series { return series{w.Tail.Start, w.Tail.Step, w.Tail.Samples} }},
	{"phasor", func(w *record.Waveform) series { return series{w.Tail.Start, w.Tail.Step, w.Tail.Phasor} }},
}

// A series is samples at even times.
type series struct {
	start, step float64
	samples     []float64
}

// time is that of sample i, infinite after the last.
func (s series) time(i int) float64 {
	if i >= len(s.samples) {
		return math.Inf(1)
	}
	return s.start + float64(i)*s.step
}

// largest is the largest size of a sample that is a number.
func (s series) largest() (most float64) {
	for _, y := range s.samples {
		if y = math.Abs(y); y > most && !math.IsInf(y, 0) {
			most = y
		}
	}
	return most
}

// rows writes one row for each time at which any waveform has a sample. Currents
// and the voltages of junctions without a section lie half a step before the
// other voltages; so their fields and those of the others take turns.
func (s span) rows(t *table, f *waveforms, c *record.Case) {
	var all []series
	var columns []int
	for i := range c.Waveforms {
		all = append(all, s.of(&c.Waveforms[i]))
		columns = append(columns, f.column[keyOf(&c.Waveforms[i])])
	}
	next := make([]int, len(all))
	row := make([]float64, len(f.column))
	largest := make([]float64, len(f.column))
	for k, x := range all {
		largest[columns[k]] = x.largest()
	}
	for {
		now := math.Inf(1)
		for k, n := range next {
			now = min(now, all[k].time(n))
		}
		if math.IsInf(now, 1) {
			return
		}
		for k := range row {
			row[k] = math.NaN()
		}
		for k, n := range next {
			if all[k].time(n) == now {
				row[columns[k]] = all[k].samples[n]
				next[k]++
			}
		}
		t.text(c.Name, s.name)
		t.numbers(now)
		for k, x := range row {
			t.sample(x, largest[k])
		}
		t.end()
	}
}
