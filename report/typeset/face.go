package typeset

import (
	"sync"

	"codeberg.org/go-fonts/liberation/liberationmonoregular"
	"codeberg.org/go-fonts/liberation/liberationsansbold"
	"codeberg.org/go-fonts/liberation/liberationsansitalic"
	"codeberg.org/go-fonts/liberation/liberationsansregular"
	stdfont "golang.org/x/image/font"
	"golang.org/x/image/font/opentype"
	"golang.org/x/image/font/sfnt"
	"gonum.org/v1/plot/font"
	"gonum.org/v1/plot/vg"
)

// A Face is one of the faces of the document.
type Face int

// The faces.
const (
	Sans Face = iota
	Bold
	Italic
	Mono
)

var (
	fonts = [...]font.Font{
		Sans:   {Typeface: "Liberation", Variant: "Sans"},
		Bold:   {Typeface: "Liberation", Variant: "Sans", Weight: stdfont.WeightBold},
		Italic: {Typeface: "Liberation", Variant: "Sans", Style: stdfont.StyleItalic},
		Mono:   {Typeface: "Liberation", Variant: "Mono"},
	}
	programs = [...][]byte{
		Sans:   liberationsansregular.TTF,
		Bold:   liberationsansbold.TTF,
		Italic: liberationsansitalic.TTF,
		Mono:   liberationmonoregular.TTF,
	}
)

// cache holds the parsed faces, once for the process.
var cache = sync.OnceValue(func() *font.Cache {
	var coll font.Collection
	for i, program := range programs {
		f, err := opentype.Parse(program)
		if err != nil {
			panic("typeset: a built-in font does not parse")
		}
		coll = append(coll, font.Face{Font: fonts[i], Face: f})
	}
	return font.NewCache(coll)
})

// Font returns the gonum font of f at a size in points.
func (f Face) Font(size float64) font.Font { return font.From(fonts[f], vg.Points(size)) }

// Face returns the gonum face of f at a size in points.
func (f Face) Face(size float64) font.Face { return cache().Lookup(fonts[f], vg.Points(size)) }

// Has reports whether f has a glyph for r that the document can hold.
func (f Face) Has(r rune) bool {
	var buf sfnt.Buffer
	g, err := f.Face(1).Face.GlyphIndex(&buf, r)
	return err == nil && g != 0 && r <= 0xFFFF
}
