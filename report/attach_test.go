package report

import (
	"bytes"
	"strings"
	"testing"

	"linewitness/report/archive"
	"linewitness/report/data"
	"linewitness/report/internal/reporttest"
	"linewitness/sim/record"
)

// The document holds what the record can be written to as files, byte for byte,
// and what the design reads.
func TestAttachments(t *testing.T) {
	r := reporttest.Feeder()
	r.Attachments = []record.Attachment{{Name: "data/antenna.s1p", Data: []byte("# MHz S MA R 50\r\n100 0.5 -20\r\n")}, {Name: "spot.CSV", Data: []byte("1,2")}}
	f, err := archive.Open(written(t, r, Options{}))
	if err != nil {
		t.Fatal(err)
	}
	result, err := data.JSON(r)
	if err != nil {
		t.Fatal(err)
	}
	tables, err := data.CSV(r)
	if err != nil {
		t.Fatal(err)
	}
	stem := strings.TrimSuffix(r.Design.File, ".yaml")
	want := []archive.Attachment{
		{Name: r.Design.File, Role: archive.Design, Relationship: archive.Source, MIME: "application/yaml", Data: r.Design.Source},
		{Name: "data/antenna.s1p", Role: archive.Input, Relationship: archive.Source, MIME: "text/plain", Data: r.Attachments[0].Data},
		{Name: "spot.CSV", Role: archive.Input, Relationship: archive.Source, MIME: "text/csv", Data: r.Attachments[1].Data},
		{Name: stem + ".json", Role: archive.Result, Relationship: archive.Data, MIME: "application/json", Data: result},
	}
	for _, c := range tables {
		want = append(want, archive.Attachment{Name: stem + "." + c.Name + ".csv", Role: archive.Table, Relationship: archive.Data, MIME: "text/csv", Data: c.Data})
	}
	got := f.Attachments()
	if len(got) != len(want) {
		t.Fatalf("%d files, want %d", len(got), len(want))
	}
	for i, w := range want {
		g := got[i]
		if g.Name != w.Name || g.Role != w.Role || g.Relationship != w.Relationship || g.MIME != w.MIME || g.Description == "" || !bytes.Equal(g.Data, w.Data) {
			t.Errorf("file %d is %q, %s, %s, %s, %q, %d bytes; want %q, %s, %s, %s, %d bytes", i,
				g.Name, g.Role, g.Relationship, g.MIME, g.Description, len(g.Data), w.Name, w.Role, w.Relationship, w.MIME, len(w.Data))
		}
	}
}

// The properties name the design, its author, its number and what made the record.
func TestProperties(t *testing.T) {
	r := reporttest.Feeder()
	r.Tool = record.Tool{Version: "v1.2", Go: "go1.26.0 any/any"}
	f, err := archive.Open(write(t, r, Options{}))
	if err != nil {
		t.Fatal(err)
	}
	for _, c := range []struct{ what, got, want string }{
		{"title", f.Title, r.Design.Title},
		{"author", f.Author, r.Design.PreparedBy},
		{"subject", f.Subject, r.Design.Purpose},
		{"keywords", f.Keywords, "DR-0042, revision B"},
		{"creator", f.Creator, "linewitness v1.2"},
		{"producer", f.Producer, "linewitness v1.2, go1.26.0 any/any"},
		{"version", f.Version, "v1.2"},
		{"date", f.Created, "D:20260514000000+00'00'"},
	} {
		if c.got != c.want || c.want == "" {
			t.Errorf("%s %q, want %q", c.what, c.got, c.want)
		}
	}
	r.Design.Date = "last spring"
	if f, err = archive.Open(write(t, r, Options{})); err != nil || f.Created != "" {
		t.Errorf("a date that cannot be read becomes %q, error %v", f.Created, err)
	}
}

func TestDesignName(t *testing.T) {
	for in, want := range map[string]string{"": "design.yaml", "stdin": "stdin.yaml", "feeder.yml": "feeder.yml", "a.b": "a.b"} {
		if got := designName(in); got != want {
			t.Errorf("designName(%q) = %q, want %q", in, got, want)
		}
	}
}

func TestUnused(t *testing.T) {
	files := []archive.Attachment{{Name: "a.csv"}, {Name: "linewitness-a.csv"}}
	for in, want := range map[string]string{"b.csv": "b.csv", "a.csv": "linewitness-linewitness-a.csv"} {
		if got := unused(files, in); got != want {
			t.Errorf("unused(%q) = %q, want %q", in, got, want)
		}
	}
}

// A table that is too long is left out.
func TestLongTables(t *testing.T) {
	for size, want := range map[int]bool{0: true, largestTable: true, largestTable + 1: false} {
		if got := fits(data.CSVFile{Data: make([]byte, size)}); got != want {
			t.Errorf("a table of %d bytes fits: %t", size, got)
		}
	}
}
