package report

import (
	"slices"
	"strings"

	"linewitness/report/format"
	"linewitness/report/ink"
	"linewitness/report/sheet"
	"linewitness/sim/record"
)

// assumptions says what the record rests on and nobody has confirmed, and how
// many data have what origin.
func (d *document) assumptions(room coverRoom) {
	kinds := d.lineKinds()
	n := countData(kinds, unconfirmed)
	mark, clr, word := sheet.Confirm, ink.Doubt, format.Plural(int64(n), "assumption")+" to confirm:"
	text := strings.Join(assumed(kinds), " ")
	if n == 0 {
		mark, clr, word, text = sheet.Holds, ink.Good, "No assumption to confirm.", ""
	}
	text = trimmed(text + " " + originsOf(kinds))
	d.b.Space(5)
	d.b.VerdictOf(room.prose, mark, clr, word, text)
}

// countData counts the pieces of data of a sort.
func countData(kinds []lineKind, sort func(record.Pedigree) bool) (n int) {
	for _, k := range kinds {
		for _, p := range k.Pedigree {
			if sort(p) {
				n++
			}
		}
	}
	return n
}

// assumed says which data need confirmation, those of the cable table first: a
// sentence for the lines that lack the same.
func assumed(kinds []lineKind) []string {
	var out []string
	for _, g := range []struct{ kind, words string }{
		{"catalogue", "From the cable table (nominal, from memory; to be replaced by the sheet of the cable in hand): "},
		{"assumed", "Assumed by the program: "},
	} {
		var lines casesOf // statements are the data, cases the lines
		for _, k := range kinds {
			if whats := whatOf(k.Pedigree, g.kind); whats != "" {
				lines.add(whats, k.label)
			}
		}
		var parts []string
		for _, what := range lines.statements {
			parts = append(parts, what+" of "+among(lines.cases[what], mostNames))
		}
		if len(parts) > 0 {
			out = append(out, g.words+strings.Join(parts, "; ")+".")
		}
	}
	return out
}

// whatOf names the data of one origin, each once.
func whatOf(ps []record.Pedigree, kind string) string {
	var whats []string
	for _, p := range ps {
		if p.Kind == kind && !slices.Contains(whats, p.What) {
			whats = append(whats, p.What)
		}
	}
	return listed(whats)
}

// originsOf counts the other data of the lines by where they come from.
func originsOf(kinds []lineKind) string {
	var parts []string
	for _, g := range []struct{ kind, words string }{
		{"measured", "measured"},
		{"datasheet", "from data sheets"},
		{"geometry", "from dimensions"},
		{"given", "given without an origin"},
	} {
		if n := countData(kinds, func(p record.Pedigree) bool { return p.Kind == g.kind }); n > 0 {
			parts = append(parts, format.Count(int64(n))+format.Space+g.words)
		}
	}
	s := ""
	if len(parts) > 0 {
		s = "Other data of the lines: " + listed(parts) + ". "
	}
	return s + "Source, loads and elements are as given; their origin is not stated."
}
