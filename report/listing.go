package report

import (
	"bytes"
	"path"
	"strings"

	"linewitness/report/format"
	"linewitness/report/sheet"
	"linewitness/report/typeset"
)

// listing writes the design file line by line.
func (d *document) listing() {
	g := d.r.Design
	d.b.Heading("The design file", 60)
	d.b.Note("File " + path.Base(g.File) + ", SHA-256 " + g.SHA256 + ". Solved by linewitness " + d.r.Tool.Version + " (" + d.r.Tool.Go +
		"). What the font cannot print is given by its number, <U+…>; a line that is too long goes on below, after " + sheet.Continued + ".")
	if len(g.Source) == 0 {
		d.b.Paragraph("The record does not hold the text of the file.")
		return
	}
	text := strings.TrimSuffix(string(bytes.ReplaceAll(g.Source, []byte("\r\n"), []byte("\n"))), "\n")
	for i, line := range strings.Split(text, "\n") {
		d.b.ListingLine(format.Count(int64(i+1)), typeset.Listing(line))
	}
}
