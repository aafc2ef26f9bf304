package sheet

import (
	"io"
	"time"

	"github.com/jung-kurt/gofpdf"
	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
	"linewitness/report/canvas"
	"linewitness/report/typeset"
)

// Meta is what every page says about its document.
type Meta struct {
	Header           string // at the head of the page
	Number, Revision string // at its foot
}

// A Book is a document being laid out.
type Book struct {
	pdf   *gofpdf.Fpdf
	fonts *canvas.Fonts
	cv    *canvas.Canvas // of the page in work
	paper Paper
	meta  Meta
	y     float64 // upper edge of the free room on the page
	gap   float64 // room to leave before the next block on the page
	err   error

	headings    []heading // that wait for the block below them
	entries     []entry   // the headings so far
	contents    int       // the page for the list of them; 0 if there is none
	contentsTop float64   // the upper edge of its room
	feet        []Foot
	floats      []floated
	landing     bool // a piece that waited is being drawn
	headed      bool // the last block on the page is a heading

	// Overfull counts the pieces of text that are wider than the room given
	// to them. It stays 0; tests look at it.
	Overfull int
}

// New returns a book with one empty page.
func New(meta Meta, paper Paper) *Book {
	pdf := gofpdf.NewCustom(&gofpdf.InitType{
		OrientationStr: "P", UnitStr: "pt",
		Size: gofpdf.SizeType{Wd: paper.Width, Ht: paper.Height},
	})
	pdf.SetAutoPageBreak(false, 0)
	pdf.SetMargins(0, 0, 0)
	pdf.SetCatalogSort(true)                   // else the order of objects is random
	pdf.SetCreationDate(time.Unix(0, 0).UTC()) // else it is the clock's
	pdf.SetModificationDate(time.Unix(0, 0).UTC())
	b := &Book{pdf: pdf, fonts: canvas.NewFonts(pdf), paper: paper, meta: meta}
	// The outline is encoded as the current font is.
	b.fail(b.fonts.Use(typeset.Sans.Face(10)))
	b.NewPage()
	return b
}

// NewPage ends the page in work and begins another.
func (b *Book) NewPage() {
	b.endPage()
	b.pdf.AddPage()
	b.cv = canvas.New(b.pdf, b.fonts, 0, 0, b.paper.Width, b.paper.Height)
	b.y, b.gap = b.paper.Height-marginTop, 0
}

// close ends the last page.
func (b *Book) close() {
	if len(b.headings) > 0 {
		b.put(0)
	}
	b.land(0, 0)
	b.endPage()
}

func (b *Book) endPage() {
	if b.cv != nil {
		b.feet = append(b.feet, Foot{Left: b.y - marginBottom, Headed: b.headed})
		b.fail(b.cv.Close())
		b.cv = nil
	}
}

// Width returns the width of the text area.
func (b *Book) Width() float64 { return b.paper.Width - marginLeft - marginRight }

// Body returns the height of the text area.
func (b *Book) Body() float64 { return b.paper.Height - marginTop - marginBottom }

// Room returns the height that is left on the page in work.
func (b *Book) Room() float64 { return b.y - b.gap - b.waiting() - marginBottom }

// Fresh reports whether nothing is on the page yet.
func (b *Book) Fresh() bool { return b.y == b.paper.Height-marginTop }

// Need begins a new page unless the page in work has room for a block of
// height h.
func (b *Book) Need(h float64) {
	if len(b.headings) > 0 {
		b.put(h)
		return
	}
	if b.Room() < h && !b.Fresh() {
		b.NewPage()
	}
}

// Space asks for room above the next block, unless it comes first on its page.
func (b *Book) Space(h float64) {
	if !b.Fresh() {
		b.gap = max(b.gap, h)
	}
}

// Block takes a block of height h over the full width, on a new page if need
// be, and lets paint draw on it.
func (b *Book) Block(h float64, paint func(draw.Canvas)) {
	b.Need(h)
	b.y -= b.gap
	b.gap, b.headed = 0, false
	paint(draw.Canvas{Canvas: b.cv, Rectangle: vg.Rectangle{
		Min: vg.Point{X: vg.Points(marginLeft), Y: vg.Points(b.y - h)},
		Max: vg.Point{X: vg.Points(b.paper.Width - marginRight), Y: vg.Points(b.y)},
	}})
	b.y -= h
}

func (b *Book) fail(err error) {
	if b.err == nil && err != nil {
		b.err = err
	}
}

// Pages returns the number of pages so far.
func (b *Book) Pages() int { return b.pdf.PageCount() }

// Write draws the headers and footers and writes the document to w, without
// properties: what it says about itself, and the form in which it is kept, are the
// business of package archive. The book cannot be used after it.
func (b *Book) Write(w io.Writer) error {
	b.close()
	b.listContents()
	total := b.pdf.PageCount()
	for page := 1; page <= total; page++ {
		b.pdf.SetPage(page)
		b.running(page, total)
	}
	b.fail(b.fonts.Close())
	if b.err != nil {
		return b.err
	}
	return b.pdf.Output(w)
}
