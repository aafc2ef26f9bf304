package archive

import "linewitness/report/archive/internal/syntax"

// identity reads what the document says of itself.
func (r *reader) identity(out *File) error {
	if r.Trailer["Info"] == nil {
		return nil
	}
	info, err := syntax.As[syntax.Dict](r.File, r.Trailer["Info"])
	if err != nil {
		return err
	}
	for _, p := range []struct {
		key syntax.Name
		to  *string
	}{
		{"Title", &out.Title},
		{"Author", &out.Author},
		{"Subject", &out.Subject},
		{"Keywords", &out.Keywords},
		{"Creator", &out.Creator},
		{"Producer", &out.Producer},
		{"CreationDate", &out.Created},
	} {
		if info[p.key] == nil {
			continue
		}
		s, err := syntax.As[syntax.String](r.File, info[p.key])
		if err != nil {
			return err
		}
		*p.to = plainText(s)
	}
	return nil
}
