package report

import (
	"math"
	"slices"
	"strings"
	"testing"

	"linewitness/report/internal/reporttest"
	"linewitness/sim/record"
)

// The worst margins: what is missed comes first, then what is not shown, then
// what is met by the least part of its limit; each requirement and rating once, in
// its worst case.
func TestClearances(t *testing.T) {
	limit := func(v float64) *float64 { return &v }
	nan := math.NaN()
	req := func(id string, v record.RequirementVerdict, margin, percent float64, max *float64) record.Requirement {
		return record.Requirement{ID: id, Verdict: v, Margin: margin, MarginPercent: percent, Max: max, Unit: "dB"}
	}
	d := &document{r: &record.Record{Cases: []record.Case{
		{Name: "a", Requirements: []record.Requirement{
			req("far", record.Met, 50, 50, nil), req("near", record.Met, 0.1, nan, limit(2)), req("open", record.NotShownReq, nan, nan, nil),
			req("two", record.Met, 1, 10, nil), req("zero", record.Met, 1, nan, limit(0)),
		}},
		{Name: "b", Requirements: []record.Requirement{
			req("two", record.MissedReq, -1, -3, nil), {ID: "window", Verdict: record.Met, Margin: 0.1, MarginPercent: nan, Min: limit(-2), Max: limit(2)},
		}, Ratings: []record.Rating{{Section: "s", Quantity: "voltage", Verdict: record.Met, MarginPercent: 7}}},
	}}}
	var got []string
	for _, c := range d.clearances() {
		got = append(got, orElse(c.id, c.what)+" in "+c.name)
	}
	want := []string{"two in b", "open in a", "near in a", "window in b", "Rating of s, voltage in b", "far in a", "zero in a"}
	if !slices.Equal(got, want) {
		t.Errorf("got %q, want %q", got, want)
	}
}

// The compliance table has every requirement in every case that it is judged in,
// with its text once, in the order of the design file.
func TestComplianceTable(t *testing.T) {
	r := reporttest.SixCases()
	d := &document{r: r}
	table := d.complianceTable()
	judged, texts := 0, map[string]int{}
	for _, c := range r.Cases {
		judged += len(c.Requirements)
	}
	if len(table.Rows) != judged {
		t.Errorf("%d rows, %d judgements", len(table.Rows), judged)
	}
	var order []string
	for _, row := range table.Rows {
		if row[1].Text != "" {
			texts[row[0].Text]++
			order = append(order, row[0].Text)
		}
		if row[7].Text == "" || len(row) != len(table.Columns) {
			t.Errorf("row %v", row)
		}
	}
	for id, n := range texts {
		if n != 1 {
			t.Errorf("the text of %s stands %d times", id, n)
		}
	}
	if ids := d.requirementIDs(); !slices.Equal(order, ids) {
		t.Errorf("order %v, want %v", order, ids)
	}
	if got := readable(d.complianceFinding()); !strings.Contains(got, "in 6 cases") {
		t.Errorf("finding %q", got)
	}
}

// The cover says where the date is from, what was revised, who signs, what needs
// confirmation and what the document is made of.
func TestCover(t *testing.T) {
	r := reporttest.Receiving()
	g := &r.Design
	g.DateFrom, g.ApprovedBy = "environment", "H. Brandt"
	g.History = []record.Revision{{Revision: "A", Date: "2026-01-10", By: "M. Okafor", Text: "First issue"}, {Revision: "B", Date: "2026-05-14", Text: "Longer trap"}}
	r.Attachments = []record.Attachment{{Name: "antenna.s1p", Data: []byte("! empty\n"), SHA256: strings.Repeat("ab", 32)}}
	cover := readable(text(t, r, Options{})[0])
	for _, s := range []string{
		"SOURCE_DATE_EPOCH", "First issue", "Longer trap", "Prepared", "Checked", "Approved", "H. Brandt", "signature",
		"assumptions to confirm:", "From the cable table", "Assumed by the program", strings.Repeat("ab", 32), strings.Repeat("0123456789abcdef", 4),
		"written to PDF/A-3b", "antenna.s1p (read by the design file)", "a manifest with the SHA-256 of each", "The 3 worst of",
	} {
		if !strings.Contains(cover, s) {
			t.Errorf("the cover lacks %q", s)
		}
	}
	for from, want := range map[string]string{"record": "given in the design", "file": "time of the design file", "": "2026-05-14"} {
		g.DateFrom = from
		if got := dated(*g); !strings.HasSuffix(got, want) {
			t.Errorf("%q is dated %q, want %q", from, got, want)
		}
	}
	g.Date = ""
	if got := dated(*g); got != "not stated" {
		t.Errorf("without a date: %q", got)
	}
}

// Of a case that is not shown whole the sections nearest to a limit and most
// changed are chosen, and its loudest waveforms.
func TestChosen(t *testing.T) {
	r := reporttest.Feeder()
	d := &document{r: cleaned(r)}
	for i := range d.r.Cases[1:] {
		c := &d.r.Cases[i+1]
		names := d.chosen(c)
		if len(names) == 0 || len(names) > chosenSections {
			t.Errorf("%s: chosen %v", c.Name, names)
		}
		nearest, least := "", math.Inf(1)
		for _, q := range c.Requirements {
			if strings.HasSuffix(q.Quantity, "voltage") || strings.HasSuffix(q.Quantity, "current") {
				if share := shareOf(&q); share < least {
					nearest, least = q.Subject, share
				}
			}
		}
		if nearest != "" && !slices.Contains(names, nearest) {
			t.Errorf("%s: chosen %v, nearest to its limit is %s", c.Name, names, nearest)
		}
		list, others := loudest(c.Waveforms)
		if len(list) > 2 || len(list)+len(others) != len(c.Waveforms) {
			t.Errorf("%s: %d waveforms, %d others of %d", c.Name, len(list), len(others), len(c.Waveforms))
		}
	}
	if d.whole(&d.r.Cases[1]) || !d.whole(d.nominal()) {
		t.Error("whole: the nominal case alone is")
	}
	d.opt.Full = true
	if !d.whole(&d.r.Cases[1]) {
		t.Error("whole: in a full record each is")
	}
}
