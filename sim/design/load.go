package design

import (
	"crypto/sha256"
	"encoding/hex"
	"slices"
)

// Load reads a design file; name is what diagnostics call it. An error is a
// Diagnostics with every problem of the file.
func Load(name string, src []byte) (*File, error) {
	p := &problems{}
	text := newSource(src)
	f := read(src, text, p)
	if len(p.list) > 0 {
		return nil, p.diagnostics(name, text)
	}
	sum := sha256.Sum256(src)
	f.Name, f.Source, f.SHA256 = name, src, hex.EncodeToString(sum[:])
	return f, nil
}

// read does the work of Load. If it leaves problems, its result is not used.
func read(src []byte, text *source, p *problems) *File {
	if len(src) > maxBytes {
		p.problem(Pos{}, say("a design file is at most 1 MiB"), "the file has %d bytes", len(src))
		return nil
	}
	if text.check(p); len(p.list) > 0 {
		return nil
	}
	root := parse(src, p)
	if root == nil {
		return nil
	}
	nominal := &walker{problems: p}
	file := nominal.walk(root)
	if file == nil {
		return nil
	}
	patches := nominal.readCases(file, root)
	requirements := nominal.walkRequirements(file, caseNames(patches))
	walkers := []*walker{nominal}
	out := &File{Nominal: nominal.design}
	for _, patch := range patches {
		w := &walker{problems: p, patch: patch, base: nominal}
		w.walk(patch.apply(root))
		walkers = append(walkers, w)
		out.Cases = append(out.Cases, Case{patch.name, w.design})
	}
	judged := judge(nominal, requirements, walkers)
	for _, w := range walkers {
		w.design.Requirements = judged
		if w.flawed && len(p.list) == 0 {
			panic("design: a flaw was met and not told of")
		}
	}
	return out
}

func caseNames(patches []*patch) []string {
	names := []string{nominalName}
	for _, p := range patches {
		names = append(names, p.name)
	}
	return names
}

// nominalName is what requirements call the nominal design.
const nominalName = "nominal"

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
	w.whole = !w.flawed
	w.checkNetwork()
	return file
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
