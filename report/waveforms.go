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

// waveforms draws the stress run: the whole turn-on at the left, the last
// periods with the phasor's own waveform at the right.
func (d *document) waveforms(c *record.Case) {
	list, silent := heard(distinct(c.Waveforms), noise(c))
	if len(list) == 0 {
		return
	}
	if !d.whole(c) {
		var others []string
		list, others = loudest(list)
		d.leave(namesOf("waveforms", "place", others))
	}
	each := 1
	if len(list) > crowdedWaveforms {
		each = 2
	}
	key := []figure.Entry{
		{Style: ink.PhasorLine, Text: "phasor: its amplitude (left), its waveform (right)"},
		{Style: ink.FDTDLine, Text: "time domain (right)"},
		{Style: ink.TraceLine, Band: true, Text: "time domain, between its extremes where dense"},
	}
	rows := min(len(list)/each, fewWaveRows)
	d.b.Subheading("Waveforms", figure.KeyHeight+waveHeight(rows)+waveCaption)
	d.b.Note(startNote(c.Stress, silent))
	d.key(key)
	for len(list) > 0 {
		if fit := d.waveRowsThatFit(); fit < rows {
			d.b.NewPage()
		}
		n := min(len(list), max(d.waveRowsThatFit(), 1)*each)
		d.waveStack(c, list[:n], each, key)
		list = list[n:]
		rows = min((len(list)+each-1)/each, fewWaveRows)
	}
}

// The rows of waveforms stand one upon the other and share the axes of the
// lowest.
const (
	waveRow     = 51.0
	waveAxis    = 19.0 // the labels below the lowest row
	waveAlone   = 72.0 // of a waveform in a file of its own
	waveCaption = 46.0 // room for the caption, the more for the more rows
	fewWaveRows = 2    // that at least stand together
)

func waveHeight(rows int) float64 { return float64(rows)*waveRow + waveAxis }

// waveRowsThatFit returns how many rows have room on the page in work.
func (d *document) waveRowsThatFit() int {
	return int((d.b.Room() - waveAxis - waveCaption) / waveRow)
}

// startNote says how the source starts, and what is not drawn.
func startNote(s record.Stress, silent []string) string {
	note := "Source as it starts in service: " + orElse(format.Signed(s.Profile), "not stated") + "."
	if s.Worst {
		note += " Shown for the start phase that gives the largest voltage, " + format.Angle(s.Voltage.Phase) + "."
	}
	if len(silent) > 0 {
		note += " Zero throughout and not drawn: " + strings.Join(silent, ", ") + "."
	}
	return note
}

// heard parts the waveforms that are more than rounding from those that are
// not, such as the voltage across a short.
func heard(ws []record.Waveform, f floor) (list []record.Waveform, silent []string) {
	for _, w := range ws {
		if most := max(largestOf(w.Samples), largestOf(w.Tail.Phasor)); most < f.unit(w.Unit) {
			silent = append(silent, w.Name)
			continue
		}
		list = append(list, w)
	}
	return list, silent
}

// crowdedWaveforms is how many waveforms get a row each; more stand in pairs.
const crowdedWaveforms = 12

// distinct leaves out what repeats an earlier waveform sample by sample, as
// the voltage of the source's junction repeats that of the source, and what
// has no sample.
func distinct(ws []record.Waveform) []record.Waveform {
	var out []record.Waveform
	for _, w := range ws {
		same := func(o record.Waveform) bool {
			return o.Unit == w.Unit && o.Step == w.Step && o.Start == w.Start && slices.Equal(o.Samples, w.Samples)
		}
		i := slices.IndexFunc(out, same)
		switch {
		case len(w.Samples) == 0:
		case i < 0:
			out = append(out, w)
		case out[i].Name != w.Name:
			out[i].Name += " = " + w.Name
		}
	}
	return out
}

// key draws a key over the full width.
func (d *document) key(entries []figure.Entry) {
	d.b.Block(figure.KeyRoom(entries, d.b.Width()), func(c draw.Canvas) { figure.Key(c, entries) })
}

