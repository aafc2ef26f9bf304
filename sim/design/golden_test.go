package design

import (
	"flag"
	"io/fs"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/google/go-cmp/cmp"
)

var update = flag.Bool("update", false, "rewrite the golden files")

// badFiles are the bad designs, by what is wrong with them: the YAML, the
// structure (which the JSON Schema sees too) or the meaning.
func badFiles(t *testing.T, kind string) (files []string) {
	t.Helper()
	err := filepath.WalkDir(filepath.Join("testdata", "bad", kind), func(path string, d fs.DirEntry, err error) error {
		if filepath.Ext(path) == ".yaml" {
			files = append(files, path)
		}
		return err
	})
	if err != nil || len(files) == 0 {
		t.Fatalf("no bad designs of kind %q: %v", kind, err)
	}
	return files
}

func readFile(t testing.TB, name string) []byte {
	t.Helper()
	b, err := os.ReadFile(name)
	if err != nil {
		t.Fatal(err)
	}
	return b
}

// TestBadDesigns compares what is told of each bad design with the golden
// file beside it.
func TestBadDesigns(t *testing.T) {
	for _, file := range badFiles(t, "") {
		name := strings.TrimSuffix(filepath.ToSlash(file), ".yaml")
		t.Run(strings.TrimPrefix(name, "testdata/bad/"), func(t *testing.T) {
			got := rendered(t, filepath.Base(file), readFile(t, file))
			golden := name + ".out"
			if *update {
				if err := os.WriteFile(golden, []byte(got), 0o644); err != nil {
					t.Fatal(err)
				}
			}
			if diff := cmp.Diff(string(readFile(t, golden)), got); diff != "" {
				t.Errorf("told (-want +got):\n%s", diff)
			}
		})
	}
}

// rendered loads a bad design and returns what is told.
func rendered(t *testing.T, name string, src []byte) string {
	t.Helper()
	return told(t, name, src, openIn(filesDir))
}

func told(t *testing.T, name string, src []byte, open func(string) ([]byte, error)) string {
	t.Helper()
	_, err := LoadWith(name, src, open)
	ds, ok := err.(Diagnostics)
	if !ok {
		t.Fatalf("loaded, or gave an error that is not Diagnostics: %v", err)
	}
	var b strings.Builder
	if err := ds.Render(&b, false); err != nil {
		t.Fatal(err)
	}
	return b.String()
}

func TestGoodDesigns(t *testing.T) {
	files, err := filepath.Glob("testdata/good/*.yaml")
	if err != nil || len(files) == 0 {
		t.Fatal("no good designs", err)
	}
	for _, file := range files {
		t.Run(filepath.Base(file), func(t *testing.T) {
			mustLoad(t, filepath.Base(file), readFile(t, file))
		})
	}
}
