package report

import (
	"math"
	"strings"

	"linewitness/report/format"
	"linewitness/sim/record"
)

// gridFinding says how the figures go with the grid.
func gridFinding(v *record.Convergence) string {
	if v.Skipped != "" {
		return "The study on three grids was left out: " + strings.TrimSuffix(v.Skipped, ".") +
			". Only the predicted error of the grid stands behind the figures."
	}
	t := v.Tally()
	var parts []string
	rest := len(v.Studies)
	for _, b := range []struct {
		of        record.Behaviour
		one, many string
	}{
		{record.Converging, "converges" + orders(t), "converge" + orders(t)},
		{record.OffOrder, "converges with another order", "converge with another order"},
		{record.GridFree, "does not depend on the grid", "do not depend on the grid"},
		{record.Oscillatory, "oscillates", "oscillate"},
		{record.Diverging, "diverges", "diverge"},
		{record.TwoGrids, "is of the stress run, on two grids, where no order can be observed", "are of the stress run, on two grids, where no order can be observed"},
		{record.OneGrid, "is on one grid", "are on one grid"},
	} {
		rest -= t.Of[b.of]
		switch n := t.Of[b.of]; {
		case n == 1:
			parts = append(parts, format.Count(1)+format.Space+b.one)
		case n > 1:
			parts = append(parts, format.Count(int64(n))+format.Space+b.many)
		}
	}
	if rest > 0 {
		parts = append(parts, format.Count(int64(rest))+format.Space+"without a finite value")
	}
	s := "Of " + format.Plural(int64(len(v.Studies)), "figure") + " " + listed(parts) + "."
	if t.Largest != nil {
		s += " The largest grid convergence index is " + format.Index(t.Largest.GCIPercent) + ", of " + cited(t.Largest) + "."
	}
	return s
}

// orders says which orders were observed.
func orders(t record.Tally) string {
	low, high := format.Fixed(t.Low, 2), format.Fixed(t.High, 2)
	switch {
	case math.IsNaN(t.Low):
		return ""
	case low == high:
		return " with an observed order of " + low + ", near the formal 2"
	}
	return " with an observed order of " + low + " to " + high + ", near the formal 2"
}

// listed joins parts of a sentence: "a, b and c".
func listed(parts []string) string {
	if len(parts) < 2 {
		return strings.Join(parts, "")
	}
	last := len(parts) - 1
	return strings.Join(parts[:last], ", ") + " and " + parts[last]
}

// gridNote says what the grids are and, where they come first, the columns.
func gridNote(v *record.Convergence, columns bool) string {
	var grids []string
	for _, g := range v.Grids {
		grids = append(grids, format.Plural(int64(g.StepsPerPeriod), "step")+" of "+format.SI(g.Step, "s")+" a period and "+format.Plural(int64(g.Cells), "cell"))
	}
	s := ""
	if len(grids) > 0 {
		s = "Grids of the settling run, finest first: " + strings.Join(grids, "; ") + ". "
	}
	for i := range v.Studies {
		if v.Studies[i].Behaviour == record.TwoGrids {
			s += "A figure of the stress run stands on that run's own two grids. "
			break
		}
	}
	if !columns {
		return trimmed(s)
	}
	return s + "Step to zero: the value extrapolated to a step of zero. Index: the grid convergence index of the finest grid, the factor times what the order leaves of the change (see Method)."
}

// mostUnexplained is how many figures a sentence names.
const mostUnexplained = 4

// validationFinding says whether the uncertainties explain the errors.
func validationFinding(v *record.Convergence) string {
	t := v.Tally()
	if t.Compared == 0 && len(t.Open) == 0 {
		return "No figure here is given by both solutions, so there is no error to explain."
	}
	if len(t.Open) == 0 {
		s := "Every error is explained by its uncertainty"
		if t.Nearest.Ratio() == 0 {
			return s + ": there is none."
		}
		return s + ": the largest |E|/u of " + format.Plural(int64(t.Compared), "figure") + " is " + format.Ratio(t.Nearest.Ratio()) + ", of " + cited(t.Nearest) + "."
	}
	var names []string
	for i := range t.Open {
		names = append(names, cited(&t.Open[i])+" (|E|/u "+format.Ratio(t.Open[i].Ratio())+")")
	}
	return "Not explained by its uncertainty is the error of " + strings.Join(names[:min(len(names), mostUnexplained)], "; of ") + further(len(names)-mostUnexplained) +
		". An error without an explanation is a disagreement of the two solutions, even inside the limit."
}

// unexplained says why two solutions that differ by less than the limit
// disagree.
func unexplained(c *record.Case) string {
	s := "In case " + c.Name + " the two solutions differ by " + format.Percent(largest(c.Agreement)) +
		", which is inside the limit of " + format.Percent(c.Agreement.Limit) + ", but more than the grid and the settling explain"
	t := c.Convergence.Tally()
	var names []string
	for i := range t.Open {
		names = append(names, orElse(t.Open[i].ID, studyName(&t.Open[i])))
	}
	if len(names) > 0 {
		s += ", in " + among(names, mostUnexplained)
	}
	return s + "."
}

// further counts what a sentence does not name.
func further(n int) string {
	if n <= 0 {
		return ""
	}
	return "; and of " + format.Count(int64(n)) + " more"
}

// validationNote says which figures are not compared and, where they come
// first, what the columns are.
func validationNote(v *record.Convergence, columns bool) string {
	s := ""
	if columns {
		s = "E: finest grid less closed form. u: its uncertainty, the sum of those of the grid (the larger of the index and of 1.25 times what the dispersion formulas predict), of what is left of the settling, of the rational form of dispersive lines, and of rounding."
	}
	var only []string
	for i := range v.Studies {
		if x := &v.Studies[i]; math.IsNaN(x.Phasor) {
			only = append(only, orElse(x.ID, studyName(x)))
		}
	}
	if len(only) > 0 {
		s += " Given by the time domain alone, and not compared: " + among(only, mostNames) + "."
	}
	return trimmed(s)
}
