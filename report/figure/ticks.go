package figure

import (
	"math"

	"gonum.org/v1/plot"
	"linewitness/report/format"
)

// ticks places labelled ticks about wish points apart on an axis, and no
// closer than their labels need.
type ticks struct {
	s            scale
	length, wish float64 // of the axis, between ticks; points
	need         func(label string) float64
}

var _ plot.Ticker = ticks{}

// Ticks implements plot.Ticker on the coordinates of the axis.
func (t ticks) Ticks(lo, hi float64) []plot.Tick {
	if t.s.Log {
		return t.decades(lo, hi)
	}
	step := t.step(lo, hi)
	var out []plot.Tick
	for k := math.Ceil(lo/step - 1e-6); k*step <= hi+step*1e-6; k++ {
		out = append(out, t.tick(k*step, format.Tick(k*step, step)))
	}
	return out
}

// step returns the distance of the ticks: as wished, or less if that leaves
// fewer than three, or more if the labels would not find room.
func (t ticks) step(lo, hi float64) float64 {
	const least = 3
	step := niceStep((hi - lo) / math.Max(t.length/t.wish, 1))
	for finer := step; t.fits(finer, lo, hi); finer = niceStep(finer * 0.45) {
		step = finer
		if math.Floor(hi/step+1e-6)-math.Ceil(lo/step-1e-6)+1 >= least {
			break
		}
	}
	for range 4 {
		if t.fits(step, lo, hi) {
			break
		}
		step = niceStep(step * 1.1)
	}
	return step
}

// fits reports whether labels of ticks at either end find room.
func (t ticks) fits(step, lo, hi float64) bool {
	first, last := math.Ceil(lo/step)*step, math.Floor(hi/step)*step
	need := math.Max(t.need(format.Tick(first, step)), t.need(format.Tick(last, step)))
	return step/(hi-lo)*t.length >= need
}

func (t ticks) tick(v float64, label string) plot.Tick {
	if t.s.Bare {
		label = ""
	}
	return plot.Tick{Value: v, Label: label}
}

// decades labels every decade, or every second, third, ... if they are many.
func (t ticks) decades(lo, hi float64) []plot.Tick {
	first, last := int(math.Ceil(lo-1e-9)), int(math.Floor(hi+1e-9))
	every := 1 + (last-first)/max(int(t.length/t.wish), 2)
	var out []plot.Tick
	for n := first; n <= last; n++ {
		label := ""
		if (last-n)%every == 0 {
			label = format.Decade(n)
		}
		out = append(out, t.tick(float64(n), label))
	}
	return out
}

// niceStep returns the smallest of 1, 2, 2.5, 5 times a power of ten that is
// not below v.
func niceStep(v float64) float64 {
	power := math.Pow(10, math.Floor(math.Log10(v)))
	for _, m := range []float64{1, 2, 2.5, 5} {
		if m*power >= v*(1-1e-9) {
			return m * power
		}
	}
	return 10 * power
}
