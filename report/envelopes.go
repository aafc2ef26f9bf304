package report

import (
	"math"
	"math/cmplx"
	"slices"

	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
	"linewitness/report/figure"
	"linewitness/report/format"
	"linewitness/report/ink"
	"linewitness/sim/record"
)

// manyWavelengths is the length from which on the lobes of an envelope are too
// narrow to read; the section is then drawn as a band with zooms of its ends.
const manyWavelengths = 12

// zoomWavelengths is the length of a zoom.
const zoomWavelengths = 2

// manySections is how many short sections get a row of their own.
const manySections = 3

// The heights of an envelope and of the error strip below it.
const (
	envelopeHeight = 93.0 // the axis in wavelengths included
	stripHeight    = 50.0
	rowHeight      = envelopeHeight + stripHeight
	zoomHeight     = rowHeight - 14 // of the zooms below a long section
)

// track is one quantity along one section.
type track struct {
	section     string
	symbol      string // "|V|"
	unit        string
	wavelengths float64
	length      float64
	z           []float64
	fdtd        []float64 // magnitudes
	phasor      []float64
	found       []float64 // error over the section's largest value
	expected    []float64
	peakZ, peak []float64
	limits      []limit
	agreed      float64 // limit of the agreement

	top  record.Extreme          // the closed form's largest value, which may lie between the points
	fine func(z float64) float64 // the phasor's magnitude between the points
}

// tracks returns voltage and current along the k-th section, or nil where the
// record has no profile.
func tracks(c *record.Case, k int) []*track {
	p := c.Profiles[k]
	m := sectionOf(c, k)
	v := &track{symbol: "|V|", unit: "V", z: p.ZV, peakZ: p.PeakZV, peak: p.PeakV, limits: limitsOf(c, p.Section, "voltage")}
	v.compare(p.VF, p.VP, p.EV)
	gamma := propagation(m, c.Model.Frequency)
	v.fine = func(z float64) float64 { return cmplx.Abs(between(p.ZV, p.VP, gamma, z)) }
	i := &track{symbol: "|I|", unit: "A", z: p.ZI, peakZ: p.PeakZI, peak: p.PeakI, limits: limitsOf(c, p.Section, "current")}
	i.compare(p.IF, p.IP, p.EI)
	i.fine = func(z float64) float64 { return cmplx.Abs(between(p.ZI, p.IP, gamma, z)) }
	for _, s := range c.Phasor.Sections {
		if s.Name == p.Section {
			v.top, i.top = s.VoltageMax, s.CurrentMax
		}
	}
	var out []*track
	for _, t := range []*track{v, i} {
		t.section, t.wavelengths, t.length, t.agreed = p.Section, m.Wavelengths, m.Length, c.Agreement.Limit
		if len(t.z) > 0 {
			out = append(out, t)
		}
	}
	return out
}

// sectionOf returns the section of the k-th profile.
func sectionOf(c *record.Case, k int) record.ModelSection {
	for _, s := range c.Model.Sections {
		if s.Name == c.Profiles[k].Section {
			return s
		}
	}
	return record.ModelSection{}
}

// compare fills the magnitudes and the errors.
func (t *track) compare(fdtd, phasor []complex128, expected []float64) {
	t.fdtd, t.phasor = magnitudes(fdtd), magnitudes(phasor)
	scale := largestOf(t.phasor)
	for i := range min(len(fdtd), len(phasor)) {
		t.found = append(t.found, cmplx.Abs(fdtd[i]-phasor[i])/scale)
	}
	for _, e := range expected {
		t.expected = append(t.expected, e/scale)
	}
}

func magnitudes(zs []complex128) []float64 {
	out := make([]float64, len(zs))
	for i, z := range zs {
		out[i] = cmplx.Abs(z)
	}
	return out
}

// largestOf returns the largest finite value, 0 if there is none.
func largestOf(ys []float64) float64 {
	if i := largestAt(ys); i >= 0 {
		return math.Abs(ys[i])
	}
	return 0
}

// headingRoom is what a heading of the second level takes, the gap above it
// included.
const headingRoom = 30.0

// envelopes draws |V| and |I| along every section, with the error below.
func (d *document) envelopes(c *record.Case) {
	if len(c.Profiles) == 0 {
		return
	}
	const headed = 70.0 // note, key and caption
	long, short := sorted(c)
	if !d.whole(c) {
		long, short = d.chosenTracks(c, long, short)
	}
	first := rowHeight
	if len(long) > 0 && (len(short) == 0 || d.b.Room() > rowHeight+zoomHeight+headed+headingRoom) {
		first += zoomHeight
	}
	d.b.Subheading("Along the sections: envelopes and agreement", first+headed)
	e := envelopeDrawer{d, c, d.envelopeKey(c, slices.Concat(long, short))}
	if first == rowHeight { // a long one would leave the rest of the page empty
		e.shortSections(short)
		short = nil
	}
	for _, ts := range long {
		e.longSection(ts)
	}
	e.shortSections(short)
}

