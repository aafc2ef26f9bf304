package archive

import (
	"bytes"
	"encoding/xml"
	"fmt"
	"regexp"
	"strings"
	"sync"
	"testing"
	"time"

	"github.com/google/go-cmp/cmp"
	"github.com/jung-kurt/gofpdf"

	"linewitness/report/archive/internal/icc"
	"linewitness/report/archive/internal/syntax"
)

// catalogOf reads a finished document and its catalog.
func catalogOf(t *testing.T, file []byte) (*syntax.File, syntax.Dict) {
	t.Helper()
	f, err := syntax.Parse(file, foreign)
	if err != nil {
		t.Fatal(err)
	}
	return f, as[syntax.Dict](t, f, f.Trailer["Root"])
}

func as[T syntax.Value](t *testing.T, f *syntax.File, v syntax.Value) T {
	t.Helper()
	out, err := syntax.As[T](f, v)
	if err != nil {
		t.Fatal(err)
	}
	return out
}

// The catalog says what ISO 19005-3 asks for.
func TestCatalog(t *testing.T) {
	file := finished(t)
	if !bytes.HasPrefix(file, []byte("%PDF-1.7\n%\xe2\xe3\xcf\xd3\n")) || !bytes.HasSuffix(file, []byte("\n%%EOF\n")) {
		t.Error("header or end of the file")
	}
	f, catalog := catalogOf(t, file)
	if got := as[syntax.String](t, f, catalog["Lang"]); got != "en-GB" {
		t.Errorf("language %q", got)
	}
	for key, want := range map[syntax.Name]string{
		"ViewerPreferences": "<</DisplayDocTitle true\n>>",
		"PageLabels":        "<</Nums [0 <</S /D\n>>]\n>>",
	} {
		if got := string(syntax.Append(nil, catalog[key])); got != want {
			t.Errorf("%s is %s, want %s", key, got, want)
		}
	}
	intents := as[syntax.Array](t, f, catalog["OutputIntents"])
	intent := as[syntax.Dict](t, f, intents[0])
	if len(intents) != 1 || intent["S"] != syntax.Name("GTS_PDFA1") {
		t.Errorf("output intents %v", intents)
	}
	profile := as[*syntax.Stream](t, f, intent["DestOutputProfile"])
	if got, err := f.Decode(profile); err != nil || !bytes.Equal(got, icc.SRGB()) || profile.Dict["N"] != syntax.Number("3") {
		t.Errorf("output profile of %d bytes, error %v", len(got), err)
	}
}

// Every attached file has what 6.8 asks for, and the keys of the name tree are
// sorted and in ASCII.
func TestSpecifications(t *testing.T) {
	f, catalog := catalogOf(t, finished(t))
	tree := as[syntax.Dict](t, f, as[syntax.Dict](t, f, catalog["Names"])["EmbeddedFiles"])
	names := as[syntax.Array](t, f, tree["Names"])
	var keys []string
	for i := 0; i < len(names); i += 2 {
		keys = append(keys, string(names[i].(syntax.String)))
	}
	if want := []string{"data/Pr_fung _.s1p", "data/Pr_fung _.s1p (2)", "feeder.error.csv", "feeder.json", "feeder.yaml", "manifest.json"}; !cmp.Equal(keys, want) {
		t.Errorf("keys %q, want %q", keys, want)
	}
	associated := as[syntax.Array](t, f, catalog["AF"])
	if len(associated) != len(files())+1 {
		t.Fatalf("%d associated files", len(associated))
	}
	for i, a := range files() {
		spec := as[syntax.Dict](t, f, associated[i])
		s := as[*syntax.Stream](t, f, spec["EF"].(syntax.Dict)["UF"])
		params := s.Dict["Params"].(syntax.Dict)
		got := fmt.Sprint(spec["Type"], spec["AFRelationship"], s.Dict["Type"], s.Dict["Subtype"], params["Size"], params["ModDate"], len(params["CheckSum"].(syntax.String)))
		want := fmt.Sprint("Filespec", a.Relationship, "EmbeddedFile", a.MIME, len(a.Data), "D:20260514000000+00'00'", 16)
		if got != want {
			t.Errorf("%q: %s, want %s", a.Name, got, want)
		}
	}
}

// packet is what the metadata stream must be able to be read as.
type packet struct {
	About struct {
		Title       string `xml:"title>Alt>li"`
		Author      string `xml:"creator>Seq>li"`
		Subject     string `xml:"description>Alt>li"`
		Language    string `xml:"language>Bag>li"`
		Keywords    string `xml:"http://ns.adobe.com/pdf/1.3/ Keywords"`
		Producer    string `xml:"http://ns.adobe.com/pdf/1.3/ Producer"`
		Creator     string `xml:"http://ns.adobe.com/xap/1.0/ CreatorTool"`
		Created     string `xml:"http://ns.adobe.com/xap/1.0/ CreateDate"`
		Modified    string `xml:"http://ns.adobe.com/xap/1.0/ ModifyDate"`
		ID          string `xml:"http://ns.adobe.com/xap/1.0/mm/ DocumentID"`
		Part        int    `xml:"http://www.aiim.org/pdfa/ns/id/ part"`
		Conformance string `xml:"http://www.aiim.org/pdfa/ns/id/ conformance"`
	} `xml:"RDF>Description"`
}

func metadataOf(t *testing.T, f *syntax.File, catalog syntax.Dict) packet {
	t.Helper()
	s := as[*syntax.Stream](t, f, catalog["Metadata"])
	if s.Dict["Filter"] != nil || s.Dict["Subtype"] != syntax.Name("XML") {
		t.Errorf("metadata stream %v", s.Dict)
	}
	var p packet
	if err := xml.Unmarshal(s.Data, &p); err != nil {
		t.Fatal(err)
	}
	return p
}

