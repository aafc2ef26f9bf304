package design

import (
	"os"
	"path/filepath"
	"strings"
	"testing"
)

// mustLoad loads a design that has no problem.
func mustLoad(t testing.TB, name string, src []byte) *File {
	t.Helper()
	f, err := Load(name, src)
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
		mustLoad(t, filepath.Base(file), src)
	}
}
