package reporttest

import (
	"math"
	"slices"

	"linewitness/sim/record"
)

// Receiving is a receiving site in three cases, with lines of every origin, a
// fit, ratings of every verdict, a transformer and a combination.
func Receiving() *record.Record { return receiving() }

var receiving = made(newReceiving)

func newReceiving() *record.Record {
	r := newRecord("Receiving site, aerial to rack", ReceivingNetwork())
	opt := Options{Error: 3e-4, Loop: 0.4}
	for _, name := range []string{"nominal", "wet", "no_trap"} {
		n := ReceivingNetwork()
		switch name {
		case "wet":
			n.Loads[0].R *= 0.4
		case "no_trap":
			n.Bridges = n.Bridges[:1]
		}
		c := n.Case(name, opt)
		c.Model.Lines = Lines()
		c.Ratings = rate(c)
		r.Cases = append(r.Cases, c)
	}
	r.Cases[1].Model.Lines[1].Text += ", wet"
	for i := range r.Cases {
		c := &r.Cases[i]
		for _, q := range c.Ratings {
			if q.Verdict == record.MissedReq && !q.Advisory {
				c.Verdict = record.Missed
			}
		}
	}
	finish(r)
	return r
}

// ReceivingNetwork is the nominal network of Receiving.
func ReceivingNetwork() Network {
	return Network{
		Frequency: 9.7e6, EMF: 400, Source: 50, At: "aerial",
		Sections: []Section{
			{Name: "drop", From: "balun", To: "tee", Length: 38, Z0: 50, VF: 0.659, DB: 0.0194},
			{Name: "feeder", From: "tee", To: "rack", Length: 61, Z0: 50, VF: 0.85, DB: 0.008},
			{Name: "spur", From: "tee", To: "monitor", Length: 7.5, Z0: 75, VF: 0.66, DB: 0.02},
		},
		Loads: []Load{
			{Name: "receiver", At: "rack", R: 50},
			{Name: "watch", At: "monitor", R: 75, C: 47e-12},
			{Name: "trap", At: "tee", R: 300, L: 2e-6, Given: "parallel of 2.2 uH (Q 180) and 122 pF", As: "combination of 2"},
		},
		Bridges: []Load{
			{Name: "unun", At: "balun", To: "aerial", Ratio: 2, Given: "1:2"},
			{Name: "pad", At: "rack", To: "monitor", R: 400},
		},
	}
}

// fromMemory is the note of the values of the cable table.
const fromMemory = "nominal, from memory; to be replaced by the sheet of the cable in hand"

// Lines are kinds of line of every origin and both models.
func Lines() []record.ModelLine {
	list := []record.Pedigree{
		{What: "z0", Text: "50 ohm", Kind: "catalogue", Note: fromMemory},
		{What: "velocity factor", Text: "0.659", Kind: "catalogue", Note: fromMemory},
		{What: "capacitance", Text: "101 pF/m", Kind: "catalogue", Note: fromMemory},
	}
	fit := []record.FitPoint{}
	for _, p := range []struct{ mhz, given, fitted float64 }{{10, 1.97, 1.99}, {50, 4.76, 4.66}, {100, 6.73, 6.78}, {400, 14.6, 14.6}, {1000, 26.25, 26.3}} {
		text := trim(p.given) + " dB/100m at " + trim(p.mhz) + " MHz"
		list = append(list, record.Pedigree{What: "loss", Text: text, Kind: "catalogue", Note: fromMemory})
		fit = append(fit, record.FitPoint{Frequency: p.mhz * 1e6, Given: p.given / 100, Fitted: p.fitted / 100, Text: text})
	}
	list = append(list,
		record.Pedigree{What: "voltage rating", Text: "3700 V rms", Kind: "catalogue", Note: fromMemory},
		record.Pedigree{What: "model", Text: "dispersive", Kind: "assumed", Note: "resistance by skin effect, conductance by a constant loss tangent"})
	return []record.ModelLine{
		{Name: "RG-213", Text: "RG-213 of the cable table", Model: "dispersive", Pedigree: list, Fit: fit, SeriesResidual: 3.9e-4, ShuntResidual: 0.0021},
		{
			Name: "hardline", Text: "coaxial, inner radius 2.4 mm, outer radius 7.1 mm, permittivity 1.38, loss tangent 2e-4, conductivity copper", Model: "dispersive",
			SeriesResidual: 3.9e-4, ShuntResidual: 0.0021, FieldPerVolt: 384,
			Pedigree: []record.Pedigree{
				{What: "inner radius", Text: "2.4 mm", Kind: "geometry"},
				{What: "outer radius", Text: "7.1 mm", Kind: "geometry"},
				{What: "permittivity", Text: "1.38", Kind: "datasheet", Note: "sheet 4411, issue 3"},
				{What: "loss tangent", Text: "2e-4", Kind: "measured", Note: "2026-02-11, 20 C"},
				{What: "outer conductivity", Text: "the same", Kind: "assumed", Note: "as the other conductor"},
			},
		},
		{Name: "spare", Text: "z0 75 ohm, velocity factor 0.66, 2 dB/100m at 10 MHz", Model: "constant", Pedigree: []record.Pedigree{
			{What: "z0", Text: "75 ohm", Kind: "given"}, {What: "velocity factor", Text: "0.66", Kind: "given"}, {What: "model", Text: "constant", Kind: "given"},
		}},
	}
}

// rate judges every section of a case by its voltage and its current.
func rate(c record.Case) []record.Rating {
	var out []record.Rating
	for k, s := range c.Stress.Sections {
		steady := c.Phasor.Sections[k]
		v := record.Rating{
			Section: s.Name, Quantity: "voltage", Unit: "V", Steady: steady.VoltageMax.Value, SteadyAt: steady.VoltageMax.At,
			Peak: s.Voltage, PeakAt: s.VoltageAt, PeakTime: s.VoltageTime, Uncertainty: 0.4,
			Rated: 600 * math.Sqrt2, Text: "600 V rms", Source: "line spare", Derating: 6,
		}
		switch k {
		case 0:
			v.Rated, v.Text, v.Source, v.Advisory, v.Derating = 250*math.Sqrt2, "250 V rms", "cable table", true, 0
		case 1:
			v.Field = 384 * math.Max(v.Steady, v.Peak)
		}
		i := record.Rating{
			Section: s.Name, Quantity: "current", Unit: "A", Steady: steady.CurrentMax.Value, SteadyAt: steady.CurrentMax.At,
			Peak: s.Current, PeakAt: s.CurrentAt, PeakTime: s.CurrentTime, Uncertainty: 0.002,
			Rated: 6, Text: "6 A peak", Source: "section " + s.Name, Derating: 3,
		}
		out = append(out, judged(v), judged(i))
	}
	slices.SortFunc(out, func(a, b record.Rating) int { return int(math.Copysign(1, a.MarginDB-b.MarginDB)) })
	return out
}

func judged(r record.Rating) record.Rating {
	r.Allowed = r.Rated * math.Pow(10, -r.Derating/20)
	most := math.Max(r.Steady, r.Peak)
	r.Margin, r.MarginDB = r.Allowed-most, 20*math.Log10(r.Allowed/most)
	r.MarginPercent = 100 * r.Margin / r.Allowed
	switch {
	case r.Margin >= r.Uncertainty:
		r.Verdict = record.Met
	case r.Margin < -r.Uncertainty:
		r.Verdict = record.MissedReq
	default:
		r.Verdict = record.NotShownReq
	}
	return r
}
