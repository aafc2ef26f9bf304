package report

import (
	"path"
	"strings"

	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
	"linewitness/report/format"
	"linewitness/report/ink"
	"linewitness/report/sheet"
	"linewitness/report/typeset"
	"linewitness/sim/record"
)

// cover writes the first page: identity, verdict, cases, requirements, ratings.
func (d *document) cover() {
	d.b.Overline("Design verification record, transmission-line network")
	d.b.Title(title(d.r))
	d.identity()
	d.signatures()
	d.banner()
	if d.r.Design.Purpose != "" {
		d.b.Paragraph(d.r.Design.Purpose)
	}
	if d.r.Design.Notes != "" {
		d.b.Note("Notes: " + d.r.Design.Notes)
	}
	d.cases()
	d.requirements()
	d.coverClaims()
	d.ratings()
	d.toConfirm()
}

// field is a label and its value.
type field struct{ label, value string }

// identity writes what identifies the document, in two columns.
func (d *document) identity() {
	g := d.r.Design
	d.b.Fields([]sheet.Field{
		{Label: "Document number", Value: orElse(g.Number, "none")},
		{Label: "Revision", Value: orElse(g.Revision, "none")},
		{Label: "Date", Value: orElse(g.Date, "not stated")},
		{Label: "Design file", Value: path.Base(g.File)},
		{Label: "SHA-256 of the design file", Value: g.SHA256, Face: typeset.Mono, Wide: true},
		{Label: "Made by", Value: "linewitness " + strings.TrimSpace(d.r.Tool.Version+" ("+d.r.Tool.Go+")"), Wide: true},
	})
}

// banner draws the verdict: word, shape and colour.
func (d *document) banner() {
	v := d.r.Verdict
	word := typeset.Style{Face: typeset.Bold, Size: 15, Color: colorOf(v)}
	lines := sheet.First(sheet.BodyStyle.Wrap(d.reason(), d.b.Width()-bannerIndent-10), bannerLines)
	height := 32 + float64(len(lines))*bannerLeading
	d.b.Space(8)
	d.b.Block(height, func(c draw.Canvas) {
		frame(c, v)
		x, y := c.Min.X.Points(), c.Max.Y.Points()
		markOf(v).Draw(c, x+22, y-height/2, 24)
		word.Draw(c, x+bannerIndent, y-19, capital(string(v)), typeset.Left)
		for i, line := range lines {
			d.b.Draw(c, sheet.BodyStyle, x+bannerIndent, y-32-float64(i)*bannerLeading, d.b.Width()-bannerIndent-10, line)
		}
	})
	d.b.Space(8)
}

const (
	bannerIndent  = 46.0
	bannerLeading = 10.8
	bannerLines   = 12 // the table has what a longer text would say
)

// frame draws the box of the banner: thin for what holds, heavy with a filled
// edge for what does not.
func frame(c draw.Canvas, v record.Verdict) {
	edge := 1.0
	if v != record.Verified && v != record.NotShown {
		edge = 2.2
		bar := c.Rectangle
		bar.Max.X = bar.Min.X + 5
		c.SetColor(colorOf(v))
		c.Fill(bar.Path())
	}
	c.SetLineStyle(draw.LineStyle{Color: colorOf(v), Width: vg.Points(edge)})
	c.Stroke(c.Rectangle.Path())
}

func capital(s string) string {
	if s == "" {
		return s
	}
	return strings.ToUpper(s[:1]) + s[1:]
}

// cases writes the summary of the cases.
func (d *document) cases() {
	rated := d.rated()
	t := sheet.Table{Columns: []sheet.Column{{Head: "Case", Grow: 2}, {Head: "Verdict", Grow: 2}, {Head: "Requirements", Grow: 2}}}
	if rated {
		t.Columns = append(t.Columns, sheet.Column{Head: "Ratings", Grow: 2})
	}
	t.Columns = append(t.Columns, right("Solutions differ by"), right("Settled to 1"+format.Space+"% after"), right("Peak voltage"), right("Peak current"))
	for _, c := range d.r.Cases {
		row := []sheet.Cell{
			{Text: c.Name, Bold: true},
			{Text: string(c.Verdict), Mark: markOf(c.Verdict)},
			{Text: count(c.Requirements).String()},
		}
		if rated {
			row = append(row, sheet.Cell{Text: countRatings(c.Ratings).String()})
		}
		t.Rows = append(t.Rows, append(row,
			sheet.Cell{Text: format.Percent(largest(c.Agreement))},
			sheet.Cell{Text: format.SI(c.Settling.To1Percent, "s")},
			sheet.Cell{Text: format.SI(c.Stress.Voltage.Value, "V")},
			sheet.Cell{Text: format.SI(c.Stress.Current.Value, "A")}))
	}
	d.b.Subheading("Cases", d.b.Kept(t))
	d.b.Table(t)
}

// signatures draws the block to sign.
func (d *document) signatures() {
	const height = 42.0
	g := d.r.Design
	d.b.Space(5)
	d.b.Block(height, func(c draw.Canvas) {
		third := c.Size().X / 3
		for i, f := range []field{{"Prepared", g.PreparedBy}, {"Checked", g.CheckedBy}, {"Approved", g.ApprovedBy}} {
			box := c.Rectangle
			box.Min.X += third * vg.Length(i)
			box.Max.X = box.Min.X + third
			c.SetLineStyle(draw.LineStyle{Color: ink.Hair, Width: 0.5})
			c.Stroke(box.Path())
			x, y, room := box.Min.X.Points()+5, box.Max.Y.Points(), third.Points()-10
			d.b.Draw(c, sheet.NoteStyle, x, y-10, room, f.label)
			d.b.Draw(c, sheet.BodyStyle, x, y-21, room, sheet.BodyStyle.Fit(f.value, room))
			d.b.Draw(c, sheet.NoteStyle, x, y-36, room, "signature, date")
		}
	})
	d.b.Space(8)
}
