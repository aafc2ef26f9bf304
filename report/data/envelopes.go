package data

import (
	"fmt"
	"math"
	"math/cmplx"

	"linewitness/sim/record"
)

// envelopeHeader: along each section first the voltage points, then the
// current points, which lie half a cell off. fdtd and phasor are steady
// amplitudes, peak is the largest instantaneous value of the stress run.
var envelopeHeader = []string{
	"case", "section", "z_m",
	"fdtd_v", "fdtd_v_deg", "phasor_v", "phasor_v_deg", "peak_v",
	"fdtd_a", "fdtd_a_deg", "phasor_a", "phasor_a_deg", "peak_a",
}

func envelopeRows(t *table, c *record.Case) error {
	for i := range c.Profiles {
		p := &c.Profiles[i]
		if err := checkProfile(p); err != nil {
			return err
		}
		for _, row := range merge(p.ZV, p.PeakZV) {
			t.text(c.Name, p.Section)
			t.numbers(row.z)
			polar(t, p.VF, row.a)
			polar(t, p.VP, row.a)
			t.digits(valueDigits, at(p.PeakV, row.b))
			t.numbers(none[:5]...)
			t.end()
		}
		for _, row := range merge(p.ZI, p.PeakZI) {
			t.text(c.Name, p.Section)
			t.numbers(row.z)
			t.numbers(none[:5]...)
			polar(t, p.IF, row.a)
			polar(t, p.IP, row.a)
			t.digits(valueDigits, at(p.PeakI, row.b))
			t.end()
		}
	}
	return nil
}

var none = [5]float64{math.NaN(), math.NaN(), math.NaN(), math.NaN(), math.NaN()}

// polar writes magnitude and angle of xs[i], or two empty fields if i < 0. The
// angle of nothing is left empty too.
func polar(t *table, xs []complex128, i int) {
	if i < 0 {
		t.numbers(none[:2]...)
		return
	}
	r, angle := cmplx.Polar(xs[i])
	if r == 0 {
		angle = math.NaN()
	}
	t.digits(valueDigits, r, angle*180/math.Pi)
}

func at(xs []float64, i int) float64 {
	if i < 0 {
		return math.NaN()
	}
	return xs[i]
}

// A place is a point of either of two ascending lists, or of both; the index
// is -1 in a list that does not have it.
type place struct {
	z    float64
	a, b int
}

// merge returns the places of two ascending lists, ascending.
func merge(za, zb []float64) []place {
	var out []place
	a, b := 0, 0
	for a < len(za) || b < len(zb) {
		switch {
		case b == len(zb) || a < len(za) && za[a] < zb[b]:
			out = append(out, place{za[a], a, -1})
			a++
		case a == len(za) || zb[b] < za[a]:
			out = append(out, place{zb[b], -1, b})
			b++
		default:
			out = append(out, place{za[a], a, b})
			a++
			b++
		}
	}
	return out
}

func checkProfile(p *record.Profile) error {
	for _, x := range []struct {
		what string
		z    []float64
		n    []int
	}{
		{"voltages", p.ZV, []int{len(p.VF), len(p.VP), len(p.EV)}},
		{"currents", p.ZI, []int{len(p.IF), len(p.IP), len(p.EI)}},
		{"peak voltages", p.PeakZV, []int{len(p.PeakV)}},
		{"peak currents", p.PeakZI, []int{len(p.PeakI)}},
	} {
		for _, n := range x.n {
			if n != len(x.z) {
				return fmt.Errorf("section %q has %s at %d places and %d values", p.Section, x.what, len(x.z), n)
			}
		}
	}
	return nil
}
