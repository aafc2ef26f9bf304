package fsv

import (
	"fmt"
	"math"
	"slices"
	"strings"
	"testing"

	"pgregory.net/rapid"
)

// identityTolerance, absolute, is for measures of order 1 that are exact but
// for the rounding of a transform of some thousand points: a bin of 1e-3 of the
// largest is known to 1e-12 of itself.
const identityTolerance = 1e-9

func near(got, want float64) bool { return math.Abs(got-want) <= identityTolerance }

// wave is a curve with a mean, a slow part, features and something at every
// frequency, so that none of its parts is empty.
func wave(n int) []float64 {
	y := make([]float64, n)
	for i := range y {
		x := float64(i) / float64(n)
		y[i] = 1.3 + 0.4*math.Cos(3*x) + math.Sin(40*x) + 0.3*math.Cos(97*x+x*x) + 0.1*math.Mod(float64(i*i), 7)
	}
	return y
}

// apply gives f of every value.
func apply(y []float64, f func(float64) float64) []float64 {
	out := make([]float64, len(y))
	for i, v := range y {
		out[i] = f(v)
	}
	return out
}

func times(s float64) func(float64) float64 { return func(v float64) float64 { return s * v } }
func plus(c float64) func(float64) float64  { return func(v float64) float64 { return v + c } }

type fataler interface {
	Fatal(args ...any)
	Helper()
}

func mustCurves(t fataler, y1, y2 []float64) Result {
	t.Helper()
	r, err := Curves(y1, y2)
	if err != nil {
		t.Fatal(err)
	}
	return r
}

// drawPair draws two curves of the same length that have to do with one
// another.
func drawPair(t *rapid.T) (y1, y2 []float64) {
	n := rapid.IntRange(leastPoints, 80).Draw(t, "points")
	value := rapid.Float64Range(-10, 10)
	y1 = rapid.SliceOfN(value, n, n).Draw(t, "first")
	y2 = rapid.SliceOfN(value, n, n).Draw(t, "second")
	alike := rapid.Float64Range(0, 1).Draw(t, "alike")
	for i := range y2 {
		y2[i] += alike * (y1[i] - y2[i])
	}
	return y1, y2
}

// TestSymmetry: the curves may change places, a common factor and the signs do
// not matter, and what is made of the points agrees with them.
func TestSymmetry(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		y1, y2 := drawPair(t)
		r := mustCurves(t, y1, y2)
		s := rapid.SampledFrom([]float64{1e-300, 1e-3, 7, 1e300}).Draw(t, "scale")
		for what, q := range map[string]Result{
			"changed places": mustCurves(t, y2, y1),
			"scaled":         mustCurves(t, apply(y1, times(s)), apply(y2, times(s))),
			"one negative":   mustCurves(t, y1, apply(y2, times(-1))),
		} {
			for i := range r.GDM.Points {
				if !near(q.ADM.Points[i], r.ADM.Points[i]) || !near(q.FDM.Points[i], r.FDM.Points[i]) || !near(q.GDM.Points[i], r.GDM.Points[i]) {
					t.Fatalf("%s: point %d is %g, %g; was %g, %g", what, i, q.ADM.Points[i], q.FDM.Points[i], r.ADM.Points[i], r.FDM.Points[i])
				}
			}
		}
		for _, m := range []Measure{r.ADM, r.FDM, r.GDM} {
			checkMeasure(t, m, r.Points)
		}
	})
}

func checkMeasure(t *rapid.T, m Measure, points int) {
	t.Helper()
	total := 0.0
	for _, h := range m.Histogram {
		total += h
	}
	if len(m.Points) != points || !near(total, 1) || !near(m.Value, mean(m.Points)) || m.Word != Word(m.Value) {
		t.Fatalf("%+v", m)
	}
	if m.Grade < 1 || m.Grade > 6 || m.Spread < 1 || m.Spread > 6 || m.ConfidenceWeighted < 1-identityTolerance || m.ConfidenceWeighted > 6 {
		t.Fatalf("%+v", m)
	}
	if slices.Min(m.Points) < 0 {
		t.Fatalf("negative measure: %+v", m)
	}
}

// TestErrors: what is wrong with the curves, and where.
func TestErrors(t *testing.T) {
	y := wave(20)
	x := make([]float64, 20)
	for i := range x {
		x[i] = float64(i)
	}
	with := func(s []float64, i int, v float64) []float64 {
		s = slices.Clone(s)
		s[i] = v
		return s
	}
	for _, tt := range []struct {
		want           string
		x1, y1, x2, y2 []float64
	}{
		{"first curve: 19 abscissae for 20 values", x[:19], y, x, y},
		{"second curve: point 4 is NaN; a comparison needs finite values", x, y, x, with(y, 3, math.NaN())},
		{"second curve: point 1 is -Inf; a comparison needs finite values", x, y, x, with(y, 0, math.Inf(-1))},
		{"first curve: abscissa 5 is +Inf; a comparison needs finite ones", with(x, 4, math.Inf(1)), y, x, y},
		{"first curve: abscissa 5 does not rise; give the points with rising abscissae", with(x, 4, 3), y, x, y},
		{"0 points in the range that the curves share; a comparison needs at least 16", nil, nil, x, y},
		{"0 points in the range that the curves share; a comparison needs at least 16", x, y, apply(x, plus(30)), y},
		{"15 points in the range that the curves share; a comparison needs at least 16", x, y, apply(x, plus(5)), y},
		{"1 points in the range that the curves share; a comparison needs at least 16", x, y, apply(x, plus(19)), y},
	} {
		if _, err := Compare(tt.x1, tt.y1, tt.x2, tt.y2); err == nil || err.Error() != tt.want {
			t.Errorf("error %v, want %s", err, tt.want)
		}
	}
	for _, tt := range []struct {
		want   string
		y1, y2 []float64
	}{
		{"the curves have 20 and 19 points; give their abscissae", y, y[1:]},
		{"first curve: point 2 is +Inf; a comparison needs finite values", with(y, 1, math.Inf(1)), y},
		{"15 points in the range that the curves share; a comparison needs at least 16", y[:15], y[:15]},
	} {
		if _, err := Curves(tt.y1, tt.y2); err == nil || err.Error() != tt.want {
			t.Errorf("error %v, want %s", err, tt.want)
		}
	}
}

// TestChoices: the record's sentences name the constants.
func TestChoices(t *testing.T) {
	all := strings.Join(Choices(), "\n")
	for _, want := range []string{
		"at most 4096", "bins 0 to 3", "5 bins above", "40 % of its total", "2 bins on either side",
		"2 points on either side", "over 3 for the high part", "hold 85 %",
	} {
		if !strings.Contains(all, want) {
			t.Errorf("nothing of %q in:\n%s", want, all)
		}
	}
}

func BenchmarkCurves(b *testing.B) {
	for _, n := range []int{100, 509, 4096, 200000} {
		b.Run(fmt.Sprint(n), func(b *testing.B) {
			y1, y2 := wave(n), apply(wave(n), math.Sin)
			for b.Loop() {
				mustCurves(b, y1, y2)
			}
		})
	}
}
