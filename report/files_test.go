package report

import (
	"bytes"
	"encoding/xml"
	"errors"
	"image/png"
	"io"
	"path/filepath"
	"strconv"
	"strings"
	"testing"

	"linewitness/report/internal/reporttest"
)

// figureFiles returns the files of the figures of a network by name.
func figureFiles(t *testing.T, n reporttest.Network) map[string][]byte {
	t.Helper()
	files := map[string][]byte{}
	err := WriteFigures(reporttest.One("One", n, reporttest.Options{Error: 1e-4, Loop: 0.3, MaxPoints: 100}), Options{}, func(f File) error {
		if _, twice := files[f.Name]; twice {
			t.Errorf("%s is written twice", f.Name)
		}
		files[f.Name] = f.Data
		return nil
	})
	if err != nil {
		t.Fatal(err)
	}
	return files
}

// Each figure is there twice, as a whole SVG document whose text is text and as
// a PNG image of the same shape; each has its caption; and all are the same on
// every run.
func TestWriteFigures(t *testing.T) {
	files := figureFiles(t, reporttest.Single(1))
	for name, again := range figureFiles(t, reporttest.Single(1)) {
		if !bytes.Equal(files[name], again) {
			t.Errorf("%s differs from run to run", name)
		}
	}
	for _, name := range []string{"network.svg", "nominal-envelopes-line.svg", "nominal-power.svg", "nominal-settling.svg", "nominal-waveform-source-current.svg", "nominal-reflection-line.svg"} {
		if files[name] == nil {
			t.Errorf("%s is missing", name)
		}
	}
	captions := string(files["captions.txt"])
	for name, data := range files {
		stem := strings.TrimSuffix(name, filepath.Ext(name))
		if name != "captions.txt" && !strings.Contains(captions, stem+"\n") {
			t.Errorf("%s has no caption", name)
		}
		if filepath.Ext(name) != ".svg" {
			continue
		}
		w, h := svgSize(t, name, data)
		img, err := png.Decode(bytes.NewReader(files[stem+".png"]))
		if err != nil {
			t.Fatalf("%s.png: %v", stem, err)
		}
		const dot = 1.0 / pngScale * 72 // the size of an image is a whole number of dots
		if b := img.Bounds(); !near(float64(b.Dx())*dot, w, dot) || !near(float64(b.Dy())*dot, h, dot) {
			t.Errorf("%s: %v dots for %v by %v points", stem, b, w, h)
		}
	}
	for _, want := range []string{`<image preserveAspectRatio="none" x=`, "data:image/png;"} {
		if got := strings.Count(string(files["nominal-spacetime.svg"]), want); got != 2 { // the map and its scale
			t.Errorf("the map has %d times %q", got, want)
		}
	}
	text := string(files["nominal-envelopes-line.svg"])
	for _, want := range []string{"<title>nominal-envelopes-line</title>", "<desc>line: |V| up to", ">distance (m)</text>", "Arial,Helvetica,sans-serif", ">phasor; expected error</text>"} {
		if !strings.Contains(text, want) {
			t.Errorf("the SVG lacks %q", want)
		}
	}
}

func near(a, b, tolerance float64) bool { return a-b <= tolerance && b-a <= tolerance }

// svgSize parses the whole of an SVG document and returns its size in points.
func svgSize(t *testing.T, name string, data []byte) (w, h float64) {
	t.Helper()
	var root struct {
		XMLName xml.Name
		ViewBox string `xml:"viewBox,attr"`
	}
	if err := xml.Unmarshal(data, &root); err != nil || root.XMLName.Local != "svg" {
		t.Fatalf("%s: root %q, error %v", name, root.XMLName.Local, err)
	}
	fields := strings.Fields(root.ViewBox)
	if len(fields) != 4 {
		t.Fatalf("%s: view box %q", name, root.ViewBox)
	}
	w, err1 := strconv.ParseFloat(fields[2], 64)
	h, err2 := strconv.ParseFloat(fields[3], 64)
	if err := errors.Join(err1, err2); err != nil {
		t.Fatalf("%s: view box %q: %v", name, root.ViewBox, err)
	}
	return w, h
}

// A failing writer is heard.
func TestFiguresUnwritten(t *testing.T) {
	full := errors.New("full")
	err := WriteFigures(reporttest.One("One", reporttest.Single(1), reporttest.Options{Error: 1e-4, Loop: 0.3}), Options{}, func(File) error { return full })
	if !errors.Is(err, full) {
		t.Errorf("error %v, want that of the writer", err)
	}
}

// A text without glyphs is refused as in the document.
func TestFiguresGlyphs(t *testing.T) {
	n := reporttest.Single(1)
	n.Sections[0].Name = "線路"
	r := reporttest.One("One", n, reporttest.Options{Error: 1e-4, Loop: 0.3})
	err := WriteFigures(r, Options{}, func(File) error { return nil })
	if want := WritePDF(io.Discard, r, Options{}); err == nil || want == nil || err.Error() != want.Error() {
		t.Errorf("error %v, want %v", err, want)
	}
}

func TestFileName(t *testing.T) {
	for in, want := range map[string]string{
		"nominal-envelopes-main": "nominal-envelopes-main", "iced-waveform-source voltage = tx": "iced-waveform-source-voltage-tx",
		"../../etc/passwd": "etc-passwd", "Ωλ": "figure", "CON: a\\b": "con-a-b", "stub_end": "stub_end", strings.Repeat("ab-", 60): strings.Repeat("ab-", 26) + "ab",
	} {
		if got := fileName(in); got != want {
			t.Errorf("fileName(%q) = %q, want %q", in, got, want)
		}
	}
	d := &document{}
	for range 3 {
		d.note(picture{name: "a b"})
	}
	if d.pictures[0].name != "a-b" || d.pictures[1].name != "a-b-2" || d.pictures[2].name != "a-b-3" {
		t.Errorf("names %q, %q, %q", d.pictures[0].name, d.pictures[1].name, d.pictures[2].name)
	}
}
