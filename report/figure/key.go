package figure

import (
	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
	"linewitness/report/ink"
	"linewitness/report/typeset"
)

// An Entry is a line style and what it stands for.
type Entry struct {
	Style draw.LineStyle
	Band  bool
	Dots  bool // open circles
	Text  string
}

// KeyHeight is the height of a line of a key.
const KeyHeight = 12.5

const (
	keySample = 22.0
	keyGap    = 14.0
)

// rows breaks a key into lines.
func rows(entries []Entry, width float64) [][]Entry {
	var out [][]Entry
	x := width + 1
	for _, e := range entries {
		w := keySample + 4 + textStyle.Width(e.Text) + keyGap
		if x+w-keyGap > width {
			out = append(out, nil)
			x = 0
		}
		out[len(out)-1] = append(out[len(out)-1], e)
		x += w
	}
	return out
}

// KeyRoom returns the height that a key takes in the given width.
func KeyRoom(entries []Entry, width float64) float64 {
	return float64(len(rows(entries, width))) * KeyHeight
}

// Key draws a key from the upper left corner of c.
func Key(c draw.Canvas, entries []Entry) {
	y := c.Max.Y.Points() - 8
	for _, row := range rows(entries, c.Size().X.Points()) {
		x := c.Min.X.Points()
		for _, e := range row {
			sample(c, e, x, y+2.4)
			x += keySample + 4
			x += textStyle.Draw(c, x, y, e.Text, typeset.Left) + keyGap
		}
		y -= KeyHeight
	}
}

func sample(c draw.Canvas, e Entry, x, y float64) {
	if e.Band {
		box := vg.Rectangle{
			Min: vg.Point{X: vg.Points(x), Y: vg.Points(y - 3)},
			Max: vg.Point{X: vg.Points(x + keySample), Y: vg.Points(y + 3)},
		}
		c.SetColor(ink.Band)
		c.Fill(box.Path())
		c.SetLineStyle(e.Style)
		c.Stroke(box.Path())
		return
	}
	if e.Dots {
		c.SetLineStyle(draw.LineStyle{Color: e.Style.Color, Width: vg.Points(0.6)})
		for k := range 3 {
			c.Stroke(circle(vg.Point{X: vg.Points(x + keySample*(0.2+0.3*float64(k))), Y: vg.Points(y)}, vg.Points(1.3)))
		}
		return
	}
	c.StrokeLine2(e.Style, vg.Points(x), vg.Points(y), vg.Points(x+keySample), vg.Points(y))
}
