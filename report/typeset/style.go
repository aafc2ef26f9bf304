package typeset

import (
	"image/color"

	"gonum.org/v1/plot/vg"
)

// A Style is how a text is set.
type Style struct {
	Face  Face
	Size  float64 // points
	Color color.Color
}

// Align is where the given point lies on the text.
type Align float64

// The alignments.
const (
	Left   Align = 0
	Center Align = 0.5
	Right  Align = 1
)

// Width returns the width of s in points.
func (st Style) Width(s string) float64 { return width(st.Face.Font(st.Size), s).Points() }

// Draw draws one line of text with its baseline at y and returns its width.
func (st Style) Draw(c vg.Canvas, x, y float64, s string, align Align) float64 {
	w := st.Width(s)
	c.SetColor(st.Color)
	draw(c, st.Face.Font(st.Size), vg.Point{X: vg.Points(x - float64(align)*w), Y: vg.Points(y)}, s)
	return w
}

// In returns the style in another face.
func (st Style) In(f Face) Style { st.Face = f; return st }

// At returns the style in another size.
func (st Style) At(size float64) Style { st.Size = size; return st }

// Of returns the style in another colour.
func (st Style) Of(c color.Color) Style { st.Color = c; return st }
