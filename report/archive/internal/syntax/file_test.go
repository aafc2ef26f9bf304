package syntax

import (
	"bytes"
	"encoding/binary"
	"errors"
	"fmt"
	"strings"
	"testing"

	"github.com/google/go-cmp/cmp"
)

// A draft is a PDF file in the making.
type draft struct {
	bytes.Buffer
	at map[int]int // offsets of objects
}

func newDraft() *draft {
	d := &draft{at: map[int]int{}}
	d.WriteString("%PDF-1.5\n")
	return d
}

func (d *draft) object(n int, text string) {
	d.at[n] = d.Len()
	fmt.Fprintf(d, "%d 0 obj\n%s\nendobj\n", n, text)
}

func (d *draft) stream(n int, dict, data string) {
	d.object(n, fmt.Sprintf("<<%s /Length %d>>\nstream\n%s\nendstream", dict, len(data), data))
}

// table writes a cross-reference table of some objects, and returns the file.
func (d *draft) table(trailer string, numbers ...int) []byte {
	start := d.Len()
	d.WriteString("xref\n0 1\n0000000000 65535 f \n")
	for _, n := range numbers {
		fmt.Fprintf(d, "%d 1\n%010d 00000 n \n", n, d.at[n])
	}
	fmt.Fprintf(d, "trailer\n<<%s>>\nstartxref\n%d\n%%%%EOF\n", trailer, start)
	return d.Bytes()
}

// entries is a cross-reference stream's data: a type, an offset or a container,
// and an index.
func entries(rows ...[3]int) string {
	var b []byte
	for _, r := range rows {
		b = append(b, byte(r[0]))
		b = binary.BigEndian.AppendUint16(b, uint16(r[1]))
		b = append(b, byte(r[2]))
	}
	return string(b)
}

// packed is a file with objects 1 and 2 in an object stream and a
// cross-reference stream; head is that of the object stream.
func packed(head string) []byte {
	d := newDraft()
	d.stream(3, fmt.Sprintf("/Type /ObjStm /N 2 /First %d", len(head)), head+"(one) [2 0 R]")
	start := d.Len()
	d.stream(4, "/Type /XRef /Size 5 /W [1 2 1] /Root 1 0 R", entries(
		[3]int{0, 0, 0}, [3]int{2, 3, 0}, [3]int{2, 3, 1}, [3]int{1, d.at[3], 0}, [3]int{1, start, 0}))
	fmt.Fprintf(d, "startxref\n%d\n%%%%EOF\n", start)
	return d.Bytes()
}

func object(t *testing.T, file []byte, r Ref) Value {
	t.Helper()
	f, err := Parse(file, wide)
	if err != nil {
		t.Fatal(err)
	}
	v, err := f.Object(r)
	if err != nil {
		t.Fatal(err)
	}
	return v
}

func TestObjectStreams(t *testing.T) {
	file := packed("1 0 2 6 ")
	if got := object(t, file, 1); got != String("one") {
		t.Errorf("object 1 is %v", got)
	}
	if got := object(t, file, 2); !cmp.Equal(got, Value(Array{Ref(2)})) {
		t.Errorf("object 2 is %v", got)
	}
	if got := object(t, file, 7); got != (Null{}) {
		t.Errorf("object 7 is %v", got)
	}
}

// A newer section hides what an older one has, also by setting it free.
func TestUpdates(t *testing.T) {
	d := newDraft()
	d.object(1, "(old)")
	d.object(2, "(kept)")
	d.object(3, "(gone)")
	d.table("/Root 1 0 R", 1, 2, 3)
	older := d.Len()
	d.object(1, "(new)")
	start := d.Len()
	fmt.Fprintf(d, "xref\n1 1\n%010d 00000 n \n3 1\n0000000000 00001 f \ntrailer\n<</Root 1 0 R /Prev %d>>\nstartxref\n%d\n%%%%EOF\n",
		d.at[1], strings.Index(d.String(), "xref\n0 1"), start)
	if older >= start {
		t.Fatal("the update is not one")
	}
	for r, want := range map[Ref]Value{1: String("new"), 2: String("kept"), 3: Null{}} {
		if got := object(t, d.Bytes(), r); got != want {
			t.Errorf("object %d is %v, want %v", r, got, want)
		}
	}
}

// The length of a stream may be an object of its own.
func TestIndirectLength(t *testing.T) {
	d := newDraft()
	d.object(1, "<</Length 2 0 R>>\nstream\r\nabc\nendstream")
	d.object(2, "3")
	s, ok := object(t, d.table("/Root 1 0 R", 1, 2), 1).(*Stream)
	if !ok || string(s.Data) != "abc" {
		t.Errorf("stream %v", s)
	}
}

