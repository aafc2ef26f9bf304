package archive

import (
	"bytes"
	"image"
	"image/color"
	"image/png"
	"sync"
	"testing"
	"time"

	"codeberg.org/go-fonts/liberation/liberationsansbold"
	"codeberg.org/go-fonts/liberation/liberationsansregular"
	"github.com/jung-kurt/gofpdf"

	"linewitness/report/archive/internal/syntax"
)

// needles are the texts of the pages of the sample.
var needles = []string{"Ω ≤ −3 dB, β·ℓ = 90°", "Second page, µ and Γ", "Third page"}

// pages is the sample as gofpdf writes it, laid out once.
func pages(tb testing.TB) []byte {
	tb.Helper()
	layOnce.Do(func() { laidOut = layOut(tb) })
	return bytes.Clone(laidOut)
}

var (
	layOnce sync.Once
	laidOut []byte
)

// layOut makes a document of gofpdf: three pages, two fonts, an outline of
// two levels, a link, two images of the same width, a half transparent area.
func layOut(tb testing.TB) []byte {
	tb.Helper()
	f := gofpdf.New("P", "mm", "A4", "")
	f.SetCatalogSort(true)
	f.SetCreationDate(time.Unix(0, 0))
	f.SetModificationDate(time.Unix(0, 0))
	f.AddUTF8FontFromBytes("LiberationSans", "", liberationsansregular.TTF)
	f.AddUTF8FontFromBytes("LiberationSans", "B", liberationsansbold.TTF)
	f.SetFont("LiberationSans", "", 12)
	f.AddPage()
	f.Bookmark("Erste Prüfung", 0, 0)
	f.Text(20, 30, needles[0])
	to := f.AddLink()
	f.Link(20, 20, 30, 10, to)
	f.AddPage()
	f.SetLink(to, 0, 2)
	f.Bookmark("Case one", 0, 0)
	f.Bookmark("Waveforms", 1, 20)
	f.Bookmark("Envelopes", 1, 40)
	f.SetFont("LiberationSans", "B", 12)
	f.Text(20, 30, needles[1])
	f.SetAlpha(0.5, "Normal")
	f.Rect(20, 40, 30, 10, "F")
	for i, name := range []string{"one", "two"} {
		f.RegisterImageOptionsReader(name, gofpdf.ImageOptions{ImageType: "png"}, bytes.NewReader(picture(tb, i)))
		f.Image(name, 20, 60+40*float64(i), 20, 0, false, "", 0, "")
	}
	f.AddPage()
	f.Bookmark("Listing", 0, 0)
	f.Text(20, 30, needles[2])
	var b bytes.Buffer
	if err := f.Output(&b); err != nil {
		tb.Fatal(err)
	}
	return b.Bytes()
}

func picture(tb testing.TB, shade int) []byte {
	tb.Helper()
	im := image.NewNRGBA(image.Rect(0, 0, 8, 4+4*shade))
	im.Set(2, 2, color.NRGBA{200, 60, 0, 255})
	var b bytes.Buffer
	if err := png.Encode(&b, im); err != nil {
		tb.Fatal(err)
	}
	return b.Bytes()
}

// meta is what the sample says of itself, with what needs care in PDF and in XML.
func meta() Meta {
	return Meta{
		Title: `Feeder (50 Ω) & "stub" <2>`, Author: "R. Prüfer", Subject: "A purpose\nof two lines", Keywords: "DR-1, revision B",
		Creator: "linewitness v1", Producer: "linewitness v1, go", Version: "v1", Lang: "en-GB",
		Created: time.Date(2026, time.May, 14, 0, 0, 0, 0, time.UTC),
	}
}

// files are attachments of every role. Two names are the same in ASCII.
func files() []Attachment {
	noise := make([]byte, 3000)
	for i := range noise {
		noise[i] = byte(i * i >> 3)
	}
	return []Attachment{
		{"feeder.yaml", Design, Source, "application/yaml", "the design file", []byte("format: 1\r\n\xff\x00\x80")},
		{"data/Prüfung Ω.s1p", Input, Source, "text/plain", "read by the design file", noise},
		{"data/Pr_fung _.s1p", Input, Source, "text/plain", "read by the design file", nil},
		{"feeder.json", Result, Data, "application/json", "every figure of the record", []byte(`{"format": 1}`)},
		{"feeder.error.csv", Table, Data, "text/csv", "samples: error", bytes.Repeat([]byte("1,2,3\r\n"), 20000)},
	}
}

// finished is the sample in its final form.
func finished(tb testing.TB) []byte {
	tb.Helper()
	out, err := Finish(pages(tb), meta(), files())
	if err != nil {
		tb.Fatal(err)
	}
	return out
}

// edited changes a finished document and writes it again.
func edited(tb testing.TB, file []byte, change func(f *syntax.File, catalog syntax.Dict)) []byte {
	tb.Helper()
	f, err := syntax.Parse(file, trusted)
	if err != nil {
		tb.Fatal(err)
	}
	catalog, err := syntax.As[syntax.Dict](f, f.Trailer["Root"])
	if err != nil {
		tb.Fatal(err)
	}
	change(f, catalog)
	out, err := f.Bytes(func([]byte) []byte { return []byte("edited") })
	if err != nil {
		tb.Fatal(err)
	}
	return out
}