// The metadata say what the properties say, and which part of the standard the
// document is written to.
func TestMetadataAreTheProperties(t *testing.T) {
	f, catalog := catalogOf(t, finished(t))
	got := metadataOf(t, f, catalog).About
	info := as[syntax.Dict](t, f, f.Trailer["Info"])
	for key, value := range map[syntax.Name]string{
		"Title": got.Title, "Author": got.Author, "Subject": got.Subject, "Keywords": got.Keywords,
		"Creator": got.Creator, "Producer": got.Producer,
	} {
		if want := plainText(info[key].(syntax.String)); value != want || want == "" {
			t.Errorf("%s is %q, in the properties %q", key, value, want)
		}
	}
	for key, value := range map[syntax.Name]string{"CreationDate": got.Created, "ModDate": got.Modified} {
		date, err := time.Parse(time.RFC3339, value)
		if err != nil || dateString(date) != info[key].(syntax.String) {
			t.Errorf("%s is %q, in the properties %q", key, value, info[key])
		}
	}
	if got.Part != 3 || got.Conformance != "B" || got.Language != "en-GB" {
		t.Errorf("part %d, level %s, language %s", got.Part, got.Conformance, got.Language)
	}
	if !regexp.MustCompile(`^uuid:[0-9a-f]{8}-[0-9a-f]{4}-8[0-9a-f]{3}-[89ab][0-9a-f]{3}-[0-9a-f]{12}$`).MatchString(got.ID) {
		t.Errorf("identifier %q is no UUID of version 8", got.ID)
	}
}

// What is not known is left out of both places.
func TestEmptyMeta(t *testing.T) {
	file, err := Finish(pages(t), Meta{}, nil)
	if err != nil {
		t.Fatal(err)
	}
	f, catalog := catalogOf(t, file)
	if info := as[syntax.Dict](t, f, f.Trailer["Info"]); len(info) != 0 {
		t.Errorf("properties %v", info)
	}
	if got := metadataOf(t, f, catalog).About; got.Title != "" || got.Created != "" || got.Part != 3 {
		t.Errorf("metadata %+v", got)
	}
	if catalog["AF"] != nil || catalog["Lang"] != nil {
		t.Errorf("catalog %v", catalog)
	}
}

// Control characters and broken UTF-8 get into neither place.
func TestUnfitText(t *testing.T) {
	m := meta()
	m.Title = "a\x00b\xff\r\nc\ufffe"
	file, err := Finish(pages(t), m, nil)
	if err != nil {
		t.Fatal(err)
	}
	f, catalog := catalogOf(t, file)
	const want = "a\ufffdb\ufffd  c\ufffd"
	info := as[syntax.Dict](t, f, f.Trailer["Info"])
	if got := metadataOf(t, f, catalog).About.Title; got != want || plainText(info["Title"].(syntax.String)) != want {
		t.Errorf("title %q and %q, want %q", got, info["Title"], want)
	}
}

// The same arguments give the same bytes, also side by side; another word gives
// another identifier.
func TestFinishIsDeterministic(t *testing.T) {
	first := finished(t)
	var wait sync.WaitGroup
	for range 4 {
		wait.Go(func() {
			out, err := Finish(layOut(t), meta(), files())
			if err != nil || !bytes.Equal(out, first) {
				t.Errorf("another document, error %v", err)
			}
		})
	}
	wait.Wait()
	m := meta()
	m.Title += "."
	other, err := Finish(pages(t), m, files())
	if err != nil {
		t.Fatal(err)
	}
	id := regexp.MustCompile(`uuid:[-0-9a-f]+`)
	if a, b := id.Find(first), id.Find(other); bytes.Equal(a, b) {
		t.Errorf("two documents have the identifier %s", a)
	}
}

func TestFinishRefuses(t *testing.T) {
	core := gofpdf.New("P", "mm", "A4", "")
	core.AddPage()
	core.SetFont("Helvetica", "", 12)
	core.Text(20, 20, "text")
	var b bytes.Buffer
	if err := core.Output(&b); err != nil {
		t.Fatal(err)
	}
	good := files()[0]
	with := func(change func(*Attachment)) []Attachment {
		a := good
		change(&a)
		return []Attachment{good, a}
	}
	for _, c := range []struct {
		name, reason string
		pdf          []byte
		files        []Attachment
	}{
		{"core font", "archive: fonts: object ", b.Bytes(), nil},
		{"core font", "font Helvetica is not embedded", b.Bytes(), nil},
		{"no PDF", "archive: the document as laid out", []byte("text"), nil},
		{"twice", `archive: two attachments are called "feeder.yaml"`, pages(t), with(func(*Attachment) {})},
		{"manifest", `called "manifest.json"`, pages(t), with(func(a *Attachment) { a.Name = manifestName })},
		{"no name", "has no name", pages(t), with(func(a *Attachment) { a.Name = "" })},
		{"role", `unknown role "x"`, pages(t), with(func(a *Attachment) { a.Name, a.Role = "n", "x" })},
		{"relationship", `unknown relationship "x"`, pages(t), with(func(a *Attachment) { a.Name, a.Relationship = "n", "x" })},
		{"size", "more than 201326592 bytes", pages(t), with(func(a *Attachment) { a.Name, a.Data = "n", make([]byte, MaxContent) })},
		{"type", `"n": no MIME type`, pages(t), with(func(a *Attachment) { a.Name, a.MIME = "n", "" })},
	} {
		if _, err := Finish(c.pdf, Meta{}, c.files); err == nil || !strings.Contains(err.Error(), c.reason) {
			t.Errorf("%s: error %v, want one with %q", c.name, err, c.reason)
		}
	}
}
