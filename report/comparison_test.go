package report

import (
	"bytes"
	"fmt"
	"math"
	"strings"
	"testing"

	"github.com/pdfcpu/pdfcpu/pkg/api"

	"linewitness/sim/record"
)

// compared is a comparison with so many changes and with so many requirements
// that went worse in each of two cases.
func compared(changes, requirements int) *record.Comparison {
	c := &record.Comparison{
		Old: record.Side{File: "feeder-a.yaml", Kind: "design file", Title: "Harbour feeder", Number: "HB-1", Revision: "A", SHA256: strings.Repeat("0a", 32), Version: "v1", Verdict: record.Verified},
		New: record.Side{File: "feeder-b.pdf", Kind: "record", Title: "Harbour feeder, longer", Number: "HB-1", Revision: "B", SHA256: strings.Repeat("1b", 32), Version: "v1", Verdict: record.Missed},
	}
	for i := range changes {
		c.Changes = append(c.Changes, record.Change{Kind: record.ChangedTerm, Place: fmt.Sprintf("section s%d", i), Term: "length", Old: "85 m", New: "87 m"})
	}
	for _, name := range []string{"nominal", "iced"} {
		k := record.CaseEffect{Name: name, Old: record.Verified, New: record.Missed}
		for i := range requirements {
			k.Effects = append(k.Effects, record.Effect{
				Kind: record.RequirementEffect, ID: fmt.Sprintf("R%d", i), Quantity: "steady_voltage", Subject: "along main", Direction: record.Better,
				Old: &record.Figure{Value: 1200, Unit: "V peak", Margin: -10, Limit: "at most 1.19 kV peak", Verdict: "missed"},
				New: &record.Figure{Value: 1100, Unit: "V peak", Margin: 90, Limit: "at most 1.19 kV peak", Verdict: "met"},
			})
		}
		k.Effects = append(k.Effects,
			record.Effect{
				Kind: record.RequirementEffect, ID: "M1", Quantity: "vswr", Subject: "main, from end", Direction: record.Worse,
				Old: &record.Figure{Value: 1.2, Unit: "1", Margin: 0.3, Limit: "at most 1.5", Verdict: "met"},
				New: &record.Figure{Value: complex(math.NaN(), 0), Unit: "1", Margin: math.NaN(), Limit: "at most 1.4", Verdict: "missed"},
			},
			record.Effect{
				Kind: record.ClaimEffect, ID: "C1", Quantity: "input_impedance", Direction: record.NewFigure,
				New: &record.Figure{Value: 50 - 1i, Complex: true, Unit: "ohm", Margin: 1, Verdict: "confirmed"},
			},
			record.Effect{
				Kind: record.RatingEffect, Quantity: "largest voltage", Subject: "main", Direction: record.AsBefore,
				Old: &record.Figure{Verdict: "met"}, New: &record.Figure{Verdict: "met"},
			},
			record.Effect{
				Kind: record.FigureEffect, Quantity: "source_power", Subject: "source", Direction: record.Moved,
				Old: &record.Figure{Value: 10, Unit: "W"}, New: &record.Figure{Value: 9.5, Unit: "W"},
			})
		c.Cases = append(c.Cases, k)
	}
	c.Worsened = true
	return c
}

func comparisonText(t *testing.T, c *record.Comparison, opt Options) string {
	t.Helper()
	d, err := buildComparison(c, opt)
	if err != nil {
		t.Fatal(err)
	}
	if d.b.Overfull > 0 {
		t.Errorf("%d texts are wider than their room", d.b.Overfull)
	}
	file, err := d.finish()
	if err != nil {
		t.Fatal(err)
	}
	all := pages(t, file)
	if len(all) != 1 {
		t.Errorf("%d pages, want one", len(all))
	}
	return readable(strings.Join(all, ""))
}

