// Package change finds what is different between two design files, term by
// term, in the words of the files.
package change

import (
	"slices"
	"strings"

	"linewitness/sim/design"
	"linewitness/sim/record"
)

// Between compares two designs as they are written, in the order of the new one; what
// is no more stands where it stood. A value in other words, "0.085 km" for "85 m",
// is told as such.
func Between(old, now design.Term) []record.Change {
	c := &comparison{}
	for _, p := range aligned(old.Terms, now.Terms) {
		if p.key() == "cases" {
			c.cases(p)
			continue
		}
		c.part("", p)
	}
	return c.list
}

// A comparison gathers changes.
type comparison struct{ list []record.Change }

// groups are the keys of a design file whose values have names, and what one of
// them is called.
var groups = map[string]string{
	"lines": "line", "sections": "section", "loads": "load", "elements": "element",
	"requirements": "requirement", "claims": "claim",
}

// part compares one part of the file, or of what a case changes in it.
func (c *comparison) part(inCase string, p pair) {
	kind, named := groups[p.key()]
	if !named {
		c.thing(inCase, p.key(), p)
		return
	}
	entries := aligned(p.old.terms(), p.now.terms())
	for _, e := range paired(entries) {
		c.thing(inCase, kind+" "+e.key(), e)
	}
}

// thing compares what stands under one name: key by key if both have it and it
// has keys.
func (c *comparison) thing(inCase, place string, p pair) {
	at := record.Change{Case: inCase, Place: place}
	switch {
	case p.renamed():
		at.Kind, at.Old, at.New = record.RenamedTerm, p.old.Key, p.now.Key
		c.list = append(c.list, at)
	case p.old == nil || p.now == nil:
		c.add(at, p)
	default:
		c.terms(at, p)
	}
}

// terms compares the keys of a mapping, and of those inside it.
func (c *comparison) terms(at record.Change, p pair) {
	if p.old == nil || p.now == nil || len(p.old.Terms) == 0 || len(p.now.Terms) == 0 {
		c.add(at, p)
		return
	}
	for _, inner := range aligned(p.old.Terms, p.now.Terms) {
		below := at
		below.Term = strings.TrimSpace(at.Term + " " + inner.key())
		c.terms(below, inner)
	}
}

// add notes a term that differs.
func (c *comparison) add(at record.Change, p pair) {
	at.Old, at.New = p.old.text(), p.now.text()
	switch {
	case p.old == nil:
		at.Kind = record.AddedTerm
	case p.now == nil:
		at.Kind = record.RemovedTerm
	case at.Old == at.New:
		return
	case design.SameValue(at.Old, at.New):
		at.Kind = record.RewordTerm
	default:
		at.Kind = record.ChangedTerm
	}
	c.list = append(c.list, at)
}

// cases compares the cases, each part of them like the parts of the file.
func (c *comparison) cases(p pair) {
	for _, k := range paired(aligned(p.old.terms(), p.now.terms())) {
		if k.old == nil || k.now == nil || k.renamed() {
			c.thing("", "case "+k.key(), k)
			continue
		}
		for _, part := range aligned(k.old.Terms, k.now.Terms) {
			c.part(k.key(), part)
		}
	}
}

// Files compares the files that the designs read, by their names.
func Files(old, now *design.File) (all []record.Change) {
	for _, a := range now.Attachments {
		i := slices.IndexFunc(old.Attachments, func(b design.Attachment) bool { return a.Name == b.Name })
		if i >= 0 && old.Attachments[i].SHA256 != a.SHA256 {
			all = append(all, record.Change{
				Kind: record.ChangedTerm, Place: "file " + a.Name, Term: "content, by its SHA-256",
				Old: short(old.Attachments[i].SHA256), New: short(a.SHA256),
			})
		}
	}
	return all
}

// short is the begin of a checksum, enough to tell two apart.
func short(sum string) string { return sum[:min(len(sum), 12)] }
