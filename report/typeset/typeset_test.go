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

var body = Style{Face: Sans, Size: 10, Color: color.Black}

// advance is a digit's width in both Liberation faces, 1139/2048 em (sans)
// and 1229/2048 em (mono), from the fonts' own hmtx tables.
func TestWidth(t *testing.T) {
	const tol = 0.01 // the tables are in units of 1/2048 em, rounded to 1/64
	for _, c := range []struct {
		st   Style
		in   string
		want float64
	}{
		{body, "0", 10 * 1139.0 / 2048},
		{body.In(Mono), "abc", 3 * 10 * 1229.0 / 2048},
		{body, "", 0},
		{body, "8" + string(format.Sup) + "8" + string(format.End), 10 * 1139.0 / 2048 * (1 + scriptSize)},
	} {
		if got := c.st.Width(c.in); math.Abs(got-c.want) > tol {
			t.Errorf("Width(%q) = %v, want %v", c.in, got, c.want)
		}
	}
}

// The widths are those that gonum measures, whose axes leave room by them.
func TestWidthAsGonum(t *testing.T) {
	const tol = 1e-9 // the same sum of whole font units
	for _, f := range []Face{Sans, Bold, Italic, Mono} {
		face := f.Face(9)
		for _, s := range []string{"P.Y.LT11", "AV To fi", "50.01 − j0.03 Ω", "λ/4 ≤ β·ℓ"} {
			got, want := Style{Face: f, Size: 9}.Width(s), face.Width(s).Points()
			if math.Abs(got-want) > tol {
				t.Errorf("face %d, %q: width %v, want %v", f, s, got, want)
			}
		}
	}
}

func TestWrap(t *testing.T) {
	for _, c := range []struct {
		in    string
		width float64
		want  string
	}{
		{"one two three", 1000, "one two three"},
		{"one two three", 40, "one two|three"},
		{"5" + format.Space + "V and 6" + format.Space + "V", 24, "5" + format.Space + "V|and|6" + format.Space + "V"},
		{"mmmmmmmm", 25, "mmm|mmm|mm"},
		{"", 10, ""},
		{"m", 1, "m"},
	} {
		got := strings.Join(body.Wrap(c.in, c.width), "|")
		if got != c.want {
			t.Errorf("Wrap(%q, %v) = %q, want %q", c.in, c.width, got, c.want)
		}
	}
}

// Wrapping loses no character and, above the width of the widest character,
// makes no line too wide.
func TestWrapProperty(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := rapid.StringMatching(`[a-zA-Z0-9_ ]{0,80}`).Draw(t, "text")
		w := rapid.Float64Range(12, 200).Draw(t, "width")
		lines := body.Wrap(s, w)
		for _, l := range lines {
			if body.Width(l) > w {
				t.Fatalf("line %q is wider than %v", l, w)
			}
		}
		squeeze := func(s string) string { return strings.ReplaceAll(s, " ", "") }
		if got := squeeze(strings.Join(lines, "")); got != squeeze(s) {
			t.Fatalf("wrapped to %q, from %q", got, s)
		}
	})
}

func TestFit(t *testing.T) {
	for _, c := range []struct {
		in    string
		width float64
		want  string
	}{
		{"mast", 100, "mast"}, {"a_rather_long_name", 40, "a_rath…"}, {"wide", 0, ""}, {"Wide", 12, "…"},
	} {
		got := body.Fit(c.in, c.width)
		if got != c.want || body.Width(got) > c.width {
			t.Errorf("Fit(%q, %v) = %q, want %q", c.in, c.width, got, c.want)
		}
	}
}

func TestCleanAndListing(t *testing.T) {
	if got, want := Clean(" a\t b\nc\x00d\xff\ue000é "), "a b c dé"; got != want {
		t.Errorf("Clean gives %q, want %q", got, want)
	}
	if got, want := Listing("a\tb # 漢 Ω\x00\xff"), "a   b # <U+6F22> Ω<U+0000><0xFF>"; got != want {
		t.Errorf("Listing gives %q, want %q", got, want)
	}
}

// Superscripts are drawn above the baseline, and in a smaller size.
func TestDrawMarkup(t *testing.T) {
	var rec recorder.Canvas
	body.Draw(&rec, 100, 50, "10"+string(format.Sup)+"3"+string(format.End), Right)
	var texts []*recorder.FillString
	for _, a := range rec.Actions {
		if f, ok := a.(*recorder.FillString); ok {
			texts = append(texts, f)
		}
	}
	if len(texts) != 2 || texts[0].String != "10" || texts[1].String != "3" {
		t.Fatalf("drew %v", texts)
	}
	if up := texts[1].Point.Y - texts[0].Point.Y; up <= 0 {
		t.Errorf("superscript is %v above the baseline", up)
	}
	if texts[1].Size >= texts[0].Size {
		t.Errorf("superscript size %v, text %v", texts[1].Size, texts[0].Size)
	}
}
