package main

import (
	"context"
	"io"
	"os"
	"path/filepath"
	"testing"
)

// A file that cannot be written leaves the others unwritten, and what was
// there before as it was.
func TestWriteProductsAllOrNone(t *testing.T) {
	dir := t.TempDir()
	first := filepath.Join(dir, "a.json")
	if err := os.WriteFile(first, []byte("old"), 0o666); err != nil {
		t.Fatal(err)
	}
	err := writeProducts(context.Background(), []product{
		{first, []byte("new")}, {filepath.Join(dir, "missing", "a.pdf"), []byte("x")},
	})
	if got := newApp(nil, io.Discard, io.Discard).explain(err); err == nil || got != statusFile {
		t.Errorf("error %v has status %d, want %d", err, got, statusFile)
	}
	if got, err := os.ReadFile(first); err != nil || string(got) != "old" {
		t.Errorf("a.json is %q (error %v), want it as it was", got, err)
	}
	if entries, _ := os.ReadDir(dir); len(entries) != 1 {
		t.Errorf("files %v, want a.json alone", entries)
	}
}

func TestWriteProducts(t *testing.T) {
	dir := t.TempDir()
	path := filepath.Join(dir, "a.json")
	for _, content := range []string{"first", "second"} { // the second replaces the first
		if err := writeProducts(context.Background(), []product{{path, []byte(content)}}); err != nil {
			t.Fatal(err)
		}
		if got, err := os.ReadFile(path); err != nil || string(got) != content {
			t.Errorf("a.json is %q (error %v), want %q", got, err, content)
		}
	}
	if entries, _ := os.ReadDir(dir); len(entries) != 1 {
		t.Errorf("files %v, want a.json alone", entries)
	}
}
