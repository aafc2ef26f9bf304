package report

import (
	"cmp"
	"slices"
	"strings"

	"linewitness/report/format"
	"linewitness/report/sheet"
	"linewitness/sim/record"
)

// coverRatings is how many ratings the cover shows; it names the nearest ones,
// and more would hide them.
const coverRatings = 12

// caseRating is a rating of one case.
type caseRating struct {
	name string
	record.Rating
}

// ranked returns the ratings of all cases, worst first. A margin that is not
// known is the worst.
func (d *document) ranked() []caseRating {
	var out []caseRating
	for _, c := range d.r.Cases {
		for _, r := range c.Ratings {
			out = append(out, caseRating{c.Name, r})
		}
	}
	slices.SortStableFunc(out, func(a, b caseRating) int { return cmp.Compare(a.MarginDB, b.MarginDB) })
	return out
}

// ratings writes the ratings of all cases, or the worst of them.
func (d *document) ratings() {
	all := d.ranked()
	if len(all) == 0 {
		d.b.Note("No line and no section carries a rating, so this record does not say what a line stands.")
		return
	}
	title := "Ratings, worst first"
	if len(all) > coverRatings {
		title = "Ratings: the " + format.Count(coverRatings) + " worst of " + format.Count(int64(len(all)))
	}
	d.b.Subheading(title, 80)
	d.b.Table(ratingTable(all[:min(len(all), coverRatings)], true, fielded(all)))
	note := ""
	if len(all) > coverRatings {
		note = "All " + format.Count(int64(len(all))) + " ratings stand with their cases. "
	}
	d.b.Note(note + ratingNote(all))
}

// caseRatings writes the ratings of a case if the cover does not have them
// all.
func (d *document) caseRatings(c *record.Case) {
	if len(c.Ratings) == 0 || len(d.ranked()) <= coverRatings {
		return
	}
	var rows []caseRating
	for _, r := range c.Ratings {
		rows = append(rows, caseRating{c.Name, r})
	}
	d.b.Subheading("Ratings, worst first", 60)
	d.b.Table(ratingTable(rows, false, fielded(rows)))
}

// ratingNote says what the columns mean.
func ratingNote(all []caseRating) string {
	s := "Steady, largest ever, allowed and uncertainty are peak values, the steady one that of the worse solution; a rating in rms was multiplied by √2. " +
		"Allowed is the rating less its derating, and the margin is from the larger value to it, in dB and in per cent of it."
	if slices.ContainsFunc(all, func(r caseRating) bool { return r.Advisory }) {
		s += " Not counted: ratings of the cable table are from memory; they warn and have no part in the verdict."
	}
	if fielded(all) {
		s += " The field is the largest ever at the inner conductor, smooth and concentric."
	}
	return s
}

// fielded reports whether the field is known for any of the ratings.
func fielded(rows []caseRating) bool {
	return slices.ContainsFunc(rows, func(r caseRating) bool { return r.Field > 0 })
}

func ratingTable(rows []caseRating, named, field bool) sheet.Table {
	t := sheet.Table{Size: 6.8}
	if named {
		t.Columns = append(t.Columns, left("Case"))
	}
	t.Columns = append(t.Columns, left("Section, quantity"), right("Steady, peak value"), right("Largest ever, peak value"),
		left("Rating as given"), right("Derating"), right("Allowed, peak value"), right("Margin"), right("Uncertainty ±"))
	if field {
		t.Columns = append(t.Columns, right("Field, peak value"))
	}
	t.Columns = append(t.Columns, left("Verdict"))
	for _, r := range rows {
		t.Rows = append(t.Rows, ratingRow(r, named, field))
	}
	return t
}

func ratingRow(r caseRating, named, field bool) []sheet.Cell {
	var row []sheet.Cell
	if named {
		row = append(row, sheet.Cell{Text: r.name})
	}
	row = append(row, sheet.Cell{Text: r.Section + ", " + r.Quantity, Bold: true},
		sheet.Cell{Text: format.SI(r.Steady, r.Unit) + " at" + format.Space + place(r.SteadyAt)},
		sheet.Cell{Text: format.SI(r.Peak, r.Unit) + " at" + format.Space + place(r.PeakAt) + "," + format.Space + format.SI(r.PeakTime, "s")},
		sheet.Cell{Text: trimmed(unbroken(r.Text) + " " + unbroken(bracket(r.Source)))},
		sheet.Cell{Text: derating(r.Derating)},
		sheet.Cell{Text: format.SI(r.Allowed, r.Unit)},
		sheet.Cell{Text: format.DB(r.MarginDB) + ", " + format.Percent(r.MarginPercent/100)},
		sheet.Cell{Text: format.Uncertainty(r.Uncertainty, r.Unit)})
	if field {
		row = append(row, sheet.Cell{Text: absent(r.Field, "V/m")})
	}
	verdict := sheet.Cell{Text: string(r.Verdict), Mark: markOfRequirement(r.Verdict), Bold: r.Verdict != record.Met}
	if r.Advisory {
		verdict.Text += ", not counted"
	}
	return append(row, verdict)
}

// unbroken keeps a text together on a line.
func unbroken(s string) string { return strings.ReplaceAll(s, " ", format.Space) }

// derating prints how far below its rating a value must stay.
func derating(dB float64) string {
	if dB == 0 {
		return "none"
	}
	return format.DB(dB)
}

// countRatings counts the ratings that have a part in the verdict.
func countRatings(rs []record.Rating) (t tally) {
	for _, r := range rs {
		if !r.Advisory {
			t.add(r.Verdict)
		}
	}
	return t
}

// rated reports whether anything in the record has a rating.
func (d *document) rated() bool {
	return slices.ContainsFunc(d.r.Cases, func(c record.Case) bool { return len(c.Ratings) > 0 })
}

// broken says which sections are beyond what their ratings allow, or not shown
// to keep it, and in which cases: those that count in the verdict, and those of
// the cable table, which only warn.
func (d *document) broken() (counted, advised []string) {
	var missed, open, advisory casesOf
	for _, c := range d.r.Cases {
		for _, r := range c.Ratings {
			section := "Section " + r.Section
			switch {
			case r.Verdict == record.Met:
			case r.Advisory:
				advisory.add(section+" is not within the "+r.Quantity+" rating of the cable table, which is from memory and not counted,", c.Name)
			case r.Verdict == record.MissedReq:
				missed.add(section+" is beyond its allowed "+r.Quantity, c.Name)
			default:
				open.add(section+" is not shown to keep its allowed "+r.Quantity, c.Name)
			}
		}
	}
	counted = append(missed.sentences("further ratings are exceeded"), open.sentences("further ratings are not shown to be kept")...)
	return counted, advisory.sentences("further ratings of the cable table are not kept")
}
