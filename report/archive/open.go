package archive

import (
	"crypto/md5"
	"errors"
	"fmt"
	"strings"

	"linewitness/report/archive/internal/syntax"
)

// foreign bounds what a file from outside may ask for. A record has some
// thousand objects; other programs pack them into streams.
var foreign = syntax.Limits{
	Bytes: MaxSize, Objects: 1 << 18, Depth: 32, Values: 1 << 20, Inflated: MaxContent + 16<<20, Updates: 64,
}

// Open reads the attached files of a record and checks each against the manifest.
//
// It reads what [Finish] writes, also after common tools have rewritten it:
// object streams, cross-reference streams, updates. It does not read encrypted
// files, hybrid files and filters other than FlateDecode, and repairs nothing.
// The errors wrap ErrNotPDF, ErrNotRecord, ErrNewer, ErrDamaged, ErrMissing,
// ErrTampered or ErrTooLarge. It bounds its work and memory and never panics.
func Open(pdf []byte) (*File, error) {
	f, err := syntax.Parse(pdf, foreign)
	if err != nil {
		return nil, kindOf(err)
	}
	r := &reader{File: f, embedded: map[string]*syntax.Stream{}, met: map[syntax.Ref]bool{}}
	out, err := r.record()
	if err != nil {
		return nil, kindOf(err)
	}
	return out, nil
}

// kindOf gives errors of the syntax one of the kinds of this package.
func kindOf(err error) error {
	for _, kind := range []error{ErrNotPDF, ErrNotRecord, ErrNewer, ErrDamaged, ErrMissing, ErrTampered, ErrTooLarge} {
		if errors.Is(err, kind) {
			return err
		}
	}
	reason := strings.ReplaceAll(err.Error(), "syntax: ", "")
	switch {
	case errors.Is(err, syntax.ErrNotPDF):
		return because(ErrNotPDF, "%s", reason)
	case errors.Is(err, syntax.ErrEncrypted):
		return because(ErrNotRecord, "%s, which a record never is", reason)
	case errors.Is(err, syntax.ErrLimit):
		return because(ErrTooLarge, "%s", reason)
	}
	return because(ErrDamaged, "%s", reason)
}

// reader is a file being read.
type reader struct {
	*syntax.File
	embedded map[string]*syntax.Stream // by the names of the files
	met      map[syntax.Ref]bool       // nodes of the name tree
}

func (r *reader) record() (*File, error) {
	catalog, err := syntax.As[syntax.Dict](r.File, r.Trailer["Root"])
	if err != nil {
		return nil, err
	}
	out := &File{}
	if err := r.identity(out); err != nil {
		return nil, err
	}
	if err := r.find(catalog); err != nil {
		return nil, err
	}
	m, err := r.manifest(out.Creator)
	if err != nil {
		return nil, err
	}
	out.Version, out.Format = m.Version, m.Format
	for _, e := range m.Files {
		a, err := r.extract(e)
		if err != nil {
			return nil, err
		}
		out.files = append(out.files, a)
	}
	if err := check(out.files); err != nil {
		return nil, because(ErrDamaged, "%s: %v", manifestName, err)
	}
	return out, nil
}

// manifest reads the manifest. Without one the document may still say that it
// was a record.
func (r *reader) manifest(creator string) (*manifest, error) {
	s := r.embedded[manifestName]
	switch {
	case s == nil && strings.HasPrefix(creator, ComparisonCreator+" "):
		return nil, because(ErrNotRecord, "it is the page of a comparison, which holds no design")
	case s == nil && strings.HasPrefix(creator, program+" "):
		return nil, because(ErrMissing, "%q", manifestName)
	case s == nil:
		return nil, because(ErrNotRecord, "no %s is attached", manifestName)
	}
	data, err := r.Decode(s)
	if err != nil {
		return nil, err
	}
	return readManifest(data)
}

// extract takes a file out and checks it against the manifest and against what
// the document itself notes of it.
func (r *reader) extract(e entry) (Attachment, error) {
	s := r.embedded[e.Name]
	if s == nil {
		return Attachment{}, because(ErrMissing, "%q", e.Name)
	}
	data, err := r.Decode(s)
	if err != nil {
		return Attachment{}, kindOf(fmt.Errorf("%q: %w", e.Name, err))
	}
	switch {
	case len(data) != e.Size:
		return Attachment{}, because(ErrTampered, "%q has %d bytes, not %d", e.Name, len(data), e.Size)
	case sha256Of(data) != e.SHA256:
		return Attachment{}, because(ErrTampered, "%q has SHA-256 %s, not %s", e.Name, sha256Of(data), e.SHA256)
	case !r.sumHolds(s, data):
		return Attachment{}, because(ErrTampered, "%q has another check sum than the document notes", e.Name)
	}
	return Attachment{e.Name, e.Role, e.Relationship, e.MIME, e.Description, data}, nil
}

// sumHolds compares the check sum of a file with the document's, if it has one.
func (r *reader) sumHolds(s *syntax.Stream, data []byte) bool {
	params, err := syntax.As[syntax.Dict](r.File, s.Dict["Params"])
	if err != nil || params["CheckSum"] == nil {
		return true
	}
	noted, err := syntax.As[syntax.String](r.File, params["CheckSum"])
	sum := md5.Sum(data)
	return err == nil && string(noted) == string(sum[:])
}
