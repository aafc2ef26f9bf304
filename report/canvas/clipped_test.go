package canvas

import (
	"math"
	"testing"

	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/recorder"
	"pgregory.net/rapid"
)

// bounds returns the smallest rectangle around the points of the paths drawn.
func bounds(rec *recorder.Canvas) (r vg.Rectangle, drawn bool) {
	r = vg.Rectangle{Min: vg.Point{X: vg.Length(math.Inf(1)), Y: vg.Length(math.Inf(1))}, Max: vg.Point{X: vg.Length(math.Inf(-1)), Y: vg.Length(math.Inf(-1))}}
	add := func(p vg.Path) {
		for _, s := range p {
			if s.Type == vg.CloseComp {
				continue
			}
			drawn = true
			r.Min.X, r.Min.Y = min(r.Min.X, s.Pos.X), min(r.Min.Y, s.Pos.Y)
			r.Max.X, r.Max.Y = max(r.Max.X, s.Pos.X), max(r.Max.Y, s.Pos.Y)
		}
	}
	for _, a := range rec.Actions {
		switch a := a.(type) {
		case *recorder.Stroke:
			add(a.Path)
		case *recorder.Fill:
			add(a.Path)
		}
	}
	return r, drawn
}

// Nothing is drawn outside the clip, whatever the path, and all of a path that
// is inside it.
func TestClipped(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		length := func(name string) vg.Length { return vg.Points(rapid.Float64Range(-300, 300).Draw(t, name)) }
		var rec recorder.Canvas
		c := Over(&rec)
		c.Push()
		clip := vg.Rectangle{Min: vg.Point{X: -100, Y: -50}, Max: vg.Point{X: 100, Y: 50}}
		c.ClipRect(vg.Rectangle{Min: vg.Point{X: -100, Y: -400}, Max: vg.Point{X: 400, Y: 400}})
		c.ClipRect(vg.Rectangle{Min: vg.Point{X: -200, Y: -50}, Max: vg.Point{X: 100, Y: 50}})
		var p vg.Path
		p.Move(vg.Point{X: length("x0"), Y: length("y0")})
		for range rapid.IntRange(1, 6).Draw(t, "lines") {
			p.Line(vg.Point{X: length("x"), Y: length("y")})
		}
		p.Arc(vg.Point{X: length("cx"), Y: length("cy")}, vg.Points(rapid.Float64Range(0, 200).Draw(t, "r")), 0, rapid.Float64Range(-7, 7).Draw(t, "angle"))
		c.Stroke(p)
		c.Fill(p)
		c.Pop()
		const slop = 0.01 // of gonum's clipping, points
		if r, drawn := bounds(&rec); drawn && (r.Min.X < clip.Min.X-slop || r.Max.X > clip.Max.X+slop || r.Min.Y < clip.Min.Y-slop || r.Max.Y > clip.Max.Y+slop) {
			t.Fatalf("drawn over %v, the clip is %v", r, clip)
		}
		rec.Actions = nil
		c.Stroke(p) // the clip is off again
		if got := rec.Actions[0].(*recorder.Stroke).Path; len(got) != len(p) {
			t.Fatalf("%d parts of %d are left without a clip", len(got), len(p))
		}
	})
}

// A line across the clip is cut at its edges; one inside is left whole.
func TestClippedLine(t *testing.T) {
	var rec recorder.Canvas
	c := Over(&rec)
	c.Push()
	c.ClipRect(vg.Rectangle{Max: vg.Point{X: 10, Y: 10}})
	var p vg.Path
	p.Move(vg.Point{X: -10, Y: 5})
	p.Line(vg.Point{X: 20, Y: 5})
	c.Stroke(p)
	got, drawn := bounds(&rec)
	if want := (vg.Rectangle{Min: vg.Point{Y: 5}, Max: vg.Point{X: 10, Y: 5}}); !drawn || got != want {
		t.Errorf("drawn over %v, want %v", got, want)
	}
	defer func() {
		if recover() == nil {
			t.Error("turning the coordinates under a clip is not refused")
		}
	}()
	c.Rotate(1)
}
