package figure

import (
	"math"
	"strings"
	"testing"

	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
	"gonum.org/v1/plot/vg/recorder"
)

// Bars keep to one scale, and names and texts stay on the canvas whatever
// their length and whatever the values.
func TestBars(t *testing.T) {
	nan, inf := math.NaN(), math.Inf(1)
	long := strings.Repeat("a long name ", 20)
	for name, list := range map[string][]Bar{
		"plain": {
			{Name: "available", To: 10, Text: "10 W"},
			{Name: "lost", From: 7, To: 10, Text: "3 W", Fill: Rising},
			{Name: "choke", From: 6.999, To: 7, Text: "1 mW", Fill: Upright},
			{Name: "load", To: 6.999, Text: "6.999 W", Fill: Solid},
		},
		"long":       {{Name: long, To: 10, Text: long, Fill: Falling}, {Name: "b", Text: "c"}, {Name: "d", Text: "e"}},
		"not finite": {{Name: "a", From: nan, To: inf, Text: "b"}, {Name: "c", From: -3, To: nan, Text: "d"}, {Name: "e", From: 4, To: -inf, Text: "f"}},
	} {
		var rec recorder.Canvas
		c := draw.NewCanvas(&rec, vg.Points(400), vg.Points(BarsHeight(len(list))))
		Bars(c, list, 10)
		inside(t, name, rec.Actions, c.Rectangle)
		for s, r := range written(rec.Actions) {
			if r.Max.X > c.Max.X+vg.Points(textStyle.Width(s)-tagStyle.Width(s)) {
				t.Errorf("%s: %q ends at %v", name, s, r.Max.X)
			}
		}
	}
}

// The end of a bar is at its part of the whole.
func TestBarsScale(t *testing.T) {
	d := &bars{x0: 100, x1: 300, whole: 50}
	for v, want := range map[float64]float64{0: 100, 25: 200, 50: 300, 60: 300, -1: 100} {
		if got := d.x(v); got != want {
			t.Errorf("%v is at %v, want %v", v, got, want)
		}
	}
	if got := d.x(math.NaN()); got != 100 {
		t.Errorf("NaN is at %v", got)
	}
}

// The patterns of bars differ in their strokes, or as dark and white do.
func TestFills(t *testing.T) {
	seen := map[string]Fill{}
	for f := Blank; f <= Upright; f++ {
		var rec recorder.Canvas
		d := &bars{c: draw.NewCanvas(&rec, vg.Points(100), vg.Points(20))}
		d.fill(vg.Rectangle{Max: vg.Point{X: 60, Y: 6.6}}, f)
		var b strings.Builder
		for _, a := range rec.Actions {
			b.WriteString(a.Call() + "\n")
		}
		if o, ok := seen[b.String()]; ok {
			t.Errorf("patterns %d and %d are drawn alike", f, o)
		}
		seen[b.String()] = f
	}
}