func TestComparisonText(t *testing.T) {
	text := comparisonText(t, compared(2, 1), Options{})
	for _, s := range []string{
		"Harbour feeder, longer", "feeder-a.yaml (design file)", "HB-1, revision B", strings.Repeat("1b", 32), "page 1 of 1",
		"A verdict is worse.", "2 changes in the design.", "2 worse, 2 better, 2 new and", "2 as before.",
		"section s1, length", "85 m", "87 m", "1.200 kV", "1.100 kV", "−10.00 V", "at most 1.4, was at most 1.5", "was met",
		"50.00 − j1.00 Ω", "Key figures that moved", "−500.0 mW",
	} {
		if !strings.Contains(text, s) {
			t.Errorf("the text lacks %q:\n%s", s, text)
		}
	}
	if strings.Contains(text, "largest voltage") {
		t.Error("what is as before has a row")
	}
	if worse, better := strings.Index(text, "VSWR, main"), strings.Index(text, "steady voltage"); worse > better {
		t.Error("what is worse does not come first")
	}
}

// Whatever there is to tell, it is one page, and what is left out is counted.
func TestComparisonIsOnePage(t *testing.T) {
	for _, n := range []struct {
		changes, requirements int
		paper                 string
	}{{8, 3, "letter"}, {400, 5, "a4"}, {200, 200, "letter"}} {
		text := comparisonText(t, compared(n.changes, n.requirements), Options{Paper: n.paper})
		if over := n.changes > 100; over != strings.Contains(text, "more, see the JSON form") {
			t.Errorf("%+v: summed up %t, want %t", n, !over, over)
		}
		if !strings.Contains(text, "M1") {
			t.Errorf("%+v: the worst is left out", n)
		}
	}
}

// Long and odd texts of a design do not break the page.
func TestComparisonOfLongTexts(t *testing.T) {
	c := compared(0, 0)
	long := strings.Repeat("a long purpose ", 300)
	c.Changes = []record.Change{
		{Kind: record.ChangedTerm, Place: "record", Term: "purpose", Old: long, New: "short\n\ttext \ue000"},
		{Kind: record.FollowTerm, Place: "section stub", Term: "length", Old: "22.5 deg", New: "22.5 deg", OldSI: 5.25, NewSI: 5.125, Unit: "m"},
	}
	c.Cases[0].Effects[0].New.Limit = "at\nmost 1.4"
	c.New.Title = strings.Repeat("Title ", 60)
	text := comparisonText(t, c, Options{})
	for _, s := range []string{"short text", "22.5 deg, 5.250 m", "a long purpose", "…", "at most 1.4"} {
		if !strings.Contains(text, s) {
			t.Errorf("the text lacks %q", s)
		}
	}
	if c.Cases[0].Effects[0].New.Limit != "at\nmost 1.4" {
		t.Error("the comparison itself was changed")
	}
}

func TestComparisonSaysNothing(t *testing.T) {
	c := compared(0, 0)
	c.Cases, c.Worsened, c.Echo = nil, false, "Only the results are at hand."
	text := comparisonText(t, c, Options{})
	for _, s := range []string{"Nothing.", "Nothing beyond the uncertainties.", "No verdict is worse.", "Only the results are at hand."} {
		if !strings.Contains(text, s) {
			t.Errorf("the text lacks %q", s)
		}
	}
}

// The same comparison gives the same bytes, and other programs read them.
func TestComparisonFile(t *testing.T) {
	var a, b bytes.Buffer
	for _, w := range []*bytes.Buffer{&a, &b} {
		if err := WriteComparison(w, compared(3, 3), Options{}); err != nil {
			t.Fatal(err)
		}
	}
	if !bytes.Equal(a.Bytes(), b.Bytes()) {
		t.Error("two runs differ")
	}
	api.DisableConfigDir()
	if err := api.Validate(bytes.NewReader(a.Bytes()), nil); err != nil {
		t.Error(err)
	}
	if err := WriteComparison(&a, compared(1, 1), Options{Paper: "a3"}); err == nil {
		t.Error("an unknown paper is no error")
	}
	c := compared(1, 1)
	c.New.Title = "\u6f22"
	if err := WriteComparison(&a, c, Options{}); err == nil || !strings.Contains(err.Error(), "no sign for") {
		t.Errorf("a character without a sign: error %v", err)
	}
}
