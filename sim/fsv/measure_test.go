package fsv

import (
	"math"
	"testing"
)

func TestWord(t *testing.T) {
	for _, tt := range []struct {
		value float64
		want  string
	}{
		{0, "excellent"},
		{0.0999, "excellent"},
		{0.1, "very good"},
		{0.199, "very good"},
		{0.2, "good"},
		{0.4, "fair"},
		{0.79, "fair"},
		{0.8, "poor"},
		{1.6, "poor"},
		{1.6001, "very poor"},
		{50, "very poor"},
	} {
		if got := Word(tt.value); got != tt.want {
			t.Errorf("%g is %q, want %q", tt.value, got, tt.want)
		}
	}
}

// TestVisual: the manual's formula, worked by hand.
func TestVisual(t *testing.T) {
	for value, want := range map[float64]float64{
		0: 1, 0.05: 1.5, 0.1: 2, 0.15: 2.51, 0.3: 3.505, 0.6: 4.5025, 1.2: 5.50125, 1.6: 6.00125, 3: 6,
	} {
		if got := Visual(value); !near(got, want) {
			t.Errorf("%g is %g on the visual scale, want %g", value, got, want)
		}
	}
}

// TestGradeAndSpread on histograms worked by hand.
func TestGradeAndSpread(t *testing.T) {
	for _, tt := range []struct {
		histogram     [6]float64
		grade, spread int
	}{
		{[6]float64{1}, 1, 1},
		{[6]float64{0, 0, 0, 0, 0, 1}, 6, 1},
		{[6]float64{0.85, 0.15}, 1, 1},
		{[6]float64{0.84, 0.16}, 2, 2},
		{[6]float64{0.05, 0.1, 0.7, 0.1, 0.05}, 3, 3},
		{[6]float64{0.1, 0.2, 0.3, 0.25, 0.1, 0.05}, 4, 4},
		{[6]float64{0, 0, 0.3, 0.6, 0.1}, 4, 2},
		{[6]float64{0.45, 0, 0, 0, 0.1, 0.45}, 6, 6},         // two heaps
		{[6]float64{0.1, 0.1, 0.1, 0.5, 0.1, 0.1}, 5, 5},     // either way of counting outward
		{[6]float64{0.4, 0.2, 0, 0.1, 0.2, 0.1}, 5, 5},       // outward on one side only
		{[6]float64{0.05, 0.25, 0.35, 0.2, 0.1, 0.05}, 4, 4}, // the sum of four is 0.85 but for its last bit
		{[6]float64{0.1, 0.1, 0.1, 0.1, 0.1, 0.5}, 6, 5},
		{[6]float64{0.3, 0.25, 0.3, 0.05, 0.05, 0.05}, 3, 3}, // two fullest
		{[6]float64{0.05, 0.3, 0.05, 0.3, 0.3, 0}, 5, 4},     // three fullest
		{[6]float64{1. / 6, 1. / 6, 1. / 6, 1. / 6, 1. / 6, 1. / 6}, 6, 6},
	} {
		if g, s := grade(tt.histogram), spread(tt.histogram); g != tt.grade || s != tt.spread {
			t.Errorf("%v: grade %d, spread %d; want %d, %d", tt.histogram, g, s, tt.grade, tt.spread)
		}
	}
}

// TestMeasure: what is made of ten points.
func TestMeasure(t *testing.T) {
	m := newMeasure([]float64{0, 0.05, 0.15, 0.15, 0.3, 0.3, 0.5, 1, 1.6, 3})
	if want := [6]float64{0.2, 0.2, 0.2, 0.1, 0.2, 0.1}; m.Histogram != want {
		t.Errorf("histogram %v, want %v", m.Histogram, want)
	}
	if !near(m.Value, 0.705) || m.Word != "fair" || m.Grade != 5 || m.Spread != 5 || !near(m.ConfidenceWeighted, 3.2) {
		t.Errorf("%+v", m)
	}
	if Word(math.Inf(1)) != "very poor" {
		t.Error("an infinite difference is not very poor")
	}
}
