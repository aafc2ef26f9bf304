package report

import (
	"bytes"
	"fmt"
	"io"
	"reflect"
	"slices"

	"linewitness/report/archive"
	"linewitness/report/format"
	"linewitness/report/sheet"
	"linewitness/sim/record"
)

// WriteComparison writes a comparison as a PDF document of one page, for the
// revision history. What finds no room is summed up.
//
// It fails as WritePDF does.
func WriteComparison(w io.Writer, c *record.Comparison, opt Options) error {
	d, err := buildComparison(c, opt)
	if err != nil {
		return err
	}
	file, err := d.finish()
	if err == nil {
		_, err = w.Write(file)
	}
	return explain(err)
}

func (d *comparison) finish() ([]byte, error) {
	var page bytes.Buffer
	if err := d.b.Write(&page); err != nil {
		return nil, err
	}
	return archive.Finish(page.Bytes(), d.properties(), nil)
}

// buildComparison lays the page out with all rows, and then with fewer and fewer
// until it is one page.
func buildComparison(c *record.Comparison, opt Options) (*comparison, error) {
	paper, err := opt.paper()
	if err != nil {
		return nil, err
	}
	own := *c
	clean(reflect.ValueOf(&own).Elem())
	d := &comparison{c: &own}
	d.changes = own.Changes
	d.effects, d.figures, d.before = d.sorted()
	for room := d.most(); ; room = room.less() {
		d.b = sheet.New(sheet.Meta{Header: d.title(), Number: own.New.Number, Revision: own.New.Revision}, paper)
		d.page(room)
		if d.b.Pages() == 1 || room == (rows{}) {
			return d, nil
		}
	}
}

// comparison is a comparison being laid out.
type comparison struct {
	c       *record.Comparison
	b       *sheet.Book
	changes []record.Change
	effects []effectIn // that are judged and not as before
	figures []effectIn // key figures that moved
	before  int        // judged, and as before
}

// effectIn is an effect and its case.
type effectIn struct {
	name string
	*record.Effect
}

// sorted gathers what is worth a row: the worst first.
func (d *comparison) sorted() (effects, figures []effectIn, before int) {
	for i := range d.c.Cases {
		k := &d.c.Cases[i]
		for j := range k.Effects {
			e := effectIn{k.Name, &k.Effects[j]}
			switch {
			case e.Kind == record.FigureEffect:
				if e.Matters() && k.Old != "" && k.New != "" { // else there is nothing to compare with
					figures = append(figures, e)
				}
			case e.Matters():
				effects = append(effects, e)
			default:
				before++
			}
		}
	}
	slices.SortStableFunc(effects, func(a, b effectIn) int { return a.weight() - b.weight() })
	return effects, figures, before
}

// weight orders effects: a worse verdict first, then a better one, then margins.
func (e effectIn) weight() int {
	turned := e.Old != nil && e.New != nil && e.Old.Verdict != e.New.Verdict
	switch {
	case e.Direction == record.Worse && turned:
		return 0
	case turned:
		return 1
	case e.Direction == record.Worse:
		return 2
	case e.Direction == record.NewFigure, e.Direction == record.NoMore:
		return 3
	}
	return 4
}

// rows is how many rows each table may have.
type rows struct{ changes, effects, figures int }

// most bounds each from the start: no page has room for more.
func (d *comparison) most() rows {
	const page = 40
	return rows{min(page, len(d.changes)), min(page, len(d.effects)), min(page, len(d.figures))}
}

// less takes an eighth, and one row at least, from the table that is longest for
// what it tells: a key figure tells half of what the others do.
func (r rows) less() rows {
	longest, length := &r.figures, 2*r.figures
	for _, n := range []*int{&r.changes, &r.effects} {
		if *n > length {
			longest, length = n, *n
		}
	}
	*longest -= min(*longest, *longest/8+1)
	return r
}

func (d *comparison) title() string {
	return orElse(d.c.New.Title, d.c.New.File)
}

func (d *comparison) properties() archive.Meta {
	creator := archive.ComparisonCreator + " " + d.c.New.Version
	return archive.Meta{
		Title: d.title() + ", comparison", Subject: "What changed from " + d.c.Old.File + " to " + d.c.New.File,
		Creator: creator, Producer: creator, Version: d.c.New.Version, Lang: "en-GB",
	}
}

// page lays out the page.
func (d *comparison) page(r rows) {
	d.b.Overline("Comparison of two versions of a design, transmission-line network")
	d.b.Title(d.title())
	d.b.Space(12)
	d.sides()
	d.finding()
	d.changeTable(r.changes)
	d.effectTable(r.effects)
	d.figureTable(r.figures)
	d.b.Note("Margins are distances to the nearer limit, of a claim what its tolerance leaves. As before: by no more than the uncertainties of both. " +
		"Amplitudes are peak where nothing else is said.")
}

// sides writes what identifies the two designs.
func (d *comparison) sides() {
	t := sheet.Table{Columns: []sheet.Column{{Head: ""}, {Head: "Old", Share: 1}, {Head: "New", Share: 1}}}
	old, now := &d.c.Old, &d.c.New
	for _, row := range [][3]string{
		{"File", old.File + " (" + old.Kind + ")", now.File + " (" + now.Kind + ")"},
		{"Document, revision", identified(old), identified(now)},
		{"SHA-256 of the design file", orElse(old.SHA256, format.Missing), orElse(now.SHA256, format.Missing)},
		{"Solved by", "linewitness " + old.Version, "linewitness " + now.Version},
	} {
		t.Rows = append(t.Rows, sheet.Row(row[:]...))
	}
	t.Rows = append(t.Rows, []sheet.Cell{
		{Text: "Verdict"},
		{Text: string(old.Verdict), Mark: markOf(old.Verdict), Bold: true},
		{Text: string(now.Verdict), Mark: markOf(now.Verdict), Bold: true},
	})
	d.b.Table(t)
}

func identified(s *record.Side) string {
	return orElse(s.Number, "no number") + ", " + orElse(prefixed("revision ", s.Revision), "no revision")
}

// finding writes the outcome in a sentence.
func (d *comparison) finding() {
	mark, color, word := sheet.Holds, colorOf(record.Verified), "No verdict is worse."
	if d.c.Worsened {
		mark, color, word = sheet.Fails, colorOf(record.Missed), "A verdict is worse."
	}
	d.b.Verdict(mark, color, word, comparisonFinding(d))
}

func comparisonFinding(d *comparison) string {
	count := map[record.Direction]int{}
	for _, e := range d.effects {
		count[e.Direction]++
	}
	s := fmt.Sprintf("%s in the design. Requirements, ratings and claims in all cases: ", format.Plural(int64(len(d.changes)), "change"))
	var parts []string
	for _, dir := range []record.Direction{record.Worse, record.Better, record.Moved, record.NewFigure, record.NoMore} {
		if count[dir] > 0 {
			parts = append(parts, format.Count(int64(count[dir]))+format.Space+string(dir))
		}
	}
	parts = append(parts, format.Count(int64(d.before))+format.Space+"as before")
	return s + listed(parts) + "."
}
