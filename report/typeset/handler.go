package typeset

import (
	"math"
	"strings"

	"gonum.org/v1/plot/font"
	"gonum.org/v1/plot/text"
	"gonum.org/v1/plot/vg"
)

// Handler sets the text of gonum plots with the faces and the markup of this
// package. It embeds gonum's own handler for what needs neither.
type Handler struct{ text.Plain }

var _ text.Handler = Handler{}

// NewHandler returns a Handler.
func NewHandler() Handler { return Handler{text.Plain{Fonts: cache()}} }

// Box returns the size of a line of text.
func (h Handler) Box(txt string, fnt font.Font) (w, height, depth vg.Length) {
	_, height, depth = h.Plain.Box("", fnt)
	return width(fnt, txt), height, depth
}

// Draw draws text as gonum's own handler does, markup included.
func (h Handler) Draw(c vg.Canvas, txt string, sty text.Style, pt vg.Point) {
	txt = strings.TrimRight(txt, "\n")
	if txt == "" {
		return
	}
	c.SetColor(sty.Color)
	if sty.Rotation != 0 {
		c.Push()
		defer c.Pop()
		c.Rotate(sty.Rotation)
	}
	sin64, cos64 := math.Sincos(sty.Rotation)
	cos, sin := vg.Length(cos64), vg.Length(sin64)
	pt.X, pt.Y = pt.Y*sin+pt.X*cos, pt.Y*cos-pt.X*sin
	pt.Y += sty.Height(txt)*vg.Length(sty.YAlign) - h.Extents(sty.Font).Ascent
	lines := h.Lines(txt)
	for i, line := range lines {
		dx := vg.Length(sty.XAlign) * width(sty.Font, line)
		dy := vg.Length(len(lines)-i) * sty.Font.Size
		draw(c, sty.Font, pt.Add(vg.Point{X: dx, Y: dy}), line)
	}
}
