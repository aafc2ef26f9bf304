package data

import (
	"math"
	"math/cmplx"

	"linewitness/sim/record"
)

// errorHeader: the distance between the two witnesses' phasors at each point
// of the grid, what the grid explains of it, and its share of the section's
// largest value, which is what the agreement limit bounds.
var errorHeader = []string{
	"case", "section", "z_m",
	"error_v", "expected_v", "error_v_rel",
	"error_a", "expected_a", "error_a_rel",
}

func errorRows(t *table, c *record.Case) error {
	for i := range c.Profiles {
		p := &c.Profiles[i]
		if err := checkProfile(p); err != nil {
			return err
		}
		v, a := scales(c.Agreement, p.Section)
		for j, z := range p.ZV {
			d := cmplx.Abs(p.VF[j] - p.VP[j])
			t.text(c.Name, p.Section)
			t.numbers(z)
			t.digits(errorDigits, d, p.EV[j], d/v)
			t.numbers(none[:3]...)
			t.end()
		}
		for j, z := range p.ZI {
			d := cmplx.Abs(p.IF[j] - p.IP[j])
			t.text(c.Name, p.Section)
			t.numbers(z)
			t.numbers(none[:3]...)
			t.digits(errorDigits, d, p.EI[j], d/a)
			t.end()
		}
	}
	return nil
}

// scales returns what the agreement of a section was normalised by, NaN if the
// section was not compared.
func scales(a record.Agreement, section string) (voltage, current float64) {
	for _, s := range a.Sections {
		if s.Name == section {
			return s.VoltageScale, s.CurrentMax
		}
	}
	return math.NaN(), math.NaN()
}
