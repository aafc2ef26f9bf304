package report

import (
	"math"
	"math/cmplx"

	"linewitness/report/format"
	"linewitness/report/sheet"
	"linewitness/sim/record"
)

// figureRow is one key figure by both witnesses.
type figureRow struct {
	name         string
	phasor, fdtd string
	difference   float64 // relative
}

// keyFigures writes the key figures by both witnesses.
func (d *document) keyFigures(c *record.Case) {
	t := sheet.Table{Columns: []sheet.Column{
		left("Steady state"), right("Phasor"), right(timeDomain(c)), right("Difference, relative"),
	}}
	for _, r := range keyRows(c) {
		t.Rows = append(t.Rows, []sheet.Cell{
			{Text: r.name}, {Text: r.phasor}, {Text: r.fdtd}, {Text: format.Percent(r.difference)},
		})
	}
	d.b.Subheading("Key figures", d.b.Kept(t))
	d.b.Table(t)
	d.b.Fields(d.transientFields(c))
}

// timeDomain heads the column of the time domain.
func timeDomain(c *record.Case) string {
	if !c.Settling.Settled {
		return "Time domain, not settled"
	}
	return "Time domain"
}

func keyRows(c *record.Case) []figureRow {
	p, f := c.Phasor, c.FDTD
	rows := []figureRow{
		complexRow("Impedance that the source sees", p.Source.Impedance, f.Source.Impedance, format.Complex, "Ω"),
		complexRow("Voltage at the source", p.Source.V, f.Source.V, format.Polar, "V"),
		complexRow("Current from the source", p.Source.I, f.Source.I, format.Polar, "A"),
		realRow("Power from the source", p.Source.Power, f.Source.Power, "W"),
	}
	pl, fl := loadPower(p), loadPower(f)
	rows = append(rows, realRow("Power into all loads", pl, fl, "W"),
		plainRow("Efficiency, loads over source", pl/p.Source.Power, fl/f.Source.Power, format.Percent))
	pv, pi := tops(p)
	fv, fi := tops(f)
	return append(rows, realRow("Largest voltage on any section", pv, fv, "V"), realRow("Largest current on any section", pi, fi, "A"))
}

func complexRow(name string, p, f complex128, print func(complex128, string) string, unit string) figureRow {
	return figureRow{name, print(p, unit), print(f, unit), cmplx.Abs(f-p) / cmplx.Abs(p)}
}

func realRow(name string, p, f float64, unit string) figureRow {
	return plainRow(name, p, f, func(v float64) string { return format.SI(v, unit) })
}

func plainRow(name string, p, f float64, print func(float64) string) figureRow {
	return figureRow{name, print(p), print(f), math.Abs(f-p) / math.Abs(p)}
}

func loadPower(s record.Steady) (w float64) {
	for _, l := range s.Loads {
		w += l.Power
	}
	return w
}

// tops returns the largest voltage and current on any section.
func tops(s record.Steady) (v, i float64) {
	for _, e := range s.Sections {
		v, i = max(v, e.VoltageMax.Value), max(i, e.CurrentMax.Value)
	}
	return v, i
}

// transientFields are the key figures of the two time-domain runs.
func (d *document) transientFields(c *record.Case) []sheet.Field {
	s, x := c.Settling, c.Stress
	start := "start: " + format.Signed(x.Profile)
	if x.Worst {
		start += " (every phase was considered)"
	}
	return []sheet.Field{
		{Label: "Peak voltage", Value: peak(x.Voltage, "V"), Wide: true},
		{Label: "Peak current", Value: peak(x.Current, "A"), Wide: true},
		{Label: "Against the steady value", Value: overSteady(x.Overshot) + "; " + start, Wide: true},
		{Label: "Settling", Value: settled(s, d.r.Design.Tolerance), Wide: true},
	}
}

// overSteady compares the largest instantaneous voltage with the largest steady
// one, of which it falls short where the run ends before it is reached.
func overSteady(part float64) string {
	word := " above"
	if part < 0 {
		word = " below"
	}
	return "largest instantaneous voltage " + format.Percent(math.Abs(part)) + word + " the largest steady one"
}

func peak(p record.Peak, unit string) string {
	s := format.SI(p.Value, unit)
	if p.Uncertainty > 0 {
		s += format.Space + "±" + format.Space + format.Uncertainty(p.Uncertainty, unit)
	}
	if p.Section == "" {
		return s
	}
	return s + " on " + p.Section + " at " + place(p.At) + ", " + format.SI(p.Time, "s") +
		" after switch-on, start phase " + format.Angle(p.Phase)
}

func settled(s record.Settling, tolerance float64) string {
	out := "within 1 % of the final state at every junction after " + format.SI(s.To1Percent, "s")
	if math.IsNaN(s.To1Percent) {
		out = "the final state was not reached within 1 % at every junction"
	}
	if s.Settled {
		out += "; steady within " + format.Percent(tolerance) + " after " + format.Plural(int64(s.Periods), "period") + " of the settling run"
	}
	return out
}
