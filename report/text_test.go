package report

import (
	"bytes"
	"compress/zlib"
	"io"
	"regexp"
	"strconv"
	"strings"
	"testing"
	"unicode/utf16"

	"linewitness/sim/record"
)

var (
	streams = regexp.MustCompile(`(?s)<</Filter /FlateDecode\s/Length \d+\s?>>\nstream\n(.*?)\nendstream`)
	shown   = regexp.MustCompile(`\[(<[^\]]*>)\] TJ`)
	pieces  = regexp.MustCompile(`<([0-9a-f]*)>`)
)

// pages returns the text of every page, decoded as this package wrote it:
// characters are their own codes.
func pages(t *testing.T, file []byte) []string {
	t.Helper()
	var out []string
	for _, m := range streams.FindAllSubmatch(file, -1) {
		z, err := zlib.NewReader(bytes.NewReader(m[1]))
		if err != nil {
			t.Fatal(err)
		}
		content, err := io.ReadAll(z)
		if err != nil {
			t.Fatal(err)
		}
		if bytes.Contains(content, []byte(" TJ ET")) {
			out = append(out, pageText(t, content))
		}
	}
	return out
}

// text lays a record out and returns the text of its pages, without the work of
// making it a file to keep.
func text(t *testing.T, r *record.Record, opt Options) []string {
	t.Helper()
	d, err := build(r, opt)
	if err != nil {
		t.Fatalf("build: %v", err)
	}
	var b bytes.Buffer
	if err := d.b.Write(&b); err != nil {
		t.Fatalf("write: %v", explain(err))
	}
	sound(t, d)
	return pages(t, b.Bytes())
}

// afterContents is the text without the cover and the contents.
func afterContents(text []string) string { return readable(strings.Join(text[2:], "\n")) }

// pageText joins the texts of a page without a space between them.
func pageText(t *testing.T, content []byte) string {
	t.Helper()
	var b strings.Builder
	for _, m := range shown.FindAllSubmatch(content, -1) {
		for _, p := range pieces.FindAllSubmatch(m[1], -1) {
			for h := string(p[1]); len(h) >= 4; h = h[4:] {
				u, err := strconv.ParseUint(h[:4], 16, 16)
				if err != nil {
					t.Fatal(err)
				}
				b.WriteString(string(utf16.Decode([]uint16{uint16(u)})))
			}
		}
	}
	return b.String()
}
