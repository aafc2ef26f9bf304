package archive

import (
	"bytes"
	"crypto/md5"
	"errors"
	"slices"
	"strings"
	"testing"

	"github.com/google/go-cmp/cmp"
	"github.com/google/go-cmp/cmp/cmpopts"
	"github.com/jung-kurt/gofpdf"

	"linewitness/report/archive/internal/syntax"
)

// attached fails unless the files of the sample come back.
func attached(t *testing.T, f *File) {
	t.Helper()
	got := f.Attachments()
	if len(got) != len(files()) {
		t.Fatalf("%d files, want %d", len(got), len(files()))
	}
	for i, want := range files() {
		if !bytes.Equal(got[i].Data, want.Data) {
			t.Errorf("%q has other bytes", want.Name)
		}
		got[i].Data, want.Data = nil, nil
		if diff := cmp.Diff(want, got[i]); diff != "" {
			t.Errorf("file %d (-want +got):\n%s", i, diff)
		}
	}
}

// What was attached comes back byte for byte, with its names, roles and types.
func TestOpen(t *testing.T) {
	f, err := Open(finished(t))
	if err != nil {
		t.Fatal(err)
	}
	attached(t, f)
	m := meta()
	want := File{
		Version: "v1", Format: 1, Title: m.Title, Author: m.Author, Subject: "A purpose of two lines", Keywords: m.Keywords,
		Creator: m.Creator, Producer: m.Producer, Created: "D:20260514000000+00'00'",
	}
	if diff := cmp.Diff(want, *f, cmpopts.IgnoreUnexported(File{})); diff != "" {
		t.Errorf("file (-want +got):\n%s", diff)
	}
	if got := f.Design(); !bytes.Equal(got.Data, files()[0].Data) {
		t.Errorf("the design is %q", got.Data)
	}
	if got := f.Result().Name; got != "feeder.json" {
		t.Errorf("the result is %q", got)
	}
	if got, err := f.Input("data/Prüfung Ω.s1p"); err != nil || !bytes.Equal(got, files()[1].Data) {
		t.Errorf("input: %v", err)
	}
	for _, name := range []string{"none", "feeder.json"} {
		if _, err := f.Input(name); !errors.Is(err, ErrMissing) {
			t.Errorf("input %q: error %v", name, err)
		}
	}
}

// A list that is changed by who got it is not the file's own.
func TestAttachmentsAreACopy(t *testing.T) {
	f, err := Open(finished(t))
	if err != nil {
		t.Fatal(err)
	}
	f.Attachments()[0].Name = "other"
	if got := f.Attachments()[0].Name; got != "feeder.yaml" {
		t.Errorf("the first file is called %q", got)
	}
}

// specification finds the file specification of a name.
func specification(tb testing.TB, f *syntax.File, catalog syntax.Dict, name string) (syntax.Dict, *syntax.Stream) {
	tb.Helper()
	for _, r := range catalog["AF"].(syntax.Array) {
		spec, err := syntax.As[syntax.Dict](f, r)
		if err != nil {
			tb.Fatal(err)
		}
		if plainText(spec["UF"].(syntax.String)) == name {
			s, err := syntax.As[*syntax.Stream](f, spec["EF"].(syntax.Dict)["F"])
			if err != nil {
				tb.Fatal(err)
			}
			return spec, s
		}
	}
	tb.Fatalf("no file %q", name)
	return nil, nil
}

// replaced puts other data into an attached file, with a check sum that holds if
// asked for.
func replaced(name, data string, withSum bool) func(testing.TB, *syntax.File, syntax.Dict) {
	return func(tb testing.TB, f *syntax.File, catalog syntax.Dict) {
		_, s := specification(tb, f, catalog, name)
		d := s.Dict
		if sum := md5.Sum([]byte(data)); withSum {
			d["Params"].(syntax.Dict)["CheckSum"] = syntax.String(sum[:])
		}
		*s = *syntax.NewStream(d, []byte(data))
	}
}

// renamed gives an attached file another name, so that it is missing.
func renamed(name string) func(testing.TB, *syntax.File, syntax.Dict) {
	return func(tb testing.TB, f *syntax.File, catalog syntax.Dict) {
		spec, _ := specification(tb, f, catalog, name)
		spec["UF"], spec["F"] = syntax.String("other"), syntax.String("other")
	}
}

func anonymous(_ testing.TB, f *syntax.File, catalog syntax.Dict) {
	delete(catalog, "Names")
	f.Trailer["Info"] = f.Add(syntax.Dict{"Creator": syntax.String("writer")})
}

func compared(_ testing.TB, f *syntax.File, catalog syntax.Dict) {
	delete(catalog, "Names")
	f.Trailer["Info"] = f.Add(syntax.Dict{"Creator": syntax.String(ComparisonCreator + " v1")})
}

