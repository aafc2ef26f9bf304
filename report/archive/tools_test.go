package archive

import (
	"bytes"
	"os"
	"os/exec"
	"path/filepath"
	"strings"
	"testing"
)

// tool runs a program that is not ours on a finished document, and skips the test
// where there is no such program.
func tool(t *testing.T, name string, args ...string) string {
	t.Helper()
	path, err := exec.LookPath(name)
	if err != nil {
		t.Skipf("%s is not installed", name)
	}
	out, err := exec.Command(path, args...).CombinedOutput()
	if err != nil {
		t.Fatalf("%s: %v\n%s", name, err, out)
	}
	return string(out)
}

func saved(t *testing.T, file []byte) string {
	t.Helper()
	path := filepath.Join(t.TempDir(), "record.pdf")
	if err := os.WriteFile(path, file, 0o666); err != nil {
		t.Fatal(err)
	}
	return path
}

func TestToolsCheck(t *testing.T) {
	path := saved(t, finished(t))
	t.Run("qpdf", func(t *testing.T) {
		if out := tool(t, "qpdf", "--check", path); !strings.Contains(out, "No syntax or stream encoding errors") {
			t.Error(out)
		}
	})
	t.Run("ghostscript", func(t *testing.T) {
		tool(t, "gs", "-q", "-dNOPAUSE", "-dBATCH", "-dPDFSTOPONERROR", "-dPDFSTOPONWARNING", "-sDEVICE=nullpage", path)
	})
	t.Run("pdfdetach", func(t *testing.T) {
		out := tool(t, "pdfdetach", "-list", path)
		for _, a := range files() {
			if !strings.Contains(out, a.Name) {
				t.Errorf("%q is not in the list:\n%s", a.Name, out)
			}
		}
	})
	t.Run("show", func(t *testing.T) {
		if out := tool(t, "qpdf", "--show-attachment=feeder.yaml", path); out != string(files()[0].Data) {
			t.Errorf("the design comes out as %q", out)
		}
	})
}

// The files come back from what another program makes of the document.
func TestOpenRewritten(t *testing.T) {
	path := saved(t, finished(t))
	for name, args := range map[string][]string{
		"object streams": {"--object-streams=generate"},
		"linearized":     {"--linearize"},
		"linearized objects": {
			"--linearize", "--object-streams=generate",
		},
		"plain":        {"--stream-data=uncompress"},
		"editable":     {"--qdf"},
		"recompressed": {"--recompress-flate", "--compression-level=9"},
		"with others":  {"--add-attachment", path, "--key=copy.pdf", "--"},
	} {
		t.Run(name, func(t *testing.T) {
			other := path + "." + name + ".pdf"
			tool(t, "qpdf", append(append([]string{path}, args...), other)...)
			rewritten, err := os.ReadFile(other)
			if err != nil {
				t.Fatal(err)
			}
			f, err := Open(rewritten)
			if err != nil {
				t.Fatal(err)
			}
			attached(t, f)
		})
	}
	t.Run("encrypted", func(t *testing.T) {
		other := path + ".encrypted.pdf"
		tool(t, "qpdf", path, "--encrypt", "", "", "256", "--", other)
		rewritten, err := os.ReadFile(other)
		if err != nil {
			t.Fatal(err)
		}
		if _, err := Open(rewritten); err == nil || !strings.Contains(err.Error(), "encrypted") {
			t.Errorf("error %v", err)
		}
	})
}

func BenchmarkFinish(b *testing.B) {
	laid := pages(b)
	all := files()
	all[4].Data = bytes.Repeat(all[4].Data, 40) // 5.6 MB
	b.ReportAllocs()
	for b.Loop() {
		if _, err := Finish(laid, meta(), all); err != nil {
			b.Fatal(err)
		}
	}
}

func BenchmarkOpen(b *testing.B) {
	file := finished(b)
	b.ReportAllocs()
	for b.Loop() {
		if _, err := Open(file); err != nil {
			b.Fatal(err)
		}
	}
}
