package sim

import (
	"cmp"
	"math/cmplx"
	"slices"

	"linewitness/sim/record"
)

// mostSlips is how many slips a claim lists: further ones are of no help.
const mostSlips = 5

// alike is the part of the tolerance within which two figures are the same to
// whoever compares them with the claim.
const alike = 0.02

// nearness are the limits, as parts of the tolerance, between which slips are
// taken to be equally near to a claim. A hand calculation that agrees to a
// hundredth of its tolerance is hardly an accident; one that agrees to a half of
// it says little more than one at its edge.
var nearness = []float64{0.01, 0.03, 0.1, 0.3}

// slips are the slips that would confirm claim i, most likely first: those
// that explain the most claims, that break the fewest, that come nearest, and
// that are the most usual.
func (e *explanation) slips(i int) []record.Slip {
	c := e.claims[i]
	var mine []*candidate
	for _, k := range e.candidates {
		if _, ok := k.values[i]; ok {
			mine = append(mine, k)
		}
	}
	slices.SortStableFunc(mine, func(a, b *candidate) int {
		return cmp.Or(
			cmp.Compare(len(b.values), len(a.values)),
			cmp.Compare(a.breaks, b.breaks),
			cmp.Compare(c.band(a.values[i]), c.band(b.values[i])),
			cmp.Compare(a.Rank(), b.Rank()),
		)
	})
	var out []record.Slip
	var leaders []*candidate
	for _, k := range mine {
		if l := slices.IndexFunc(leaders, func(l *candidate) bool { return e.alike(l, k) }); l >= 0 {
			if also := k.Label(); also != leaders[l].Label() && !slices.Contains(out[l].Also, also) {
				out[l].Also = append(out[l].Also, also)
			}
			continue
		}
		if len(leaders) < mostSlips {
			leaders = append(leaders, k)
			out = append(out, c.slip(k, k.values[i]))
		}
	}
	return out
}

// band is the index of the nearness that a figure has to the claim.
func (c *claimed) band(v complex128) int {
	part := c.apart(v) / c.Tolerance
	for i, limit := range nearness {
		if part <= limit {
			return i
		}
	}
	return len(nearness)
}

// alike reports whether nothing that is claimed tells two candidates apart.
func (e *explanation) alike(a, b *candidate) bool {
	if a.breaks != b.breaks || len(a.values) != len(b.values) {
		return false
	}
	for i, v := range a.values {
		w, ok := b.values[i]
		if !ok || cmplx.Abs(v-w) > alike*e.claims[i].Tolerance {
			return false
		}
	}
	return true
}
