package figure

import (
	"math"
	"slices"
	"strings"
	"testing"

	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
	"gonum.org/v1/plot/vg/recorder"
	"linewitness/report/format"
	"linewitness/report/ink"
	"pgregory.net/rapid"
)

func labels(t ticks, lo, hi float64) string {
	var out []string
	for _, tick := range t.Ticks(lo, hi) {
		if tick.Label != "" {
			out = append(out, strings.ReplaceAll(tick.Label, format.Space, " "))
		}
	}
	return strings.Join(out, " | ")
}

func TestTicks(t *testing.T) {
	narrow := func(string) float64 { return 10 }
	for _, c := range []struct {
		lo, hi, length float64
		log            bool
		want           string
	}{
		{0, 1, 100, false, "0.0 | 0.5 | 1.0"},
		{-910, 910, 50, false, "−500 | 0 | 500"}, // a step of 1000 would leave a single tick
		{0, 1.7, 400, false, "0.0 | 0.2 | 0.4 | 0.6 | 0.8 | 1.0 | 1.2 | 1.4 | 1.6"},
		{18.41, 18.44, 150, false, "18.41 | 18.42 | 18.43 | 18.44"},
		{-6, -1, 100, true, "0.01 % | 10 %"},
		{-6, -1, 300, true, "10\ue000−4\ue002 % | 0.001 % | 0.01 % | 0.1 % | 1 % | 10 %"},
	} {
		axis := ticks{s: scale{Axis: Axis{Log: c.log}}, length: c.length, wish: 46, need: narrow}
		got := labels(axis, c.lo, c.hi)
		if got != c.want {
			t.Errorf("ticks of %v to %v on %v pt: %q, want %q", c.lo, c.hi, c.length, got, c.want)
		}
	}
}

// Labels of neighbouring ticks never meet, however narrow the panel.
func TestTicksFindRoom(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		lo := rapid.Float64Range(-999, 999).Draw(t, "low")
		hi := lo + math.Pow(10, rapid.Float64Range(-3, 3).Draw(t, "decades"))
		axis := ticks{
			length: rapid.Float64Range(40, 500).Draw(t, "length"), wish: 46,
			need: func(s string) float64 { return tickStyle.Width(s) },
		}
		last := math.Inf(-1)
		for _, tick := range axis.Ticks(lo, hi) {
			at, half := (tick.Value-lo)/(hi-lo)*axis.length, tickStyle.Width(tick.Label)/2
			if at-half < last {
				t.Fatalf("label %q begins at %v, the one before ends at %v", tick.Label, at-half, last)
			}
			last = at + half
		}
	})
}

// The extremes of the windows hold every finite point and are points of the
// curve themselves.
func TestExtremes(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		ys := rapid.SliceOfN(rapid.Float64Range(-5, 5), 1, 300).Draw(t, "ys")
		if rapid.Bool().Draw(t, "broken") {
			ys[len(ys)/2] = math.NaN()
		}
		n := rapid.IntRange(1, 50).Draw(t, "windows")
		b := Extremes(Times(0, 1, len(ys)), ys, n)
		if len(b.X) > n || len(b.Lo) != len(b.X) || len(b.Hi) != len(b.X) {
			t.Fatalf("%d, %d, %d points for %d windows", len(b.X), len(b.Lo), len(b.Hi), n)
		}
		lo, hi := math.Inf(1), math.Inf(-1)
		for _, y := range ys {
			if finite(y) {
				lo, hi = min(lo, y), max(hi, y)
			}
		}
		gotLo, gotHi := math.Inf(1), math.Inf(-1)
		for i := range b.X {
			gotLo, gotHi = min(gotLo, b.Lo[i]), max(gotHi, b.Hi[i])
			if b.Lo[i] > b.Hi[i] || i > 0 && b.X[i] < b.X[i-1] {
				t.Fatal("windows out of order")
			}
		}
		if gotLo != lo || gotHi != hi {
			t.Fatalf("extremes %v to %v, want %v to %v", gotLo, gotHi, lo, hi)
		}
	})
}

