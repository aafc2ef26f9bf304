package sim

import (
	"cmp"
	"context"
	"fmt"
	"math"
	"math/cmplx"
	"slices"

	"linewitness/phasor"
	"linewitness/sim/line"
	"linewitness/sim/record"
	"linewitness/sim/slip"
)

// A candidate is a slip that would confirm at least one contradicted claim.
type candidate struct {
	slip.Slip
	values   map[int]complex128 // of the claims that it explains, by index
	breaks   int                // confirmed claims that it would contradict
	explains []string           // ids, in the order of the claims
}

// An explanation is what single slips make of the claims of a case.
type explanation struct {
	claims     []*claimed
	candidates []*candidate
	note       string // what was not looked at, or empty
}

// explain looks for single slips behind the contradicted claims.
func (a *assessor) explain(ctx context.Context, claims []*claimed) *explanation {
	e := &explanation{claims: claims}
	if !slices.ContainsFunc(claims, doubted) {
		return e
	}
	a.misreadings(e)
	single := a.sections(ctx, e)
	catalogue := slip.Catalogue{Net: a.net, Quotes: a.quotes, Single: single}
	for _, c := range catalogue.Changes() {
		if ctx.Err() != nil {
			break
		}
		a.change(e, c)
	}
	if len(single) < len(a.net.Sections) {
		e.note = fmt.Sprintf("slips in one section alone were looked for in the %d of %d sections on which the claims depend most", len(single), len(a.net.Sections))
	}
	return e
}

func doubted(c *claimed) bool { return c.verdict == record.Contradicted }

// misreadings tries the slips in the result. Each can be made with one claim and not with
// another, so it breaks none.
func (a *assessor) misreadings(e *explanation) {
	byLabel := map[string]*candidate{}
	for i, c := range e.claims {
		if !doubted(c) {
			continue
		}
		all := a.reading(c).Misreadings()
		if c.timed == nil {
			all = append(all, a.places(c)...)
		}
		for _, m := range all {
			v, ok := c.nearest(m.Figures)
			if !ok {
				continue
			}
			known := byLabel[m.Label()]
			if known == nil {
				known = &candidate{Slip: m.Slip, values: map[int]complex128{}}
				byLabel[m.Label()] = known
				e.candidates = append(e.candidates, known)
			}
			known.add(i, c, v)
		}
	}
}

// add adds a claim that the candidate explains.
func (k *candidate) add(i int, c *claimed, v complex128) {
	if _, ok := k.values[i]; !ok {
		k.explains = append(k.explains, c.ID)
	}
	k.values[i] = v
}

// nearest picks the figure that is nearest to the claim among those that would
// confirm it.
func (c *claimed) nearest(figures []complex128) (best complex128, ok bool) {
	for _, v := range figures {
		if c.explained(v) && (!ok || c.apart(v) < c.apart(best)) {
			best, ok = v, true
		}
	}
	return best, ok
}

// explained reports whether the claim would be confirmed if v were the figure.
// What changes the figure by less than the tolerance is not to be told from no
// slip at all.
func (c *claimed) explained(v complex128) bool {
	right := c.exact
	if c.timed != nil {
		right = c.found
	}
	return c.judged(v) == record.Confirmed && !(cmplx.Abs(v-right) <= c.Tolerance)
}

// change tries a slip in the design as it was calculated.
func (a *assessor) change(e *explanation, change slip.Change) {
	value := a.valuer(change)
	if value == nil {
		return
	}
	k := &candidate{Slip: change.Slip, values: map[int]complex128{}}
	for i, c := range e.claims {
		if !doubted(c) {
			continue
		}
		if v, ok := value(c); ok && c.explained(v) {
			k.add(i, c, v)
		}
	}
	if len(k.values) == 0 {
		return
	}
	for _, c := range e.claims {
		if c.verdict != record.Confirmed {
			continue
		}
		if v, ok := value(c); ok && c.judged(v) == record.Contradicted {
			k.breaks++
		}
	}
	e.candidates = append(e.candidates, k)
}

// valuer gives the figures under a change; ok is false for a claim that it does
// not touch. It is nil if the changed network has no solution.
func (a *assessor) valuer(change slip.Change) func(*claimed) (v complex128, ok bool) {
	if change.Gain != 0 {
		return func(c *claimed) (complex128, bool) {
			if c.timed != nil {
				return slip.Gained(c.Quantity, c.found, change.Gain), true
			}
			return slip.Gained(c.Quantity, c.exact, change.Gain), true
		}
	}
	n := change.Make()
	solution, err := phasor.Solve(n)
	if err != nil {
		return nil
	}
	st := shortState(n, solution)
	return func(c *claimed) (complex128, bool) {
		if c.timed != nil || change.Reflected && !reflective(c.Quantity) {
			return 0, false
		}
		return figureOf(c.Claim, st), true
	}
}

// solveWork bounds what is spent on changed networks: the sum of the cubes of
// the sizes of their systems, about two seconds. mostSolves bounds their number.
const (
	solveWork   = 4e9
	leastSolves = 100
	mostSolves  = 4000
)

// sections chooses the sections in which slips are tried one at a time: all,
// or, where that would cost too much, those on which the claims depend most.
func (a *assessor) sections(ctx context.Context, e *explanation) []int {
	n := a.net
	var all []int
	for k := range n.Sections {
		all = append(all, k)
	}
	size := 2 * float64(len(n.Junctions)+2*len(n.Sections)+len(n.Branches)+1)
	solves := math.Min(mostSolves, math.Max(leastSolves, solveWork/(size*size*size)))
	room := max(4, int(solves)/slip.Catalogue{Net: n, Quotes: a.quotes}.PerSection())
	if len(all) <= room {
		return all
	}
	weight := make([]float64, len(all))
	for _, k := range all {
		if ctx.Err() == nil {
			weight[k] = a.weight(e, k)
		}
	}
	slices.SortStableFunc(all, func(x, y int) int { return cmp.Compare(weight[y], weight[x]) })
	return all[:room]
}

// weight is how much the contradicted claims depend on section k: the sum of
// their changes, in tolerances, for a line a little lossier and longer.
func (a *assessor) weight(e *explanation, k int) float64 {
	n := *a.net
	n.Sections = slices.Clone(n.Sections)
	s := &n.Sections[k]
	c := s.At(n.Omega())
	// A hundredth of a wave and of a neper more.
	s.Length += c.Wavelength(n.Frequency) / 100
	c.R += 2 * real(c.Impedance(n.Omega())) / (100 * s.Length)
	s.Line, s.Dispersion = c, line.Dispersion{}
	solution, err := phasor.Solve(&n)
	if err != nil {
		return 0
	}
	st := shortState(&n, solution)
	sum := 0.0
	for _, c := range e.claims {
		if !doubted(c) || c.timed != nil {
			continue
		}
		if d := cmplx.Abs(figureOf(c.Claim, st)-c.exact) / c.Tolerance; !math.IsNaN(d) && !math.IsInf(d, 0) {
			sum += d
		}
	}
	return sum
}
