package canvas

import (
	"bytes"
	"errors"
	"fmt"
	"image/color"
	"math"

	"github.com/jung-kurt/gofpdf"
	"gonum.org/v1/plot/vg"
)

// opaque is the blend mode that gofpdf calls for by name.
const opaque = "Normal"

// state is what Push saves; q and Q save the same on the page.
type state struct {
	clr   color.NRGBA
	width vg.Length
	alpha float64 // opacity in force on the page
}

// Canvas implements vg.CanvasSizer on a rectangle of the current page.
type Canvas struct {
	pdf    *gofpdf.Fpdf
	fonts  *Fonts
	k, hPt float64 // points in a user unit, height of the page in points
	w, h   vg.Length
	st     state
	stack  []state
	out    bytes.Buffer
	err    error

	alpha0 float64 // what GetAlpha answered before
	mode0  string
	faded  bool // SetAlpha was used
}

var _ vg.CanvasSizer = (*Canvas)(nil)

// New starts a canvas on the current page of pdf with its upper-left corner
// at (x, y) and the size w by h, all in the document's user unit, and clips
// to it. fonts must belong to the same document.
func New(pdf *gofpdf.Fpdf, fonts *Fonts, x, y, w, h float64) *Canvas {
	k := pdf.GetConversionRatio()
	_, pageHeight := pdf.GetPageSize()
	c := &Canvas{
		pdf: pdf, fonts: fonts, k: k, hPt: pageHeight * k,
		w: vg.Points(w * k), h: vg.Points(h * k),
	}
	c.alpha0, c.mode0 = pdf.GetAlpha()
	c.st = state{clr: color.NRGBA{A: 255}, width: 1, alpha: 1}
	c.ops("q")
	c.ops("1 0 0 1", exact(x*k), exact(c.hPt-(y+h)*k), "cm")
	c.ops("0 0", fine(w*k), fine(h*k), "re W n")
	c.ops("1 j 0 J") // round joins: no miter spikes on noisy curves
	vg.Initialize(c)
	return c
}

// Close ends the canvas and returns the first error met on it. The state of
// the document is as it was before New.
func (c *Canvas) Close() error {
	for len(c.stack) > 0 {
		c.Pop()
	}
	c.ops("Q")
	c.flush()
	if c.faded { // Q restored the page; this restores GetAlpha's answer
		c.pdf.SetAlpha(c.alpha0, c.mode0)
	}
	return errors.Join(c.err, c.pdf.Error())
}

// Size returns the size of the canvas.
func (c *Canvas) Size() (w, h vg.Length) { return c.w, c.h }

// SetLineWidth sets the width of stroked paths; at 0 nothing is stroked.
func (c *Canvas) SetLineWidth(w vg.Length) {
	c.st.width = w
	if w > 0 {
		c.ops(fine(w.Points()), "w")
	}
}

// SetLineDash sets the dash pattern. A pattern of no length means a solid
// line; the page format would call it an error.
func (c *Canvas) SetLineDash(pattern []vg.Length, offset vg.Length) {
	b, sum := []byte("["), vg.Length(0)
	for i, d := range pattern {
		if i > 0 {
			b = append(b, ' ')
		}
		b = number(b, d.Points(), 2)
		sum += d
	}
	if sum <= 0 {
		b, offset = b[:1], 0
	}
	c.ops(string(b)+"]", fine(offset.Points()), "d")
}

// SetColor sets the colour of strokes, fills and text.
func (c *Canvas) SetColor(clr color.Color) {
	if clr == nil {
		clr = color.Black
	}
	// Colours may come with their opacity multiplied in; the page wants
	// them straight.
	c.st.clr = color.NRGBAModel.Convert(clr).(color.NRGBA)
	s := channel(c.st.clr.R) + " " + channel(c.st.clr.G) + " " + channel(c.st.clr.B)
	c.ops(s, "rg", s, "RG")
	c.setAlpha(math.Round(float64(c.st.clr.A)/255*1000) / 1000)
}

// setAlpha goes through gofpdf, which owns the table of opacities.
func (c *Canvas) setAlpha(a float64) {
	if a == c.st.alpha {
		return
	}
	c.flush()
	c.pdf.SetAlpha(a, opaque)
	c.st.alpha, c.faded = a, true
}

// Rotate turns the coordinates by r radians, counter-clockwise.
func (c *Canvas) Rotate(r float64) {
	s, co := math.Sincos(r)
	c.ops(precise(co), precise(s), precise(-s), precise(co), "0 0 cm")
}

// Translate moves the origin to p.
func (c *Canvas) Translate(p vg.Point) {
	c.ops("1 0 0 1", exact(p.X.Points()), exact(p.Y.Points()), "cm")
}

// Scale scales the coordinates.
func (c *Canvas) Scale(x, y float64) { c.ops(precise(x), "0 0", precise(y), "0 0 cm") }

// Push saves the state of the canvas.
func (c *Canvas) Push() {
	c.stack = append(c.stack, c.st)
	c.ops("q")
}

// Pop restores the state that the last Push saved.
func (c *Canvas) Pop() {
	if len(c.stack) == 0 {
		panic("canvas: Pop without Push")
	}
	c.st = c.stack[len(c.stack)-1]
	c.stack = c.stack[:len(c.stack)-1]
	c.ops("Q")
}

func (c *Canvas) fail(format string, a ...any) {
	if c.err == nil {
		c.err = fmt.Errorf("canvas: "+format, a...)
	}
}

// ops writes one line of operands and operator.
func (c *Canvas) ops(parts ...string) {
	for i, p := range parts {
		if i > 0 {
			c.out.WriteByte(' ')
		}
		c.out.WriteString(p)
	}
	c.out.WriteByte('\n')
}

// flush hands what was written to the page. It must run before any call by
// which gofpdf itself writes to the page.
func (c *Canvas) flush() {
	if c.out.Len() > 0 {
		c.out.Truncate(c.out.Len() - 1) // RawWriteStr ends the line
		c.pdf.RawWriteStr(c.out.String())
		c.out.Reset()
	}
}