// Each thing that can be wrong is called by its name.
func TestOpenRefuses(t *testing.T) {
	const manifestOf = `{"program": "linewitness", "format": 1, "files": [`
	for _, c := range []struct {
		name   string
		change func(testing.TB, *syntax.File, syntax.Dict)
		kind   error
		reason string
	}{
		{"edited", replaced("feeder.json", `{"format": 2}`, true), ErrTampered, `"feeder.json" has SHA-256`},
		{"longer", replaced("feeder.json", `{"format": 1 }`, true), ErrTampered, `"feeder.json" has 14 bytes, not 13`},
		{"check sum", func(tb testing.TB, f *syntax.File, c syntax.Dict) {
			_, s := specification(tb, f, c, "feeder.yaml")
			s.Dict["Params"].(syntax.Dict)["CheckSum"] = syntax.String("0123456789abcdef")
		}, ErrTampered, `"feeder.yaml" has another check sum`},
		{"not compressed", func(tb testing.TB, f *syntax.File, c syntax.Dict) {
			_, s := specification(tb, f, c, "feeder.yaml")
			s.Data = s.Data[:len(s.Data)-6]
		}, ErrDamaged, `"feeder.yaml": compressed data`},
		{"other filter", func(tb testing.TB, f *syntax.File, c syntax.Dict) {
			_, s := specification(tb, f, c, "feeder.yaml")
			s.Dict["Filter"] = syntax.Name("LZWDecode")
		}, ErrDamaged, "filter"},
		{"file missing", renamed("feeder.json"), ErrMissing, `"feeder.json"`},
		{"manifest missing", renamed(manifestName), ErrMissing, manifestName},
		{"no names", func(_ testing.TB, _ *syntax.File, c syntax.Dict) { delete(c, "Names") }, ErrMissing, manifestName},
		{"other program", anonymous, ErrNotRecord, "no manifest.json is attached"},
		{"comparison", compared, ErrNotRecord, "the page of a comparison"},
		{"other manifest", replaced(manifestName, `{"program": "packer", "format": 1}`, true), ErrNotRecord, "another program"},
		{"no JSON", replaced(manifestName, `[`, true), ErrNotRecord, "unexpected end"},
		{"newer", replaced(manifestName, `{"program": "linewitness", "format": 2}`, true), ErrNewer, "format 2, this program reads up to 1"},
		{"no design", replaced(manifestName, manifestOf+`]}`, true), ErrMissing, "lists no design"},
		{"no result", replaced(manifestName, manifestOf+`{"role": "design"}]}`, true), ErrMissing, "lists no result"},
		{"two designs", replaced(manifestName, manifestOf+`{"role": "design"}, {"role": "design"}]}`, true), ErrDamaged, "lists 2 files as design"},
		{"twice", renamedTo("data/Pr_fung _.s1p", "feeder.yaml"), ErrDamaged, `two attached files are called "feeder.yaml"`},
		{"encrypted", func(_ testing.TB, f *syntax.File, _ syntax.Dict) { f.Trailer["Encrypt"] = syntax.Dict{} }, ErrNotRecord, "encrypted"},
	} {
		changed := edited(t, finished(t), func(f *syntax.File, catalog syntax.Dict) { c.change(t, f, catalog) })
		if c.name == "encrypted" { // the writer leaves that key out
			changed = bytes.Replace(changed, []byte("trailer\n<<"), []byte("trailer\n<</Encrypt <<>> "), 1)
		}
		got, err := Open(changed)
		if !errors.Is(err, c.kind) || !strings.Contains(err.Error(), c.reason) || got != nil {
			t.Errorf("%s: error %v, want %v with %q", c.name, err, c.kind, c.reason)
		}
	}
}

func renamedTo(name, other string) func(testing.TB, *syntax.File, syntax.Dict) {
	return func(tb testing.TB, f *syntax.File, catalog syntax.Dict) {
		spec, _ := specification(tb, f, catalog, name)
		spec["UF"] = textString(other)
	}
}

// Files that others added are no fault, and not ours.
func TestOpenKeepsToTheManifest(t *testing.T) {
	changed := edited(t, finished(t), func(f *syntax.File, catalog syntax.Dict) {
		spec := f.Add(syntax.Dict{
			"UF": syntax.String("stamp.txt"),
			"EF": syntax.Dict{"F": f.Add(syntax.NewStream(syntax.Dict{}, []byte("approved")))},
		})
		tree := catalog["Names"].(syntax.Dict)["EmbeddedFiles"].(syntax.Dict)
		tree["Names"] = append(tree["Names"].(syntax.Array), syntax.String("stamp.txt"), spec)
	})
	f, err := Open(changed)
	if err != nil {
		t.Fatal(err)
	}
	if got := len(f.Attachments()); got != len(files()) {
		t.Errorf("%d files, want %d", got, len(files()))
	}
}

