package drawing

import (
	"slices"
	"testing"

	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
	"gonum.org/v1/plot/vg/recorder"
	"linewitness/report/internal/reporttest"
	"linewitness/sim/record"
	"pgregory.net/rapid"
)

// drawn draws every band on a strip of a page and returns labels and actions.
func drawn(l *Layout, b *Band) (labels []vg.Rectangle, texts []string, area vg.Rectangle) {
	const width = 480.0 // of the text area of an A4 page, points
	var rec recorder.Canvas
	c := draw.NewCanvas(&rec, vg.Points(width), vg.Points(float64(b.Rows)*RowHeight))
	labels = l.Draw(c, b)
	for _, a := range rec.Actions {
		if f, ok := a.(*recorder.FillString); ok {
			texts = append(texts, f.String)
		}
	}
	return labels, texts, c.Rectangle
}

func overlap(a, b vg.Rectangle) bool {
	return a.Min.X < b.Max.X && b.Min.X < a.Max.X && a.Min.Y < b.Max.Y && b.Min.Y < a.Max.Y
}

// No two labels meet, none leaves the drawing, and every section, load and
// bridge is drawn once, whatever the network.
func TestLabelsApart(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		n := reporttest.Random(t, 40)
		m := n.Model()
		l := Lay(m, rapid.IntRange(2, 60).Draw(t, "rows"))
		seen := map[*edge]int{}
		parts := map[*record.ModelPart]int{}
		for _, b := range l.Bands {
			labels, _, area := drawn(l, b)
			for i, a := range labels {
				if a.Min.X < area.Min.X || a.Max.X > area.Max.X || a.Min.Y < area.Min.Y || a.Max.Y > area.Max.Y {
					t.Fatalf("band %d: label %v leaves %v", b.Index, a, area)
				}
				for _, o := range labels[:i] {
					if overlap(a, o) {
						t.Fatalf("band %d: labels %v and %v meet", b.Index, a, o)
					}
				}
			}
			for _, w := range b.wires {
				if w.via != nil {
					seen[w.via]++
				} else {
					parts[w.part]++
				}
			}
		}
		if len(seen) != len(m.Sections)+len(m.Elements) || len(parts) != len(m.Loads) {
			t.Fatalf("%d edges and %d loads drawn, want %d and %d", len(seen), len(parts), len(m.Sections)+len(m.Elements), len(m.Loads))
		}
		for e, times := range seen {
			if times != 1 {
				t.Fatalf("the edge from %s to %s is drawn %d times", e.a, e.b, times)
			}
		}
	})
}

func TestLayoutShapes(t *testing.T) {
	for name, c := range map[string]struct {
		net                  reporttest.Network
		bands, rows, columns int
	}{
		"one section": {reporttest.Single(1), 1, 1, 2},
		"feeder":      {reporttest.FeederNetwork(), 1, 2, 3},
		"star of 4":   {reporttest.Star(4), 1, 4, 3},
		"star of 39":  {reporttest.Star(39), 2, 30, 3}, // 30 rows to a band
		"ring":        {reporttest.Ring(4), 1, 5, 4},
		"cascade":     {reporttest.Cascade(40), 10, 1, 5},
	} {
		l := Lay(c.net.Model(), 30)
		if len(l.Bands) != c.bands || l.Bands[0].Rows != c.rows || l.Columns != c.columns {
			t.Errorf("%s: %d bands, %d rows, %d columns, want %d, %d, %d", name,
				len(l.Bands), l.Bands[0].Rows, l.Columns, c.bands, c.rows, c.columns)
		}
	}
}

// The ring's last section, its bridge and the parallel section are routed to
// their junctions and not cut off by arrows.
func TestLoopsAreRouted(t *testing.T) {
	l := Lay(reporttest.Ring(4).Model(), 30)
	var closed []string
	for _, w := range l.Bands[0].wires {
		if w.close == "" {
			continue
		}
		if !w.way.known {
			t.Errorf("an edge to %s ends in an arrow", w.close)
		}
		closed = append(closed, w.close)
	}
	if len(closed) != 3 {
		t.Errorf("loops close at %v, want three places", closed)
	}
}

// A junction that nothing ties to the source is drawn, and said to be so.
func TestUntied(t *testing.T) {
	m := reporttest.Single(1).Model()
	m.Junctions = append(m.Junctions, "stray")
	l := Lay(m, 10)
	if len(l.Bands) != 2 {
		t.Fatalf("%d bands, want 2", len(l.Bands))
	}
	_, texts, _ := drawn(l, l.Bands[1])
	for _, s := range texts {
		if s == "stray" {
			return
		}
	}
	t.Errorf("texts %q lack the stray junction", texts)
}

// A transformer's ratio reads in the order in which its ends are drawn, and a
// combination without room for its value says what it is.
func TestPartsInWords(t *testing.T) {
	n := reporttest.ReceivingNetwork() // its unun is 1:2 from the balun to the aerial, and the aerial is at the left
	l := Lay(n.Model(), 10)
	_, texts, _ := drawn(l, l.Bands[0])
	for _, want := range []string{"unun", "2:1", "combination of 2"} {
		if !slices.Contains(texts, want) {
			t.Errorf("texts %q lack %q", texts, want)
		}
	}
	n.At, n.Bridges[0].At, n.Bridges[0].To = "aerial", "aerial", "balun"
	l = Lay(n.Model(), 10)
	if _, texts, _ = drawn(l, l.Bands[0]); !slices.Contains(texts, "1:2") {
		t.Errorf("texts %q lack 1:2", texts)
	}
	for in, want := range map[string]string{"1:4": "4:1", "2.5 : 1": "1:2.5", "3": "1:(3)"} {
		if got := turnedRatio(in); got != want {
			t.Errorf("turnedRatio(%q) = %q, want %q", in, got, want)
		}
	}
}

func TestLetter(t *testing.T) {
	for n, want := range map[int]string{1: "A", 26: "Z", 27: "AA", 53: "BA"} {
		if got := letter(n); got != want {
			t.Errorf("letter(%d) = %q, want %q", n, got, want)
		}
	}
}
