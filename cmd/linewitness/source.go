package main

import (
	"bytes"
	"context"
	"errors"
	"io"
	"os"
	"path/filepath"
	"strings"

	"linewitness/report/result"
	"linewitness/sim/design"
)

// maxSource is one byte more than design.Load accepts: enough for it to see
// that a file is too long, and no more of a file without end.
const maxSource = 1<<20 + 1

// standardInput is the argument that stands for it.
const standardInput = "-"

// load reads and checks a design file. It says on stderr what is wrong with
// the design itself.
func (a *app) load(ctx context.Context, path string) (*design.File, error) {
	source, err := await(ctx, func() ([]byte, error) { return a.read(path) })
	if errors.Is(err, context.Canceled) {
		return nil, err
	}
	if err != nil {
		return nil, fileError(err.Error(), "")
	}
	if err := notDesign(displayName(path), source); err != nil {
		return nil, err
	}
	return a.loadFrom(ctx, displayName(path), source, besides(path))
}

// pdfMark is how every PDF file begins.
var pdfMark = []byte("%PDF-")

// notDesign refuses what verify wrote where a design file is due. What a reader of
// designs would say of it, key by key, is of no help.
func notDesign(name string, source []byte) error {
	switch {
	case bytes.HasPrefix(source, pdfMark):
		return usageError(name+": a PDF file, not a design file", `"linewitness recheck" solves the design in a record again`)
	case result.Recognised(source):
		return usageError(name+": a result, not a design file", "give the design file that it was made from")
	}
	return nil
}

// loadFrom checks a design file that is in memory; open gives the files that it
// names.
func (a *app) loadFrom(ctx context.Context, name string, source []byte, open func(string) ([]byte, error)) (*design.File, error) {
	f, err := await(ctx, func() (*design.File, error) { return design.LoadWith(name, source, open) })
	if errors.Is(err, context.Canceled) {
		return nil, err
	}
	var problems design.Diagnostics
	if errors.As(err, &problems) {
		problems.Render(a.stderr, colourful(a.stderr))
		return nil, errStatus(statusUsage)
	}
	return f, err
}

// besides opens the files that a design file names, beside the design file; a
// design from standard input has them beside the working directory.
func besides(path string) func(string) ([]byte, error) {
	folder := "."
	if path != standardInput {
		folder = filepath.Dir(path)
	}
	return func(name string) ([]byte, error) {
		f, err := os.Open(filepath.Join(folder, filepath.FromSlash(name)))
		if err != nil {
			return nil, err
		}
		defer f.Close()
		return io.ReadAll(io.LimitReader(f, maxAttached))
	}
}

// maxAttached bounds a file that a design file names: one byte more than a
// reader of such files accepts.
const maxAttached = 4<<20 + 1

func (a *app) read(path string) ([]byte, error) { return a.readUpTo(path, maxSource) }

// readUpTo reads the first bytes of a file, which are all if it has fewer.
func (a *app) readUpTo(path string, most int64) ([]byte, error) {
	if path == standardInput {
		return io.ReadAll(io.LimitReader(a.stdin, most))
	}
	f, err := os.Open(path)
	if err != nil {
		return nil, err
	}
	defer f.Close()
	return io.ReadAll(io.LimitReader(f, most))
}

func displayName(path string) string {
	if path == standardInput {
		return "stdin"
	}
	return path
}

// outputBase is the name of the output files of a design without extension.
func outputBase(path string) string {
	if path == standardInput {
		return "design"
	}
	name := filepath.Base(path)
	if base := strings.TrimSuffix(name, filepath.Ext(name)); base != "" {
		return base
	}
	return name
}
