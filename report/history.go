package report

import (
	"linewitness/report/format"
	"linewitness/report/sheet"
)

// coverHistory is how many revisions the cover has room for.
const coverHistory = 6

// history writes the newest revisions of the document, in their order.
func (d *document) history(room coverRoom) {
	all := d.r.Design.History
	if len(all) == 0 {
		return
	}
	shown := all[max(len(all)-room.history, 0):]
	title := "Revision history"
	if len(shown) < len(all) {
		title += ": the newest " + format.Count(int64(len(shown))) + " of " + format.Count(int64(len(all)))
	}
	t := d.revisions(len(all) - len(shown))
	d.b.Label(title, d.b.Kept(t))
	d.b.Table(t)
}

// fullHistory writes all revisions, if the cover does not have them.
func (d *document) fullHistory() {
	if len(d.r.Design.History) > coverHistory {
		t := d.revisions(0)
		d.b.Subheading("Revision history", d.b.Kept(t))
		d.b.Table(t)
	}
}

// revisions is the table of the revisions from the given one on.
func (d *document) revisions(from int) sheet.Table {
	t := sheet.Table{Columns: []sheet.Column{{Head: "Revision"}, {Head: "Date"}, {Head: "By"}, {Head: "What changed", Grow: 1}}}
	for _, h := range d.r.Design.History[from:] {
		row := sheet.Row(orElse(h.Revision, format.Missing), orElse(h.Date, format.Missing), orElse(h.By, format.Missing), orElse(h.Text, format.Missing))
		row[0].Bold = true
		t.Rows = append(t.Rows, row)
	}
	return t
}
