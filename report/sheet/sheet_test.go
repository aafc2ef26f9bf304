package sheet

import (
	"bytes"
	"strings"
	"testing"
	"unicode/utf8"

	"gonum.org/v1/plot/vg/draw"
	"linewitness/report/typeset"
	"pgregory.net/rapid"
)

func book() *Book {
	return New(Meta{Header: "Title", Number: "N-1"}, A4)
}

// finish writes the book and fails on any error or text that is too wide.
func finish(t interface {
	Helper()
	Fatal(...any)
	Fatalf(string, ...any)
}, b *Book,
) []byte {
	t.Helper()
	var out bytes.Buffer
	if err := b.Write(&out); err != nil {
		t.Fatal(err)
	}
	if b.Overfull > 0 {
		t.Fatalf("%d texts are wider than their room", b.Overfull)
	}
	return out.Bytes()
}

// Blocks never run into the foot of the page, and none is lost.
func TestBlocksBreakPages(t *testing.T) {
	b := book()
	const height = 100.0
	drawn := 0
	for range 20 {
		b.Block(height, func(c draw.Canvas) {
			drawn++
			if c.Min.Y.Points() < marginBottom-1e-9 {
				t.Errorf("block at %v runs into the foot", c.Min.Y.Points())
			}
		})
	}
	perPage := int(b.Body() / height)
	if want := (20 + perPage - 1) / perPage; b.Pages() != want || drawn != 20 {
		t.Errorf("%d blocks on %d pages, want 20 on %d", drawn, b.Pages(), want)
	}
	finish(t, b)
}

// A heading keeps room for what follows, and it goes to the next page with it.
func TestHeadingIsNotLeftAlone(t *testing.T) {
	b := book()
	b.Block(b.Body()-60, func(draw.Canvas) {})
	b.Heading("Heading", 80)
	b.Paragraph("Text.")
	if b.Pages() != 2 {
		t.Errorf("the heading is on page %d, want 2", b.Pages())
	}
	finish(t, b)
}

// Whatever is written in whatever order, no heading is alone at the foot of a page,
// no piece that waits is lost, and every heading is in the contents.
func TestHeadingsGoWithWhatFollows(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		b := book()
		drawn, floats, headings := 0, 0, 0
		for range rapid.IntRange(1, 40).Draw(t, "parts") {
			height := rapid.Float64Range(5, 500).Draw(t, "height")
			switch rapid.IntRange(0, 4).Draw(t, "kind") {
			case 0:
				b.Heading("Heading", rapid.Float64Range(0, 200).Draw(t, "keep"))
				headings++
			case 1:
				b.Subheading("Subheading", rapid.Float64Range(0, 200).Draw(t, "keep"))
				headings++
			case 2:
				b.Table(rowsOf(rapid.IntRange(1, 40).Draw(t, "rows")))
			case 3:
				floats++
				headings++
				b.Float(height, func() {
					b.Subheading("Float", height-20)
					b.Block(height-20, func(draw.Canvas) { drawn++ })
				})
			default:
				b.Block(height, func(draw.Canvas) {})
			}
		}
		b.Block(10, func(draw.Canvas) {})
		if err := b.Err(); err != nil {
			t.Fatal(err)
		}
		for i, f := range b.Feet() {
			if f.Headed {
				t.Fatalf("page %d ends with a heading", i+1)
			}
			if f.Left < -1e-9 {
				t.Fatalf("page %d is overfull by %v", i+1, -f.Left)
			}
		}
		if drawn != floats || len(b.entries) != headings {
			t.Fatalf("%d of %d pieces that waited, %d of %d headings", drawn, floats, len(b.entries), headings)
		}
	})
}

// The contents have every heading once with its page, whatever their number; where
// they are too many those of the second level are left out.
func TestContents(t *testing.T) {
	for _, c := range []struct{ chapters, sections, listed int }{{2, 3, 9}, {9, 14, 136}, {60, 20, 61}} {
		b := book()
		b.Contents()
		for range c.chapters {
			b.Heading("Chapter", 0)
			b.Paragraph("Text.")
			for range c.sections {
				b.Subheading("Section", 0)
				b.Paragraph("Text.")
			}
		}
		b.endPage()
		l := b.arrange(b.contentsTop - marginBottom)
		got := 0
		for _, column := range l.columns {
			got += len(column)
		}
		if got != c.listed || l.unit < tight {
			t.Errorf("%d chapters of %d sections: %d listed, want %d, %v apart", c.chapters, c.sections, got, c.listed, l.unit)
		}
		b.cv = nil
		file := finish(t, b)
		if n := bytes.Count(file, []byte("/Subtype /Link")); n != c.listed {
			t.Errorf("%d links, want %d", n, c.listed)
		}
	}
}

// No line of a paragraph stands alone at the foot or the head of a page.
func TestParagraphKeepsTwoLines(t *testing.T) {
	for _, c := range []struct {
		room  float64 // lines that fit on the first page
		pages int
		left  int // lines on the second page
	}{{1, 2, 4}, {2, 2, 2}, {3, 2, 2}, {4, 1, 0}} {
		b := book()
		step := leadingOf(BodyStyle)
		b.Block(b.Body()-(c.room+0.5)*step, func(draw.Canvas) {})
		b.lines(BodyStyle, fourLines(t, b))
		used := int((b.paper.Height-marginTop-b.y)/step + 0.5)
		if b.Pages() != c.pages || c.pages == 2 && used != c.left {
			t.Errorf("room for %v lines: %d pages, %d lines on the last, want %d and %d", c.room, b.Pages(), used, c.pages, c.left)
		}
		finish(t, b)
	}
}

