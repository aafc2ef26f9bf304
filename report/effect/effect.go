// Package effect finds what the change of a design did to its requirements,
// ratings, claims and key figures, case by case, from the two results as package
// result reads them.
package effect

import (
	"math"
	"math/cmplx"
	"slices"

	"linewitness/report/result"
	"linewitness/sim/record"
)

// Fill sets the verdicts, the cases and whether anything worsened, from the old
// and the new result.
func Fill(c *record.Comparison, old, now *result.Node) {
	c.Old.Verdict, c.New.Verdict = record.Verdict(old.String("verdict")), record.Verdict(now.String("verdict"))
	c.Cases = nil
	was, is := old.Get("cases"), now.Get("cases")
	for i, name := range is.Keys {
		c.Cases = append(c.Cases, caseEffect(name, was.Get(name), is.Nodes[i]))
	}
	for i, name := range was.Keys {
		if is.Get(name) == nil {
			c.Cases = append(c.Cases, caseEffect(name, was.Nodes[i], nil))
		}
	}
	c.Worsened = worsened(c)
}

func caseEffect(name string, old, now *result.Node) record.CaseEffect {
	out := record.CaseEffect{
		Name: name, Old: record.Verdict(old.String("verdict")), New: record.Verdict(now.String("verdict")),
	}
	was, is := figuresOf(old), figuresOf(now)
	for _, f := range is {
		i := slices.IndexFunc(was, f.isOf)
		if i >= 0 {
			f.old = was[i].now
		}
		out.Effects = append(out.Effects, f.effect())
	}
	for _, f := range was {
		if !slices.ContainsFunc(is, f.isOf) {
			f.old, f.now = f.now, nil
			out.Effects = append(out.Effects, f.effect())
		}
	}
	return out
}

// A figure is one of a case; now is its outcome in the result that it was read
// from.
type figure struct {
	kind                  record.EffectKind
	id, quantity, subject string
	old, now              *record.Figure
}

// isOf reports whether two are the same figure in two designs.
func (f figure) isOf(other figure) bool {
	return f.kind == other.kind && f.id == other.id && f.quantity == other.quantity && f.subject == other.subject
}

func (f figure) effect() record.Effect {
	e := record.Effect{Kind: f.kind, ID: f.id, Quantity: f.quantity, Subject: f.subject, Old: f.old, New: f.now}
	e.Direction = direction(&e)
	e.Old, e.New = rounded(e.Old, e.New), rounded(e.New, e.Old)
	return e
}

// rounded is a figure whose value is nothing beside that of the other, and no more
// than the rounding of a zero, with the zero.
func rounded(f, other *record.Figure) *record.Figure {
	if f == nil || other == nil || !(cmplx.Abs(f.Value) < nothing*cmplx.Abs(other.Value)) {
		return f
	}
	own := *f
	own.Value = 0
	return &own
}

// nothing, relative: less is the rounding of a double.
const nothing = 1e-15

// figuresOf are the figures of a case in the order of its result.
func figuresOf(c *result.Node) (all []figure) {
	for _, n := range c.Get("requirements").Items() {
		all = append(all, named(record.RequirementEffect, n, &record.Figure{
			Value: n.Get("value").Complex(), Margin: n.Float("margin"), Limit: n.String("limit_text"), Verdict: n.String("verdict"),
		}))
	}
	for _, n := range c.Get("ratings").Items() {
		all = append(all, rating(n))
	}
	for _, n := range c.Get("claims").Items() {
		all = append(all, claim(n))
	}
	for _, n := range c.Get("convergence", "figures").Items() {
		if n.String("id") == "" {
			all = append(all, named(record.FigureEffect, n, &record.Figure{Value: keyValue(n), Margin: math.NaN()}))
		}
	}
	return all
}

// named fills in what all figures but ratings have under the same keys.
func named(kind record.EffectKind, n *result.Node, f *record.Figure) figure {
	f.Unit, f.Uncertainty = n.String("unit"), n.Float("uncertainty")
	return figure{kind: kind, id: n.String("id"), quantity: n.String("quantity"), subject: n.String("subject"), now: f}
}

func rating(n *result.Node) figure {
	return figure{
		kind: record.RatingEffect, quantity: "largest " + n.String("quantity"), subject: n.String("section"),
		now: &record.Figure{
			Value: complex(math.Max(n.Float("steady"), n.Float("peak")), 0), Unit: n.String("unit") + " peak",
			Uncertainty: n.Float("uncertainty"), Margin: n.Float("margin"), Limit: n.String("rated_text"), Verdict: n.String("verdict"),
		},
	}
}

// claim has as its value what was found; its margin is what its tolerance leaves.
func claim(n *result.Node) figure {
	value := n.Get("phasor").Complex()
	if math.IsNaN(real(value)) {
		value = n.Get("fdtd").Complex()
	}
	complexValue := n.Get("complex")
	return named(record.ClaimEffect, n, &record.Figure{
		Value: value, Complex: complexValue != nil && complexValue.Text == "true",
		Margin: n.Float("tolerance") - n.Float("difference"), Verdict: n.String("verdict"),
		Limit: n.String("claimed_text") + " within " + n.String("tolerance_text"),
	})
}

// keyValue is the closed form's value, or that of the finest grid where only the
// time domain has one.
func keyValue(n *result.Node) complex128 {
	v := n.Get("phasor").Complex()
	if values := n.Get("values").Items(); math.IsNaN(real(v)) && len(values) > 0 {
		return values[0].Complex()
	}
	return v
}
