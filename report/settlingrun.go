package report

import (
	"math"

	"linewitness/report/figure"
	"linewitness/report/format"
	"linewitness/report/ink"
	"linewitness/sim/record"
)

// settlingDepth is how far below the tolerance the settling panel may reach.
const settlingDepth = 1e-4

// estimated reports whether two estimates or more are inside the panel, so that
// there is a line to see.
func estimated(s record.Settling, tolerance float64) bool {
	seen := 0
	for _, p := range s.Curve {
		if p.Estimate > tolerance*settlingDepth && !math.IsInf(p.Estimate, 0) {
			seen++
		}
	}
	return seen > 1
}

// settlingPanel returns nil if no window was compared.
func settlingPanel(s record.Settling, tolerance float64) *figure.Panel {
	var ts, change, estimate []float64
	for _, p := range s.Curve {
		ts, change, estimate = append(ts, p.Time), append(change, p.Change), append(estimate, p.Estimate)
	}
	top := largestOf(change)
	if top <= 0 {
		return nil
	}
	hi := math.Pow(10, math.Ceil(math.Log10(max(top, largestOf(estimate), tolerance)*1.2)))
	lo := math.Pow(10, math.Floor(math.Log10(max(min(smallestOf(change), tolerance)/1.5, tolerance*settlingDepth, hi*1e-12))))
	last := max(s.Time, ts[len(ts)-1])
	p := figure.New("Settling run", "relative",
		figure.Axis{Label: "time", Unit: "s", Max: last}, figure.Axis{Min: lo, Max: hi, Log: true})
	p.Upright(roundTrips(s.RoundTrip, last), ink.MarkLine, "")
	p.Level(tolerance, ink.LimitLine, "tolerance")
	p.Line(ts, estimate, ink.PhasorLine)
	p.Line(ts, change, ink.FDTDLine)
	p.Dots(ts, change, ink.FDTDLine)
	return p
}

// smallestOf returns the smallest value above zero, 1 if there is none.
func smallestOf(ys []float64) float64 {
	least := math.Inf(1)
	for _, y := range ys {
		if y > 0 && y < least {
			least = y
		}
	}
	if math.IsInf(least, 1) {
		return 1
	}
	return least
}

// roundTrips returns multiples of the round trip up to last: each one, or
// every second, fifth, tenth, ... if they would stand too close.
func roundTrips(trip, last float64) []float64 {
	every := roundTripsApart(last / trip)
	if every == 0 {
		return nil
	}
	var out []float64
	for k := 1.0; k*every*trip < last; k++ {
		out = append(out, k*every*trip)
	}
	return out
}

// mostMarks is how many round trips are marked at most.
const mostMarks = 16

// roundTripsApart returns the smallest of 1, 2, 5, 10, ... that leaves at most
// mostMarks marks of n, or 0 if n is not a number of marks.
func roundTripsApart(n float64) float64 {
	if !(n > 0) || math.IsInf(n, 0) {
		return 0
	}
	for power := 1.0; ; power *= 10 {
		for _, m := range []float64{1, 2, 5} {
			if n/(m*power) <= mostMarks {
				return m * power
			}
		}
	}
}

func settlingFinding(s record.Settling, tolerance float64) string {
	last := s.Curve[len(s.Curve)-1]
	text := "after " + format.SI(s.Time, "s") + " (" + format.Plural(int64(s.Periods), "period") + ") the change over a round trip of " +
		format.SI(s.RoundTrip, "s") + " is " + format.Percent(last.Change)
	if s.Settled {
		text += " and the estimated remaining error " + format.Percent(s.Residual) + ", inside the tolerance of " + format.Percent(tolerance) + "."
	} else {
		text += "; the tolerance of " + format.Percent(tolerance) + " was not reached."
	}
	if every := roundTripsApart(s.Time / s.RoundTrip); every > 1 {
		text += " The upright lines are " + format.Count(int64(every)) + " round trips apart."
	}
	return text
}
