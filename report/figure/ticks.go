package figure

import (
	"math"

	"gonum.org/v1/plot"
	"linewitness/report/format"
)

// ticks places at most about most labelled ticks on an axis, two at least.
type ticks struct {
	s    scale
	most int
}

var _ plot.Ticker = ticks{}

// Ticks implements plot.Ticker on the coordinates of the axis.
func (t ticks) Ticks(lo, hi float64) []plot.Tick {
	if t.s.Log {
		return t.decades(lo, hi)
	}
	step := t.step(lo, hi)
	first, last := math.Ceil(lo/step-1e-6), math.Floor(hi/step+1e-6)
	var out []plot.Tick
	for k := first; k <= last; k++ {
		out = append(out, t.tick(k*step, format.Tick(k*step, step)))
	}
	return out
}

// step returns the distance of the ticks: as chosen by most, or less if that
// leaves fewer than three.
func (t ticks) step(lo, hi float64) float64 {
	const least = 3
	step := niceStep((hi - lo) / float64(max(t.most, 2)))
	for range 3 {
		if math.Floor(hi/step+1e-6)-math.Ceil(lo/step-1e-6)+1 >= least {
			break
		}
		step = niceStep(step * 0.45)
	}
	return step
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
	every := 1 + (last-first)/max(t.most, 2)
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