// Each fault of a file is an error, and none a panic.
func TestDamagedFiles(t *testing.T) {
	one := func(text string) []byte {
		d := newDraft()
		d.object(1, text)
		return d.table("/Root 1 0 R", 1)
	}
	section := func(text string) []byte {
		return []byte(fmt.Sprintf("%%PDF-1.7\n%s\nstartxref\n9\n%%%%EOF\n", text))
	}
	for _, c := range []struct {
		name, reason string
		file         []byte
	}{
		{"no end", "no endobj", one("(a) (b)")},
		{"itself", "circle", one("1 0 R")},
		{"length of itself", "leads back to itself", one("<</Length 1 0 R>>\nstream\nabc\nendstream")},
		{"too long", "does not fit", one("<</Length 999>>\nstream\nabc\nendstream")},
		{"negative", "does not fit", one("<</Length -1>>\nstream\nabc\nendstream")},
		{"too short", "does not end there", one("<</Length 1>>\nstream\nabc\nendstream")},
		{"no length", "length of a stream", one("<<>>\nstream\nabc\nendstream")},
		{"no line", "no end of line", one("<</Length 3>>\nstream abc\nendstream")},
		{"no section", "no startxref", []byte("%PDF-1.7\n")},
		{"beyond", "section at offset 99", []byte("%PDF-1.7\nstartxref\n99\n")},
		{"no number", "startxref", []byte("%PDF-1.7\nstartxref\nx\n")},
		{"table", "table at", section("xref\nx")},
		{"entry", "entry of object 0", section("xref\n0 1\n0000000000 65535 x")},
		{"no trailer", "no trailer", section("xref\ntrailer 5")},
		{"hybrid", "hybrid", section("xref\ntrailer <</XRefStm 5>>")},
		{"ring of sections", "section at offset 9", section("xref\ntrailer <</Prev 9>>")},
		{"negative section", "Prev", section("xref\ntrailer <</Prev -9>>")},
		{"indirect section", "Prev", section("xref\ntrailer <</Prev 1 0 R>>")},
		{"many objects", "more than 1000 objects", section("xref\n1001 1\n0000000000 00000 n \ntrailer <<>>")},
		{"no stream", "no cross-reference section", section("1 0 obj\n5\nendobj")},
		{"widths", "widths", section("1 0 obj\n<</Type /XRef /Length 0 /W [1 9 1] /Size 1>>\nstream\n\nendstream\nendobj")},
		{"no width", "widths", section("1 0 obj\n<</Type /XRef /Length 0 /W [0 0 0] /Size 9>>\nstream\n\nendstream\nendobj")},
		{"few entries", "too few", section("1 0 obj\n<</Type /XRef /Length 0 /W [1 2 1] /Size 9>>\nstream\n\nendstream\nendobj")},
		{"index", "index", section("1 0 obj\n<</Type /XRef /Length 0 /W [1 2 1] /Index [0 -1]>>\nstream\n\nendstream\nendobj")},
		{"size", "Size", section("1 0 obj\n<</Type /XRef /Length 0 /W [1 2 1]>>\nstream\n\nendstream\nendobj")},
		{"object stream", "head of an object stream", packed("1 0 2 999 ")},
		{"value of a stream", "no value", packed("1 0 2 3 ")},
	} {
		f, err := Parse(c.file, wide)
		if err == nil {
			_, err = f.Resolve(Ref(1))
		}
		if err == nil || !strings.Contains(err.Error(), c.reason) {
			t.Errorf("%s: error %v, want one with %q", c.name, err, c.reason)
		}
	}
}

func TestLimits(t *testing.T) {
	long := newDraft()
	long.object(1, "5")
	prev := ""
	var file []byte
	for range wide.Updates + 1 {
		start := long.Len()
		file = long.table("/Root 1 0 R"+prev, 1)
		prev = fmt.Sprintf(" /Prev %d", start)
	}
	if _, err := Parse(file, wide); !errors.Is(err, ErrLimit) {
		t.Errorf("updates: error %v", err)
	}
	narrow := wide
	narrow.Bytes = 20
	if _, err := Parse(file, narrow); !errors.Is(err, ErrLimit) {
		t.Errorf("bytes: error %v", err)
	}
	if _, err := Parse([]byte("PDF"), wide); !errors.Is(err, ErrNotPDF) {
		t.Errorf("no PDF: error %v", err)
	}
}