// What is no PDF, or only begins as one, is said to be so.
func TestOpenNonsense(t *testing.T) {
	whole := finished(t)
	for _, c := range []struct {
		name string
		file []byte
		kind error
	}{
		{"empty", nil, ErrNotPDF},
		{"text", []byte("format: 1\n"), ErrNotPDF},
		{"version 2", []byte("%PDF-2.0\n"), ErrNotPDF},
		{"head", []byte("%PDF-1.7\n"), ErrDamaged},
		{"half", whole[:len(whole)/2], ErrDamaged},
		{"without its head", whole[100:], ErrNotPDF},
		{"shifted", slices.Concat([]byte("%PDF-1.7\n"), whole), ErrDamaged},
		{"size", append([]byte("%PDF-1.7\n"), make([]byte, MaxSize)...), ErrTooLarge},
	} {
		if _, err := Open(c.file); !errors.Is(err, c.kind) {
			t.Errorf("%s: error %v, want %v", c.name, err, c.kind)
		}
	}
}

// A small file that unpacks to more than any record holds is refused before it is
// unpacked; so is a tree that leads back to itself.
func TestOpenBombs(t *testing.T) {
	defer func(l syntax.Limits) { foreign = l }(foreign)
	foreign.Inflated = 1 << 20 // the true limit takes a second to reach
	bomb := edited(t, finished(t), func(f *syntax.File, catalog syntax.Dict) {
		_, s := specification(t, f, catalog, manifestName)
		*s = *syntax.NewLongStream(s.Dict, make([]byte, foreign.Inflated+1))
	})
	if len(bomb) > 1<<17 {
		t.Fatalf("the bomb has %d bytes", len(bomb))
	}
	if _, err := Open(bomb); !errors.Is(err, ErrTooLarge) {
		t.Errorf("bomb: error %v", err)
	}
	ring := edited(t, finished(t), func(f *syntax.File, catalog syntax.Dict) {
		node := syntax.Dict{}
		r := f.Add(node)
		node["Kids"] = syntax.Array{r, r}
		catalog["Names"] = syntax.Dict{"EmbeddedFiles": r}
	})
	if _, err := Open(ring); !errors.Is(err, ErrDamaged) {
		t.Errorf("ring: error %v", err)
	}
	deep := edited(t, finished(t), func(_ *syntax.File, catalog syntax.Dict) {
		var v syntax.Value = syntax.Null{}
		for range 1000 {
			v = syntax.Array{v}
		}
		catalog["Deep"] = v
	})
	if _, err := Open(deep); !errors.Is(err, ErrTooLarge) {
		t.Errorf("deep: error %v", err)
	}
}

// A flipped byte is found, or it is in what no attached file depends on: never
// does a changed file come out.
func TestFlippedBytes(t *testing.T) {
	whole := finished(t)
	want := files()
	found := 0
	const apart = 101 // bytes between two flips: prime, so that they fall everywhere
	for i := 0; i < len(whole); i += apart {
		bad := bytes.Clone(whole)
		bad[i] ^= 1 << (i % 8)
		f, err := Open(bad)
		if err != nil {
			found++
			continue
		}
		for k, a := range f.Attachments() {
			if !bytes.Equal(a.Data, want[k].Data) {
				t.Fatalf("byte %d: file %q came out changed", i, a.Name)
			}
		}
	}
	if found == 0 {
		t.Error("no flip was found")
	}
}

// small is a record of an empty page, for its reader to be tried on.
func small(tb testing.TB) []byte {
	tb.Helper()
	page := gofpdf.New("P", "mm", "A4", "")
	page.AddPage()
	var b bytes.Buffer
	if err := page.Output(&b); err != nil {
		tb.Fatal(err)
	}
	out, err := Finish(b.Bytes(), Meta{}, []Attachment{files()[0], files()[3]})
	if err != nil {
		tb.Fatal(err)
	}
	return out
}

func FuzzOpen(f *testing.F) {
	f.Add(small(f))
	f.Add([]byte("%PDF-1.7\nxref\n0 1\n0000000000 65535 f \ntrailer\n<</Size 1>>\nstartxref\n9\n%%EOF\n"))
	f.Fuzz(func(t *testing.T, b []byte) {
		r, err := Open(b)
		if err != nil {
			return
		}
		if r.Design().Role != Design || r.Result().Role != Result {
			t.Error("a record without design or result")
		}
	})
}
