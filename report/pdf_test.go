package report

import (
	"bytes"
	"errors"
	"fmt"
	"math"
	"regexp"
	"strings"
	"sync"
	"testing"

	"linewitness/report/archive"
	"linewitness/report/internal/reporttest"
	"linewitness/sim/record"
)

// written returns the document of a record as it is.
func written(t *testing.T, r *record.Record, opt Options) []byte {
	t.Helper()
	var b bytes.Buffer
	if err := WritePDF(&b, r, opt); err != nil {
		t.Fatal(err)
	}
	return b.Bytes()
}

// write lays a record out, fails on an error or on text that is wider than
// its room, and returns the file. Its tables of samples are empty: packing them
// takes longer than all else, and their tests are elsewhere.
func write(t interface {
	Helper()
	Fatalf(string, ...any)
}, r *record.Record, opt Options,
) []byte {
	t.Helper()
	d, err := build(r, opt)
	if err != nil {
		t.Fatalf("build: %v", err)
	}
	for i := range d.files {
		if d.files[i].Role == archive.Table {
			d.files[i].Data = nil
		}
	}
	file, err := d.finish(r)
	if err != nil {
		t.Fatalf("write: %v", explain(err))
	}
	sound(t, d)
	return file
}

// sound fails on text that is wider than its room and on lone headings.
func sound(t interface {
	Helper()
	Fatalf(string, ...any)
}, d *document,
) {
	t.Helper()
	if d.b.Overfull > 0 {
		t.Fatalf("%d texts are wider than their room", d.b.Overfull)
	}
	if page := lonely(d.b); page > 0 {
		t.Fatalf("page %d ends with a heading", page)
	}
}

// The text of the document: title block, verdict, numbers with their units,
// conventions, differences between cases, listing, page numbers.
func TestText(t *testing.T) {
	text := text(t, reporttest.Feeder(), Options{})
	if len(text) < 10 || len(text) > 34 {
		t.Errorf("%d pages", len(text))
	}
	all := strings.Join(text, "\n")
	for _, s := range []string{
		"Hilltop FM feeder, main line and tuning stub", "DR-0042, revision B", "Requirement missed",
		"R1 is missed in iced, arc, stub_missing.", strings.Repeat("0123456789abcdef", 4),
		"50.01 − j0.03 Ω", "393.7 ft", "42.64 λ", "181.1 nH/m", "1.950 kV", "obey the telegrapher's",
		"load antenna: 14 ohm + 68.14 nH at flange instead of 28 ohm + 29.2 nH at flange",
		"section stub is absent", "infinite", "attenuation: 0.70 dB/100m", "IEEE Std C95.1", "multipactor",
	} {
		if !strings.Contains(all, s) {
			t.Errorf("the text lacks %q", s)
		}
	}
	for i, s := range text {
		if want := fmt.Sprintf("page %d of %d", i+1, len(text)); !strings.Contains(s, want) {
			t.Errorf("page %d lacks its number", i+1)
		}
		if strings.Contains(s, "NaN") || strings.Contains(s, "Inf") || strings.Contains(s, "%!") {
			t.Errorf("page %d prints a bare NaN, Inf or a formatting mistake", i+1)
		}
	}
}

// Every font is embedded; none of the reader's own fonts, nothing active and
// no alias is used. The outline names the cases.
func TestStructure(t *testing.T) {
	file := string(write(t, reporttest.Feeder(), Options{}))
	text := pages(t, []byte(file))
	count := func(s string) int { return strings.Count(file, s) }
	if got := count("/Type /Page\n"); got != len(text) {
		t.Errorf("%d page objects, %d pages of text", got, len(text))
	}
	const fonts = 4 // regular, bold, italic, mono
	if d, f := count("/Type /FontDescriptor"), count("/FontFile2 "); d != fonts || f != fonts {
		t.Errorf("%d fonts, %d embedded, want %d", d, f, fonts)
	}
	objects := regexp.MustCompile(`(?s)stream\r?\n.*?endstream`).ReplaceAllString(file, "") // packed bytes hold anything
	for _, s := range []string{"/Subtype /Type1", "/JavaScript", "/JS", "{nb}", "/Type0 /Helvetica"} {
		if strings.Contains(objects, s) {
			t.Errorf("the file holds %s", s)
		}
	}
	if got := count("/Title "); got < 1+len(reporttest.Feeder().Cases) {
		t.Errorf("%d titles in properties and outline", got)
	}
	if want := "/CreationDate (D:20260514000000+00'00')"; !strings.Contains(file, want) {
		t.Errorf("the file lacks %s", want)
	}
}

