package effect

import (
	"math"
	"math/cmplx"

	"linewitness/sim/record"
)

// direction says which way a figure went: by its verdicts, and where they are as
// good by the margins, if these differ by more than they are known to.
func direction(e *record.Effect) record.Direction {
	switch {
	case e.Old == nil:
		return record.NewFigure
	case e.New == nil:
		return record.NoMore
	}
	switch rank := verdictChange(e); {
	case rank > 0:
		return record.Worse
	case rank < 0:
		return record.Better
	case e.Old.Unit != e.New.Unit:
		return record.Moved
	case e.Kind == record.FigureEffect:
		return figureDirection(e)
	}
	return marginDirection(e)
}

// rounding, relative to the values: less is the arithmetic of two runs.
const rounding = 1e-9

// known is what the difference of the two values is known to.
func known(e *record.Effect) float64 {
	known := 0.0
	for _, f := range []*record.Figure{e.Old, e.New} {
		for _, part := range []float64{f.Uncertainty, rounding * cmplx.Abs(f.Value)} {
			if !math.IsNaN(part) && !math.IsInf(part, 0) {
				known += part
			}
		}
	}
	return known
}

// figureDirection: a key figure is neither good nor bad.
func figureDirection(e *record.Effect) record.Direction {
	was, is := cmplx.IsNaN(e.Old.Value), cmplx.IsNaN(e.New.Value)
	if was != is || !was && cmplx.Abs(e.New.Value-e.Old.Value) > known(e) {
		return record.Moved
	}
	return record.AsBefore
}

// marginDirection compares two margins. One that is not there is that of a value
// that is infinite or was not shown, and its verdict has said so.
func marginDirection(e *record.Effect) record.Direction {
	switch gain := e.New.Margin - e.Old.Margin; {
	case gain > known(e):
		return record.Better
	case gain < -known(e):
		return record.Worse
	}
	return record.AsBefore
}

// worsened reports whether a verdict is worse than it was.
func worsened(c *record.Comparison) bool {
	if c.New.Verdict.Rank() > c.Old.Verdict.Rank() {
		return true
	}
	for _, k := range c.Cases {
		if k.Old != "" && k.New != "" && k.New.Rank() > k.Old.Rank() {
			return true
		}
		for i := range k.Effects {
			if e := &k.Effects[i]; e.Old != nil && e.New != nil && verdictChange(e) > 0 {
				return true
			}
		}
	}
	return false
}

// verdictChange is above zero for a worse verdict, below for a better one.
func verdictChange(e *record.Effect) int { return rank(e.New.Verdict) - rank(e.Old.Verdict) }

// rank orders the verdicts of requirements, ratings and claims: a larger one is
// worse.
func rank(verdict string) int {
	switch verdict {
	case string(record.Met), string(record.Confirmed), "":
		return 0
	case string(record.NotShownReq): // as of claims
		return 1
	}
	return 2
}
