package archive

import (
	"crypto/md5"
	"maps"
	"slices"
	"strconv"

	"linewitness/report/archive/internal/syntax"
)

// enclosed is a file and its stream, which comes when it is compressed.
type enclosed struct {
	Attachment
	stream chan *syntax.Stream
}

// enclose begins to compress the files and their manifest, beside what else there
// is to do.
func (m Meta) enclose(files []Attachment) ([]enclosed, error) {
	if len(files) == 0 {
		return nil, nil
	}
	all, err := list(m.Version, files)
	if err != nil {
		return nil, err
	}
	var out []enclosed
	for _, a := range append(slices.Clone(files), all) {
		e := enclosed{a, make(chan *syntax.Stream, 1)}
		go func() { e.stream <- m.embedded(a) }()
		out = append(out, e)
	}
	return out, nil
}

// attach puts the files and their manifest into the document (6.8): in the name
// tree, where viewers find them, and as files associated with the whole of it.
func (d *document) attach() error {
	specs := map[string]syntax.Ref{}
	var associated syntax.Array
	for _, e := range d.files {
		key := freeKey(specs, e.Name)
		specs[key] = d.Add(d.specification(e))
		associated = append(associated, specs[key])
	}
	if len(specs) == 0 {
		return nil
	}
	var names syntax.Array
	for _, key := range slices.Sorted(maps.Keys(specs)) {
		names = append(names, syntax.String(key), specs[key])
	}
	d.catalog["Names"] = syntax.Dict{"EmbeddedFiles": syntax.Dict{"Names": names}}
	d.catalog["AF"] = associated
	return nil
}

// freeKey is a key of the name tree for a file: its name in ASCII, because
// readers differ in how they put keys of two encodings into order, with a number
// if another file has it.
func freeKey(taken map[string]syntax.Ref, name string) string {
	key := ascii(name)
	for n := 2; taken[key] != 0; n++ {
		key = ascii(name) + " (" + strconv.Itoa(n) + ")"
	}
	return key
}

// specification is the file specification of a file (6.8; ISO 32000-1, 7.11.3).
func (d *document) specification(a enclosed) syntax.Dict {
	stream := d.Add(<-a.stream)
	return syntax.Dict{
		"Type": syntax.Name("Filespec"),
		"F":    syntax.String(ascii(a.Name)), "UF": textString(a.Name),
		"EF":             syntax.Dict{"F": stream, "UF": stream},
		"Desc":           textString(a.Description),
		"AFRelationship": syntax.Name(a.Relationship),
	}
}

// embedded is the embedded file stream of a file (ISO 32000-1, 7.11.4).
func (m Meta) embedded(a Attachment) *syntax.Stream {
	sum := md5.Sum(a.Data) // what the format asks for; the manifest has a better one
	params := syntax.Dict{
		"Size":     syntax.Number(strconv.Itoa(len(a.Data))),
		"CheckSum": syntax.String(sum[:]),
	}
	if !m.Created.IsZero() {
		params["CreationDate"] = dateString(m.Created)
		params["ModDate"] = dateString(m.Created)
	}
	return syntax.NewLongStream(syntax.Dict{
		"Type": syntax.Name("EmbeddedFile"), "Subtype": syntax.Name(a.MIME), "Params": params,
	}, a.Data)
}
