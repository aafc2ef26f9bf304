package report

import (
	"fmt"
	"math"
	"math/cmplx"
	"strings"

	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
	"linewitness/report/figure"
	"linewitness/report/format"
	"linewitness/report/ink"
	"linewitness/sim/record"
)

// chartColumns is how many sections stand in a row at most; few are larger.
const chartColumns = 4

// The measures of the figures of reflection and phase.
const (
	chartLines  = 3    // of text below a chart
	chartShare  = 0.45 // of the width, of a chart with its phase beside it
	phaseHeight = 84.0 // of the phase below a chart
)

// reflections draws the reflection coefficient and the phase of the voltage
// along every section.
func (d *document) reflections(c *record.Case) {
	var list []*locus
	for _, m := range c.Model.Sections {
		if l := newLocus(c, m); l != nil {
			list = append(list, l)
		}
	}
	if !d.whole(c) {
		list = d.chosenLoci(c, list)
	}
	list, even := uneven(c, list)
	if len(list) == 0 {
		return
	}
	g := chartGrid{columns: min(len(list), chartColumns), beside: len(list) < 3}
	g.height = figure.ChartHeight(d.b.Width()/float64(g.columns), chartLines)
	if g.beside { // chart, phase, chart, phase
		g.height = figure.ChartHeight(d.b.Width()*chartShare/float64(g.columns), chartLines)
	}
	key := reflectionKey(c, list)
	var rows []picture
	for i := 0; i < len(list); i += g.columns {
		rows = append(rows, g.row(c, list[i:min(i+g.columns, len(list))], key))
	}
	const note = 45 // of the text and the key
	need := note + g.total() + d.b.CaptionHeight("Figure 00", rows[0].finding)
	d.b.Float(headingRoom+need, func() { d.reflectionRows(need, rows, key, even) })
}

// reflectionRows writes the rows of charts.
func (d *document) reflectionRows(need float64, rows []picture, key []figure.Entry, even []string) {
	d.b.Subheading("Reflection and phase along the sections", need)
	d.b.Note("Reflection coefficient Γ in its plane (chart after P. H. Smith), in each section against its own " + z0 + " and looking away from the generator. " +
		"Circles: resistance and reactance in units of that " + z0 + ". A turn is half a wavelength. Phase of V relative to the EMF of the source, unwrapped.")
	d.key(key)
	for _, p := range rows {
		d.show(p)
	}
	if len(even) > 0 {
		d.b.Note("Not drawn, for |Γ| stays below " + format.Short(evenReflection) + " there and the phase falls evenly: " + strings.Join(even, ", ") + ".")
	}
}

// evenReflection is the size of the reflection coefficient below which a section
// without a limit on it is not drawn: all of it is a dot and a straight line.
const evenReflection = 0.01

// uneven returns the sections worth a chart, one at least, and of the others the
// names and by how much the phase turns.
func uneven(c *record.Case, list []*locus) (drawn []*locus, even []string) {
	for i, l := range list {
		small := l.shown() && max(cmplx.Abs(l.near), cmplx.Abs(l.far), cmplx.Abs(l.nearF), cmplx.Abs(l.farF)) < evenReflection
		if small && len(reflectionLimits(c, l)) == 0 && !(i == len(list)-1 && len(drawn) == 0) {
			first, last, _ := ends(newPhaseTrack(l).phasor)
			even = append(even, l.section.Name+" ("+format.Electrical(last-first)+")")
			continue
		}
		drawn = append(drawn, l)
	}
	return drawn, even
}

// chartGrid is how charts and phases stand: side by side where the sections are
// few, else one below the other.
type chartGrid struct {
	columns int
	beside  bool
	height  float64 // of a chart
}

func (g chartGrid) total() float64 {
	if g.beside {
		return g.height
	}
	return g.height + phaseHeight
}

// cells returns the places of the i-th chart and of its phase.
func (g chartGrid) cells(c draw.Canvas, i int) (chart, phase draw.Canvas) {
	c = column(c, i, g.columns)
	if g.beside {
		split := c.Size().X * chartShare
		return draw.Crop(c, 0, split-c.Size().X, 0, 0), draw.Crop(c, split, 0, 0, 0)
	}
	return draw.Crop(c, 0, 0, vg.Points(phaseHeight), 0), draw.Crop(c, 0, 0, 0, -vg.Points(g.height))
}

