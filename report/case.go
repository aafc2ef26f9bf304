package report

import (
	"math"
	"math/cmplx"
	"slices"

	"linewitness/report/format"
	"linewitness/report/sheet"
	"linewitness/sim/record"
)

// caseRoom is the part of a page that a chapter needs to begin on it.
const caseRoom = 0.3

// solved writes the pages of one case.
func (d *document) solved(c *record.Case) {
	d.b.Need(d.b.Body() * caseRoom)
	d.b.Space(22)
	d.b.Heading("Case "+c.Name, 120)
	d.verdictLine(c)
	d.differences(c)
	if !c.Settling.Settled {
		d.unsettled(c)
	}
	d.keyFigures(c)
	d.caseRatings(c)
	d.sections(c)
	d.loads(c)
	d.power(c)
	d.waveforms(c)
	d.envelopes(c)
	d.reflections(c)
	d.spaceTime(c)
	d.settling(c)
	d.gridStudy(c)
	d.fidelity(c)
	d.grid(c)
	d.warnings(c)
	d.leftOut(c)
}

// verdictLine says the verdict of the case in a line.
func (d *document) verdictLine(c *record.Case) {
	a := c.Agreement
	s := "Requirements: " + count(c.Requirements).String() + "."
	if len(c.Ratings) > 0 {
		s += " Ratings: " + countRatings(c.Ratings).String() + "."
	}
	s += claimsOfCase(c) + " The two solutions differ by " + format.Percent(largest(a)) +
		" at most; " + format.Percent(a.Expected) + " was expected and the limit is " + format.Percent(a.Limit) + "."
	if a.Worst.Section != "" {
		s += " The largest difference is in the " + a.Worst.Quantity + " of " + a.Worst.Section + " at " + place(a.Worst.At) + "."
	}
	switch n := len(c.Warnings); {
	case n == 0:
		s += " The run raised no warning."
	default:
		s += " " + format.Plural(int64(n), "warning") + "."
	}
	d.b.Verdict(markOf(c.Verdict), colorOf(c.Verdict), capital(string(c.Verdict))+".", s)
}

// sections writes the state along the sections.
func (d *document) sections(c *record.Case) {
	near := noise(c)
	t := sheet.Table{Columns: []sheet.Column{
		left("Section"), right("Impedance at From"), right("VSWR, From"), right("VSWR, To"), right("Largest |V|"), right("at"),
		right("Smallest |V|"), right("Largest |I|"), right("at"), right("Loss"), right("Peak V, all time"), right("Peak I, all time"),
	}, Size: 7}
	for i, s := range c.Phasor.Sections {
		var x record.StressSection
		if i < len(c.Stress.Sections) {
			x = c.Stress.Sections[i]
		}
		t.Rows = append(t.Rows, []sheet.Cell{
			{Text: s.Name, Bold: true},
			{Text: format.Complex(s.From.Impedance, "Ω")},
			{Text: format.VSWR(s.From.VSWR)},
			{Text: format.VSWR(s.To.VSWR)},
			{Text: format.SI(s.VoltageMax.Value, "V")},
			{Text: place(s.VoltageMax.At)},
			{Text: format.SI(real(near.voltage(complex(s.VoltageMin.Value, 0))), "V")},
			{Text: format.SI(s.CurrentMax.Value, "A")},
			{Text: place(s.CurrentMax.At)},
			{Text: format.SI(s.Loss, "W")},
			{Text: format.SI(x.Voltage, "V")},
			{Text: format.SI(x.Current, "A")},
		})
	}
	if len(t.Rows) == 0 {
		return
	}
	d.b.Subheading("Sections: steady state (phasor) and peaks", d.b.Kept(t))
	d.b.Table(t)
}

// loads writes the loads and the junctions.
func (d *document) loads(c *record.Case) {
	near := noise(c)
	t := sheet.Table{Columns: []sheet.Column{
		left("Load or junction"), right("Voltage, peak"), right("Voltage, rms"), right("Current, peak"), right("Power"),
	}}
	shown := map[string]bool{}
	for _, l := range c.Phasor.Loads {
		name := l.Name + " (load)"
		if at := loadAt(c.Model, l.Name); at != "" {
			name, shown[at] = l.Name+" (load), "+at, true
		}
		t.Rows = append(t.Rows, []sheet.Cell{
			{Text: name, Bold: true},
			{Text: format.Polar(near.voltage(l.V), "V")},
			{Text: rms(near.voltage(l.V))},
			{Text: format.Polar(near.current(l.I), "A")},
			{Text: format.SI(near.power(l.Power), "W")},
		})
	}
	for _, j := range c.Phasor.Junctions {
		if shown[j.Name] { // a load has its voltage
			continue
		}
		t.Rows = append(t.Rows, []sheet.Cell{
			{Text: j.Name},
			{Text: format.Polar(near.voltage(j.V), "V")},
			{Text: rms(near.voltage(j.V))},
			{Text: format.Missing},
			{Text: format.Missing},
		})
	}
	d.b.Subheading("Loads and junctions: steady state (phasor)", d.b.Kept(t))
	d.b.Table(t)
}

// loadAt returns the junction of a load.
func loadAt(m record.Model, name string) string {
	for _, l := range m.Loads {
		if l.Name == name {
			return l.At
		}
	}
	return ""
}

func rms(v complex128) string { return format.SI(cmplx.Abs(v)/math.Sqrt2, "V") }

// warnings lists what the run noticed; what was noticed in the nominal case is
// not said again.
func (d *document) warnings(c *record.Case) {
	if len(c.Warnings) == 0 {
		return
	}
	d.b.Subheading("Warnings", 30)
	if n := d.nominal(); c != n && slices.Equal(c.Warnings, n.Warnings) {
		d.b.Paragraph("The same as in " + n.Name + ".")
		return
	}
	for _, w := range c.Warnings {
		d.b.Item(w)
	}
}

// grid writes the table of the grid.
func (d *document) grid(c *record.Case) {
	g := c.Grid
	if len(g.Sections) == 0 {
		return
	}
	note := format.Plural(int64(g.StepsPerPeriod), "step") + " a period, each " + format.SI(g.Step, "s") + "; " +
		format.Digits(g.Updates, 3) + " cell updates in both runs."
	if n := d.nominal(); c != n && slices.Equal(g.Sections, n.Grid.Sections) {
		d.b.Subheading("Grid of the time domain", 30)
		d.b.Note("The grid of " + n.Name + ": " + note)
		return
	}
	t := sheet.Table{Columns: []sheet.Column{
		left("Section"), right("Cells"), right("Cell"), right("Courant number"), right("Cells per wavelength"),
		right("Points compared"), right("Phase error, predicted"),
	}}
	for _, s := range g.Sections {
		t.Rows = append(t.Rows, []sheet.Cell{
			{Text: s.Name, Bold: true},
			{Text: format.Count(int64(s.Cells))},
			{Text: format.SI(s.Cell, "m")},
			{Text: format.Fixed(s.Courant, 5)},
			{Text: format.Number(s.CellsPerWavelength)},
			{Text: format.Count(int64(s.Points))},
			{Text: format.Digits(s.PhaseErrorDegrees, 3) + "°"},
		})
	}
	d.b.Subheading("Grid of the time domain", d.b.Kept(t))
	d.b.Table(t)
	d.b.Note(note)
}
