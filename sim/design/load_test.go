package design

import (
	"io/fs"
	"os"
	"path/filepath"
	"strings"
	"testing"
)

// filesDir holds the files that the designs of the tests refer to.
const filesDir = "testdata/files"

// openIn opens the files of a folder.
func openIn(dir string) func(string) ([]byte, error) {
	return func(path string) ([]byte, error) { return fs.ReadFile(os.DirFS(dir), path) }
}

// mustLoad loads a design that has no problem.
func mustLoad(t testing.TB, name string, src []byte) *File {
	t.Helper()
	return mustLoadIn(t, filesDir, name, src)
}

func mustLoadIn(t testing.TB, dir, name string, src []byte) *File {
	t.Helper()
	f, err := LoadWith(name, src, openIn(dir))
	if ds, ok := err.(Diagnostics); ok {
		var b strings.Builder
		ds.Render(&b, false)
		t.Fatal("\n" + b.String())
	}
	return f
}

func TestDemoDesignsLoad(t *testing.T) {
	files, err := filepath.Glob("../../testdata/designs/*.yaml")
	if err != nil || len(files) == 0 {
		t.Fatal("no designs", err)
	}
	for _, file := range files {
		src, err := os.ReadFile(file)
		if err != nil {
			t.Fatal(err)
		}
		mustLoadIn(t, filepath.Dir(file), filepath.Base(file), src)
	}
}
