package canvas

import (
	"fmt"
	"strconv"

	"golang.org/x/image/font/sfnt"
	"gonum.org/v1/plot/font"
	"gonum.org/v1/plot/vg"
)

// A GlyphError says that a font has no glyph for a character of a text.
type GlyphError struct {
	Font string
	Rune rune
	Text string // the text that holds it
}

func (e *GlyphError) Error() string {
	return fmt.Sprintf("font %s has no glyph for %q (%U), in %q", e.Font, e.Rune, e.Rune, e.Text)
}

// noBreak is drawn as a space: it matters to the breaking of lines only, and
// who searches the document will type a space.
const noBreak = '\u00a0'

// FillString draws one line of text with its baseline starting at pt, kerned
// as font.Face.Width measures it; without the kerning a right-aligned label
// can be off by a tenth of its width.
func (c *Canvas) FillString(fc font.Face, pt vg.Point, s string) {
	if fc.Font.Size == 0 || s == "" || c.st.clr.A == 0 {
		return
	}
	if !finite(pt) {
		c.fail("the text %q has a coordinate that is not finite", s)
		return
	}
	embedded, err := c.fonts.face(fc)
	if err != nil {
		c.fail("%w", err)
		return
	}
	b := c.out.AvailableBuffer()
	b = append(append(append(b, "BT /"...), embedded.resource...), ' ')
	b = append(number(b, fc.Font.Size.Points(), 2), " Tf "...)
	b = append(number(b, pt.X.Points(), 2), ' ')
	b = append(number(b, pt.Y.Points(), 2), " Td [<"...)
	b = c.glyphs(b, embedded, fc, s)
	c.out.Write(append(b, ">] TJ ET\n"...))
}

// glyphs appends the characters of s in hexadecimal, with the kerning between
// them in thousandths of the font size.
func (c *Canvas) glyphs(b []byte, embedded *face, fc font.Face, s string) []byte {
	var previous sfnt.GlyphIndex
	perEm := float64(fc.Face.UnitsPerEm())
	for _, r := range s {
		if r == noBreak {
			r = ' '
		}
		g := embedded.glyph(fc.Face, r)
		if g == 0 {
			c.fail("%w", &GlyphError{Font: fc.Name(), Rune: r, Text: s})
			continue
		}
		if k := embedded.kern(fc.Face, previous, g); previous != 0 && k != 0 {
			b = append(number(append(b, '>'), -1000*float64(k)/perEm, 1), '<')
		}
		b = append(b, hex4(r)...)
		previous = g
	}
	return b
}

func hex4(r rune) string {
	const width = 1 << 16 // sets the leading zeros
	return strconv.FormatUint(uint64(width|r), 16)[1:]
}
