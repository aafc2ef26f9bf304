package archive

import (
	"bytes"
	"io"
	"regexp"
	"strings"
	"testing"

	"github.com/google/go-cmp/cmp"
	"github.com/ledongthuc/pdf"
	"github.com/pdfcpu/pdfcpu/pkg/api"
	"github.com/pdfcpu/pdfcpu/pkg/pdfcpu/model"

	"linewitness/report/archive/internal/syntax"
)

func configuration() *model.Configuration {
	api.DisableConfigDir()
	conf := model.NewDefaultConfiguration()
	conf.ValidationMode = model.ValidationRelaxed
	conf.Offline = true
	return conf
}

// Another program takes the files out, byte for byte, under their names.
func TestAttachmentsForOthers(t *testing.T) {
	file := finished(t)
	got, err := api.ExtractAttachmentsRaw(bytes.NewReader(file), "", nil, configuration())
	if err != nil {
		t.Fatal(err)
	}
	byName := map[string][]byte{}
	for _, a := range got {
		data, err := io.ReadAll(a)
		if err != nil {
			t.Fatal(err)
		}
		byName[a.FileName] = data
	}
	if len(byName) != len(files())+1 {
		t.Errorf("%d files", len(byName))
	}
	for _, a := range files() {
		if data, ok := byName[a.Name]; !ok || !bytes.Equal(data, a.Data) {
			t.Errorf("%q: %d bytes, want %d", a.Name, len(data), len(a.Data))
		}
	}
}

// Another program finds the document valid, its outline whole and its title right.
func TestStructureForOthers(t *testing.T) {
	file := finished(t)
	ctx, err := api.ReadValidateAndOptimize(bytes.NewReader(file), configuration())
	if err != nil {
		t.Fatal(err)
	}
	if ctx.PageCount != len(needles) || ctx.Title != meta().Title || ctx.Author != meta().Author {
		t.Errorf("%d pages, title %q, author %q", ctx.PageCount, ctx.Title, ctx.Author)
	}
	marks, err := api.Bookmarks(bytes.NewReader(file), configuration())
	if err != nil {
		t.Fatal(err)
	}
	var got []string
	for _, m := range marks {
		got = append(got, m.Title)
		for _, k := range m.Kids {
			got = append(got, "- "+k.Title)
		}
	}
	if want := []string{"Erste Prüfung", "Case one", "- Waveforms", "- Envelopes", "Listing"}; !cmp.Equal(got, want) {
		t.Errorf("outline %q, want %q", got, want)
	}
}

// A reader that keeps to the letter of the format finds the text, beyond Latin too.
func TestTextForOthers(t *testing.T) {
	file := finished(t)
	r, err := pdf.NewReader(bytes.NewReader(file), int64(len(file)))
	if err != nil {
		t.Fatal(err)
	}
	for i, want := range needles {
		got, err := r.Page(i + 1).GetPlainText(nil)
		if err != nil || !strings.Contains(got, want) {
			t.Errorf("page %d reads %q, want %q (error %v)", i+1, got, want, err)
		}
	}
}

// Fonts are composite, embedded, and named after a subset and with their real names.
func TestFonts(t *testing.T) {
	f, _ := catalogOf(t, finished(t))
	name := regexp.MustCompile(`^[A-Z]{6}\+(LiberationSans|LiberationSans-Bold)$`)
	seen := map[string]bool{}
	err := f.Each(func(_ syntax.Ref, v syntax.Value) error {
		d, ok := v.(syntax.Dict)
		if !ok || d["Type"] != syntax.Name("Font") || d["Subtype"] == syntax.Name("CIDFontType2") {
			return nil
		}
		part := as[syntax.Dict](t, f, as[syntax.Array](t, f, d["DescendantFonts"])[0])
		descriptor := as[syntax.Dict](t, f, part["FontDescriptor"])
		full := string(d["BaseFont"].(syntax.Name))
		if d["Subtype"] != syntax.Name("Type0") || !name.MatchString(full) || part["BaseFont"] != d["BaseFont"] || descriptor["FontName"] != d["BaseFont"] {
			t.Errorf("font %v, part %v, descriptor %v", d["BaseFont"], part["BaseFont"], descriptor["FontName"])
		}
		seen[full] = true
		program := as[*syntax.Stream](t, f, descriptor["FontFile2"])
		data, err := f.Decode(program)
		if length, _ := f.Int(program.Dict["Length1"]); err != nil || length != len(data) || length < 1000 {
			t.Errorf("program of %d bytes, noted %d, error %v", len(data), length, err)
		}
		return nil
	})
	if err != nil || len(seen) != 2 {
		t.Errorf("fonts %v, error %v", seen, err)
	}
}

// The outline counts what is seen of it: three entries, the two below one of them
// folded away.
func TestOutlineCounts(t *testing.T) {
	f, catalog := catalogOf(t, finished(t))
	root := as[syntax.Dict](t, f, catalog["Outlines"])
	if root["Count"] != syntax.Number("3") {
		t.Errorf("%v entries, want 3", root["Count"])
	}
	var got []syntax.Value
	for next := root["First"]; next != nil; {
		entry := as[syntax.Dict](t, f, next)
		got = append(got, entry["Count"])
		next = entry["Next"]
	}
	if want := []syntax.Value{nil, syntax.Number("-2"), nil}; !cmp.Equal(got, want) {
		t.Errorf("counts %v, want %v", got, want)
	}
}

// Links are objects of their own, are printed, and still lead to a page.
func TestLinks(t *testing.T) {
	f, _ := catalogOf(t, finished(t))
	links := 0
	err := f.Each(func(_ syntax.Ref, v syntax.Value) error {
		page, ok := v.(syntax.Dict)
		if !ok || page["Annots"] == nil {
			return nil
		}
		for _, a := range page["Annots"].(syntax.Array) {
			if _, indirect := a.(syntax.Ref); !indirect {
				t.Errorf("annotation %v stands in its page", a)
			}
			link := as[syntax.Dict](t, f, a)
			target := as[syntax.Dict](t, f, as[syntax.Array](t, f, link["Dest"])[0])
			if link["F"] != syntax.Number("4") || target["Type"] != syntax.Name("Page") {
				t.Errorf("link %v to %v", link, target["Type"])
			}
			links++
		}
		return nil
	})
	if err != nil || links != 1 {
		t.Errorf("%d links, error %v", links, err)
	}
}
