package report

import (
	"cmp"
	"math"
	"slices"
	"strings"

	"linewitness/report/format"
	"linewitness/report/sheet"
	"linewitness/sim/record"
)

// worstMargins is how many margins the cover shows.
const worstMargins = 3

// clearance is how far a requirement or a rating is from its limit in one case.
type clearance struct {
	id, what, about string
	name            string // of the case
	value, limit    string
	uncertainty     string
	margin          string
	verdict         record.RequirementVerdict
	note            string
	share           float64 // margin over limit; NaN if that is not known
}

// worse orders what is missed before what is not shown before what is met, and
// then by the part of the limit that is left.
func worse(a, b clearance) int {
	if c := cmp.Compare(verdictRank(a.verdict), verdictRank(b.verdict)); c != 0 {
		return c
	}
	switch na, nb := math.IsNaN(a.share), math.IsNaN(b.share); {
	case na != nb && a.verdict == record.Met: // met by no known margin: nothing is near
		return cmp.Compare(boolRank(na), boolRank(nb))
	case na != nb:
		return cmp.Compare(boolRank(nb), boolRank(na))
	}
	return cmp.Compare(a.share, b.share)
}

func boolRank(b bool) int {
	if b {
		return 1
	}
	return 0
}

func verdictRank(v record.RequirementVerdict) int {
	switch v {
	case record.MissedReq:
		return 0
	case record.Met:
		return 2
	}
	return 1
}

// clearances returns every requirement and every rating once, in its worst case,
// the worst first.
func (d *document) clearances() []clearance {
	var out []clearance
	add := func(h clearance, same func(clearance) bool) {
		i := slices.IndexFunc(out, same)
		switch {
		case i < 0:
			out = append(out, h)
		case worse(h, out[i]) < 0:
			out[i] = h
		}
	}
	for i := range d.r.Cases {
		c := &d.r.Cases[i]
		for j := range c.Requirements {
			h := requiredClearance(&c.Requirements[j], c.Name)
			add(h, func(o clearance) bool { return o.id == h.id && h.id != "" })
		}
		for j := range c.Ratings {
			h := ratedClearance(&c.Ratings[j], c.Name)
			add(h, func(o clearance) bool { return o.id == "" && o.what == h.what })
		}
	}
	slices.SortStableFunc(out, worse)
	return out
}

func requiredClearance(q *record.Requirement, name string) clearance {
	return clearance{
		id: q.ID, what: orElse(q.Text, quantityOf(*q)), about: quantityOf(*q), name: name,
		value: format.Quantity(q.Value, q.Unit), limit: format.Signed(q.Limit), uncertainty: format.Uncertainty(q.Uncertainty, q.Unit),
		margin: marginOf(q), verdict: q.Verdict, share: shareOf(q),
	}
}

func ratedClearance(r *record.Rating, name string) clearance {
	h := clearance{
		what: "Rating of " + r.Section + ", " + r.Quantity, about: trimmed(r.Text + " " + bracket(r.Source)), name: name,
		value: format.SI(max(r.Steady, r.Peak), r.Unit) + " peak", limit: "at most " + format.SI(r.Allowed, r.Unit) + " peak",
		uncertainty: format.Uncertainty(r.Uncertainty, r.Unit),
		margin:      unbroken(format.SI(r.Margin, r.Unit) + ", " + format.DB(r.MarginDB)), verdict: r.Verdict, share: r.MarginPercent / 100,
	}
	if r.Advisory {
		h.note = "not counted"
	}
	return h
}

// marginOf prints a margin in its unit, and in dB or per cent where that has a
// meaning.
func marginOf(q *record.Requirement) string {
	s := format.Bare(q.Margin, q.Unit)
	if r := relative(*q); r != format.Missing && s != format.Missing {
		s += ", " + r
	}
	return unbroken(s)
}

// shareOf is the part of the limit that is left: of half the width where there
// are two.
func shareOf(q *record.Requirement) float64 {
	limit := 0.0
	switch {
	case !math.IsNaN(q.MarginPercent):
		return q.MarginPercent / 100
	case q.Min != nil && q.Max != nil:
		limit = (*q.Max - *q.Min) / 2
	case q.Max != nil:
		limit = *q.Max
	case q.Min != nil:
		limit = *q.Min
	}
	if limit == 0 {
		return math.NaN()
	}
	return q.Margin / math.Abs(limit)
}

// worstMargins writes the worst margins of the record.
func (d *document) worstMargins(room coverRoom) {
	all := d.clearances()
	if len(all) == 0 {
		d.b.Note("The design states no requirement and no rating: there is no margin to show.")
		return
	}
	list := all[:min(len(all), room.margins)]
	t := sheet.Table{Size: 7, Columns: []sheet.Column{
		{Head: "Id"},
		{Head: "Requirement or rating", Grow: 1},
		{Head: "Case"},
		{Head: "Value", Align: rightAlign},
		{Head: "Uncertainty ±", Align: rightAlign},
		{Head: "Limit"},
		{Head: "Margin", Align: rightAlign},
		{Head: "Verdict"},
	}}
	for _, h := range list {
		t.Rows = append(t.Rows, h.row())
	}
	title := "The worst margins"
	if len(all) > len(list) {
		title = "The " + format.Count(int64(len(list))) + " worst of " + format.Count(int64(len(all))) + " margins"
	}
	d.b.Label(title, d.b.Kept(t))
	d.b.Table(t)
}

func (h clearance) row() []sheet.Cell {
	what := sheet.Cell{Text: strings.TrimSuffix(h.what, ".")}
	if h.about != h.what {
		what.Note = h.about
	}
	return []sheet.Cell{
		{Text: h.id, Bold: true},
		what,
		{Text: h.name},
		{Text: h.value},
		{Text: h.uncertainty},
		{Text: h.limit},
		{Text: h.margin, Bold: h.verdict != record.Met},
		{Text: string(h.verdict), Mark: markOfRequirement(h.verdict), Bold: h.verdict != record.Met, Note: h.note},
	}
}
