package canvas_test

import (
	"bytes"
	"errors"
	"image"
	"image/color"
	"math"
	"regexp"
	"strconv"
	"strings"
	"testing"

	"github.com/jung-kurt/gofpdf"
	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
	"linewitness/report/canvas"
	"linewitness/report/typeset"
	"pgregory.net/rapid"
)

// page draws on a canvas of 100 by 100 points at the lower left corner of an
// uncompressed page and returns the file.
func page(t *testing.T, paint func(c *canvas.Canvas)) (file string, err error) {
	t.Helper()
	pdf := gofpdf.New("P", "pt", "A4", "")
	pdf.SetCompression(false)
	pdf.AddPage()
	_, h := pdf.GetPageSize()
	fonts := canvas.NewFonts(pdf)
	c := canvas.New(pdf, fonts, 0, h-100, 100, 100)
	paint(c)
	if err := c.Close(); err != nil {
		return "", err
	}
	if err := fonts.Close(); err != nil {
		t.Fatal(err)
	}
	var b bytes.Buffer
	if err := pdf.Output(&b); err != nil {
		t.Fatal(err)
	}
	return b.String(), nil
}

func at(x, y float64) vg.Point { return vg.Point{X: vg.Points(x), Y: vg.Points(y)} }

func TestOperators(t *testing.T) {
	for name, c := range map[string]struct {
		paint func(*canvas.Canvas)
		want  string
	}{
		"line": {func(c *canvas.Canvas) {
			var p vg.Path
			p.Move(at(1, 2))
			p.Line(at(3.456, 4))
			p.Line(at(3.457, 4)) // the same at the resolution of the page
			c.Stroke(p)
		}, "1 2 m\n3.46 4 l\nS\n"},
		"quadratic curve": {func(c *canvas.Canvas) {
			var p vg.Path
			p.Move(at(0, 0))
			p.QuadTo(at(3, 6), at(6, 0))
			p.Close()
			c.Fill(p)
		}, "0 0 m\n2 4 4 4 6 0 c\nh\nf\n"},
		"quarter circle": {func(c *canvas.Canvas) {
			var p vg.Path
			p.Arc(at(0, 0), vg.Points(10), 0, math.Pi/2)
			c.Stroke(p)
		}, "10 0 m\n10 5.52 5.52 10 0 10 c\nS\n"}, // 4/3 tan(pi/8) = 0.5523
		"transform": {
			func(c *canvas.Canvas) { c.Translate(at(1, -2)); c.Scale(2, 3); c.Rotate(math.Pi) },
			"1 0 0 1 1 -2 cm\n2 0 0 3 0 0 cm\n-1 0 0 -1 0 0 cm\n",
		},
		"dash":     {func(c *canvas.Canvas) { c.SetLineDash([]vg.Length{2, 1}, 0.5) }, "[2 1] 0.5 d\n"},
		"no dash":  {func(c *canvas.Canvas) { c.SetLineDash([]vg.Length{0, 0}, 3) }, "[] 0 d\n"},
		"color":    {func(c *canvas.Canvas) { c.SetColor(color.NRGBA{R: 255, B: 51, A: 255}) }, "1 0 0.2 rg 1 0 0.2 RG\n"},
		"clip":     {func(c *canvas.Canvas) { canvas.Clip(draw.Canvas{Canvas: c}, vg.Rectangle{Max: at(5, 6)}) }, "0 0 5 6 re W n\n"},
		"premixed": {func(c *canvas.Canvas) { c.SetColor(color.RGBA{R: 64, A: 128}) }, "0.498 0 0 rg 0.498 0 0 RG\n"},
	} {
		file, err := page(t, c.paint)
		if err != nil {
			t.Fatal(err)
		}
		if !strings.Contains(file, c.want) {
			t.Errorf("%s: the page lacks %q", name, c.want)
		}
	}
}

// The text of a canvas takes the width that gonum measures, kerning included.
func TestTextWidth(t *testing.T) {
	const (
		text = "P.Y.LT11 AVA"
		size = 10.0
		tol  = 0.02 // advances are whole units of 1/2048 em, kernings written to 0.1/1000 em
	)
	face := typeset.Sans.Face(size)
	file, err := page(t, func(c *canvas.Canvas) { c.FillString(face, at(5, 5), text) })
	if err != nil {
		t.Fatal(err)
	}
	m := regexp.MustCompile(`5 5 Td \[(.*)\] TJ`).FindStringSubmatch(file)
	if m == nil {
		t.Fatal("no text on the page")
	}
	width := 0.0
	for _, part := range regexp.MustCompile(`<([0-9a-f]*)>|(-?[0-9.]+)`).FindAllStringSubmatch(m[1], -1) {
		for h := part[1]; len(h) >= 4; h = h[4:] {
			r, err := strconv.ParseInt(h[:4], 16, 32)
			if err != nil {
				t.Fatal(err)
			}
			width += face.Width(string(rune(r))).Points()
		}
		if part[2] != "" {
			k, err := strconv.ParseFloat(part[2], 64)
			if err != nil {
				t.Fatal(err)
			}
			width -= k / 1000 * size
		}
	}
	if want := face.Width(text).Points(); math.Abs(width-want) > tol {
		t.Errorf("width on the page %v, measured %v", width, want)
	}
}

