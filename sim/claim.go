package sim

import (
	"context"
	"math"
	"math/cmplx"
	"slices"

	"linewitness/sim/design"
	"linewitness/sim/network"
	"linewitness/sim/record"
	"linewitness/sim/slip"
)

// claims compares the designer's own figures of this case with both witnesses
// and looks for the slips behind those that both contradict. It is cut short if
// ctx ends.
func (s *solved) claims(ctx context.Context) []record.Claim {
	a := &assessor{
		net: s.net, exact: s.exact, found: s.found,
		steps:  s.grid.grid.StepsPerPeriod,
		quotes: quotes(s.design),
		// As sure as a requirement of it would be.
		spread: func(r design.Requirement, q quantity) float64 { return s.measure(r, q).uncertainty() },
		timed:  s.timed,
	}
	var mine []design.Claim
	for _, c := range s.design.Claims {
		if slices.Contains(c.Cases, s.name) {
			mine = append(mine, c)
		}
	}
	return a.assess(ctx, s.name, mine)
}

// An assessor judges the claims of a case.
type assessor struct {
	net          *network.Network
	exact, found *state
	steps        int            // of a period, of the grid
	quotes       [][]slip.Quote // losses that the data of each section's line quote
	spread       func(design.Requirement, quantity) float64
	timed        func(design.Requirement) *timedFigure
}

// A timedFigure is a figure that only the time domain has.
type timedFigure struct {
	value, spread float64
	note          string
	unfinished    bool // the run ended before the network was at rest
}

// timed gives a figure of the stress runs, judged as a requirement of the same
// quantity would be, or nil for one of the steady state.
func (s *solved) timed(r design.Requirement) *timedFigure {
	if !timeOnly(r.Quantity) {
		return nil
	}
	j := s.judgements(r, nil)[0]
	return &timedFigure{j.values[0].value, j.spread, j.note, j.unfinished}
}

// timeOnly reports whether a quantity is one of the stress runs.
func timeOnly(q design.Quantity) bool {
	switch q {
	case design.PeakVoltage, design.PeakCurrent, design.Overshoot, design.SettleTime:
		return true
	}
	return false
}

// quotes are the losses that the data of each section's line give at other
// frequencies than that of the design: the one of a nominal line, or of a loss
// table the nearest below and above.
func quotes(d *design.Design) [][]slip.Quote {
	f := d.Source.Frequency.SI
	of := map[string][]slip.Quote{}
	for _, l := range d.Lines {
		var q []slip.Quote
		switch n := l.Nominal; {
		case len(l.Fit) > 0:
			q = nearestQuotes(l.Fit, f)
		case n != nil && n.LossAt > 0 && n.LossAt != f:
			q = []slip.Quote{{Frequency: n.LossAt, Attenuation: n.Attenuation}}
		}
		of[l.Name] = q
	}
	var out [][]slip.Quote
	for _, s := range d.Sections {
		out = append(out, of[s.Line])
	}
	return out
}

func nearestQuotes(fit []design.FitPoint, f float64) (out []slip.Quote) {
	var below, above *design.FitPoint
	for i, p := range fit {
		switch {
		case p.Frequency < f && (below == nil || p.Frequency > below.Frequency):
			below = &fit[i]
		case p.Frequency > f && (above == nil || p.Frequency < above.Frequency):
			above = &fit[i]
		}
	}
	for _, p := range []*design.FitPoint{below, above} {
		if p != nil {
			out = append(out, slip.Quote{Frequency: p.Frequency, Attenuation: p.Given})
		}
	}
	return out
}

// A claimed is a claim with what was found of it, in SI units.
type claimed struct {
	design.Claim
	exact, found complex128 // exact is NaN for what only the time domain has
	spread       float64
	verdict      record.ClaimVerdict
	timed        *timedFigure
}

// assess judges claims and explains those that are contradicted.
func (a *assessor) assess(ctx context.Context, name string, claims []design.Claim) []record.Claim {
	var all []*claimed
	for _, c := range claims {
		if ctx.Err() != nil {
			return nil
		}
		all = append(all, a.judge(c))
	}
	e := a.explain(ctx, all)
	var out []record.Claim
	for i, c := range all {
		r := c.record(name)
		if c.verdict == record.Contradicted {
			r.Slips = e.slips(i)
		}
		r.Finding = c.finding(r, e.note)
		out = append(out, r)
	}
	return out
}

// judge compares a claim with the witnesses.
func (a *assessor) judge(c design.Claim) *claimed {
	out := &claimed{Claim: c}
	if out.timed = a.timed(c.Requirement); out.timed != nil {
		out.exact = complex(math.NaN(), 0)
		out.found, out.spread = complex(out.timed.value, 0), out.timed.spread
		out.verdict = out.judged(out.found)
		if out.timed.unfinished { // a larger peak may come
			out.verdict = record.ClaimOpen
		}
		return out
	}
	out.exact, out.found = figureOf(c, a.exact), figureOf(c, a.found)
	out.spread = a.spread(c.Requirement, func(s *state) float64 { return real(figureOf(c, s)) })
	if c.Complex {
		imaginary := a.spread(c.Requirement, func(s *state) float64 { return imag(figureOf(c, s)) })
		out.spread = math.Hypot(out.spread, imaginary)
	}
	out.verdict = out.judged(out.exact)
	if out.judged(out.found) != out.verdict {
		out.verdict = record.ClaimOpen
	}
	return out
}

// judged is what one figure, uncertain by the spread, makes of a claim. A
// figure that is not a number leaves it open.
func (c *claimed) judged(figure complex128) record.ClaimVerdict {
	switch d := c.apart(figure); {
	case d+c.spread <= c.Tolerance:
		return record.Confirmed
	case d-c.spread > c.Tolerance:
		return record.Contradicted
	}
	return record.ClaimOpen
}

// apart is how far a figure is from what is claimed.
func (c *claimed) apart(figure complex128) float64 {
	if cmplx.IsInf(figure) {
		return math.Inf(1)
	}
	return cmplx.Abs(figure - c.Value)
}

// difference is the larger distance of the two witnesses.
func (c *claimed) difference() float64 {
	if c.timed != nil {
		return c.apart(c.found)
	}
	return math.Max(c.apart(c.exact), c.apart(c.found))
}
