package design

import "slices"

// A patch is one case: a JSON Merge Patch (RFC 7396) on the nominal design.
type patch struct {
	name   string
	node   *node
	begin  Pos // the name of the case
	last   Pos // the last node of the patch
	anchor Pos // what to point at for a problem that the patch brings about elsewhere
}

func newPatch(name, value *node) *patch {
	return &patch{name.text, value, name.pos, value.end(), anchorOf(name, value)}
}

// covers reports whether a place of the file lies in the patch.
func (p *patch) covers(pos Pos) bool {
	return pos.compare(p.begin) >= 0 && pos.compare(p.last) <= 0
}

// anchorOf goes down a patch for as long as it changes one thing only.
func anchorOf(key, value *node) Pos {
	for value.kind == mapping && len(value.pairs) == 1 {
		key, value = value.pairs[0].key, value.pairs[0].value
	}
	return key.pos
}

// whyNot says why a case cannot change a key of the file.
var whyNot = map[string]string{
	"format":       "the format is that of the file",
	"record":       "the record is about all cases",
	"convention":   "the convention is that of the file",
	"requirements": "give a requirement the cases it is judged in, cases: [nominal, iced]",
	"claims":       "give a claim the case it is made of, case: iced",
	"cases":        "a case is a change of the nominal design, not of another case",
	"grid":         "all cases are solved and compared alike",
}

// readCases reads the cases of the nominal design's file.
func (w *walker) readCases(file *fields, root *node) (patches []*patch) {
	n := file.node("cases")
	if n == nil || !w.isKind(n, file.name("cases"), mapping) {
		return nil
	}
	if len(n.pairs) > most["cases"] {
		w.problem(n.pairs[most["cases"]].key.pos, say("split the design"), "more than %d %s", most["cases"], "cases")
		return nil
	}
	for _, p := range n.pairs {
		switch {
		case p.key.text == "nominal" || p.key.text == "all":
			w.problem(p.key.pos, say("choose another name"), "a case cannot be called %q, which means something else in requirements", p.key.text)
		case !w.checkName(p.key, "a case"):
		case p.value.kind == null:
			w.problem(p.key.pos, say("give what it changes, or delete it"), "case %q has no value", p.key.text)
		case w.isKind(p.value, `case "`+p.key.text+`"`, mapping):
			w.checkPatch(p.key.text, p.value)
			w.checkRemovals(p.key.text, p.value, root)
			patches = append(patches, newPatch(p.key, p.value))
		}
	}
	return patches
}

// checkPatch tells of keys that a case cannot change and of values it sets
// where there is nothing to remove.
func (w *walker) checkPatch(name string, value *node) {
	for _, p := range value.pairs {
		reason, known := whyNot[p.key.text]
		switch {
		case known:
			w.problem(p.key.pos, say("%s", rawText(reason)), "case %q cannot change %q", name, p.key.text)
		case !caseTable.has(p.key.text):
			w.problem(p.key.pos, didYouMean(p.key.text, caseTable.names()), "unknown key %q in case %q", p.key.text, name)
		}
	}
}

// checkRemovals tells of a null that removes nothing. RFC 7396 lets it pass,
// but here it is a misspelled name, and the case would be the nominal design
// under another name: a fault that the record would show as harmless.
func (w *walker) checkRemovals(name string, patch, target *node) {
	for _, p := range patch.pairs {
		old := target.get(p.key.text)
		switch {
		case p.value.kind == null && old == nil:
			w.problem(p.key.pos, didYouMean(p.key.text, target.keys()), "case %q removes %q, which is not there", name, p.key.text)
		case p.value.kind == mapping && old != nil && old.kind == mapping:
			w.checkRemovals(name, p.value, old)
		}
	}
}

// apply returns the file with the patch merged into it.
func (p *patch) apply(file *node) *node {
	allowed := &node{kind: mapping, pos: p.node.pos}
	for _, x := range p.node.pairs {
		if caseTable.has(x.key.text) {
			allowed.pairs = append(allowed.pairs, x)
		}
	}
	return merge(file, allowed, fileTable, "")
}

// merge is MergePatch of RFC 7396 on nodes that keep their places: null
// removes, mappings merge, anything else replaces.
//
// Beyond the RFC, a patch that gives one of two forms that exclude each other
// drops the inherited other form: on {r: 36.5 ohm, l: 1.2 uH} the patch
// {impedance: short} gives {impedance: short}. By the letter of the RFC a
// design would have to remove r and l by hand, and a forgotten one would be an
// error that speaks of a line the case does not show.
//
// The table is that of the mapping, nil if it is not known; key is where the
// mapping stands in its parent.
func merge(target, patch *node, t *table, key string) *node {
	if patch.kind != mapping {
		return patch
	}
	out := &node{kind: mapping, pos: patch.pos}
	changes := make(map[string]*node, len(patch.pairs))
	for _, p := range patch.pairs {
		changes[p.key.text] = p.value
	}
	if target != nil && target.kind == mapping {
		out.pos = target.pos
		dropped := overridden(patch, t)
		for _, p := range target.pairs {
			change, changed := changes[p.key.text]
			delete(changes, p.key.text)
			switch {
			case !changed && slices.Contains(dropped, p.key.text):
			case !changed:
				out.pairs = append(out.pairs, p)
			case change.kind != null:
				out.pairs = append(out.pairs, pair{p.key, merge(p.value, change, inner(t, key, p.key.text), p.key.text)})
			}
		}
	}
	for _, p := range patch.pairs {
		if change, left := changes[p.key.text]; left && change.kind != null {
			out.pairs = append(out.pairs, pair{p.key, merge(nil, change, inner(t, key, p.key.text), p.key.text)})
		}
	}
	return out
}

// inner is the table of the value of a key.
func inner(t *table, parent, key string) *table {
	if t == nil {
		return named[parent]
	}
	return nested[t][key]
}

// nested are the mappings inside mappings in which forms exclude each other.
var nested = map[*table]map[string]*table{
	fileTable:    {"source": sourceTable},
	sourceTable:  {"start": startTable, "impedance": seriesTable},
	lineTable:    {"geometry": geometryTable},
	loadTable:    {"parallel": lumpedTable, "series": lumpedTable},
	elementTable: {"parallel": lumpedTable, "series": lumpedTable},
}

// overridden lists the keys whose inherited values a patch drops because it
// gives another form of the same thing.
func overridden(patch *node, t *table) (keys []string) {
	if t == nil {
		return nil
	}
	gives := func(k string) bool { v := patch.get(k); return v != nil && v.kind != null }
	for _, c := range t.choices {
		for i, f := range c.forms {
			if !slices.ContainsFunc(f.all(), gives) {
				continue
			}
			for j, other := range c.forms {
				if j != i {
					keys = append(keys, other.all()...)
				}
			}
		}
	}
	if profile := patch.get("profile"); t == startTable && profile != nil && profile.text == "abrupt" {
		keys = append(keys, "rise")
	}
	return keys
}
