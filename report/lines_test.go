package report

import (
	"slices"
	"strings"
	"testing"

	"linewitness/report/internal/reporttest"
	"linewitness/sim/record"
)

// What the record says of lines, of ratings, and of where its data come from.
func TestLinesAndRatingsInText(t *testing.T) {
	text := text(t, reporttest.Receiving(), Options{})
	all := readable(strings.Join(text, "\n"))
	for _, s := range []string{
		"Ratings: the 12 worst of 18", "All 18 ratings stand with their cases.", "250 V rms", "6 A peak", "missed",
		"assumptions to confirm:", "z0, velocity factor, capacitance, loss and voltage rating of RG-213",
		"RG-213 of the cable table", "dispersive", "0.0390 %", "0.210 %", "384.0 V/m", "kV/m",
		"cable table, needs", "nominal, from memory; to be", "assumed, needs", "from dimensions", "Design file: it gives the value", "sheet 4411, issue 3",
		"hardline (case", "Loss table of RG-213 and its fit", "−2.10 %", "Its largest residual is −2.10 %, at 50.00 MHz.",
		"ideal transformer: voltage at aerial is 2.000 times that at balun", "combination of 2", "parallel of 2.2 uH (Q 180) and 122 pF",
		"line hardline: coaxial", "rated 353.6 V (cable table)", "allowed 4.248 A", "rated 6.000 A", "allowed 425.3 V",
		"A line with the dispersive model (here RG-213, hardline)", "A line with the constant model (here spare)",
	} {
		if !strings.Contains(all, s) {
			t.Errorf("the text lacks %q", s)
		}
	}
	if n := strings.Count(afterContents(text), "Ratings, worst first"); n != 3 {
		t.Errorf("%d full tables of ratings, want one a case", n)
	}
}

// A record with few ratings has them in the compliance alone; one with none says so.
func TestFewRatings(t *testing.T) {
	r := reporttest.Receiving()
	r.Cases = r.Cases[:1]
	if n := strings.Count(afterContents(text(t, r, Options{})), "Ratings, worst first"); n != 1 {
		t.Errorf("%d tables of ratings, want 1", n)
	}
	r.Cases[0].Ratings, r.Cases[0].Model.Lines = nil, nil
	all := strings.Join(text(t, r, Options{}), "\n")
	for _, s := range []string{"Kinds of line", "needs confirmation", "worst first"} {
		if strings.Contains(all, s) {
			t.Errorf("a record without lines and ratings has %q", s)
		}
	}
	if s := "No line and no section carries a rating"; !strings.Contains(all, s) {
		t.Errorf("the text lacks %q", s)
	}
}

// What has one origin and one note is joined; the values of one thing name it
// once.
func TestGathered(t *testing.T) {
	row := func(what, text, kind, note string) record.Pedigree {
		return record.Pedigree{What: what, Text: text, Kind: kind, Note: note}
	}
	got := gathered([]record.Pedigree{
		row("loss", "1 dB", "datasheet", ""), row("loss", "2 dB", "datasheet", ""), row("loss", "3 dB", "measured", ""), row("z0", "50 ohm", "measured", ""),
		row("model", "constant", "datasheet", "a note"),
	})
	var texts []string
	for _, p := range got {
		texts = append(texts, p.Kind+": "+p.Text)
	}
	want := []string{"datasheet: loss 1 dB; 2 dB", "measured: loss 3 dB; z0 50 ohm", "datasheet: model constant"}
	if !slices.Equal(texts, want) {
		t.Errorf("%q, want %q", texts, want)
	}
}

// The origins that nobody answers for are flagged, and an unknown one is
// printed as it is.
func TestOriginOf(t *testing.T) {
	for kind, want := range map[string]string{
		"measured": "measured", "datasheet": "data sheet", "geometry": "from dimensions", "given": "design file",
		"catalogue": "cable table, needs confirmation", "assumed": "assumed, needs confirmation", "hearsay": "hearsay",
	} {
		if got := originOf(record.Pedigree{Kind: kind}); got != want {
			t.Errorf("originOf(%q) = %q, want %q", kind, got, want)
		}
	}
}

// A kind of line that a case has otherwise is told of as that case's, and one
// whose residual differs by rounding is not.
func TestLineKinds(t *testing.T) {
	r := reporttest.Receiving()
	r.Cases[2].Model.Lines[0].SeriesResidual *= 1 + 1e-12
	var got []string
	for _, k := range (&document{r: r}).lineKinds() {
		got = append(got, k.label)
	}
	if want := "RG-213, hardline, spare, hardline (case wet)"; strings.Join(got, ", ") != want {
		t.Errorf("kinds %q, want %s", got, want)
	}
}

// What a record leaves out depends on the models of its lines.
func TestUncovered(t *testing.T) {
	model := func(names ...string) *document {
		c := record.Case{Name: "nominal"}
		for _, s := range names {
			name, m, _ := strings.Cut(s, ":")
			c.Model.Lines = append(c.Model.Lines, record.ModelLine{Name: name, Model: m})
		}
		return &document{r: &record.Record{Cases: []record.Case{c}}}
	}
	const all, some, laws = "for every line of this record has the constant model", "on the lines with the constant model: b", "what the two laws leave out"
	for _, c := range []struct {
		d           *document
		want, never []string
	}{
		{model(), []string{all}, []string{some, laws}},
		{model("a:constant", "b:constant"), []string{all}, []string{some, laws}},
		{model("a:dispersive", "b:constant"), []string{some, laws}, []string{all}},
		{model("a:dispersive"), []string{laws}, []string{all, some}},
	} {
		said := strings.Join(c.d.uncovered(), "\n")
		for _, s := range c.want {
			if !strings.Contains(said, s) {
				t.Errorf("%v: lacks %q", c.d.models(), s)
			}
		}
		for _, s := range c.never {
			if strings.Contains(said, s) {
				t.Errorf("%v: has %q", c.d.models(), s)
			}
		}
	}
}
