package report

import (
	"bytes"
	"errors"
	"fmt"
	"io"
	"path"
	"slices"
	"strings"
	"time"

	"linewitness/report/archive"
	"linewitness/report/canvas"
	"linewitness/report/format"
	"linewitness/report/sheet"
	"linewitness/sim/record"
)

// Options steer WritePDF. The zero value is the default.
type Options struct {
	Paper   string // "a4" (the default) or "letter"
	Full    bool   // every case with all its figures and tables, not the nominal alone
	Summary bool   // the cover alone, on one page; the attachments stay
}

// WritePDF writes the record as a PDF document, written to PDF/A-3b, with the
// design, the files it reads and the outcome attached.
//
// It returns an error for an unknown paper, for Full and Summary together, for a text with a character that
// the document's fonts do not have, for a record that cannot be written as JSON
// or CSV, and for a failing w.
func WritePDF(w io.Writer, r *record.Record, opt Options) error {
	d, err := build(r, opt)
	if err != nil {
		return err
	}
	file, err := d.finish(r)
	if err == nil {
		_, err = w.Write(file)
	}
	return explain(err)
}

// finish brings what was laid out into the form to be kept.
func (d *document) finish(r *record.Record) ([]byte, error) {
	var pages bytes.Buffer
	if err := d.b.Write(&pages); err != nil {
		return nil, err
	}
	return archive.Finish(pages.Bytes(), properties(r), d.files)
}

// build lays out the whole document.
func build(r *record.Record, opt Options) (*document, error) {
	paper, err := opt.paper()
	if err != nil {
		return nil, err
	}
	files, err := attachments(r)
	if err != nil {
		return nil, explain(err)
	}
	d := &document{r: cleaned(r), opt: opt, files: files}
	if opt.Summary {
		d.summary(paper)
		return d, nil
	}
	d.b = sheet.New(meta(d.r), paper)
	d.cover(everything)
	d.b.Contents()
	d.compliance()
	d.sideBySide()
	d.claims()
	d.design()
	for i := range d.r.Cases {
		d.solved(&d.r.Cases[i])
	}
	d.method()
	d.limits()
	d.cautions()
	d.listing()
	return d, nil
}

func (o Options) paper() (sheet.Paper, error) {
	if o.Full && o.Summary {
		return sheet.Paper{}, errors.New("report: a full record and a summary exclude each other")
	}
	switch o.Paper {
	case "", "a4":
		return sheet.A4, nil
	case "letter":
		return sheet.Letter, nil
	}
	return sheet.Paper{}, fmt.Errorf("report: unknown paper %q; known are a4 and letter", o.Paper)
}

// document is a record being laid out.
type document struct {
	r       *record.Record
	opt     Options
	files   []archive.Attachment
	b       *sheet.Book
	figures int
	left    []string // what the case in work leaves out

	pictures []picture // every figure so far, and their names
	taken    map[string]bool
}

// figure returns the label of the next figure.
func (d *document) figure() string {
	d.figures++
	return "Figure " + format.Count(int64(d.figures))
}

// nominal returns the first case, or nil if there is none.
func (d *document) nominal() *record.Case {
	if len(d.r.Cases) == 0 {
		return nil
	}
	return &d.r.Cases[0]
}

func meta(r *record.Record) sheet.Meta {
	return sheet.Meta{Header: title(r), Number: r.Design.Number, Revision: r.Design.Revision}
}

// properties are what the document says about itself to viewers and to systems
// that keep documents.
func properties(r *record.Record) archive.Meta {
	d := r.Design
	creator := "linewitness " + r.Tool.Version
	return archive.Meta{
		Title: title(r), Subject: d.Purpose, Author: d.PreparedBy,
		Keywords: strings.Join(slices.DeleteFunc([]string{d.Number, prefixed("revision ", d.Revision)}, func(s string) bool { return s == "" }), ", "),
		Creator:  creator, Producer: creator + prefixed(", ", r.Tool.Go), Version: r.Tool.Version,
		Lang: "en-GB", Created: date(d.Date),
	}
}

// prefixed is s after a prefix, or nothing if s is.
func prefixed(prefix, s string) string {
	if s == "" {
		return ""
	}
	return prefix + s
}

// title returns the title of the document, or the name of the design file.
func title(r *record.Record) string { return orElse(r.Design.Title, path.Base(r.Design.File)) }

// date reads the date of a record; it is zero if there is none that can be read.
func date(s string) time.Time {
	for _, layout := range []string{time.DateOnly, time.RFC3339, "2 January 2006", "January 2, 2006"} {
		if t, err := time.Parse(layout, s); err == nil {
			return t.UTC()
		}
	}
	return time.Time{}
}

// A SignError is a text of the design that the document's fonts cannot print. It
// is a fault of the design file, not of the file to be written.
type SignError struct {
	Sign rune
	Text string // that has it
}

func (e *SignError) Error() string {
	return fmt.Errorf("report: the document's fonts have no sign for %q (%U), in %q", e.Sign, e.Sign, e.Text).Error()
}

// explain says why a record cannot be printed.
func explain(err error) error {
	var glyph *canvas.GlyphError
	if errors.As(err, &glyph) {
		return &SignError{Sign: glyph.Rune, Text: glyph.Text}
	}
	if err != nil {
		return fmt.Errorf("report: %w", err)
	}
	return nil
}

func orElse(s, instead string) string {
	if s == "" {
		return instead
	}
	return s
}