// The date of the document is that of the record, never the clock's.
func TestDate(t *testing.T) {
	for in, want := range map[string]string{
		"2026-05-14": "2026-05-14", "14 May 2026": "2026-05-14", "2026-05-14T23:30:00-02:00": "2026-05-15",
		"": "0001-01-01", "last spring": "0001-01-01", // none
	} {
		if got := date(in).Format("2006-01-02"); got != want {
			t.Errorf("date(%q) = %s, want %s", in, got, want)
		}
	}
}

// Two runs, also side by side, give equal bytes; the record stays as it was.
func TestDeterministic(t *testing.T) {
	r := reporttest.Feeder()
	before := fmt.Sprintf("%+v", r)
	first := written(t, r, Options{})
	var wg sync.WaitGroup
	for range 2 {
		wg.Add(1)
		go func() {
			defer wg.Done()
			var b bytes.Buffer
			if err := WritePDF(&b, r, Options{}); err != nil || !bytes.Equal(b.Bytes(), first) {
				t.Errorf("the runs differ (error %v)", err)
			}
		}()
	}
	wg.Wait()
	if fmt.Sprintf("%+v", r) != before {
		t.Error("writing changed the record")
	}
}

func TestPapers(t *testing.T) {
	r := reporttest.One("One section", reporttest.Single(1), reporttest.Options{Error: 1e-4, Loop: 0.5})
	for paper, box := range map[string]string{
		"": "/MediaBox [0 0 595.28 841.89]", "a4": "/MediaBox [0 0 595.28 841.89]", "letter": "/MediaBox [0 0 612.00 792.00]",
	} {
		if file := write(t, r, Options{Paper: paper}); !bytes.Contains(file, []byte(box)) {
			t.Errorf("paper %q lacks %s", paper, box)
		}
	}
	err := WritePDF(new(bytes.Buffer), r, Options{Paper: "a3"})
	if want := `report: unknown paper "a3"; known are a4 and letter`; err == nil || err.Error() != want {
		t.Errorf("error %v, want %s", err, want)
	}
}

// A character that the fonts do not have is an error in the words of the
// record, but only a number in the listing of the design file.
func TestMissingGlyph(t *testing.T) {
	r := reporttest.One("漢字", reporttest.Single(1), reporttest.Options{Error: 1e-4, Loop: 0.5})
	err := WritePDF(new(bytes.Buffer), r, Options{})
	if err == nil || !strings.Contains(err.Error(), `no sign for '漢' (U+6F22), in "漢字"`) {
		t.Errorf("error %v", err)
	}
	var sign *SignError
	if !errors.As(err, &sign) || sign.Sign != '漢' || sign.Text != "漢字" {
		t.Errorf("error %#v", err)
	}
	r.Design.Title = "Title"
	r.Design.Source = []byte("# 漢\tΩ\xff\n")
	all := strings.Join(text(t, r, Options{}), "")
	if want := "# <U+6F22>"; !strings.Contains(all, want) {
		t.Errorf("the listing lacks %q", want)
	}
}

type failing struct{}

func (failing) Write([]byte) (int, error) { return 0, fmt.Errorf("disk full") }

func TestFailingWriter(t *testing.T) {
	err := WritePDF(failing{}, reporttest.One("t", reporttest.Single(1), reporttest.Options{Loop: 0.5}), Options{})
	if err == nil || err.Error() != "report: disk full" {
		t.Errorf("error %v", err)
	}
}

