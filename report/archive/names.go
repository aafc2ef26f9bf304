package archive

import "linewitness/report/archive/internal/syntax"

// mostFiles bounds the attached files of a document, ours and others'.
const mostFiles = 1000

// find notes the embedded files of a document by name (ISO 32000-1, 7.11.4).
func (r *reader) find(catalog syntax.Dict) error {
	if catalog["Names"] == nil {
		return nil
	}
	names, err := syntax.As[syntax.Dict](r.File, catalog["Names"])
	if err != nil || names["EmbeddedFiles"] == nil {
		return err
	}
	return r.node(names["EmbeddedFiles"], foreign.Depth)
}

// node reads a node of the name tree (ISO 32000-1, 7.9.6) and those below.
func (r *reader) node(v syntax.Value, depth int) error {
	if ref, ok := v.(syntax.Ref); ok {
		if r.met[ref] {
			return because(ErrDamaged, "object %d stands twice in the name tree", ref)
		}
		r.met[ref] = true
	}
	if depth == 0 {
		return because(ErrDamaged, "the name tree is too deep")
	}
	d, err := syntax.As[syntax.Dict](r.File, v)
	if err != nil {
		return err
	}
	kids, err := r.list(d, "Kids")
	if err != nil {
		return err
	}
	for _, k := range kids {
		if err := r.node(k, depth-1); err != nil {
			return err
		}
	}
	pairs, err := r.list(d, "Names")
	if err != nil {
		return err
	}
	for ; len(pairs) > 1; pairs = pairs[2:] {
		if err := r.leaf(pairs[1]); err != nil {
			return err
		}
	}
	return nil
}

// list returns an array of d, none if d has no such key.
func (r *reader) list(d syntax.Dict, k syntax.Name) (syntax.Array, error) {
	if d[k] == nil {
		return nil, nil
	}
	return syntax.As[syntax.Array](r.File, d[k])
}

// leaf notes the file of a file specification.
func (r *reader) leaf(v syntax.Value) error {
	spec, err := syntax.As[syntax.Dict](r.File, v)
	if err != nil {
		return err
	}
	name, err := syntax.As[syntax.String](r.File, first(spec["UF"], spec["F"]))
	if err != nil {
		return err
	}
	ef, err := syntax.As[syntax.Dict](r.File, spec["EF"])
	if err != nil {
		return err
	}
	s, err := syntax.As[*syntax.Stream](r.File, first(ef["UF"], ef["F"]))
	if err != nil {
		return err
	}
	return r.note(plainText(name), s)
}

func (r *reader) note(name string, s *syntax.Stream) error {
	if r.embedded[name] != nil {
		return because(ErrDamaged, "two attached files are called %q", name)
	}
	if len(r.embedded) == mostFiles {
		return because(ErrTooLarge, "more than %d attached files", mostFiles)
	}
	r.embedded[name] = s
	return nil
}

func first(a, b syntax.Value) syntax.Value {
	if a != nil {
		return a
	}
	return b
}
