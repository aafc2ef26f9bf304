package figure

import (
	"image"
	"math"
	"testing"

	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
	"gonum.org/v1/plot/vg/recorder"
	"linewitness/report/ink"
	"pgregory.net/rapid"
)

// Every place is in one bin, in order, whatever their distances; a bin without
// one has a near place.
func TestBins(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		at := []float64{rapid.Float64Range(-5, 5).Draw(t, "first")}
		for range rapid.IntRange(0, 60).Draw(t, "more") {
			at = append(at, at[len(at)-1]+rapid.Float64Range(1e-6, 3).Draw(t, "step"))
		}
		n := rapid.IntRange(1, 40).Draw(t, "bins")
		seen := make([]int, len(at))
		width := (at[len(at)-1] - at[0]) / float64(n)
		for b, r := range bins(at, n) {
			if r[0] >= r[1] {
				t.Fatalf("bin %d is empty", b)
			}
			lo, hi := at[0]+float64(b)*width, at[0]+float64(b+1)*width
			for i := r[0]; i < r[1]; i++ {
				if at[i] >= lo-1e-9 && at[i] <= hi+1e-9 {
					seen[i]++
				}
			}
		}
		for i, times := range seen {
			if times == 0 {
				t.Fatalf("place %d of %d is in no bin of %d", i, len(at), n)
			}
		}
	})
}

// A crest that is narrower than a dot of the image is seen on it.
func TestMapKeepsCrests(t *testing.T) {
	m := &Map{}
	for i := range 5000 {
		m.X = append(m.X, float64(i))
	}
	for j := range 3 {
		m.Y, m.V = append(m.Y, float64(j)), append(m.V, make([]float64, len(m.X)))
	}
	m.V[1][1234], m.V[2][4321] = 9, -8
	top, signed := m.largest()
	if top != 9 || !signed {
		t.Fatalf("largest %v, signed %v", top, signed)
	}
	img := m.raster(top)
	seen := map[uint8]bool{}
	for _, p := range img.Pix {
		seen[p] = true
	}
	if !seen[shade(1, false)] || !seen[shade(-8.0/9, false)] || !seen[shade(-8.0/9, true)] {
		t.Error("a crest is lost")
	}
	if b := img.Bounds(); b.Dx() != mapColumns || b.Dy() != mapRows {
		t.Errorf("the image is %v", b)
	}
	// Time runs upward: the last row is at the head of the image.
	if img.ColorIndexAt(4321*mapColumns/5000, 1) == shadeZero || img.ColorIndexAt(4321*mapColumns/5000, mapRows-2) != shadeZero {
		t.Error("the image is upside down")
	}
}

// The shades: one for zero, others for each sign, and one for what is not a
// number; each has its colour.
func TestShade(t *testing.T) {
	p := mapPalette()
	if n := len(p); n != shadeLined+mapLevels || n > 256 {
		t.Fatalf("%d shades", n)
	}
	for _, c := range []struct {
		v     float64
		lined bool
		want  uint8
	}{
		{math.NaN(), false, shadeNone},
		{math.Inf(1), true, shadeNone},
		{0, true, shadeZero},
		{1e-9, false, shadeZero},
		{1, true, shadeNegative - 1},
		{1, false, shadeNegative - 1},
		{-1, false, shadeLined - 1},
		{-1, true, shadeLined + mapLevels - 1},
		{2, false, shadeNegative - 1},
	} {
		if got := shade(c.v, c.lined); got != c.want {
			t.Errorf("shade(%v, %v) = %d, want %d", c.v, c.lined, got, c.want)
		}
	}
	if p[shade(1, false)] != ink.Diverging(1) || p[shade(-1, false)] != ink.Diverging(-1) {
		t.Error("the ends have other colours")
	}
}

// images returns the images of a drawing.
func images(actions []recorder.Action) (out []image.Image) {
	for _, a := range actions {
		if d, ok := a.(*recorder.DrawImage); ok {
			out = append(out, d.Image)
		}
	}
	return out
}

// A map has its image and its scale; one of nothing says so and has neither.
// Amplitudes have a scale from zero.
func TestMapDraws(t *testing.T) {
	nan := math.NaN()
	for name, c := range map[string]struct {
		v      [][]float64
		images int
		lowest string
	}{
		"signed":    {[][]float64{{0, 1}, {-2, nan}}, 2, "−2"},
		"amplitude": {[][]float64{{0, 1}, {2, 0}}, 2, "0.0"},
		"zero":      {[][]float64{{0, 0}, {0, 0}}, 0, ""},
		"nothing":   {[][]float64{{nan, math.Inf(1)}, {nan}}, 0, ""},
	} {
		m := &Map{Panel: New("m", "q", Axis{Unit: "m", Max: 1}, Axis{Unit: "s", Max: 1}), Symbol: "V", Unit: "V", X: []float64{0, 1}, Y: []float64{0, 1}, V: c.v}
		m.Bounds([]Mark{{At: 0, Label: "a"}, {At: 0.01, Label: "hidden by a, for want of room"}, {At: 1, Label: "b"}})
		m.Parts([]Part{{From: 0, To: 1, Name: "whole"}, {From: 0.5, To: 0.5001, Name: "narrow"}})
		m.Segments([]Segment{{0, 0, 1, 1, ink.FrontLine}, {0, nan, 1, 1, ink.FrontLine}})
		var rec recorder.Canvas
		area := draw.NewCanvas(&rec, vg.Points(400), vg.Points(200))
		m.Draw(area)
		if got := len(images(rec.Actions)); got != c.images {
			t.Errorf("%s: %d images, want %d", name, got, c.images)
		}
		inside(t, name, rec.Actions, area.Rectangle)
		texts := written(rec.Actions)
		for _, want := range []string{"a", "b", "whole"} {
			if _, ok := texts[want]; !ok {
				t.Errorf("%s: %q is not named", name, want)
			}
		}
		if _, ok := texts["narrow"]; ok {
			t.Errorf("%s: a name stands over a part without room", name)
		}
		if _, ok := texts[c.lowest]; c.lowest != "" && !ok {
			t.Errorf("%s: the scale lacks %q: %v", name, c.lowest, texts)
		}
	}
}
