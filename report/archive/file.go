package archive

import "slices"

const (
	// MaxSize is the size of the largest file that [Open] reads, in bytes. Records
	// have a few MiB.
	MaxSize = 64 << 20
	// MaxContent is the size of all attached files together that [Finish] attaches
	// and [Open] reads, in bytes.
	MaxContent = 192 << 20
)

// A File is what a record holds beside its pages. Every attached file in it is
// as the record was made with: its size and its SHA-256 are those of the manifest.
type File struct {
	// From the manifest.
	Version string // of the program that made the record
	Format  int    // of the manifest

	// From the document's properties, empty if it has none.
	Title, Author, Subject, Keywords string
	Creator, Producer                string
	Created                          string // as a PDF date, "D:20260514000000+00'00'"

	files []Attachment
}

// Attachments returns the attached files in the order of the manifest, without
// the manifest itself and without files that others added.
func (f *File) Attachments() []Attachment { return slices.Clone(f.files) }

// Attachment returns the attached file with a name.
func (f *File) Attachment(name string) (Attachment, error) {
	for _, a := range f.files {
		if a.Name == name {
			return a, nil
		}
	}
	return Attachment{}, because(ErrMissing, "%q", name)
}

// Design returns the design file.
func (f *File) Design() Attachment { return f.only(Design) }

// Result returns the JSON form of the record.
func (f *File) Result() Attachment { return f.only(Result) }

// Input returns the content of a file that the design file reads, by the name
// that the design file gives it.
func (f *File) Input(name string) ([]byte, error) {
	a, err := f.Attachment(name)
	if err == nil && a.Role != Input {
		return nil, because(ErrMissing, "%q is attached, but not as a file that the design reads", name)
	}
	return a.Data, err
}

// only returns the one file of a role that every record has.
func (f *File) only(r Role) Attachment {
	for _, a := range f.files {
		if a.Role == r {
			return a
		}
	}
	panic("archive: a record without its " + string(r))
}
