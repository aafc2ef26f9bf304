package typeset

import (
	"image/color"
	"math"
	"strings"
	"testing"

	"gonum.org/v1/plot/vg/recorder"
	"linewitness/report/format"
	"pgregory.net/rapid"
)

// drawnTexts are the texts that a formula draws, in their order.
func drawnTexts(s string) []*recorder.FillString {
	c := new(recorder.Canvas)
	Style{Face: Sans, Size: 10, Color: color.Black}.Formula(s).Draw(c, 0, 0)
	var out []*recorder.FillString
	for _, a := range c.Actions {
		if f, ok := a.(*recorder.FillString); ok {
			out = append(out, f)
		}
	}
	return out
}

// Letters of quantities are italic; digits, words, functions, the imaginary unit
// and the sign of a differential are upright (ISO 80000-2).
func TestShaped(t *testing.T) {
	for in, want := range map[string]string{
		"2ab":        "2 [ab]",
		"ln x":       "ln  [x]",
		"dV/dz":      "d [V] /d [z]",
		"jωL":        "j [ωL]",
		"Δφ":         "Δ [φ]",
		"max |V|":    "max | [V] |",
		"fdtd":       "fdtd",
		"GCI = F":    "GCI =  [F]",
		"at s = jω":  "at  [s]  = j [ω]",
		"ℓ":          "[ℓ]",
		"if |E| ≤ u": "if | [E] | ≤  [u]",
	} {
		var parts []string
		for _, p := range shaped(in) {
			if p.face == Italic {
				p.text = "[" + p.text + "]"
			}
			parts = append(parts, p.text)
		}
		if got := strings.Join(parts, " "); got != want {
			t.Errorf("shaped(%q) = %q, want %q", in, got, want)
		}
	}
}

// The numerator is above the bar and the denominator below, both centred; the
// box holds them.
func TestFraction(t *testing.T) {
	st := Style{Face: Sans, Size: 10, Color: color.Black}
	b := st.Formula(Frac("1", "1000"))
	texts := drawnTexts(Frac("1", "1000"))
	if len(texts) != 2 {
		t.Fatalf("%d texts", len(texts))
	}
	n, d := texts[0], texts[1]
	const tol = 1e-9 // sums of a few lengths
	if !(n.Point.Y > 0 && d.Point.Y < 0) {
		t.Errorf("numerator at %v, denominator at %v", n.Point.Y, d.Point.Y)
	}
	small := st.At(10 * partSize)
	left := n.Point.X.Points() + small.Width("1")/2 - d.Point.X.Points() - small.Width("1000")/2
	if math.Abs(left) > tol {
		t.Errorf("the numerator is %v off the centre", left)
	}
	if top := n.Point.Y.Points() + 10*partSize*ascent; top > b.Above+tol {
		t.Errorf("the numerator reaches %v, the box %v", top, b.Above)
	}
	if foot := d.Point.Y.Points() - 10*partSize*descent; -foot > b.Below+tol {
		t.Errorf("the denominator reaches %v, the box %v", foot, -b.Below)
	}
}

// Nothing of a formula is lost, whatever its markup, also where that is not
// closed or closed too often.
func TestFormulaKeepsText(t *testing.T) {
	marks := []string{"a", "V", "12", "ln", " ", "γ", string(format.Sup), string(format.Sub), string(format.End), string(over), string(under), string(root), string(closed), string(round), string(bars)}
	rapid.Check(t, func(t *rapid.T) {
		s := strings.Join(rapid.SliceOfN(rapid.SampledFrom(marks), 0, 30).Draw(t, "parts"), "")
		want := ""
		for _, r := range s {
			if r < 0xe000 {
				want += string(r)
			}
		}
		got := ""
		for _, f := range drawnTexts(s) {
			got += f.String
		}
		if got != want {
			t.Fatalf("%q draws %q, want %q", s, got, want)
		}
	})
}
