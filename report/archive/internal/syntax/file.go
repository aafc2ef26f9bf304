package syntax

import (
	"bytes"
	"errors"
	"fmt"
)

// A File is a PDF file whose objects are read as they are asked for.
type File struct {
	Trailer Dict

	data       []byte
	limits     Limits
	values     int             // that may still be read
	inflated   int             // bytes that may still come out of streams
	places     map[Ref]place   // where objects stand
	objects    map[Ref]Value   // what has been read or set
	containers map[Ref][]Value // object streams that have been read
	open       map[Ref]bool    // what is being read
	last       Ref             // the highest number in use
}

// A place is where an object stands: at an offset of the file, or at an index of
// an object stream. A free one is a place too: it hides an older one.
type place struct {
	offset    int
	container Ref
	index     int
	free      bool
}

// Parse reads the cross-reference sections of a file (7.5). It keeps data.
func Parse(data []byte, l Limits) (*File, error) {
	if !bytes.HasPrefix(data, []byte("%PDF-1.")) {
		return nil, ErrNotPDF
	}
	if len(data) > l.Bytes {
		return nil, beyond("bytes", l.Bytes)
	}
	f := &File{
		data: data, limits: l, values: l.Values, inflated: l.Inflated,
		places: map[Ref]place{}, objects: map[Ref]Value{}, containers: map[Ref][]Value{}, open: map[Ref]bool{},
	}
	if err := f.sections(); err != nil {
		return nil, err
	}
	if _, locked := f.Trailer["Encrypt"]; locked {
		return nil, ErrEncrypted
	}
	for r := range f.places {
		f.last = max(f.last, r)
	}
	return f, nil
}

func (f *File) lexer(b []byte, at int) *lexer {
	return &lexer{b: b, i: at, n: &f.values, d: f.limits.Depth}
}

// Object returns an indirect object, Null if there is none of that number
// (7.3.10).
func (f *File) Object(r Ref) (Value, error) {
	if v, known := f.objects[r]; known {
		return v, nil
	}
	p, known := f.places[r]
	if !known || p.free {
		return Null{}, nil
	}
	if f.open[r] || len(f.open) > f.limits.Depth {
		return nil, damaged("object %d leads back to itself", r)
	}
	f.open[r] = true
	defer delete(f.open, r)
	v, err := f.read(r, p)
	if err != nil {
		return nil, wrap(r, err)
	}
	f.objects[r] = v
	return v, nil
}

func (f *File) read(r Ref, p place) (Value, error) {
	if p.container != 0 {
		return f.packed(p.container, p.index)
	}
	return f.indirect(r, p.offset)
}

func wrap(r Ref, err error) error { return fmt.Errorf("object %d: %w", r, err) }

// indirect reads "12 0 obj ... endobj" at an offset; of any number if r is 0.
func (f *File) indirect(r Ref, at int) (Value, error) {
	if at < 0 || at >= len(f.data) {
		return nil, damaged("offset %d is outside the file", at)
	}
	l := f.lexer(f.data, at)
	n, ok := l.integer()
	g, ok2 := l.integer()
	if !ok || !ok2 || !l.keyword("obj") || g != 0 || r != 0 && Ref(n) != r {
		return nil, damaged("no such object at offset %d", at)
	}
	v, err := l.value()
	if err != nil {
		return nil, err
	}
	if d, ok := v.(Dict); ok && l.keyword("stream") {
		return f.stream(d, l)
	}
	if !l.keyword("endobj") {
		return nil, damaged("no endobj at %q", l.context())
	}
	return v, nil
}

// Resolve returns v itself, or the object that it refers to.
func (f *File) Resolve(v Value) (Value, error) {
	for range f.limits.Depth {
		r, ok := v.(Ref)
		if !ok {
			return v, nil
		}
		var err error
		if v, err = f.Object(r); err != nil {
			return nil, err
		}
	}
	return nil, damaged("references go in a circle")
}

// As returns v, resolved, as a T: an error if it is another thing.
func As[T Value](f *File, v Value) (T, error) {
	var none T
	v, err := f.Resolve(v)
	if err != nil {
		return none, err
	}
	t, ok := v.(T)
	if !ok {
		return none, fmt.Errorf("%w: a %T where a %T belongs", errOther, v, none)
	}
	return t, nil
}

var errOther = errors.New("syntax: wrong kind of object")
