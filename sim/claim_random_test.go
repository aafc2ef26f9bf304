package sim

import (
	"context"
	"fmt"
	"math"
	"math/cmplx"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"linewitness/phasor"
	"linewitness/sim/design"
	"linewitness/sim/record"
	"linewitness/sim/slip"
)

// plantTol is the tolerance of planted claims: of the value, or rad.
const plantTol = 0.01

// claiming is the claim with a value and its tolerance.
func claiming(c design.Claim, v complex128) design.Claim {
	both := c.Complex
	c = claimOf(c.Requirement, v, plantTol)
	c.Complex = both
	return c
}

// A planting is a claim that a slip has spoiled.
type planting struct {
	claim design.Claim
	label string
}

// fourFigures rounds a figure as a calculation sheet would, both parts of it
// to the same place.
func fourFigures(v complex128) complex128 {
	size := cmplx.Abs(v)
	if size == 0 || cmplx.IsNaN(v) || cmplx.IsInf(v) {
		return v
	}
	unit := math.Pow(10, math.Floor(math.Log10(size))-3)
	return complex(math.Round(real(v)/unit)*unit, math.Round(imag(v)/unit)*unit)
}

// plantings are the claims of a feeder that one slip spoils by more than twice
// the tolerance.
func plantings(a *assessor, d *drawn, id slip.ID) (out []planting) {
	asked := d.askable()
	var all []*claimed
	for _, c := range asked {
		all = append(all, a.judge(c))
	}
	try := func(c *claimed, s slip.Slip, v complex128) {
		v = fourFigures(v)
		right := c.exact
		if c.timed != nil {
			right = c.found
		}
		size := cmplx.Abs(v)
		p := claiming(c.Claim, v)
		off := cmplx.Abs(v - right)
		if angular(c.Quantity) {
			off = math.Abs(math.Remainder(real(v-right), 2*pi))
		}
		if !(size > 1e-6 && size < 1e6 && off > 2*p.Tolerance) {
			return
		}
		out = append(out, planting{p, s.Label()})
	}
	catalogue := slip.Catalogue{Net: a.net, Quotes: a.quotes}
	for k := range a.net.Sections {
		catalogue.Single = append(catalogue.Single, k)
	}
	for _, change := range catalogue.Changes() {
		if change.ID != id {
			continue
		}
		if value := a.valuer(change); value != nil {
			for _, c := range all {
				if v, ok := value(c); ok {
					try(c, change.Slip, v)
				}
			}
		}
	}
	for _, c := range all {
		ms := a.reading(c).Misreadings()
		if c.timed == nil {
			ms = append(ms, a.places(c)...)
		}
		for _, m := range ms {
			if m.ID == id {
				for _, v := range m.Figures {
					try(c, m.Slip, v)
				}
			}
		}
	}
	return out
}

// TestPlantedSlips plants each slip of the catalogue in random feeders and
// looks for it. At least so many in a hundred must be named first.
func TestPlantedSlips(t *testing.T) {
	const each, least, tries = 7, 3, 60
	const wanted = 0.95
	feeders := rapid.Custom(drawFeeder)
	planted, first := 0, 0
	var table, missed strings.Builder
	for _, id := range slip.All() {
		here, hits := 0, 0
		for seed := 0; here < each && seed < tries; seed++ {
			d := feeders.Example(int(id)*1000 + seed)
			a := d.assessor(t)
			all := plantings(a, d, id)
			if len(all) == 0 {
				continue
			}
			p := all[(seed*7919)%len(all)]
			got := assessOne(t, a, p.claim)
			here++
			if led(got, p.label) {
				hits++
			} else {
				fmt.Fprintf(&missed, "%s: %s of %s %s: %v; first %+v\n", p.label, p.claim.Quantity, p.claim.Section, p.claim.End, p.claim.Value, got.Slips)
			}
		}
		fmt.Fprintf(&table, "%3d of %3d  %s\n", hits, here, id.Name())
		if here < least {
			t.Errorf("%s: planted %d times only", id.Name(), here)
		}
		planted, first = planted+here, first+hits
	}
	t.Logf("named first: %d of %d\n%s%s", first, planted, table.String(), missed.String())
	if planted < 400 || float64(first) < wanted*float64(planted) {
		t.Errorf("named first: %d of %d", first, planted)
	}
}

// shortTol is what the short way to a crest may miss of it: see crestPoints.
const shortTol = 5e-5

// TestShortState: the short way to the largest values along sections finds those
// of the long one.
func TestShortState(t *testing.T) {
	feeders := rapid.Custom(drawFeeder)
	for seed := range 60 {
		d := feeders.Example(seed)
		s, err := phasor.Solve(&d.Network)
		if err != nil {
			t.Fatal(err)
		}
		long, short := phasorState(&d.Network, s), shortState(&d.Network, s)
		for k := range d.Sections {
			for _, v := range [][2]float64{
				{long.voltage[k].largest.value, short.voltage[k].largest.value},
				{long.current[k].largest.value, short.current[k].largest.value},
			} {
				if math.Abs(v[0]-v[1]) > shortTol*v[0] {
					t.Errorf("seed %d, section %d: %v, short %v", seed, k, v[0], v[1])
				}
			}
		}
	}
}

// led reports whether a slip leads the list of a claim, by its label.
func led(c record.Claim, want string) bool {
	if len(c.Slips) == 0 {
		return false
	}
	for _, l := range append([]string{label(c.Slips[0])}, c.Slips[0].Also...) {
		if l == want {
			return true
		}
	}
	return false
}

// TestCorrectClaims: correct claims, rounded by up to half their tolerance, are
// confirmed, and nothing is said of them.
func TestCorrectClaims(t *testing.T) {
	claims := 0
	feeders := rapid.Custom(drawFeeder)
	for seed := 0; claims < 500; seed++ {
		d := feeders.Example(seed)
		a := d.assessor(t)
		var all []design.Claim
		for i, c := range d.askable() {
			j := a.judge(c)
			right := j.exact
			if j.timed != nil {
				right = j.found
			}
			if size := cmplx.Abs(right); !(size > 1e-6 && size < 1e6) {
				continue
			}
			off := plantTol / 2 * math.Sin(float64(7*seed+i))
			if angular(c.Quantity) {
				c = claiming(c, right+complex(off, 0))
			} else {
				c = claiming(c, right*complex(1+off, 0))
			}
			all = append(all, c)
		}
		for _, got := range a.assess(context.Background(), Nominal, all) {
			claims++
			if got.Verdict != record.Confirmed || len(got.Slips) > 0 || got.Finding != "" {
				t.Errorf("seed %d, %s %v: %s, %s, slips %+v", seed, got.Quantity, got.Claimed, got.Verdict, got.Finding, got.Slips)
			}
		}
	}
}
