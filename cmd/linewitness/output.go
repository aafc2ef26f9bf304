package main

import (
	"bytes"
	"context"
	"errors"
	"fmt"
	"math/rand/v2"
	"os"
	"path/filepath"

	"linewitness/report"
	"linewitness/report/data"
	"linewitness/sim/record"
)

// The output formats.
const (
	formatPDF  = "pdf"
	formatJSON = "json"
	formatCSV  = "csv"
)

// suffixes are the ends of the names of the files that a format writes.
var suffixes = map[string][]string{
	formatPDF:  {".pdf"},
	formatJSON: {".json"},
	formatCSV:  {".waveforms.csv", ".envelopes.csv", ".error.csv"},
}

// A product is an output file in memory.
type product struct {
	path    string
	content []byte
}

// products makes the files of a record in the given formats; stem is their
// path without suffix.
func (a *app) products(ctx context.Context, r *record.Record, stem string, formats *choices, opt report.Options) ([]product, error) {
	var out []product
	if formats.has(formatPDF) {
		pdf, err := await(ctx, func() ([]byte, error) {
			var b bytes.Buffer
			err := a.writePDF(&b, r, opt)
			return b.Bytes(), err
		})
		if err != nil {
			return nil, err
		}
		out = append(out, product{stem + ".pdf", pdf})
	}
	if formats.has(formatJSON) {
		text, err := data.JSON(r)
		if err != nil {
			return nil, err
		}
		out = append(out, product{stem + ".json", text})
	}
	if formats.has(formatCSV) {
		files, err := data.CSV(r)
		if err != nil {
			return nil, err
		}
		for _, f := range files {
			out = append(out, product{stem + "." + f.Name + ".csv", f.Data})
		}
	}
	return out, nil
}

// writeProducts writes files whole or not at all: each goes under a temporary
// name in its directory first, and when all are there they get their names.
// No temporary file is left behind, whatever happens.
func writeProducts(ctx context.Context, files []product) error {
	temporary := make([]string, len(files))
	defer func() {
		for _, name := range temporary {
			if name != "" {
				os.Remove(name)
			}
		}
	}()
	for i, f := range files {
		if err := ctx.Err(); err != nil {
			return err
		}
		name, err := writeTemporary(f)
		if err != nil {
			return notWritten(f.path, err)
		}
		temporary[i] = name
	}
	if err := ctx.Err(); err != nil {
		return err
	}
	for i, f := range files {
		if err := os.Rename(temporary[i], f.path); err != nil {
			return notWritten(f.path, err)
		}
		temporary[i] = ""
	}
	return nil
}

// notWritten names the file that could not be written by its own name: the
// temporary one in err says nothing to the user.
func notWritten(path string, err error) error {
	var (
		at   *os.PathError
		link *os.LinkError
	)
	switch {
	case errors.As(err, &at):
		err = at.Err
	case errors.As(err, &link):
		err = link.Err
	}
	return fileError(fmt.Sprintf("write %s: %s", path, err), "")
}

// wrote says which files were written, unless what is on stdout is JSON.
func (a *app) wrote(files []product, asJSON bool) {
	if asJSON || len(files) == 0 {
		return
	}
	fmt.Fprintln(a.stdout)
	for _, f := range files {
		fmt.Fprintln(a.stdout, "wrote", f.path)
	}
}

// writeTemporary writes a file under a temporary name beside its own. It does
// not use os.CreateTemp, whose files only their owner can read.
func writeTemporary(p product) (name string, err error) {
	dir, base := filepath.Split(p.path)
	name = filepath.Join(dir, fmt.Sprintf(".%s.%016x.tmp", base, rand.Uint64()))
	f, err := os.OpenFile(name, os.O_WRONLY|os.O_CREATE|os.O_EXCL, 0o666)
	if err != nil {
		return "", err
	}
	_, err = f.Write(p.content)
	err = errors.Join(err, f.Sync(), f.Close())
	if err != nil {
		os.Remove(name)
		return "", err
	}
	return name, nil
}
