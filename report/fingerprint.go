package report

import (
	"strings"

	"linewitness/report/archive"
	"linewitness/report/format"
	"linewitness/report/sheet"
	"linewitness/report/typeset"
)

// fingerprint writes what the record was made from and by, and what it holds.
func (d *document) fingerprint(room coverRoom) {
	fields := []sheet.Field{{Label: "SHA-256, design file", Value: d.r.Design.SHA256, Face: typeset.Mono, Wide: true}}
	for i, a := range d.r.Attachments {
		if i == room.files && len(d.r.Attachments) > i+1 {
			fields = append(fields, sheet.Field{Label: "and", Value: format.Plural(int64(len(d.r.Attachments)-i), "further file") + ", see the manifest", Wide: true})
			break
		}
		label := "SHA-256, " + a.Name
		fields = append(fields, sheet.Field{Label: sheet.NoteStyle.Fit(label, sheet.FieldLabel), Value: a.SHA256, Face: typeset.Mono, Wide: true})
	}
	made := "linewitness " + strings.TrimSpace(d.r.Tool.Version+" ("+d.r.Tool.Go+")") + "; written to PDF/A-3b (ISO 19005-3)"
	fields = append(fields,
		sheet.Field{Label: "Made by", Value: made, Wide: true, Lines: room.prose},
		sheet.Field{Label: "Attached", Value: attached(d.files), Wide: true, Lines: room.prose})
	d.b.Fields(fields)
}

// attached names the files in the document. Those of the samples are many and
// share their name but for its end.
func attached(files []archive.Attachment) string {
	var parts []string
	tables := 0
	for _, a := range files {
		switch a.Role {
		case archive.Table:
			tables++
			continue
		default:
			parts = append(parts, a.Name+" ("+a.Description+")")
		}
	}
	if tables > 0 {
		parts = append(parts, format.Plural(int64(tables), "table")+" of samples (CSV)")
	}
	return among(append(parts, "a manifest with the SHA-256 of each"), mostNames) + ". The design file and what it reads are the bytes that were solved."
}