// envelopeDrawer draws the envelopes of a case, which share one key.
type envelopeDrawer struct {
	d   *document
	c   *record.Case
	key []figure.Entry
}

// envelopeKey writes what the curves and lines of the envelopes are.
func (d *document) envelopeKey(c *record.Case, sections [][]*track) []figure.Entry {
	note := "Above: amplitude by both solutions. Below: their difference over the section's largest value, found and expected. Distance from the From end, in metres and in wavelengths."
	key := []figure.Entry{
		{Style: ink.PhasorLine, Text: "phasor; expected error"},
		{Style: ink.FDTDLine, Text: "time domain; found error"},
		{Style: ink.PeakLine, Text: "peak over all time"},
		{Style: ink.LimitLine, Text: "limit, hatched beyond"},
	}
	if len(c.Ratings) > 0 {
		note += " Ratings hold for the amplitude and for the peak over all time; all lines are peak values. A limit far above the curves is not drawn; the caption has it."
	}
	if slices.ContainsFunc(slices.Concat(sections...), (*track).showsMild) {
		key = append(key, figure.Entry{Style: ink.RatedLine, Text: "rated, before derating"})
	}
	d.b.Note(note)
	d.key(key)
	return key
}

// sorted parts the sections into those drawn as bands and the others.
func sorted(c *record.Case) (long, short [][]*track) {
	for k := range c.Profiles {
		ts := tracks(c, k)
		switch {
		case len(ts) == 0:
		case ts[0].wavelengths > manyWavelengths:
			long = append(long, ts)
		default:
			short = append(short, ts)
		}
	}
	return long, short
}

// shortSections draws one section a row, or two if they are many.
func (e envelopeDrawer) shortSections(sections [][]*track) {
	each := 1
	if len(sections) > manySections {
		each = 2
	}
	for i := 0; i < len(sections); i += each {
		var row []*track
		finding, names := "", []string{"envelopes"}
		for _, ts := range sections[i:min(i+each, len(sections))] {
			row = append(row, ts...)
			finding += envelopeFinding(ts) + " "
			names = append(names, ts[0].section)
		}
		e.d.show(picture{
			name: pictureName(e.c, names...), finding: trimmed(finding), height: rowHeight, key: e.key,
			paint: func(c draw.Canvas) {
				for i, t := range row {
					t.draw(column(c, i, 2*each), span{0, t.length})
				}
			},
		})
	}
}

// column crops the i-th of n columns of equal width.
func column(c draw.Canvas, i, n int) draw.Canvas {
	w := c.Size().X / vg.Length(n)
	return draw.Crop(c, w*vg.Length(i), w*vg.Length(i+1)-c.Size().X, 0, 0)
}

// longSection draws the whole length as bands and zooms of both ends.
func (e envelopeDrawer) longSection(ts []*track) {
	e.d.show(picture{
		name:    pictureName(e.c, "envelopes", ts[0].section),
		finding: envelopeFinding(ts) + " " + bandNote(ts[0].wavelengths), height: rowHeight + zoomHeight, key: e.key,
		paint: func(c draw.Canvas) {
			upper := draw.Crop(c, 0, 0, vg.Points(zoomHeight), 0)
			lower := draw.Crop(c, 0, 0, 0, -vg.Points(rowHeight))
			for i, t := range ts {
				t.drawBand(column(upper, i, len(ts)))
				part := zoomWavelengths * t.length / t.wavelengths
				t.draw(column(lower, 2*i, 2*len(ts)), span{0, part})
				t.draw(column(lower, 2*i+1, 2*len(ts)), span{t.length - part, t.length})
			}
		},
	})
}

// bandWindows is how many windows a band has at most: narrower ones do not
// show apart on half the width of a page.
const bandWindows = 240

// windows returns how many windows the band of a section of so many
// wavelengths has: one each half wavelength, so that it holds a crest and a
// trough, or fewer.
func windows(wavelengths float64) int { return int(min(math.Ceil(2*wavelengths), bandWindows)) }

// bandNote says what the rows of a long section are.
func bandNote(wavelengths float64) string {
	over := "half wavelength"
	if n := windows(wavelengths); float64(n) < 2*wavelengths-1 {
		over = format.Number(wavelengths/float64(n)) + format.Space + "wavelengths"
	}
	return "Upper row: extremes over each " + over + "; lower row: the outer " + format.Plural(zoomWavelengths, "wavelength") + " at each end."
}
