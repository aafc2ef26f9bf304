package figure

import (
	"math"
	"math/cmplx"
	"strings"
	"testing"

	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
	"gonum.org/v1/plot/vg/recorder"
	"pgregory.net/rapid"
)

// Nothing of a chart is drawn outside its column, whatever its data and names.
func TestChartInside(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		g := func(name string) complex128 {
			return cmplx.Rect(rapid.Float64Range(0, 1).Draw(t, name), rapid.Float64Range(-4, 4).Draw(t, name+" angle"))
		}
		name := rapid.SampledFrom([]string{"a", "", "a_name_that_goes_on_and_on_to_the_mast_platform"})
		ch := &Chart{
			Name: name.Draw(t, "name"), Quantity: "Z0 = 50.00 − j0.02 Ω", Foot: []string{"VSWR at " + name.Draw(t, "end"), "b"},
			Lines: [][]complex128{{g("a"), g("b"), g("c")}}, Dots: []complex128{g("d")},
			Ends: []ChartEnd{{Name: name.Draw(t, "from"), At: g("from")}, {Name: name.Draw(t, "to"), At: g("to"), Far: true}},
			Rims: []ChartRim{{Radius: rapid.Float64Range(0.001, 0.999).Draw(t, "rim"), Inside: rapid.Bool().Draw(t, "inside"), Label: "R1, VSWR 1.5"}},
		}
		width := rapid.Float64Range(115, 400).Draw(t, "width")
		var rec recorder.Canvas
		c := draw.NewCanvas(&rec, vg.Points(width), vg.Points(ChartHeight(width, 2)))
		ch.Draw(c)
		for s, r := range written(rec.Actions) {
			// What is set larger was cut to its room by its own width.
			if r.Min.X < -0.5 || r.Min.X+r.Size().X > c.Max.X+vg.Points(0.5) || r.Min.Y < 0 || r.Max.Y > c.Max.Y {
				t.Fatalf("%q is at %v on %v", s, r, c.Rectangle)
			}
		}
	})
}

// The circles of the grid go through the points that they stand for, and every
// point of them is inside the unit circle.
func TestChartGrid(t *testing.T) {
	for _, v := range gridValues {
		r := constant(func(t float64) complex128 { return complex(v, t) }, true)
		for _, g := range r {
			z := (1 + g) / (1 - g)
			if e := math.Abs(real(z) - v); e > 1e-6*(1+cmplx.Abs(z)) && cmplx.Abs(g-1) > 1e-6 {
				t.Errorf("a point of the circle of r = %v has r = %v", v, real(z))
			}
			if cmplx.Abs(g) > 1+1e-9 {
				t.Errorf("%v is outside the chart", g)
			}
		}
	}
	// By hand: 1 + j1 is at 0.2 + j0.4.
	if g := reflect(1 + 1i); cmplx.Abs(g-(0.2+0.4i)) > 1e-15 {
		t.Errorf("1 + j1 is at %v", g)
	}
}

// The arrow runs clockwise, the way in which the coefficient turns toward the
// generator; the ends have marks of different shapes.
func TestChartArrow(t *testing.T) {
	var rec recorder.Canvas
	p := plane{c: draw.NewCanvas(&rec, 200, 200), x: 100, y: 100, radius: 80}
	p.arrow()
	arc := rec.Actions[strokeAt(rec.Actions, 0)].(*recorder.Stroke).Path
	angle := func(at vg.Point) float64 { return math.Atan2(at.Y.Points()-100, at.X.Points()-100) }
	if a, b := angle(arc[0].Pos), angle(arc[len(arc)-1].Pos); !(b < a) {
		t.Errorf("the arrow runs from %v to %v", a, b)
	}
	marks := [2]string{}
	for i := range marks {
		rec.Actions = nil
		p.mark(ChartEnd{Far: i == 1})
		for _, a := range rec.Actions {
			marks[i] += strings.SplitN(a.Call(), "(", 2)[0] + " "
		}
	}
	if marks[0] == marks[1] {
		t.Errorf("both ends are marked by %s", marks[0])
	}
}

func strokeAt(actions []recorder.Action, from int) int {
	for i := from; i < len(actions); i++ {
		if _, ok := actions[i].(*recorder.Stroke); ok {
			return i
		}
	}
	return -1
}

// The hatching of a limit is on the forbidden side.
func TestChartRims(t *testing.T) {
	for _, inner := range []bool{false, true} {
		var rec recorder.Canvas
		p := plane{c: draw.NewCanvas(&rec, 200, 200), x: 100, y: 100, radius: 80}
		(&Chart{Rims: []ChartRim{{Radius: 0.5, Inside: inner}}}).rims(p)
		strokes := 0
		for _, a := range rec.Actions {
			s, ok := a.(*recorder.Stroke)
			if !ok || len(s.Path) != 2 {
				continue
			}
			strokes++
			end := math.Hypot(s.Path[1].Pos.X.Points()-100, s.Path[1].Pos.Y.Points()-100)
			if (end < 40) != inner {
				t.Errorf("inside forbidden %v: a stroke ends %v from the middle", inner, end)
			}
		}
		if strokes < 20 {
			t.Errorf("%d strokes", strokes)
		}
	}
}

// The second axis shows the same length in its own unit.
func TestSecondAxis(t *testing.T) {
	pn := New("a", "b", Axis{Label: "distance", Unit: "m", Max: 120}, Axis{Max: 1})
	pn.Second("λ", 0.25)
	texts := written(drawPanel(pn, 300, 100))
	zero, ok := texts["0\u00a0λ"]
	last, ok2 := texts["30\u00a0λ"]
	if !ok || !ok2 {
		t.Fatalf("texts %v", texts)
	}
	middle := func(r vg.Rectangle) float64 { return (r.Min.X + r.Max.X).Points() / 2 }
	if got, want := middle(last)-middle(zero), 300-insetLeft-insetRight; math.Abs(got-want) > 0.5 {
		t.Errorf("from 0 to 30 wavelengths are %v points, want %v", got, want)
	}
}

func drawPanel(pn *Panel, w, h float64) []recorder.Action {
	var rec recorder.Canvas
	pn.Draw(draw.NewCanvas(&rec, vg.Points(w), vg.Points(h)))
	return rec.Actions
}
