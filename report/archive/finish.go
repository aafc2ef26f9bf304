package archive

import (
	"fmt"
	"math"

	"linewitness/report/archive/internal/syntax"
)

// document is a document of gofpdf on its way to its final form.
type document struct {
	*syntax.File
	catalog syntax.Dict
	meta    Meta
	files   []enclosed
}

// trusted bounds what the document of our own layout may ask for: only mistakes
// reach it.
var trusted = syntax.Limits{
	Bytes: math.MaxInt32, Objects: 1 << 20, Depth: 64, Values: 1 << 26, Inflated: math.MaxInt32, Updates: 1,
}

// Finish returns a document of gofpdf in the form of PDF/A-3b, with files
// attached and a manifest of them. The same arguments give the same bytes.
//
// The document must have a UTF-8 font for all its text and no attachments of
// gofpdf's own. An error says what is wrong with the document or which attachment
// is not fit to be attached.
func Finish(pdf []byte, m Meta, files []Attachment) ([]byte, error) {
	if err := check(files); err != nil {
		return nil, err
	}
	f, err := syntax.Parse(pdf, trusted)
	if err != nil {
		return nil, fault("the document as laid out: %w", err)
	}
	d := &document{File: f, meta: m.cleaned()}
	if d.files, err = d.meta.enclose(files); err != nil {
		return nil, fault("%w", err)
	}
	out, err := d.finish()
	if err != nil {
		return nil, fmt.Errorf("archive: %w", err)
	}
	return out, nil
}

func (d *document) finish() ([]byte, error) {
	var err error
	if d.catalog, err = syntax.As[syntax.Dict](d.File, d.Trailer["Root"]); err != nil {
		return nil, fmt.Errorf("catalog: %w", err)
	}
	for _, step := range []struct {
		what string
		do   func() error
	}{
		{"fonts", d.fonts},
		{"annotations", d.annotations},
		{"streams", d.repack},
		{"outline", d.outline},
		{"attachments", d.attach},
	} {
		if err := step.do(); err != nil {
			return nil, fmt.Errorf("%s: %w", step.what, err)
		}
	}
	d.info()
	metadata := newMetadata()
	d.properties(d.Add(metadata))
	return d.identified(metadata)
}

// repack compresses streams better than gofpdf, which does it for speed.
func (d *document) repack() error {
	return d.Each(func(_ syntax.Ref, v syntax.Value) error {
		if s, ok := v.(*syntax.Stream); ok {
			return d.Repack(s)
		}
		return nil
	})
}
