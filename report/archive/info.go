package archive

import "linewitness/report/archive/internal/syntax"

// info writes the document information dictionary (ISO 32000-1, 14.3.3). It says
// what the metadata stream says.
func (d *document) info() {
	out := syntax.Dict{}
	for k, s := range map[syntax.Name]string{
		"Title": d.meta.Title, "Author": d.meta.Author, "Subject": d.meta.Subject, "Keywords": d.meta.Keywords,
		"Creator": d.meta.Creator, "Producer": d.meta.Producer,
	} {
		if s != "" {
			out[k] = textString(s)
		}
	}
	if !d.meta.Created.IsZero() {
		out["CreationDate"] = dateString(d.meta.Created)
		out["ModDate"] = dateString(d.meta.Created)
	}
	d.Trailer["Info"] = d.Add(out)
}
