package report

import (
	"math"
	"path"
	"slices"
	"strings"

	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
	"linewitness/report/format"
	"linewitness/report/sheet"
	"linewitness/report/typeset"
	"linewitness/sim/record"
)

// coverRoom is how much of what may be long the cover shows.
type coverRoom struct {
	prose   int // lines of the purpose, of the notes and of the assumptions
	cases   int
	margins int
	history int // revisions, the newest
	files   int // fingerprints of files that the design reads
}

// everything is the room of a cover that may go on on a second page.
var everything = coverRoom{prose: math.MaxInt, cases: coverCases, margins: worstMargins, history: coverHistory, files: math.MaxInt}

// less is about half the room.
func (r coverRoom) less() coverRoom {
	half := func(n int) int { return max(min(n, 16)/2, 1) }
	return coverRoom{half(r.prose), half(r.cases), half(r.margins), half(r.history), half(r.files)}
}

// cover writes the first page: what the document is, its verdict and what that
// rests on, and who answers for it.
func (d *document) cover(room coverRoom) {
	d.b.Overline("Design verification record, transmission-line network")
	d.b.Title(title(d.r))
	d.identity(room)
	d.banner(room)
	d.coverClaims()
	d.worstMargins(room)
	d.cases(room)
	d.assumptions(room)
	d.history(room)
	d.signatures()
	d.fingerprint(room)
	if d.opt.Summary {
		d.b.Note("A summary: every figure is in the attached result, and a record made without --summary shows them.")
	}
}

// summary writes the cover on one page, with as much as finds room there.
func (d *document) summary(paper sheet.Paper) {
	for room := everything; ; room = room.less() {
		d.b = sheet.New(meta(d.r), paper)
		d.cover(room)
		if d.b.Pages() == 1 || room == room.less() {
			return
		}
	}
}

// field is a label and its value.
type field struct{ label, value string }

// identity writes what identifies the document and what it is for.
func (d *document) identity(room coverRoom) {
	g := d.r.Design
	d.b.Fields([]sheet.Field{
		{Label: "Document number", Value: orElse(g.Number, "none"), Lines: room.prose},
		{Label: "Revision", Value: orElse(g.Revision, "none"), Lines: room.prose},
		{Label: "Date", Value: dated(g), Lines: room.prose},
		{Label: "Design file", Value: path.Base(g.File), Lines: room.prose},
		{Label: "Purpose", Value: orElse(g.Purpose, "not stated"), Wide: true, Lines: room.prose},
	})
	if g.Notes != "" {
		d.b.Fields([]sheet.Field{{Label: "Notes", Value: g.Notes, Wide: true, Lines: room.prose}})
	}
}

// dated is the date of the document and where it is from.
func dated(g record.Design) string {
	from := map[string]string{
		"record":      "given in the design",
		"environment": "from SOURCE_DATE_EPOCH",
		"file":        "time of the design file",
	}[g.DateFrom]
	switch {
	case g.Date == "":
		return "not stated"
	case from == "":
		return g.Date
	}
	return g.Date + ", " + from
}

// banner draws the verdict: word, shape and colour.
func (d *document) banner(room coverRoom) {
	v := d.r.Verdict
	word := typeset.Style{Face: typeset.Bold, Size: 15, Color: colorOf(v)}
	lines := sheet.First(sheet.BodyStyle.Wrap(d.reason(), d.b.Width()-bannerIndent-10), min(bannerLines, max(room.prose, 2)))
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

// coverCases is how many cases the cover has room for.
const coverCases = 10

// cases writes the summary of the cases, the worst where they are many.
func (d *document) cases(room coverRoom) {
	list := d.r.Cases
	if len(list) > room.cases {
		list = slices.Clone(list)
		slices.SortStableFunc(list, func(a, b record.Case) int { return b.Verdict.Rank() - a.Verdict.Rank() })
		list = list[:room.cases]
	}
	t := d.caseTable(list)
	title := "Cases"
	if len(list) < len(d.r.Cases) {
		title = "Cases: " + format.Count(int64(len(list))) + " of " + format.Count(int64(len(d.r.Cases))) + ", the worst"
	}
	d.b.Label(title, d.b.Kept(t))
	d.b.Table(t)
}

// caseTable has a row for each case.
func (d *document) caseTable(cases []record.Case) sheet.Table {
	rated := d.rated()
	t := sheet.Table{Columns: []sheet.Column{{Head: "Case", Grow: 2}, {Head: "Verdict", Grow: 2}, {Head: "Requirements", Grow: 2}}}
	if rated {
		t.Columns = append(t.Columns, sheet.Column{Head: "Ratings", Grow: 2})
	}
	t.Columns = append(t.Columns, right("Solutions differ by"), right("Settled to 1"+format.Space+"% after"), right("Peak voltage"), right("Peak current"))
	for _, c := range cases {
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
	return t
}