// row is the picture of one row of sections.
func (g chartGrid) row(c *record.Case, row []*locus, key []figure.Entry) picture {
	var charts []*figure.Chart
	var phases []*phaseTrack
	var findings []string
	names := []string{"reflection"}
	for _, l := range row {
		chart, finding := l.chart(c)
		t := newPhaseTrack(l)
		charts, phases, names = append(charts, chart), append(phases, t), append(names, l.section.Name)
		findings = append(findings, finding+"; "+t.finding()+".")
	}
	return picture{
		name: pictureName(c, names...), finding: strings.Join(findings, " "), height: g.total(), key: key,
		paint: func(cv draw.Canvas) {
			for i, chart := range charts {
				upper, lower := g.cells(cv, i)
				chart.Draw(upper)
				phases[i].panel().Draw(lower)
			}
		},
	}
}

// reflectionKey says what the lines of the charts are.
func reflectionKey(c *record.Case, list []*locus) []figure.Entry {
	key := []figure.Entry{
		{Style: ink.PhasorLine, Text: "phasor"},
		{Style: ink.FDTDLine, Dots: true, Text: "time domain"},
	}
	for _, l := range list {
		if len(reflectionLimits(c, l)) > 0 {
			key = append(key, figure.Entry{Style: ink.LimitLine, Text: "VSWR circle of a requirement, hatched on the forbidden side"})
			break
		}
	}
	for _, l := range list {
		if _, ring := l.lines(); l.shown() && ring[1]-ring[0] > figure.RingShows {
			return append(key, figure.Entry{Style: ink.BandEdge, Band: true, Text: "turns left out"})
		}
	}
	return key
}

// chart draws one section up and says what it shows.
func (l *locus) chart(c *record.Case) (*figure.Chart, string) {
	ch := &figure.Chart{Name: l.section.Name, Quantity: "Γ", Foot: []string{"reference " + z0 + " = " + format.Complex(l.section.Z0, "Ω")}}
	limits := reflectionLimits(c, l)
	for _, m := range limits {
		ch.Rims = append(ch.Rims, figure.ChartRim{Radius: m.radius, Inside: m.least, Label: m.label()})
	}
	if !l.shown() {
		ch.Empty = nothingFinite
		return ch, l.section.Name + ": the reflection coefficient has no value on the chart"
	}
	ch.Lines, ch.Ring = l.lines()
	dots, apart := l.dots()
	ch.Dots = dots
	ch.Ends = []figure.ChartEnd{{Name: l.nearAt, At: l.near}, {Name: l.fars, At: l.far, Far: true}}
	if cmplx.Abs(l.near-l.far) < 0.02 { // one place on the page
		ch.Ends = []figure.ChartEnd{{Name: l.nearAt + ", " + l.fars, At: l.far, Far: true}}
	}
	ch.Foot = append(ch.Foot, "VSWR at "+l.nearAt+" "+format.VSWR(vswr(l.near)), "VSWR at "+l.fars+" "+format.VSWR(vswr(l.far)))
	return ch, l.finding(limits, apart)
}

// vswr is the standing wave ratio of a reflection coefficient.
func vswr(g complex128) float64 {
	const total = 1 - 1e-12 // rounding cannot tell it from a total reflection
	a := cmplx.Abs(g)
	if a >= total {
		return math.Inf(1)
	}
	return (1 + a) / (1 - a)
}

// finding says where the curve runs, how far from the limits, and how near the
// two witnesses are.
func (l *locus) finding(limits []reflectionLimit, apart float64) string {
	s := l.section.Name + ": "
	switch a, b := cmplx.Abs(l.far), cmplx.Abs(l.near); {
	case math.Max(a, b) < 5e-4:
		s += "matched, |Γ| below " + format.Number(5e-4)
	default:
		s += "|Γ| " + format.Number(a) + " at " + l.fars + " and " + format.Number(b) + " at " + l.nearAt
	}
	s += fmt.Sprintf(", %s turns", format.Number(l.turns()))
	if l.turns() > manyTurns {
		s += " (the first and the last are drawn)"
	}
	if l.turned {
		s += ", the power from " + l.nearAt + " to " + l.fars
	}
	for _, m := range limits {
		s += "; " + m.finding(l)
	}
	return s + "; the solutions differ by up to " + format.Digits(apart, 2)
}
