package syntax

import (
	"bytes"
	"fmt"
)

// Add makes v an indirect object.
func (f *File) Add(v Value) Ref {
	f.last++
	f.objects[f.last] = v
	return f.last
}

// Each visits the indirect objects in the order of their numbers.
func (f *File) Each(visit func(Ref, Value) error) error {
	for r := Ref(1); r <= f.last; r++ {
		v, err := f.Object(r)
		if err != nil {
			return err
		}
		if err := visit(r, v); err != nil {
			return wrap(r, err)
		}
	}
	return nil
}

// Bytes writes the file as version 1.7 with one cross-reference table: the
// objects that the catalog and the information dictionary lead to, numbered in
// the order in which they are first referred to, level by level. The bytes depend
// on the objects alone. id gets what was written of them and gives the file
// identifier (14.4).
func (f *File) Bytes(id func(body []byte) []byte) ([]byte, error) {
	order, err := f.reachable()
	if err != nil {
		return nil, err
	}
	number := map[Ref]Ref{}
	for i, r := range order {
		number[r] = Ref(i + 1)
	}
	var b bytes.Buffer
	b.Grow(f.size(order))
	b.WriteString("%PDF-1.7\n%\xe2\xe3\xcf\xd3\n") // the comment says that the file is binary
	offsets := make([]int, len(order))
	for i, r := range order {
		offsets[i] = b.Len()
		v, err := f.Object(r)
		if err != nil {
			return nil, err
		}
		appendObject(&b, i+1, renumbered(v, number))
	}
	f.end(&b, offsets, number, id(b.Bytes()))
	return b.Bytes(), nil
}

// size is about that of the file, to get the room for it at once.
func (f *File) size(order []Ref) int {
	const other = 400 // bytes of an object without its data, and of its entry in the table
	n := other * len(order)
	for _, r := range order {
		if s, ok := f.objects[r].(*Stream); ok {
			n += len(s.Data)
		}
	}
	return n
}

// end writes the cross-reference table and the trailer.
func (f *File) end(b *bytes.Buffer, offsets []int, number map[Ref]Ref, id []byte) {
	start := b.Len()
	size := len(offsets) + 1
	fmt.Fprintf(b, "xref\n0 %d\n0000000000 65535 f \n", size)
	for _, o := range offsets {
		fmt.Fprintf(b, "%010d 00000 n \n", o)
	}
	trailer := Dict{"Size": Number(fmt.Sprint(size)), "ID": Array{String(id), String(id)}}
	for _, k := range []Name{"Root", "Info"} {
		if f.Trailer[k] != nil {
			trailer[k] = renumbered(f.Trailer[k], number)
		}
	}
	fmt.Fprintf(b, "trailer\n%s\nstartxref\n%d\n%%%%EOF\n", Append(nil, trailer), start)
}

// reachable lists what the trailer leads to. References to nothing are left out.
func (f *File) reachable() ([]Ref, error) {
	var order []Ref
	seen := map[Ref]bool{}
	visit := func(r Ref) {
		if !seen[r] {
			seen[r] = true
			order = append(order, r)
		}
	}
	references(f.Trailer["Root"], visit)
	references(f.Trailer["Info"], visit)
	for i := 0; i < len(order); i++ {
		v, err := f.Object(order[i])
		if err != nil {
			return nil, err
		}
		references(v, visit)
	}
	return order, nil
}

// references visits the references in v, in the order in which they are written.
func references(v Value, visit func(Ref)) {
	switch v := v.(type) {
	case Ref:
		visit(v)
	case Array:
		for _, x := range v {
			references(x, visit)
		}
	case Dict:
		for _, k := range v.Keys() {
			references(v[k], visit)
		}
	case *Stream:
		for _, k := range v.Dict.Keys() {
			if k != "Length" { // it is written anew, and direct
				references(v.Dict[k], visit)
			}
		}
	}
}

// renumbered returns v with other numbers in its references.
func renumbered(v Value, number map[Ref]Ref) Value {
	switch v := v.(type) {
	case Ref:
		return number[v]
	case Array:
		out := make(Array, len(v))
		for i := range v {
			out[i] = renumbered(v[i], number)
		}
		return out
	case Dict:
		out := Dict{}
		for k, x := range v {
			out[k] = renumbered(x, number)
		}
		return out
	case *Stream:
		d := Dict{}
		for k, x := range v.Dict {
			if k != "Length" {
				d[k] = renumbered(x, number)
			}
		}
		return &Stream{d, v.Data}
	}
	return v
}