// waveStack draws waveforms in rows of so many columns, as one figure of the
// document; in the files each is a figure of its own.
func (d *document) waveStack(c *record.Case, ws []record.Waveform, columns int, key []figure.Entry) {
	rows := (len(ws) + columns - 1) / columns
	label, finding := d.figure(), wavesFinding(ws)
	d.b.Block(waveHeight(rows), func(cv draw.Canvas) {
		for i := range ws {
			row := i / columns
			below := waveAxis
			if i+columns < len(ws) {
				below = 0
			}
			top := vg.Points(float64(row) * waveRow)
			cell := draw.Crop(cv, 0, 0, cv.Size().Y-top-vg.Points(waveRow+below), -top)
			waveform(column(cell, i%columns, columns), &ws[i], c.Model.Frequency, below == 0)
		}
	})
	d.b.Caption(label, finding)
	for i := range ws {
		w := &ws[i]
		d.note(picture{
			name: pictureName(c, "waveform", w.Name), finding: waveformFinding(w), height: waveAlone, key: key,
			paint: func(cv draw.Canvas) { waveform(cv, w, c.Model.Frequency, false) },
		})
	}
}

// waveform draws the turn-on at the left and the last periods at the right. A
// bare one has another below it that shares its axes.
func waveform(c draw.Canvas, w *record.Waveform, frequency float64, bare bool) {
	const share = 0.62 // of the turn-on
	split := c.Size().X * share
	turnOn(w, frequency, bare).Draw(draw.Crop(c, 0, split-c.Size().X, 0, 0))
	lastPeriods(w, bare).Draw(draw.Crop(c, split, 0, 0, 0))
}

// times returns the times of the samples.
func times(w *record.Waveform) []float64 { return figure.Times(w.Start, w.Step, len(w.Samples)) }

// largestAt returns the index of the largest finite magnitude, or -1.
func largestAt(ys []float64) int {
	at, most := -1, -1.0
	for i, y := range ys {
		if a := math.Abs(y); a > most && !math.IsInf(a, 0) {
			at, most = i, a
		}
	}
	return at
}

// symmetric returns the range of a quantity that swings about zero.
func symmetric(series ...[]float64) (lo, hi float64) {
	const air = 1.12 // over the largest value
	for _, ys := range series {
		if i := largestAt(ys); i >= 0 {
			hi = max(hi, math.Abs(ys[i])*air)
		}
	}
	return -hi, hi
}

func turnOn(w *record.Waveform, frequency float64, bare bool) *figure.Panel {
	ts, at := times(w), largestAt(w.Samples)
	lo, hi := symmetric(w.Samples, w.Tail.Phasor)
	p := figure.New(w.Name, "turn-on", figure.Axis{Label: "time from switch-on", Unit: "s", Min: min(0, ts[0]), Max: ts[len(ts)-1], Bare: bare},
		figure.Axis{Unit: w.Unit, Min: lo, Max: hi})
	if i := largestAt(w.Tail.Phasor); i >= 0 {
		level := math.Abs(w.Tail.Phasor[i])
		p.Level(level, ink.PhasorLine, "")
		p.Level(-level, ink.PhasorLine, "")
	}
	p.Trace(ts, w.Samples, (ts[len(ts)-1]-ts[0])*frequency)
	if at >= 0 {
		p.Spot(ts[at], w.Samples[at], format.SI(w.Samples[at], w.Unit))
	} else {
		p.Say(nothingFinite)
	}
	return p
}

func lastPeriods(w *record.Waveform, bare bool) *figure.Panel {
	t := w.Tail
	lo, hi := symmetric(t.Samples, t.Phasor)
	ts := figure.Times(t.Start, t.Step, len(t.Samples))
	axis := figure.Axis{Label: "time from switch-on", Unit: "s", Min: t.Start, Max: t.Start + t.Step*float64(len(t.Samples)-1), Bare: bare}
	p := figure.New("", "last periods", axis, figure.Axis{Unit: w.Unit, Min: lo, Max: hi})
	p.Line(ts, t.Phasor, ink.PhasorLine)
	p.Line(ts, t.Samples, ink.FDTDLine)
	return p
}
