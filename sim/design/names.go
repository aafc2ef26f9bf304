package design

import (
	"slices"
	"strings"
)

// longestName is how long a name may be, so that labels fit in drawings.
const longestName = 40

// isName reports a name: a letter, then letters, digits, _ and -.
func isName(s string) bool {
	return s != "" && isLetter(s[0]) && isMadeOf(s, "_-")
}

// isID reports an id of a requirement or claim, which may begin with a digit and may
// be divided as documents number their clauses: 4.2/1.
func isID(s string) bool {
	return s != "" && (isLetter(s[0]) || isDigit(s[0])) && isMadeOf(s, "_-./")
}

func isMadeOf(s, more string) bool {
	for i := range len(s) {
		if !isLetter(s[i]) && !isDigit(s[i]) && strings.IndexByte(more, s[i]) < 0 {
			return false
		}
	}
	return len(s) <= longestName
}

func isLetter(c byte) bool { return c >= 'a' && c <= 'z' || c >= 'A' && c <= 'Z' }
func isDigit(c byte) bool  { return c >= '0' && c <= '9' }

// The most entries of each mapping. A case is solved with dense matrices, so
// a design near these bounds is far beyond what can be run; the bounds keep
// the checks of all cases together well under a second.
var most = map[string]int{"lines": 500, "sections": 500, "loads": 500, "elements": 500, "cases": 100, "requirements": 500, "claims": 500}

// checkName tells of a name that breaks the rules of names.
func (w *walker) checkName(n *node, what string) bool {
	if isName(n.text) {
		return true
	}
	w.problem(n.pos, say("a name begins with a letter and goes on with letters, digits, _ and -, at most %d in all", longestName),
		"%q is not a name for %s", n.text, what)
	return false
}

// items reads a mapping of named entries, kind being "section" and so on.
func (w *walker) items(file *fields, key, kind string) []item {
	n := file.node(key)
	if n == nil || !w.isKind(n, file.name(key), mapping) {
		return nil
	}
	if len(n.pairs) > most[key] {
		w.problem(n.pairs[most[key]].key.pos, say("split the design"), "more than %d %s", most[key], key)
		return nil
	}
	var items []item
	for _, p := range n.pairs {
		what := kind + ` "` + p.key.text + `"`
		w.checkName(p.key, withArticle(kind))
		if p.value.kind == null {
			w.problem(p.key.pos, say("give it a value or delete the line"), "%s has no value", what)
			continue
		}
		w.entry, w.siblings = p.key.text, key
		items = append(items, item{p.key, w.fields(p.value, p.key.pos, what, named[key])})
	}
	w.entry = ""
	return items
}

// names lists what there is, whether or not it reads well.
func names(items []item) (names []string) {
	for _, i := range items {
		names = append(names, i.name.text)
	}
	return names
}

// checkUnique tells of sections, loads and elements that share a name.
func (w *walker) checkUnique() {
	first := map[string]int{}
	for _, set := range [][]item{w.sections, w.loads, w.elements} {
		for _, i := range set {
			if line := first[i.name.text]; line > 0 {
				w.problem(i.name.pos, say("results are labelled with these names, so no two may be the same"),
					"the name %q is taken by a section, load or element on line %d", i.name.text, line)
				continue
			}
			first[i.name.text] = i.name.pos.Line
		}
	}
}

// junctionName reads a junction's name.
func (f *fields) junction(key string) string {
	n := f.scalar(key)
	if n == nil || !f.w.checkName(n, "a junction") {
		return ""
	}
	return n.text
}

// pair reads a list of two names.
func (f *fields) pair(key string) (names [2]string, nodes [2]*node, ok bool) {
	n := f.node(key)
	if n == nil || !f.w.isKind(n, f.name(key), list) {
		return names, nodes, false
	}
	if len(n.items) != 2 {
		f.w.problem(n.pos, say("write [a, b]"), "%s must name two, not %d", f.name(key), len(n.items))
		return names, nodes, false
	}
	for i, item := range n.items {
		if !f.w.isKind(item, "an entry of "+f.name(key), scalar) || !f.w.checkName(item, "a junction or load") {
			return names, nodes, false
		}
		names[i], nodes[i] = item.text, item
	}
	if names[0] == names[1] {
		f.w.problem(n.items[1].pos, say("name two different ones"), "%s names %q twice", f.name(key), names[0])
		return names, nodes, false
	}
	return names, nodes, true
}

// withArticle puts a or an before a noun.
func withArticle(noun string) string {
	if strings.ContainsAny(noun[:1], "aeio") {
		return "an " + noun
	}
	return "a " + noun
}

func contains(names []string, name string) bool { return slices.Contains(names, name) }
