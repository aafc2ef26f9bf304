package canvas

import (
	"bytes"
	"fmt"
	"maps"
	"regexp"
	"slices"

	"github.com/jung-kurt/gofpdf"
	stdfont "golang.org/x/image/font"
	"golang.org/x/image/font/sfnt"
	"golang.org/x/image/math/fixed"
	"gonum.org/v1/plot/font"
)

// Fonts are the embedded fonts of one document, shared by its canvases. Only
// the glyphs that were drawn go into the file.
type Fonts struct {
	pdf   *gofpdf.Fpdf
	faces map[string]*face
}

// face is one embedded font and what was drawn with it.
type face struct {
	family, style string
	resource      string // its name on the page
	glyphs        map[rune]sfnt.GlyphIndex
	kerns         map[[2]sfnt.GlyphIndex]fixed.Int26_6
	buf           sfnt.Buffer
}

// NewFonts returns the fonts of pdf, none yet.
func NewFonts(pdf *gofpdf.Fpdf) *Fonts {
	return &Fonts{pdf: pdf, faces: map[string]*face{}}
}

// Close tells the document which glyphs each font needs. Call it once, after
// the last canvas is closed and before the document is written.
func (f *Fonts) Close() error {
	for _, key := range slices.Sorted(maps.Keys(f.faces)) {
		f.register(f.faces[key])
	}
	return f.pdf.Error()
}

// register "prints" the characters into a template that is never used: the
// template shares the document's record of used characters.
func (f *Fonts) register(fc *face) {
	used := slices.Sorted(maps.Keys(fc.glyphs))
	f.pdf.CreateTemplate(func(t *gofpdf.Tpl) {
		t.SetFont(fc.family, fc.style, 10)
		t.Text(0, 0, string(used))
	})
}

// Use makes fc the current font of the document, for what gofpdf itself
// encodes as the current font is: the outline.
func (f *Fonts) Use(fc font.Face) error {
	known, err := f.face(fc)
	if err != nil {
		return err
	}
	f.pdf.SetFont(known.family, known.style, fc.Font.Size.Points())
	return f.pdf.Error()
}

// Style returns the family and style under which a gonum font is known to the
// document.
func Style(f font.Font) (family, style string) {
	if f.Weight >= stdfont.WeightSemiBold {
		style = "B"
	}
	if f.Style != stdfont.StyleNormal {
		style += "I"
	}
	return string(f.Typeface) + string(f.Variant), style
}

var resourceName = regexp.MustCompile(`/(F[0-9a-zA-Z]+) [0-9.]+ Tf ET\s*$`)

// face returns the embedded form of fc, embedding it at its first use.
func (f *Fonts) face(fc font.Face) (*face, error) {
	family, style := Style(fc.Font)
	if known := f.faces[family+" "+style]; known != nil {
		return known, nil
	}
	var ttf bytes.Buffer
	if _, err := fc.Face.WriteSourceTo(nil, &ttf); err != nil {
		return nil, fmt.Errorf("font %s: %w", fc.Name(), err)
	}
	f.pdf.AddUTF8FontFromBytes(family, style, ttf.Bytes())
	t := f.pdf.CreateTemplate(func(t *gofpdf.Tpl) { t.SetFont(family, style, 10) })
	m := resourceName.FindSubmatch(t.Bytes())
	if m == nil {
		return nil, fmt.Errorf("font %s %s: no resource name", family, style)
	}
	added := &face{
		family: family, style: style, resource: string(m[1]),
		glyphs: map[rune]sfnt.GlyphIndex{}, kerns: map[[2]sfnt.GlyphIndex]fixed.Int26_6{},
	}
	f.faces[family+" "+style] = added
	return added, nil
}

// glyph returns the glyph of r, or 0 if the font or the document has none.
func (fc *face) glyph(f *sfnt.Font, r rune) sfnt.GlyphIndex {
	if g, known := fc.glyphs[r]; known {
		return g
	}
	g, err := f.GlyphIndex(&fc.buf, r)
	if err != nil || g == 0 || r > 0xFFFF {
		return 0
	}
	fc.glyphs[r] = g
	return g
}

// kern returns the kerning between two glyphs in font units.
func (fc *face) kern(f *sfnt.Font, a, b sfnt.GlyphIndex) fixed.Int26_6 {
	pair := [2]sfnt.GlyphIndex{a, b}
	k, known := fc.kerns[pair]
	if !known {
		// An error means that the font has no kerning for the pair.
		k, _ = f.Kern(&fc.buf, a, b, fixed.Int26_6(f.UnitsPerEm()), stdfont.HintingNone)
		fc.kerns[pair] = k
	}
	return k
}
