package report

import (
	"strings"
	"testing"

	"linewitness/report/internal/reporttest"
	"linewitness/report/sheet"
	"linewitness/sim/record"
)

// The part of a page that may be left empty at its foot: less than what a part
// with its heading, note, key and figure takes, and where a figure follows without
// a heading no more than the largest of those, the two rows of a long section. So
// a page is left only for something that is not broken and had no room.
const (
	mostLeft   = 1.0 / 3
	figureLeft = 0.45
)

// leavesRoom are the headings that may begin a page although more than that is
// left on the one before, with the reason.
var leavesRoom = map[string]string{
	"Contents":   "the cover is a sheet of its own",
	"Compliance": "the contents are a sheet of their own",
}

// lonely returns the first page that ends with a heading, 0 if none does.
func lonely(b *sheet.Book) int {
	for i, f := range b.Feet() {
		if f.Headed {
			return i + 1
		}
	}
	return 0
}

// sampleRecords are records like the three demos, and one of six cases.
func sampleRecords() map[string]*record.Record {
	tree := reporttest.One("Reference tree", reporttest.Star(4), reporttest.Options{Error: 2e-4, Loop: 0.4})
	return map[string]*record.Record{
		"feeder": reporttest.Feeder(), "receiving": reporttest.Receiving(), "tree": tree, "six cases": reporttest.SixCases(),
	}
}

// No heading stands alone at the foot of a page, and no page is left half empty
// without a reason.
func TestFeet(t *testing.T) {
	options := map[string][]Options{"feeder": {{}, {Paper: "letter"}}, "receiving": {{}}, "tree": {{}}, "six cases": {{}, {Full: true}}}
	for name, r := range sampleRecords() {
		for _, opt := range options[name] {
			d, err := build(r, opt)
			if err != nil {
				t.Fatal(err)
			}
			if err := d.b.Err(); err != nil { // ends the last page too
				t.Fatal(err)
			}
			if page := lonely(d.b); page > 0 {
				t.Errorf("%s, %+v: page %d ends with a heading", name, opt, page)
			}
			feet := d.b.Feet()
			for i, f := range feet {
				last := i == len(feet)-1
				most := mostLeft
				if f.Next == "" {
					most = figureLeft
				}
				if f.Left > most*d.b.Body() && !last && leavesRoom[f.Next] == "" {
					t.Errorf("%s, %+v: %.0f %% of page %d are empty; the next begins with %q", name, opt, 100*f.Left/d.b.Body(), i+1, f.Next)
				}
			}
		}
	}
}

// mostPages is what a record of six cases is to stay under.
const mostPages = 40

// A record of six cases stays under forty pages; a full one has more, and what
// the other leaves out, the other says.
func TestSixCases(t *testing.T) {
	r := reporttest.SixCases()
	some, all := text(t, r, Options{}), text(t, r, Options{Full: true})
	if len(some) >= mostPages || len(all) <= len(some) {
		t.Errorf("%d pages, %d of a full record", len(some), len(all))
	}
	const out = "Left out of this case:"
	text := readable(strings.Join(some, "\n"))
	if n := strings.Count(text, out); n != len(r.Cases)-1 {
		t.Errorf("%d cases say what is left out, want all but the nominal one of %d", n, len(r.Cases))
	}
	for _, s := range []string{"waveforms of", "the power flow", "A record made with --full has all of it"} {
		if !strings.Contains(text, s) {
			t.Errorf("the text lacks %q", s)
		}
	}
	if s := readable(strings.Join(all, "\n")); strings.Contains(s, out) {
		t.Error("a full record leaves something out")
	}
}

// A summary is one page, with the verdict, the worst margins and every attachment.
func TestSummary(t *testing.T) {
	for name, r := range map[string]*record.Record{
		"six cases": reporttest.SixCases(), "receiving": reporttest.Receiving(), "empty": {},
		"long texts": named(strings.Repeat("a_very_long_name_", 12), reporttest.Options{Error: 1e-4, Loop: 0.5}), "fifty": demanding(50, reporttest.Options{Error: 1e-4, Loop: 0.5}),
	} {
		all := text(t, r, Options{Summary: true})
		if len(all) != 1 {
			t.Errorf("%s: %d pages", name, len(all))
		}
		if name != "six cases" {
			continue
		}
		checkSummary(t, readable(all[0]))
	}
	if _, err := build(reporttest.Feeder(), Options{Full: true, Summary: true}); err == nil {
		t.Error("a full summary is no error")
	}
}

func checkSummary(t *testing.T, text string) {
	for _, s := range []string{"Requirement missed", "The 3 worst of", "stub_long", "feeder.json", "PDF/A-3b", "signature", "made without --summary"} {
		if !strings.Contains(text, s) {
			t.Errorf("the summary lacks %q", s)
		}
	}
}
