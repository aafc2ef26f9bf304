package syntax

import "bytes"

// sections reads the chain of cross-reference sections, newest first (7.5.6).
func (f *File) sections() error {
	tail := f.data[max(0, len(f.data)-1024):]
	k := bytes.LastIndex(tail, []byte("startxref"))
	if k < 0 {
		return damaged("no startxref at the end")
	}
	l := f.lexer(tail, k+len("startxref"))
	at, ok := l.integer()
	if !ok {
		return damaged("startxref %q", l.context())
	}
	seen := map[int]bool{}
	for {
		if seen[at] || at >= len(f.data) {
			return damaged("cross-reference section at offset %d", at)
		}
		if len(seen) == f.limits.Updates {
			return beyond("updates", f.limits.Updates)
		}
		seen[at] = true
		d, err := f.section(at)
		if err != nil {
			return err
		}
		if f.Trailer == nil {
			f.Trailer = d
		}
		if d["Prev"] == nil {
			return nil
		}
		if at, err = f.direct(d, "Prev"); err != nil {
			return err
		}
	}
}

// direct returns a number of a trailer that is not negative and not a reference:
// nothing can be resolved before the sections are read.
func (f *File) direct(d Dict, k Name) (int, error) {
	if _, ok := d[k].(Number); ok {
		if n, err := f.Int(d[k]); err == nil && n >= 0 {
			return n, nil
		}
	}
	return 0, damaged("%s in a trailer: %v", k, d[k])
}

// section reads the section at an offset and returns its trailer.
func (f *File) section(at int) (Dict, error) {
	l := f.lexer(f.data, at)
	if !l.keyword("xref") {
		return f.streamSection(at)
	}
	for !l.keyword("trailer") {
		if err := f.table(l); err != nil {
			return nil, err
		}
	}
	v, err := l.value()
	if err != nil {
		return nil, err
	}
	d, ok := v.(Dict)
	switch {
	case !ok:
		return nil, damaged("no trailer")
	case d["XRefStm"] != nil:
		return nil, damaged("hybrid files are not read")
	}
	return d, nil
}

// table reads one subsection of a table (7.5.4).
func (f *File) table(l *lexer) error {
	first, ok := l.integer()
	count, ok2 := l.integer()
	if !ok || !ok2 {
		return damaged("cross-reference table at %q", l.context())
	}
	for n := first; n < first+count; n++ {
		offset, ok := l.integer()
		_, ok2 := l.integer()
		l.space()
		kind := l.word()
		if !ok || !ok2 || kind != "n" && kind != "f" {
			return damaged("cross-reference entry of object %d", n)
		}
		if err := f.note(n, place{offset: offset, free: kind == "f"}); err != nil {
			return err
		}
	}
	return nil
}

// note keeps the place of an object unless a newer section had it.
func (f *File) note(n int, p place) error {
	if n > f.limits.Objects {
		return beyond("objects", f.limits.Objects)
	}
	if _, newer := f.places[Ref(n)]; !newer {
		f.places[Ref(n)] = p
	}
	return nil
}