// A panel takes any data, and its text and lines stay on its canvas.
func TestPanelStaysInside(t *testing.T) {
	nan, inf := math.NaN(), math.Inf(1)
	for name, ys := range map[string][]float64{
		"plain": {0, 1, 2}, "empty": {}, "one point": {3}, "flat": {0, 0, 0},
		"broken": {1, nan, 2}, "infinite": {1, inf, -inf}, "none finite": {nan, inf, nan}, "huge": {1e300, -1e300, 1},
	} {
		var rec recorder.Canvas
		c := draw.NewCanvas(&rec, vg.Points(240), vg.Points(90))
		p := New("name", "quantity", Axis{Label: "time", Unit: "s", Max: 2}, Axis{Unit: "V", Min: -2, Max: 2})
		xs := Times(0, 1, len(ys))
		p.Line(xs, ys, ink.PhasorLine)
		p.Dots(xs, ys, ink.FDTDLine)
		p.Trace(xs, ys, 1e4)
		p.Level(nan, ink.LimitLine, "nowhere")
		p.Limits([]Limit{
			{Value: 1.5, Above: true, Label: "limit"},
			{Value: 1.6, Above: true, Mild: true, Label: "limit of " + strings.Repeat("a long name ", 9)},
			{Value: nan, Above: true, Label: "nowhere"},
			{Value: -1.5, Label: "lower limit"},
			{Value: 1e9, Above: true, Label: "far off"},
		})
		p.Upright([]float64{1, inf}, ink.MarkLine, "mark")
		p.Spot(2, 2, "at the very corner")
		p.Draw(c)
		inside(t, name, rec.Actions, c.Rectangle)
	}
}

// inside checks the texts, which nothing clips.
func inside(t *testing.T, name string, actions []recorder.Action, area vg.Rectangle) {
	t.Helper()
	texts := 0
	for _, a := range actions {
		f, ok := a.(*recorder.FillString)
		if !ok {
			continue
		}
		texts++
		if f.Point.X < area.Min.X || f.Point.X > area.Max.X || f.Point.Y < area.Min.Y || f.Point.Y > area.Max.Y {
			t.Errorf("%s: text %q at %v", name, f.String, f.Point)
		}
		if strings.Contains(f.String, "NaN") || strings.Contains(f.String, "Inf") {
			t.Errorf("%s: text %q", name, f.String)
		}
	}
	if texts < 6 {
		t.Errorf("%s: only %d texts", name, texts)
	}
}

// A range that cannot be drawn is widened to one that can.
func TestScale(t *testing.T) {
	for _, a := range []Axis{
		{}, {Min: 5, Max: 5}, {Min: math.NaN(), Max: 1}, {Max: math.Inf(1)}, {Min: 1e-3, Max: 1e-3, Log: true}, {Log: true}, {Min: 3, Max: 2}, {Min: 1e9, Max: 1e9 + 1e-6}, {Min: -1e300, Max: 1e300},
	} {
		s := newScale(a)
		lo, hi := s.at(s.Min), s.at(s.Max)
		if !finite(lo, hi) || hi <= lo {
			t.Errorf("%+v is drawn from %v to %v", a, lo, hi)
		}
	}
}

func TestKeyBreaksLines(t *testing.T) {
	e := []Entry{{Text: "phasor"}, {Text: "time domain"}, {Text: "peak over all time"}}
	if got := KeyRoom(e, 500); got != KeyHeight {
		t.Errorf("wide key is %v high", got)
	}
	if got := KeyRoom(e, 100); got != 3*KeyHeight {
		t.Errorf("narrow key is %v high", got)
	}
}

// Labels in a stack keep their order and their distance, and stay inside if
// there is room for all.
func TestSpread(t *testing.T) {
	const slack = 1e-9 // of sums of a few points of size
	rapid.Check(t, func(t *rapid.T) {
		ys := rapid.SliceOfN(rapid.Float64Range(-50, 150), 1, 8).Draw(t, "ys")
		slices.Sort(ys)
		const lo, hi = 0, 100 // 8 labels of TagHeight find room
		spread(ys, lo, hi, rapid.Bool().Draw(t, "up"))
		for i, y := range ys {
			if y < lo-slack || y > hi+slack || i > 0 && y-ys[i-1] < TagHeight-slack {
				t.Fatalf("labels at %v", ys)
			}
		}
	})
	ys := []float64{10, 40}
	if spread(ys, 0, 100, true); ys[0] != 10 || ys[1] != 40 {
		t.Errorf("labels with room were moved to %v", ys)
	}
}

// Only the side beyond the nearest limit is hatched, and a mild one hatches
// nothing.
func TestBeyond(t *testing.T) {
	at := func(l Limit) float64 { return l.Value }
	area := vg.Rectangle{Max: vg.Point{X: 10, Y: 100}}
	for _, c := range []struct {
		limits []Limit
		lo, hi vg.Length
	}{
		{[]Limit{{Value: 80, Above: true}, {Value: 60, Above: true}, {Value: 50, Above: true, Mild: true}}, 60, 100},
		{[]Limit{{Value: 10}, {Value: 30}}, 0, 30},
	} {
		if r := beyond(area, c.limits, at); r.Min.Y != c.lo || r.Max.Y != c.hi {
			t.Errorf("%v hatches %v to %v, want %v to %v", c.limits, r.Min.Y, r.Max.Y, c.lo, c.hi)
		}
	}
	if r := beyond(area, []Limit{{Value: 50, Above: true, Mild: true}}, at); r.Max.Y > r.Min.Y {
		t.Errorf("a mild limit hatches %v", r)
	}
}
