package design

import "slices"

// resolveCases works out in which cases a requirement is judged. One that is
// relative to a case is not judged in that case itself.
func (w *walker) resolveCases(d *demand, cases []string) {
	d.Cases = []string{nominalName}
	if n := d.fields.node("cases"); n != nil {
		d.Cases = w.namedCases(d, n, cases)
	}
	n := d.fields.scalar("relative_to")
	if n == nil {
		return
	}
	if !contains(cases, n.text) {
		w.problem(n.pos, didYouMean(n.text, cases), "there is no case %q", n.text)
		return
	}
	if d.all {
		d.Cases = slices.DeleteFunc(d.Cases, func(c string) bool { return c == n.text })
	}
	if contains(d.Cases, n.text) || len(d.Cases) == 0 {
		w.problem(n.pos, say("list in cases: the cases to compare with it"), "%s compares case %q with itself", d.fields.what, n.text)
	}
}

func (w *walker) namedCases(d *demand, n *node, cases []string) []string {
	if n.kind == scalar && n.text == "all" {
		d.all = true
		return slices.Clone(cases)
	}
	d.explicit = []*node{n}
	if n.kind == list {
		d.explicit = n.items
	}
	var chosen []string
	for _, c := range d.explicit {
		switch {
		case !w.isKind(c, d.fields.name("cases"), scalar):
		case !contains(cases, c.text):
			w.problem(c.pos, didYouMean(c.text, append([]string{"all"}, cases...)), "there is no case %q", c.text)
		case contains(chosen, c.text):
			w.problem(c.pos, say("delete it"), "%s names %q twice", d.fields.name("cases"), c.text)
		default:
			chosen = append(chosen, c.text)
		}
	}
	if len(n.items) == 0 && n.kind == list {
		w.problem(n.pos, say("list cases, or delete the line for the nominal design"), "%s is an empty list", d.fields.name("cases"))
	}
	return chosen
}

// An inventory is what a design has for requirements to name.
type inventory struct {
	w         *walker
	sections  map[string]bool
	loads     map[string]bool
	junctions map[string]bool
	at        map[string]string // the junctions of the loads
}

func takeInventory(w *walker) *inventory {
	set := func(names []string) map[string]bool {
		m := make(map[string]bool, len(names))
		for _, n := range names {
			m[n] = true
		}
		return m
	}
	inv := &inventory{w, set(names(w.sections)), set(names(w.loads)), set(w.design.Junctions), map[string]string{}}
	for _, l := range w.design.Loads {
		inv.at[l.Name] = l.At
	}
	return inv
}

// A stock is the inventories of all designs of a file.
type stock struct {
	of    map[string]*inventory // by case
	order []*inventory          // the nominal design first
}

func takeStock(walkers []*walker) stock {
	s := stock{of: map[string]*inventory{}}
	for i, w := range walkers {
		name := nominalName
		if i > 0 {
			name = w.patch.name
		}
		s.of[name] = takeInventory(w)
		s.order = append(s.order, s.of[name])
	}
	return s
}

// judge checks what the requirements name against every design they are
// judged in, and returns them.
func (s stock) judge(demands []*demand) (out []Requirement) {
	for _, d := range demands {
		s.checkSubjects(d, say("keep it, or leave the case out of cases: in the requirement on line %d", d.Pos.Line))
		out = append(out, d.Requirement)
	}
	return out
}

// A subject is something a requirement names.
type subject struct {
	node *node
	kind string // as diagnostics call it
	in   func(*inventory) []map[string]bool
}

func sectionsOf(i *inventory) []map[string]bool  { return []map[string]bool{i.sections} }
func loadsOf(i *inventory) []map[string]bool     { return []map[string]bool{i.loads} }
func junctionsOf(i *inventory) []map[string]bool { return []map[string]bool{i.junctions} }
func placesOf(i *inventory) []map[string]bool {
	return []map[string]bool{i.junctions, i.loads}
}

func (d *demand) subjects() (s []subject) {
	add := func(n *node, kind string, in func(*inventory) []map[string]bool) {
		if n != nil && n.kind == scalar && n.text != "" {
			s = append(s, subject{n, kind, in})
		}
	}
	add(d.fields.node("section"), "section", sectionsOf)
	add(d.fields.node("load"), "load", loadsOf)
	add(d.fields.node("at"), "junction", junctionsOf)
	for _, n := range d.between {
		if d.Quantity == PowerSplit {
			add(n, "load", loadsOf)
		} else {
			add(n, "junction or load", placesOf)
		}
	}
	return s
}

func (s subject) isIn(i *inventory) bool {
	return slices.ContainsFunc(s.in(i), func(m map[string]bool) bool { return m[s.node.text] })
}

// checkSubjects checks the names of a demand; lost hints at what to do about
// one that a case of it has lost.
func (s stock) checkSubjects(d *demand, lost hint) {
	for _, x := range d.subjects() {
		s.checkSubject(d, x, lost)
	}
}

// checkSubject tells of a name that no design knows at the name, and of one
// that a case has lost at the case.
func (s stock) checkSubject(d *demand, x subject, lost hint) {
	nominal := s.order[0].w
	if !nominal.whole && x.kind != "section" && x.kind != "load" {
		return // a junction may be missing because of what has been told
	}
	if !slices.ContainsFunc(s.order, x.isIn) {
		nominal.problem(x.node.pos, x.nearest(s.order[0]), "there is no %s %q", x.kind, x.node.text)
		return
	}
	for _, i := range s.order {
		d.checkClear(x, i)
	}
	judgedIn := d.Cases
	if d.RelativeTo != "" && s.of[d.RelativeTo] != nil {
		judgedIn = append(slices.Clone(judgedIn), d.RelativeTo)
	}
	for _, c := range judgedIn {
		if i := s.of[c]; i != nil && i.w.whole && !x.isIn(i) {
			i.w.problem(x.node.pos, lost, "%s needs %s %q, which is not there", d.fields.what, x.kind, x.node.text)
		}
	}
}

// checkClear tells of a name that could be a junction or a load elsewhere.
func (d *demand) checkClear(s subject, i *inventory) {
	name := s.node.text
	if s.kind == "junction or load" && i.junctions[name] && i.loads[name] && i.at[name] != name {
		i.w.problem(s.node.pos, say("rename one of them"), "%q is a junction and also a load at %q", name, i.at[name])
	}
}

func (s subject) nearest(i *inventory) hint {
	return func() string { return didYouMean(s.node.text, s.known(i))() }
}

func (s subject) known(i *inventory) (names []string) {
	for _, m := range s.in(i) {
		for n := range m {
			names = append(names, n)
		}
	}
	slices.Sort(names)
	return slices.Compact(names)
}
