package reporttest

import (
	"math"

	"linewitness/sim/record"
)

// fidelity makes up the feature selective validation of a case: one curve that
// is silent, the others good to excellent.
func fidelity(c *record.Case, opt Options) []record.Fidelity {
	var out []record.Fidelity
	add := func(subject, curve string, points int) {
		x := opt.Error * float64(1+len(out)%5)
		a, f := difference(2*x), difference(40*x)
		out = append(out, record.Fidelity{Subject: subject, Curve: curve, Points: points, ADM: a, FDM: f, GDM: difference(math.Hypot(a.Value, f.Value))})
	}
	for _, p := range c.Profiles {
		add(p.Section, "|V| along the section", len(p.ZV))
		add(p.Section, "|I| along the section", len(p.ZI))
	}
	for _, w := range c.Waveforms {
		add(w.Name, "waveform", len(w.Tail.Samples))
	}
	if n := len(out); n > 0 {
		nothing := record.Difference{Value: math.NaN()}
		out[n-1] = record.Fidelity{Subject: out[n-1].Subject, Curve: "waveform", Note: "the curve is zero in both solutions", ADM: nothing, FDM: nothing, GDM: nothing}
	}
	return out
}

// difference grades a value and spreads the points around its grade.
func difference(v float64) record.Difference {
	words := []string{"excellent", "very good", "good", "fair", "poor", "very poor"}
	k := 0
	for limit := 0.1; k < 5 && v > limit; limit *= 2 {
		k++
	}
	d := record.Difference{Value: v, Word: words[k], Grade: k + 1, Spread: 1}
	d.Histogram[k] = 0.875
	d.Histogram[(k+1)%6] = 0.125
	return d
}
