package report

import (
	"fmt"

	"linewitness/report/format"
	"linewitness/sim/record"
)

// differences says in what the model of a case differs from the nominal one.
func (d *document) differences(c *record.Case) {
	nominal := d.nominal()
	if c == nominal {
		return
	}
	d.b.Subheading("What differs from "+nominal.Name, 30)
	list := changes(nominal.Model, c.Model)
	if len(list) == 0 {
		d.b.Paragraph("Nothing in the model.")
	}
	for _, s := range list {
		d.b.Item(s)
	}
}

// changes lists what differs between two models, term by term.
func changes(a, b record.Model) []string {
	var out []string
	if a.Frequency != b.Frequency {
		out = append(out, became("frequency", format.SI(a.Frequency, "Hz"), format.SI(b.Frequency, "Hz")))
	}
	if x, y := sourceTerm(a.Source), sourceTerm(b.Source); x != y {
		out = append(out, became("source", x, y))
	}
	out = append(out, changedLines(a, b)...)
	derived := a.Frequency == b.Frequency // else everything that follows from it differs
	out = append(out, compare("section", sectionTerms(a, derived), sectionTerms(b, derived))...)
	out = append(out, compare("load", partTerms(a.Loads), partTerms(b.Loads))...)
	return append(out, compare("element", partTerms(a.Elements), partTerms(b.Elements))...)
}

func became(what, from, to string) string { return what + ": " + to + " instead of " + from }

func sourceTerm(s record.ModelSource) string {
	t := s.Given + " at " + s.At + ", impedance " + format.Complex(s.Impedance, "Ω") + ", start " + s.Start
	if s.Stop != "" {
		t += ", stop " + s.Stop
	}
	return t
}

// term is a named part of a model in words.
type term struct{ name, words string }

// changedLines compares the kinds of line that both models have; one that only
// one of them has shows in its sections.
func changedLines(a, b record.Model) []string {
	var out []string
	for _, x := range a.Lines {
		for _, y := range b.Lines {
			if p, q := lineTerm(x), lineTerm(y); x.Name == y.Name && p != q {
				out = append(out, became("line "+x.Name, p, q))
			}
		}
	}
	return out
}

func lineTerm(l record.ModelLine) string { return l.Text + " (" + l.Model + ")" }

// sectionTerms gives the sections in words, with or without what follows from
// the frequency.
func sectionTerms(m record.Model, derived bool) []term {
	var out []term
	for _, s := range m.Sections {
		words := fmt.Sprintf("%s to %s, %s, line %s", s.From, s.To, s.Given, s.Line)
		if derived {
			words = fmt.Sprintf("%s to %s, %s (%s), line %s, %s %s, R′ %s",
				s.From, s.To, s.Given, format.Wavelengths(s.Wavelengths), s.Line, z0, format.Complex(s.Z0, "Ω"), format.SI(s.R, "Ω/m"))
		}
		out = append(out, term{s.Name, words})
	}
	return out
}

func partTerms(parts []record.ModelPart) []term {
	var out []term
	for _, p := range parts {
		at := p.At
		if p.To != "" {
			at += " to " + p.To
		}
		out = append(out, term{p.Name, p.Given + " at " + at})
	}
	return out
}

func compare(kind string, a, b []term) []string {
	var out []string
	now := map[string]string{}
	for _, t := range b {
		now[t.name] = t.words
	}
	before := map[string]bool{}
	for _, t := range a {
		before[t.name] = true
		switch words, there := now[t.name]; {
		case !there:
			out = append(out, kind+" "+t.name+" is absent ("+t.words+")")
		case words != t.words:
			out = append(out, became(kind+" "+t.name, t.words, words))
		}
	}
	for _, t := range b {
		if !before[t.name] {
			out = append(out, kind+" "+t.name+" is added: "+t.words)
		}
	}
	return out
}
