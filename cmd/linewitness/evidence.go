package main

import (
	"fmt"
	"math"
	"strings"

	"linewitness/report/format"
	"linewitness/sim/record"
)

// evidenceRows are the lines on the grid study, on the validation and on the
// curves; there are none of what a record was made without.
func evidenceRows(c *record.Case) (rows [][]string) {
	v := c.Convergence.Distinct()
	t := v.Tally()
	switch {
	case v.Skipped != "":
		rows = append(rows, []string{"convergence", "left out: " + v.Skipped})
	case len(v.Studies) > 0:
		rows = append(rows, []string{"convergence", convergenceText(len(v.Studies), t)})
	}
	switch {
	case !c.Settling.Settled && len(v.Studies) > 0:
		rows = append(rows, []string{"validation", "not judged: no steady state was reached"})
	case t.Compared > 0 || len(t.Open) > 0:
		rows = append(rows, []string{"validation", validationText(t)})
	}
	if s := fidelityText(c.Fidelity); s != "" {
		rows = append(rows, []string{"curves", s})
	}
	if s := powerText(c.Power); s != "" {
		rows = append(rows, []string{"power", s})
	}
	return rows
}

// powerText says where the power goes, by the closed form, and how well each
// balance closes; it is empty where no audit was made.
func powerText(p record.Power) string {
	a := p.Phasor
	if a.Delivered == 0 {
		return ""
	}
	s := inSI(a.Delivered, "W") + " delivered"
	if !math.IsInf(a.Available, 1) {
		s += " of " + inSI(a.Available, "W") + " available"
	}
	s += ", " + inSI(a.InLoads, "W") + " into loads; balance "
	if !p.Phasor.Closed || !p.FDTD.Closed {
		s += "does not close: "
	}
	return s + fmt.Sprintf("%s phasor, %s fdtd", percent(p.Phasor.Relative), percent(p.FDTD.Relative))
}

// convergenceText counts n figures by their behaviour.
func convergenceText(n int, t record.Tally) string {
	var parts []string
	rest := n
	for _, b := range []record.Behaviour{
		record.Converging, record.OffOrder, record.GridFree, record.Oscillatory, record.Diverging, record.TwoGrids, record.OneGrid,
	} {
		k := t.Of[b]
		rest -= k
		if k == 0 {
			continue
		}
		s := fmt.Sprintf("%d %s", k, b)
		switch {
		case b == record.Converging && !math.IsNaN(t.Low):
			s += " with order " + orders(t)
		case b == record.TwoGrids || b == record.OneGrid:
			s = fmt.Sprintf("%d on %s", k, b)
		}
		parts = append(parts, s)
	}
	if rest > 0 {
		parts = append(parts, fmt.Sprintf("%d without a finite value", rest))
	}
	s := counted(n, "figure") + ": " + strings.Join(parts, ", ")
	if t.Largest != nil {
		s += "; largest index " + typeable.Replace(format.Index(t.Largest.GCIPercent)) + " (" + figureName(t.Largest) + ")"
	}
	return s
}

func orders(t record.Tally) string {
	low, high := typeable.Replace(format.Fixed(t.Low, 2)), typeable.Replace(format.Fixed(t.High, 2))
	if low == high {
		return low
	}
	return low + " to " + high
}

// validationText says whether the uncertainties explain the errors.
func validationText(t record.Tally) string {
	if len(t.Open) == 0 {
		return "every error is explained; largest error over uncertainty " + ratio(t.Nearest) + " (" + figureName(t.Nearest) + ")"
	}
	var names []string
	for i := range t.Open {
		if i == mostUnexplained {
			names = append(names, fmt.Sprintf("and %d more", len(t.Open)-i))
			break
		}
		names = append(names, figureName(&t.Open[i])+", "+ratio(&t.Open[i])+" of its uncertainty")
	}
	return "not explained: " + strings.Join(names, "; ")
}

// mostUnexplained is how many figures a line names.
const mostUnexplained = 3

func ratio(s *record.Study) string { return typeable.Replace(format.Ratio(s.Ratio())) }

// figureName is the id of a requirement, or the name of a key figure.
func figureName(s *record.Study) string {
	if s.ID != "" {
		return s.ID
	}
	return strings.TrimSpace(s.Quantity + " " + s.Subject)
}

// fidelityText names the curve with the largest global difference.
func fidelityText(fs []record.Fidelity) string {
	var worst *record.Fidelity
	graded := 0
	for i := range fs {
		if v := fs[i].GDM.Value; !math.IsNaN(v) {
			graded++
			if worst == nil || v > worst.GDM.Value {
				worst = &fs[i]
			}
		}
	}
	if worst == nil {
		return ""
	}
	return counted(graded, "curve") + ": largest global difference " + typeable.Replace(format.Measure(worst.GDM.Value)) + ", " +
		worst.GDM.Word + " (" + worst.Subject + ", " + worst.Curve + ")"
}
