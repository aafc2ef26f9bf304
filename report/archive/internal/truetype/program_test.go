package truetype

import (
	"bytes"
	"strings"
	"testing"

	"codeberg.org/go-fonts/liberation/liberationmonoregular"
	"codeberg.org/go-fonts/liberation/liberationsansbolditalic"
	"golang.org/x/image/font/sfnt"
)

// A rebuilt font has the tables of its kind, sorted, at multiples of 4, with their
// check sums and the same bytes; and the whole adds up to what the format asks for.
func TestEmbedded(t *testing.T) {
	source, err := Read(liberationmonoregular.TTF)
	if err != nil {
		t.Fatal(err)
	}
	out, err := source.Embedded()
	if err != nil {
		t.Fatal(err)
	}
	if got := sum(out); got != 0xB1B0AFBA {
		t.Errorf("the font adds up to %#x", got)
	}
	back, err := Read(out)
	if err != nil {
		t.Fatal(err)
	}
	if back["cmap"] != nil || back["name"] != nil || len(back) != len(cidTables) {
		t.Errorf("%d tables", len(back))
	}
	last := ""
	for i := range len(back) {
		e := out[directory+entrySize*i:]
		tag, at := string(e[:4]), be.Uint32(e[8:])
		if tag <= last || at%4 != 0 {
			t.Errorf("table %q after %q, at %d", tag, last, at)
		}
		last = tag
		if tag == "head" { // it holds the sum of the whole
			continue
		}
		if !bytes.Equal(back[tag], source[tag]) || be.Uint32(e[4:]) != sum(back[tag]) {
			t.Errorf("table %q is another one", tag)
		}
	}
}

// The numbers that a binary search over the tables needs, of the example in the
// format's own definition: 9 tables, the largest power of two below is 8.
func TestHeader(t *testing.T) {
	want := []byte{0, 1, 0, 0, 0, 9, 0, 128, 0, 3, 0, 16}
	if got := header(9); !bytes.Equal(got, want) {
		t.Errorf("header % x, want % x", got, want)
	}
}

// Another reader of fonts gives the same name.
func TestPostScriptName(t *testing.T) {
	for _, ttf := range [][]byte{liberationmonoregular.TTF, liberationsansbolditalic.TTF} {
		f, err := sfnt.Parse(ttf)
		if err != nil {
			t.Fatal(err)
		}
		want, err := f.Name(nil, sfnt.NameIDPostScript)
		if err != nil {
			t.Fatal(err)
		}
		p, err := Read(ttf)
		if err != nil {
			t.Fatal(err)
		}
		if got := p.PostScriptName(); got != want {
			t.Errorf("name %q, want %q", got, want)
		}
	}
}

func TestNamesThatAreNone(t *testing.T) {
	record := func(platform, name byte, text string) []byte {
		b := []byte{0, 0, 0, 1, 0, 18, 0, platform, 0, 0, 0, 0, 0, name, 0, byte(len(text)), 0, 0}
		return append(b, text...)
	}
	for _, c := range []struct {
		table []byte
		want  string
	}{
		{nil, ""},
		{[]byte{0, 0, 0, 1, 0, 18}, ""},
		{record(1, 6, "Face-Bold"), "Face-Bold"},
		{record(3, 6, "\x00F\x00a"), "Fa"},
		{record(1, 6, "Face Bold"), ""},
		{record(1, 6, ""), ""},
		{record(1, 4, "Face"), ""},
		{record(1, 6, "Face")[:20], ""},
	} {
		if got := (Program{"name": c.table}).PostScriptName(); got != c.want {
			t.Errorf("%q: name %q, want %q", c.table, got, c.want)
		}
	}
}

func TestReadRefuses(t *testing.T) {
	short := liberationmonoregular.TTF
	for _, c := range []struct {
		font   []byte
		reason string
	}{
		{nil, "a font of 0 bytes"},
		{short[:20], "directory is cut off"},
		{short[:5000], "is outside the font"},
	} {
		if _, err := Read(c.font); err == nil || !strings.Contains(err.Error(), c.reason) {
			t.Errorf("error %v, want one with %q", err, c.reason)
		}
	}
	if _, err := (Program{"glyf": {}, "head": {}}).Embedded(); err == nil || !strings.Contains(err.Error(), `no table "hhea"`) {
		t.Errorf("error %v", err)
	}
}
