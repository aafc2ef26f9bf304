package archive

import (
	"encoding/xml"
	"fmt"
	"strings"
	"time"

	"linewitness/report/archive/internal/syntax"
)

// The metadata stream (6.6.2) is in XMP, uses properties of its predefined
// schemas only (6.6.2.3), and says to which part of ISO 19005 the file is written
// (6.6.4).
const (
	xmpHead = "<?xpacket begin=\"\ufeff\" id=\"W5M0MpCehiHzreSzNTczkc9d\"?>\n" +
		`<x:xmpmeta xmlns:x="adobe:ns:meta/"><rdf:RDF xmlns:rdf="http://www.w3.org/1999/02/22-rdf-syntax-ns#">
<rdf:Description rdf:about=""
 xmlns:dc="http://purl.org/dc/elements/1.1/"
 xmlns:pdf="http://ns.adobe.com/pdf/1.3/"
 xmlns:xmp="http://ns.adobe.com/xap/1.0/"
 xmlns:xmpMM="http://ns.adobe.com/xap/1.0/mm/"
 xmlns:pdfaid="http://www.aiim.org/pdfa/ns/id/">
<dc:format>application/pdf</dc:format>
`
	xmpTail = `<pdfaid:part>3</pdfaid:part>
<pdfaid:conformance>B</pdfaid:conformance>
</rdf:Description></rdf:RDF></x:xmpmeta>
<?xpacket end="w"?>`
)

// property is a property of the metadata: its value stands between before and
// after within its element.
type property struct{ name, before, value, after string }

// metadata writes the metadata stream of a document with an identifier.
func (m Meta) metadata(id identifier) []byte {
	date := ""
	if !m.Created.IsZero() {
		date = m.Created.UTC().Format(time.RFC3339)
	}
	const (
		alt    = `<rdf:Alt><rdf:li xml:lang="x-default">`
		endAlt = `</rdf:li></rdf:Alt>`
	)
	var b strings.Builder
	b.WriteString(xmpHead)
	for _, p := range []property{
		{"dc:title", alt, m.Title, endAlt},
		{"dc:creator", "<rdf:Seq><rdf:li>", m.Author, "</rdf:li></rdf:Seq>"},
		{"dc:description", alt, m.Subject, endAlt},
		{"dc:language", "<rdf:Bag><rdf:li>", m.Lang, "</rdf:li></rdf:Bag>"},
		{"pdf:Keywords", "", m.Keywords, ""},
		{"pdf:Producer", "", m.Producer, ""},
		{"xmp:CreatorTool", "", m.Creator, ""},
		{"xmp:CreateDate", "", date, ""},
		{"xmp:ModifyDate", "", date, ""},
		{"xmp:MetadataDate", "", date, ""},
		{"xmpMM:DocumentID", "", id.uuid(), ""},
	} {
		p.write(&b)
	}
	b.WriteString(xmpTail)
	return []byte(b.String())
}

// write writes the property unless it is empty.
func (p property) write(b *strings.Builder) {
	if p.value == "" {
		return
	}
	fmt.Fprintf(b, "<%s>%s", p.name, p.before)
	_ = xml.EscapeText(b, []byte(p.value)) // a strings.Builder takes everything
	fmt.Fprintf(b, "%s</%s>\n", p.after, p.name)
}

// newMetadata makes the metadata stream, still empty. It is not compressed, so
// that programs that know nothing of PDF find it.
func newMetadata() *syntax.Stream {
	return &syntax.Stream{Dict: syntax.Dict{"Type": syntax.Name("Metadata"), "Subtype": syntax.Name("XML")}}
}
