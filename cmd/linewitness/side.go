package main

import (
	"bytes"
	"context"
	"errors"
	"path/filepath"
	"strings"

	"linewitness/report/archive"
	"linewitness/report/result"
	"linewitness/sim"
	"linewitness/sim/design"
	"linewitness/sim/record"
)

// A side is one of two designs to be compared.
type side struct {
	side   record.Side
	file   *design.File // nil of a result without its design
	result *result.Node // nil until the design is solved
}

// The kinds of files that can be compared.
const (
	designKind = "design file"
	resultKind = "result"
	recordKind = "record"
)

// readSide reads a design file, a result or a record: what it is, the first bytes
// tell. A file that is named as a PDF is one, or damaged.
func (a *app) readSide(ctx context.Context, path string) (*side, error) {
	text, err := await(ctx, func() ([]byte, error) { return a.readUpTo(path, max(archive.MaxSize, result.MaxBytes)+1) })
	if errors.Is(err, context.Canceled) {
		return nil, err
	}
	if err != nil {
		return nil, fileError(err.Error(), "")
	}
	s := &side{side: record.Side{File: filepath.Base(displayName(path))}}
	switch {
	case bytes.HasPrefix(text, pdfMark), strings.EqualFold(filepath.Ext(path), ".pdf"):
		s.side.Kind = recordKind
		return s, a.readRecord(ctx, path, text, s)
	case result.Recognised(text):
		s.side.Kind = resultKind
		n, err := result.Read(text)
		if err != nil {
			return nil, usageError(printable(displayName(path)+": "+err.Error()), "")
		}
		s.set(n)
		return s, nil
	}
	s.side.Kind = designKind
	s.file, err = a.loadFrom(ctx, displayName(path), text, besides(path))
	return s, err
}

// readRecord takes the design and the result out of a record.
func (a *app) readRecord(ctx context.Context, path string, text []byte, s *side) error {
	old, err := await(ctx, func() (*filed, error) { return unpack(path, text) })
	if err != nil {
		return err
	}
	s.set(old.result)
	s.file, err = a.loadFrom(ctx, printable(old.file.Design().Name), old.file.Design().Data, old.attached)
	return err
}

// solveSide solves a design that has no result yet.
func (a *app) solveSide(ctx context.Context, s *side, opt sim.Options) error {
	if s.result != nil {
		return nil
	}
	r, err := a.solve(ctx, s.file, s.side.File, opt)
	if err != nil {
		return err
	}
	n, err := resultOf(r)
	if err == nil {
		s.set(n)
	}
	return err
}

// set takes over a result.
func (s *side) set(n *result.Node) {
	d := n.Get("design")
	s.result = n
	s.side.Title, s.side.Number, s.side.Revision = d.String("title"), d.String("number"), d.String("revision")
	s.side.SHA256, s.side.Version = d.String("sha256"), n.String("tool", "version")
}