func TestErrors(t *testing.T) {
	face := typeset.Sans.Face(8)
	_, err := page(t, func(c *canvas.Canvas) { c.FillString(face, at(1, 1), "a漢") })
	var glyph *canvas.GlyphError
	if !errors.As(err, &glyph) || glyph.Rune != '漢' || glyph.Text != "a漢" {
		t.Errorf("missing glyph: error %v", err)
	}
	for name, paint := range map[string]func(*canvas.Canvas){
		"path": func(c *canvas.Canvas) {
			c.Stroke(vg.Path{{Type: vg.MoveComp}, {Type: vg.LineComp, Pos: at(math.NaN(), 0)}})
		},
		"text": func(c *canvas.Canvas) { c.FillString(face, at(0, math.Inf(1)), "a") },
	} {
		if _, err := page(t, paint); err == nil || !strings.Contains(err.Error(), "not finite") {
			t.Errorf("%s with a coordinate that is not finite: error %v", name, err)
		}
	}
}

// gofpdf refuses images of sixteen bits a channel, which gonum makes; equal
// images are stored once.
func TestImage(t *testing.T) {
	file, err := page(t, func(c *canvas.Canvas) {
		for range 2 {
			c.DrawImage(vg.Rectangle{Min: at(10, 20), Max: at(40, 60)}, image.NewRGBA64(image.Rect(0, 0, 3, 4)))
		}
	})
	if err != nil {
		t.Fatal(err)
	}
	// gofpdf keeps the opacity of an image as an image of its own.
	if got := strings.Count(file, "/Subtype /Image"); got != 2 {
		t.Errorf("%d images stored, want one and its opacity", got)
	}
	if !strings.Contains(file, "30.00000 0 0 40.00000 10.00000 20.00000 cm") {
		t.Error("the image is not at its place")
	}
}

// What gofpdf knows of the page is as it was, and its opacity too.
func TestStateUntouched(t *testing.T) {
	pdf := gofpdf.New("P", "pt", "A4", "")
	pdf.AddPage()
	pdf.SetFont("Helvetica", "", 11)
	pdf.SetXY(12, 34)
	fonts := canvas.NewFonts(pdf)
	c := canvas.New(pdf, fonts, 0, 0, 100, 100)
	c.Push()
	c.SetColor(color.NRGBA{A: 100})
	c.FillString(typeset.Bold.Face(9), at(1, 1), "x")
	if err := c.Close(); err != nil {
		t.Fatal(err)
	}
	x, y := pdf.GetXY()
	size, _ := pdf.GetFontSize()
	alpha, _ := pdf.GetAlpha()
	if x != 12 || y != 34 || size != 11 || alpha != 1 {
		t.Errorf("position %v, %v, font size %v, opacity %v", x, y, size, alpha)
	}
}

func TestPopWithoutPush(t *testing.T) {
	defer func() {
		if got, want := recover(), "canvas: Pop without Push"; got != want {
			t.Errorf("panic %v, want %q", got, want)
		}
	}()
	_, _ = page(t, func(c *canvas.Canvas) { c.Pop() })
	t.Error("no panic")
}

// Simplify keeps the ends and moves no point farther than the tolerance.
func TestSimplify(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		tol := rapid.Float64Range(0.001, 2).Draw(t, "tolerance")
		ys := rapid.SliceOfN(rapid.Float64Range(-20, 20), 1, 200).Draw(t, "ys")
		var p vg.Path
		for i, y := range ys {
			if i == 0 {
				p.Move(at(0, y))
			} else {
				p.Line(at(float64(i), y))
			}
		}
		s := canvas.Simplify(p, vg.Points(tol))
		if s[0].Pos != p[0].Pos || s[len(s)-1].Pos != p[len(p)-1].Pos {
			t.Fatal("the ends moved")
		}
		for _, c := range p {
			if d := nearest(s, c.Pos); d > tol*(1+1e-9) {
				t.Fatalf("a point moved by %v, tolerance %v", d, tol)
			}
		}
	})
}

// nearest returns the distance from q to a polyline.
func nearest(p vg.Path, q vg.Point) float64 {
	best := math.Hypot(float64(q.X-p[0].Pos.X), float64(q.Y-p[0].Pos.Y))
	for i := 1; i < len(p); i++ {
		a, b := p[i-1].Pos, p[i].Pos
		dx, dy := float64(b.X-a.X), float64(b.Y-a.Y)
		s := (float64(q.X-a.X)*dx + float64(q.Y-a.Y)*dy) / (dx*dx + dy*dy)
		s = math.Min(math.Max(s, 0), 1)
		best = math.Min(best, math.Hypot(float64(q.X-a.X)-s*dx, float64(q.Y-a.Y)-s*dy))
	}
	return best
}
