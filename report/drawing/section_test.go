package drawing

import (
	"slices"
	"strings"
	"testing"

	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
	"gonum.org/v1/plot/vg/recorder"
	"linewitness/sim/record"
)

// A part is drawn by the symbols of what is in it.
func TestSigns(t *testing.T) {
	for _, c := range []struct {
		part record.ModelPart
		want []sign
	}{
		{record.ModelPart{R: 50}, []sign{resistor}},
		{record.ModelPart{L: 1e-6}, []sign{coil}},
		{record.ModelPart{C: 1e-9}, []sign{capacitor}},
		{record.ModelPart{R: 1, C: 1e-9}, []sign{resistor, capacitor}},
		{record.ModelPart{R: 1, L: 1e-6, C: 1e-9}, []sign{resistor, coil, capacitor}},
		{record.ModelPart{Ratio: 2}, []sign{transformer}},
		{record.ModelPart{As: "combination of 2", R: 1}, []sign{general}},
		{record.ModelPart{}, []sign{resistor}},
	} {
		if got := signs(&c.part); !slices.Equal(got, c.want) {
			t.Errorf("%+v: signs %v, want %v", c.part, got, c.want)
		}
	}
}

// stroke is a stroke of some width between two points.
type stroke struct{ from, to, width float64 }

// strokes returns the level strokes that a pen draws.
func strokes(paint func(*pen)) []stroke {
	var rec recorder.Canvas
	paint(&pen{c: draw.NewCanvas(&rec, 200, 100)})
	var out []stroke
	width := 0.0
	for _, a := range rec.Actions {
		switch a := a.(type) {
		case *recorder.SetLineWidth:
			width = a.Width.Points()
		case *recorder.Stroke:
			if p := a.Path; len(p) == 2 && p[0].Pos.Y == p[1].Pos.Y {
				out = append(out, stroke{p[0].Pos.X.Points(), p[1].Pos.X.Points(), width})
			}
		}
	}
	return out
}

// Longer sections are drawn longer, in three classes, and the wire takes what is
// left of the cell; only the longest are broken.
func TestClasses(t *testing.T) {
	for _, c := range []struct{ wavelengths, want float64 }{{0.1, 40}, {0.125, 40}, {0.2, 72}, {2, 72}, {3, 100}, {1e6, 100}} {
		s := record.ModelSection{Wavelengths: c.wavelengths}
		got := strokes(func(p *pen) { p.section(&s, 0, 100, 50) })
		if got[0] != (stroke{c.want, 100, 0.6}) || got[1] != (stroke{0, c.want, 3.4}) {
			t.Errorf("%v wavelengths: %v, want a double line to %v", c.wavelengths, got, c.want)
		}
		var rec recorder.Canvas
		(&pen{c: draw.NewCanvas(&rec, 200, 100)}).section(&s, 0, 100, 50)
		aslant := slices.ContainsFunc(rec.Actions, func(a recorder.Action) bool {
			st, ok := a.(*recorder.Stroke)
			return ok && st.Path[0].Pos.Y != st.Path[1].Pos.Y
		})
		if aslant != (c.want == 100) {
			t.Errorf("%v wavelengths: broken %v", c.wavelengths, aslant)
		}
	}
}

// Symbols in a row and the wires between them leave no gap, and do not reach
// beyond what half says.
func TestRow(t *testing.T) {
	for _, list := range [][]sign{{resistor}, {capacitor}, {resistor, capacitor}, {capacitor, capacitor, capacitor}} {
		var rec recorder.Canvas
		p := &pen{c: draw.NewCanvas(&rec, 200, 100)}
		p.row(list, 100, 50)
		lo, hi := vg.Length(1e9), vg.Length(-1e9)
		for _, a := range rec.Actions {
			if s, ok := a.(*recorder.Stroke); ok {
				for _, c := range s.Path {
					if c.Type != vg.CloseComp {
						lo, hi = min(lo, c.Pos.X), max(hi, c.Pos.X)
					}
				}
			}
		}
		const rounding = 1e-9
		if d := (hi - lo).Points() - 2*half(list); d > rounding || d < -rounding {
			t.Errorf("%v: %v points wide, want %v", list, hi-lo, 2*half(list))
		}
	}
}

func TestLengths(t *testing.T) {
	s := record.ModelSection{Length: 120, Degrees: 15351.2}
	for room, want := range map[float64]string{200: "120.0 m, 15 351°", 40: "120.0 m"} {
		if got := strings.ReplaceAll(lengths(&s, room), "\u00a0", " "); got != want {
			t.Errorf("in %v points: %q, want %q", room, got, want)
		}
	}
}