func fourLines(t *testing.T, b *Book) string {
	t.Helper()
	s := "mm"
	for len(BodyStyle.Wrap(s+" mm", b.Width())) <= 4 {
		s += " mm"
	}
	return s
}

// Whatever the cells hold, no text is wider than its room and the columns
// fill the width.
func TestTableFits(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		columns := rapid.IntRange(1, 12).Draw(t, "columns")
		table := Table{}
		for range columns {
			table.Columns = append(table.Columns, Column{
				Head: rapid.StringMatching(`[A-Za-z ]{0,20}`).Draw(t, "head"), Grow: rapid.Float64Range(0, 2).Draw(t, "grow"),
				Share: rapid.SampledFrom([]float64{0, 0, 1, 2}).Draw(t, "share"),
				Align: rapid.SampledFrom([]typeset.Align{typeset.Left, typeset.Right}).Draw(t, "align"),
			})
		}
		for range rapid.IntRange(0, 30).Draw(t, "rows") {
			var row []Cell
			for range columns {
				row = append(row, Cell{
					Text: rapid.StringMatching(`[A-Za-z0-9_ ]{0,60}`).Draw(t, "text"),
					Note: rapid.StringMatching(`[A-Za-z0-9_ ]{0,40}`).Draw(t, "note"),
					Mark: Mark(rapid.IntRange(0, 3).Draw(t, "mark")), Bold: rapid.Bool().Draw(t, "bold"),
				})
			}
			table.Rows = append(table.Rows, row)
		}
		b := book()
		if got := sum(b.layout(table).widths); got > b.Width()+0.01 || got < b.Width()-0.01 {
			t.Fatalf("columns are %v wide, the page %v", got, b.Width())
		}
		b.Table(table)
		if b.Overfull > 0 {
			t.Fatalf("%d texts are wider than their room", b.Overfull)
		}
	})
}

// A row taller than a page is continued, not cut.
func TestTallRow(t *testing.T) {
	b := book()
	word := "w"
	b.Table(Table{Columns: []Column{{Head: "A"}, {Head: "B"}}, Rows: [][]Cell{Row(strings.Repeat(word+" ", 12000), "x")}})
	if b.Pages() < 2 {
		t.Errorf("%d pages", b.Pages())
	}
	file := finish(t, b)
	if len(file) == 0 {
		t.Error("empty file")
	}
}

// The note of a cell is longer than a page and is continued too; a short one
// makes its row less than a line higher.
func TestNoteOfCell(t *testing.T) {
	b := book()
	b.Table(Table{Columns: []Column{{Head: "A"}}, Rows: [][]Cell{{{Text: "x", Note: strings.Repeat("w ", 24000)}}}})
	if b.Pages() < 2 {
		t.Errorf("%d pages", b.Pages())
	}
	finish(t, b)
	b = book()
	l := b.layout(Table{Columns: []Column{{Head: "A"}}, Rows: [][]Cell{{{Text: "x"}}, {{Text: "x", Note: "n"}}}})
	bare, noted := l.height(l.wrap(l.t.Rows[0])), l.height(l.wrap(l.t.Rows[1]))
	if !(noted > bare && noted < bare+l.lineHeight()) {
		t.Errorf("a row is %v high, with a note %v", bare, noted)
	}
}

// A long line of a listing is broken after a space, and inside a word only where
// that has no end. Without the added indentation it is what it was.
func TestBroken(t *testing.T) {
	for _, c := range []struct {
		in   string
		n    int
		want string
	}{
		{"abc", 3, "abc"},
		{"", 5, ""},
		{"abcd", 3, "abc| d"},
		{"one two three", 9, "one two |  three"},
		{"  one two three four", 14, "  one two |    three four"},
		{"a bcdefghijklmnop", 9, "a bcdefgh|  ijklmno|  p"},
	} {
		lines := broken(c.in, c.n)
		if got := strings.Join(lines, "|"); got != c.want {
			t.Errorf("broken(%q, %d) = %q, want %q", c.in, c.n, got, c.want)
		}
	}
	rapid.Check(t, func(t *rapid.T) {
		s := rapid.StringMatching(`[ ]{0,9}([a-zΩ]{0,30} ?){0,9}`).Draw(t, "line")
		n := rapid.IntRange(12, 60).Draw(t, "columns")
		margin := min(len(s)-len(strings.TrimLeft(s, " "))+2, n/3)
		whole := ""
		for i, l := range broken(s, n) {
			if utf8.RuneCountInString(l) > n {
				t.Fatalf("line %q is longer than %d", l, n)
			}
			if i > 0 {
				l = l[margin:]
			}
			whole += l
		}
		if whole != s {
			t.Fatalf("%q became %q", s, whole)
		}
	})
}

func TestFirst(t *testing.T) {
	lines := []string{"a", "b", "c"}
	if got := strings.Join(First(lines, 2), ""); got != "a…" {
		t.Errorf("First gives %q", got)
	}
	if lines[1] != "b" {
		t.Error("First changed its argument")
	}
}