// Records at the edges of what a design can be.
func TestExtremes(t *testing.T) {
	opt := reporttest.Options{Error: 2e-4, Loop: 0.6}
	stuck := reporttest.Options{Error: 0.1, Loop: 0.999, Unsettled: true}
	long := strings.Repeat("a_very_long_name_", 12)
	for name, c := range map[string]struct {
		r    *record.Record
		want []string
	}{
		"empty":             {&record.Record{}, []string{"no document number, no revision"}},
		"no figures":        {bare(), []string{"0.0180 %"}},
		"one section":       {reporttest.One("One", reporttest.Single(0.25), opt), []string{"The design states no requirement"}},
		"40 sections":       {reporttest.One("Star", reporttest.Star(39), opt), []string{"branch_39", "receiver_39"}},
		"100 wavelengths":   {reporttest.One("Long", reporttest.Single(100), opt), []string{"extremes over each half wavelength"}},
		"not settled":       {reporttest.One("Stuck", reporttest.Single(2), stuck), []string{"No steady state was reached", "Time domain, not settled"}},
		"long names":        {named(long, opt), nil},
		"fifty":             {demanding(50, opt), []string{"Q50"}},
		"nothing is finite": {hollow(opt), []string{"–", "infinite", nothingFinite}},
	} {
		all := strings.Join(text(t, c.r, Options{}), "\n")
		for _, s := range c.want {
			if !strings.Contains(all, s) {
				t.Errorf("%s: the text lacks %q", name, s)
			}
		}
	}
}

// bare is a record without anything to draw.
func bare() *record.Record {
	r := reporttest.Feeder()
	for i := range r.Cases {
		c := &r.Cases[i]
		c.Profiles, c.Waveforms, c.Spectrum, c.Settling.Curve, c.Grid.Sections = nil, nil, record.Spectrum{}, nil, nil
	}
	return r
}

func named(long string, opt reporttest.Options) *record.Record {
	n := reporttest.Star(4)
	for i := range n.Sections {
		n.Sections[i].Name += long
		n.Sections[i].From += long
		n.Sections[i].To += long
	}
	for i := range n.Loads {
		n.Loads[i].Name += long
		n.Loads[i].At += long
	}
	n.At += long
	r := reporttest.One(strings.Repeat("Title ", 60), n, opt)
	g := &r.Design
	g.Number, g.Revision, g.PreparedBy, g.File = long, long, long+long, long
	g.Purpose, g.Notes = strings.Repeat("Purpose and more. ", 300), strings.Repeat("A note. ", 900)
	r.Cases[0].Name = long
	return r
}

// demanding is a record of n requirements, some met, some missed, some not
// shown.
func demanding(n int, opt reporttest.Options) *record.Record {
	r := reporttest.One("Fifty requirements", reporttest.Single(1), opt)
	c := &r.Cases[0]
	for i := range n {
		q := reporttest.Limit(fmt.Sprintf("Q%d", i+1), "steady_voltage", "along line", "V peak", 60, 55+float64(i%11), 1, "at most so much")
		q.Text, q.Source = "The text of a requirement that goes on for a while.", "document 7"
		c.Requirements = append(c.Requirements, q)
	}
	return r
}

// hollow is a record whose numbers are NaN or infinite throughout.
func hollow(opt reporttest.Options) *record.Record {
	r := reporttest.One("Hollow", reporttest.Single(1), opt)
	c := &r.Cases[0]
	nan, inf := math.NaN(), math.Inf(1)
	for i := range c.Profiles[0].VF {
		c.Profiles[0].VF[i], c.Profiles[0].VP[i], c.Profiles[0].PeakV[i] = complex(nan, nan), complex(inf, 0), nan
	}
	for i := range c.Waveforms {
		for k := range c.Waveforms[i].Samples {
			c.Waveforms[i].Samples[k] = nan
		}
	}
	c.Phasor.Sections[0].From = record.End{V: complex(nan, 0), Impedance: complex(inf, inf), VSWR: inf}
	c.FDTD.Source = record.SteadySource{Power: inf, Impedance: complex(nan, nan)}
	c.Stress.Voltage = record.Peak{Value: inf, Time: nan, Phase: nan, Section: "line"}
	c.Settling.Residual, c.Settling.To1Percent, c.Settling.RoundTrip = inf, nan, 0
	c.Settling.Curve[0].Change, c.Settling.Curve[1].Change = nan, 0
	c.Model.Source.Available = inf
	return r
}
