package typeset

import (
	"sync"

	stdfont "golang.org/x/image/font"
	"golang.org/x/image/font/opentype"
	"golang.org/x/image/font/sfnt"
	"golang.org/x/image/math/fixed"
	"gonum.org/v1/plot/font"
	"gonum.org/v1/plot/vg"
)

// metrics remembers the advances and kernings of one face, for a document
// measures the same characters over and over, and gonum's Width makes a
// buffer of half a kilobyte for each text.
type metrics struct {
	mu       sync.Mutex
	font     *opentype.Font
	buf      sfnt.Buffer
	glyphs   map[rune]sfnt.GlyphIndex
	advances map[sfnt.GlyphIndex]fixed.Int26_6
	kerns    map[[2]sfnt.GlyphIndex]fixed.Int26_6
}

// measured holds the metrics by font, without its size.
var measured sync.Map

func metricsOf(f font.Font) *metrics {
	f.Size = 0
	if m, known := measured.Load(f); known {
		return m.(*metrics)
	}
	m, _ := measured.LoadOrStore(f, &metrics{
		font:     cache().Lookup(f, 1).Face,
		glyphs:   map[rune]sfnt.GlyphIndex{},
		advances: map[sfnt.GlyphIndex]fixed.Int26_6{},
		kerns:    map[[2]sfnt.GlyphIndex]fixed.Int26_6{},
	})
	return m.(*metrics)
}

// width returns the width of s at a size, kerned as the canvas draws it.
func (m *metrics) width(s string, size vg.Length) vg.Length {
	m.mu.Lock()
	defer m.mu.Unlock()
	var units fixed.Int26_6
	var previous sfnt.GlyphIndex
	for i, r := range s {
		g := m.glyph(r)
		if i > 0 {
			units += m.kern(previous, g)
		}
		units += m.advance(g)
		previous = g
	}
	return size * vg.Length(float64(units)/float64(m.font.UnitsPerEm()))
}

// glyph returns the glyph of r. A character without one is measured as the
// font's sign for it; drawing it is an error.
func (m *metrics) glyph(r rune) sfnt.GlyphIndex {
	if r == '\u00a0' {
		r = ' '
	}
	g, known := m.glyphs[r]
	if !known {
		g, _ = m.font.GlyphIndex(&m.buf, r)
		m.glyphs[r] = g
	}
	return g
}

func (m *metrics) advance(g sfnt.GlyphIndex) fixed.Int26_6 {
	a, known := m.advances[g]
	if !known {
		// A built-in font has an advance for each of its glyphs.
		a, _ = m.font.GlyphAdvance(&m.buf, g, fixed.Int26_6(m.font.UnitsPerEm()), stdfont.HintingNone)
		m.advances[g] = a
	}
	return a
}

func (m *metrics) kern(a, b sfnt.GlyphIndex) fixed.Int26_6 {
	pair := [2]sfnt.GlyphIndex{a, b}
	k, known := m.kerns[pair]
	if !known {
		// An error means that the font has no kerning for the pair.
		k, _ = m.font.Kern(&m.buf, a, b, fixed.Int26_6(m.font.UnitsPerEm()), stdfont.HintingNone)
		m.kerns[pair] = k
	}
	return k
}
