package main

import (
	"bytes"
	"context"
	"flag"
	"os"
	"path/filepath"
	"strings"
	"testing"
)

var allDemos = flag.Bool("demos", false, "recheck every demo as it is, which takes half a minute")

// coarse is added to the one demo that is rechecked otherwise, to the design with
// a file beside it: the same cases on a grid that takes a twentieth of the time.
const coarse = "\ngrid: {cells_per_wavelength: 12, agreement: 10 %, settle_tolerance: 1e-3}\n"

// The record of a demo is rechecked as the same to the last digit, from the PDF
// alone.
func TestRecheckDemos(t *testing.T) {
	const designs = "../../testdata/designs/"
	files, err := filepath.Glob(designs + "*.yaml")
	if err != nil || len(files) < 3 {
		t.Fatalf("demos %v, error %v", files, err)
	}
	for _, path := range files {
		t.Run(filepath.Base(path), func(t *testing.T) {
			if !*allDemos && filepath.Base(path) != "receiving-site.yaml" {
				t.Skip("with -demos only")
			}
			source, err := os.ReadFile(path)
			if err != nil {
				t.Fatal(err)
			}
			if !*allDemos {
				source = append(source, coarse...)
			}
			dir := t.TempDir()
			if err := os.CopyFS(dir, os.DirFS(designs)); err != nil {
				t.Fatal(err)
			}
			t.Chdir(dir)
			if err := os.WriteFile(filepath.Base(path), source, 0o666); err != nil {
				t.Fatal(err)
			}
			recheckAlone(t, filepath.Base(path))
		})
	}
}

// recheckAlone makes the record of a design, takes it into an empty directory and
// rechecks it there.
func recheckAlone(t *testing.T, name string) {
	t.Helper()
	var stdout, stderr bytes.Buffer
	status := run(context.Background(), []string{"verify", "-o", "filed", "--formats", "pdf", name}, strings.NewReader(""), &stdout, &stderr)
	if stderr.Len() > 0 {
		t.Fatalf("verify: status %d, stderr %s", status, &stderr)
	}
	t.Chdir("filed")
	stdout.Reset()
	status = run(context.Background(), []string{"recheck", outputBase(name) + ".pdf"}, strings.NewReader(""), &stdout, &stderr)
	if status != statusVerified || stderr.Len() > 0 {
		t.Errorf("recheck: status %d, stderr %s, stdout %s", status, &stderr, &stdout)
	}
	if first, _, _ := strings.Cut(stdout.String(), "\n"); !strings.HasSuffix(first, ": same") {
		t.Errorf("outcome %q, want the same", first)
	}
}
