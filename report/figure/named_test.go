package figure

import (
	"fmt"
	"math"
	"strings"
	"testing"

	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
	"gonum.org/v1/plot/vg/recorder"
	"linewitness/report/ink"
	"pgregory.net/rapid"
)

// written returns the texts that a canvas was given, and where.
func written(actions []recorder.Action) map[string]vg.Rectangle {
	out := map[string]vg.Rectangle{}
	for _, a := range actions {
		if f, ok := a.(*recorder.FillString); ok {
			out[f.String] = vg.Rectangle{Min: f.Point, Max: f.Point.Add(vg.Point{X: vg.Points(tagStyle.Width(f.String)), Y: vg.Points(0.7 * tagStyle.Size)})}
		}
	}
	return out
}

func overlap(a, b vg.Rectangle) bool {
	return a.Min.X < b.Max.X && b.Min.X < a.Max.X && a.Min.Y < b.Max.Y && b.Min.Y < a.Max.Y
}

// Six curves that decay and run into one another, and a dozen marks: each
// curve is named, on the panel and clear of every other label; every mark has
// its line.
func TestNamesStandClear(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		var rec recorder.Canvas
		c := draw.NewCanvas(&rec, vg.Points(400), vg.Points(138))
		p := New("Departure", "relative", Axis{Label: "time", Unit: "s", Max: 1e-6}, Axis{Min: 1e-4, Max: 12, Log: true})
		var curves []Curve
		for i, style := range ink.Series {
			v := Curve{Name: fmt.Sprintf("junction_%d", i), Style: style}
			delay := rapid.Float64Range(0, 3e-7).Draw(t, "delay")
			fall := rapid.Float64Range(1e-8, 1e-6).Draw(t, "fall")
			for _, x := range Times(0, 4e-9, 250) {
				v.X, v.Y = append(v.X, x), append(v.Y, math.Exp(-max(x-delay, 0)/fall))
			}
			curves = append(curves, v)
		}
		var marks []Mark
		for i := range rapid.IntRange(0, 12).Draw(t, "marks") {
			marks = append(marks, Mark{At: float64(i+1) * 2e-8, Label: fmt.Sprintf("echo_%d", i)})
		}
		p.Marks(marks, ink.MarkLine)
		p.Curves(curves)
		p.Draw(c)
		texts := written(rec.Actions)
		for s, r := range texts {
			if !strings.HasPrefix(s, "junction_") && !strings.HasPrefix(s, "echo_") {
				continue
			}
			if r.Min.X < c.Min.X || r.Max.X > c.Max.X || r.Min.Y < c.Min.Y || r.Max.Y > c.Max.Y {
				t.Fatalf("%s is not on the panel: %v", s, r)
			}
			for o, q := range texts {
				if o != s && overlap(r, q) {
					t.Fatalf("%s and %s overlap", s, o)
				}
			}
		}
		for _, v := range curves {
			if _, ok := texts[v.Name]; !ok {
				t.Fatalf("%s is not named", v.Name)
			}
		}
		if len(marks) > 0 {
			if _, ok := texts["echo_0"]; !ok {
				t.Fatal("the first mark has no label")
			}
		}
	})
}

// A curve without a finite point in the panel is not named, and nothing fails.
func TestCurvesOfNothing(t *testing.T) {
	nan, inf := math.NaN(), math.Inf(1)
	for name, ys := range map[string][]float64{"empty": nil, "not finite": {nan, inf, nan}, "below": {1e-9, 1e-9, 1e-9}} {
		var rec recorder.Canvas
		c := draw.NewCanvas(&rec, vg.Points(240), vg.Points(90))
		p := New("name", "quantity", Axis{Label: "time", Unit: "s", Max: 2}, Axis{Min: 1e-4, Max: 10, Log: true})
		p.Curves([]Curve{{Name: "lost", X: []float64{0, 1, 2}, Y: ys, Style: ink.Series[0]}})
		p.Marks([]Mark{{At: nan, Label: "nowhere"}, {At: 1}}, ink.MarkLine)
		p.Draw(c)
		texts := written(rec.Actions)
		for _, s := range []string{"lost", "nowhere"} {
			if at, ok := texts[s]; ok {
				t.Errorf("%s: %q stands at %v", name, s, at.Min)
			}
		}
	}
}
