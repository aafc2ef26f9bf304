package design

import (
	"crypto/sha256"
	"encoding/hex"
)

// Load reads a design file that refers to no other file; name is what
// diagnostics call it. An error is a Diagnostics with every problem of the file.
func Load(name string, src []byte) (*File, error) { return LoadWith(name, src, nil) }

// LoadWith reads a design file and the files it refers to. It calls open once
// for each, with a path that fs.ValidPath accepts, relative to the folder of the
// design; an error that is fs.ErrNotExist says that there is no such file.
func LoadWith(name string, src []byte, open func(path string) ([]byte, error)) (*File, error) {
	p := &problems{}
	text := newSource(src)
	d := newFolder(open)
	f := read(src, text, d, p)
	if len(p.list) > 0 {
		return nil, p.diagnostics(name, text)
	}
	sum := sha256.Sum256(src)
	f.Name, f.Source, f.SHA256 = name, src, hex.EncodeToString(sum[:])
	f.Attachments = d.list
	return f, nil
}

// read does the work of LoadWith. If it leaves problems, its result is not used.
func read(src []byte, text *source, d *folder, p *problems) *File {
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
	nominal := &walker{problems: p, folder: d}
	file := nominal.walk(root)
	if file == nil {
		return nil
	}
	patches := nominal.readCases(file, root)
	taken := ids{}
	requirements := nominal.walkRequirements(file, caseNames(patches), taken)
	walkers := []*walker{nominal}
	out := &File{Nominal: nominal.design}
	for _, patch := range patches {
		w := &walker{problems: p, folder: d, patch: patch, base: nominal}
		w.walk(patch.apply(root))
		walkers = append(walkers, w)
		out.Cases = append(out.Cases, Case{patch.name, w.design})
	}
	stock := takeStock(walkers)
	claims := nominal.walkClaims(file, stock, taken)
	judged, claimed := stock.judge(requirements), stock.check(claims)
	for _, w := range walkers {
		w.design.Requirements, w.design.Claims = judged, claimed
		if w.flawed && len(p.list) == 0 {
			panic("design: a flaw was met and not told of")
		}
	}
	return out
}

// caseNames lists what requirements and claims call the cases.
func caseNames(patches []*patch) []string {
	names := []string{nominalName}
	for _, p := range patches {
		names = append(names, p.name)
	}
	return names
}

// nominalName is what requirements call the nominal design.
const nominalName = "nominal"
