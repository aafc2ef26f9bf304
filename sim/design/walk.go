package design

import (
	"slices"
	"strings"
)

// A walker turns nodes into one Design. It walks the nominal design and then
// every case, merged with it.
type walker struct {
	*problems
	folder *folder
	patch  *patch  // the case; nil for the nominal design
	base   *walker // the walker of the nominal design; nil in itself

	design *Design
	file   *fields // the whole file as merged
	flawed bool    // a problem was met: what needs a whole design must not be checked
	whole  bool    // the network read well

	sections, loads, elements []item
	lines                     map[string]*Line
	lineNames                 []string
	sourceAt                  Pos
	lengths                   map[string]Value // of the sections
	entry, siblings           string           // the named entry being read, and the key it stands under
}

// An item is a named entry with the nodes that later checks point at.
type item struct {
	name   *node
	fields *fields
}

// problem records a problem at a place of this design. What a case brings
// about is told at its patch: where the patch gives the value itself if the
// place lies there, else where the patch makes its change.
func (w *walker) problem(pos Pos, h hint, format string, args ...any) {
	w.flawed = true
	if w.patch == nil {
		w.problems.problem(pos, h, format, args...)
		return
	}
	tell, message := pos, sprintf(format, args...)
	if !w.patch.covers(pos) {
		tell = w.patch.anchor
	}
	w.problems.add(w.patch.name, pos, tell, h, message)
}

// fault records what is wrong with a scalar.
func (w *walker) fault(n *node, what string, f *fault) {
	w.problem(n.pos, f.hint, "%s: %s", what, rawText(f.message))
}

// rawText marks a text that is not from the file and is not to be shortened.
type rawText string

// walk reads one design. It returns nil if the file is not even a mapping.
func (w *walker) walk(root *node) *fields {
	w.design = &Design{}
	file := w.fields(root, root.pos, "the file", fileTable)
	if file == nil {
		return nil
	}
	w.file = file
	w.walkHeader(file)
	if n := file.node("source"); n != nil {
		w.walkSource(w.fields(n, file.at["source"].key.pos, "the source", sourceTable))
	}
	w.walkLines(w.items(file, "lines", "line"))
	w.sections = w.items(file, "sections", "section")
	w.loads = w.items(file, "loads", "load")
	w.elements = w.items(file, "elements", "element")
	w.walkSections(w.sections)
	w.design.Loads = w.walkParts(w.loads, "load")
	w.design.Elements = w.walkParts(w.elements, "element")
	w.design.Junctions = w.junctions()
	w.checkUnique()
	w.gatherWarnings()
	w.whole = !w.flawed
	w.checkNetwork()
	return file
}

// gatherWarnings lists what is worth a warning, with what it is about.
func (w *walker) gatherWarnings() {
	d := w.design
	add := func(kind, name string, warnings []string) {
		for _, text := range warnings {
			d.Warnings = append(d.Warnings, strings.TrimSpace(kind+" "+name)+": "+text)
		}
	}
	add("source", "", d.Source.Warnings)
	for _, l := range d.Lines {
		add("line", l.Name, l.Warnings)
	}
	for _, p := range d.parts() {
		add(p.kind, p.Name, p.Warnings)
	}
}

// junctions lists the junctions in the order in which the source, the
// sections, the loads and the elements name them.
func (w *walker) junctions() (names []string) {
	seen := map[string]bool{"": true}
	add := func(some ...string) {
		for _, n := range some {
			if !seen[n] {
				seen[n] = true
				names = append(names, n)
			}
		}
	}
	add(w.design.Source.At)
	for _, s := range w.design.Sections {
		add(s.From, s.To)
	}
	for _, p := range slices.Concat(w.design.Loads, w.design.Elements) {
		add(p.At, p.To)
	}
	return names
}
