package main

import (
	"bytes"
	"os"
	"path/filepath"
	"strings"

	"github.com/pdfcpu/pdfcpu/pkg/api"
	"github.com/rogpeppe/go-internal/testscript"

	"linewitness/report/archive"
	"linewitness/report/sheet"
)

// The scripts do to records what others may do to them.

// detach RECORD NAME takes an attached file out of a record.
func detach(ts *testscript.TestScript, neg bool, args []string) {
	if neg || len(args) != 2 {
		ts.Fatalf("usage: detach RECORD NAME")
	}
	api.DisableConfigDir()
	ts.Check(api.RemoveAttachmentsFile(ts.MkAbs(args[0]), "", args[1:], nil))
}

// swap RECORD NAME FROM TO changes a text in an attached file and leaves the
// manifest as it was.
func swap(ts *testscript.TestScript, neg bool, args []string) {
	if neg || len(args) != 4 {
		ts.Fatalf("usage: swap RECORD NAME FROM TO")
	}
	path := ts.MkAbs(args[0])
	f := opened(ts, path)
	a, err := f.Attachment(args[1])
	ts.Check(err)
	api.DisableConfigDir()
	ts.Check(api.RemoveAttachmentsFile(path, "", args[1:2], nil))
	changed := filepath.Join(ts.Getenv("WORK"), "swapped", args[1])
	ts.Check(os.MkdirAll(filepath.Dir(changed), 0o777))
	ts.Check(os.WriteFile(changed, exchanged(ts, a.Data, args[2], args[3]), 0o666))
	ts.Check(api.AddAttachmentsFile(path, "", []string{changed}, false, nil))
}

// forge RECORD NEW NAME FROM TO makes a new record with a text in an attached
// file changed, and with a manifest that says so.
func forge(ts *testscript.TestScript, neg bool, args []string) {
	if neg || len(args) != 5 {
		ts.Fatalf("usage: forge RECORD NEW NAME FROM TO")
	}
	files := opened(ts, ts.MkAbs(args[0])).Attachments()
	for i := range files {
		if files[i].Name == args[2] {
			files[i].Data = exchanged(ts, files[i].Data, args[3], args[4])
		}
	}
	b := sheet.New(sheet.Meta{}, sheet.A4)
	b.Paragraph("A page.")
	var page bytes.Buffer
	ts.Check(b.Write(&page))
	record, err := archive.Finish(page.Bytes(), archive.Meta{Title: "Forged", Creator: "linewitness test", Version: "test"}, files)
	ts.Check(err)
	ts.Check(os.WriteFile(ts.MkAbs(args[1]), record, 0o666))
}

func opened(ts *testscript.TestScript, path string) *archive.File {
	text, err := os.ReadFile(path)
	ts.Check(err)
	f, err := archive.Open(text)
	ts.Check(err)
	return f
}

func exchanged(ts *testscript.TestScript, text []byte, from, to string) []byte {
	if !bytes.Contains(text, []byte(from)) {
		ts.Fatalf("there is no %q to change", from)
	}
	return []byte(strings.Replace(string(text), from, to, 1))
}
