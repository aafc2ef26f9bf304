package report

import (
	"math"
	"slices"

	"linewitness/report/format"
	"linewitness/sim/record"
)

// The most of each kind that a case shows where it is not shown whole.
const (
	chosenSections = 2 // with envelopes, and with reflection and phase
	chosenChange   = 0.05
)

// whole reports whether a case is shown with all figures: the nominal one, and in
// a full record each.
func (d *document) whole(c *record.Case) bool { return d.opt.Full || c == d.nominal() }

// proven reports whether a case is shown with all tables of the evidence: one
// whose evidence is in doubt is.
func (d *document) proven(c *record.Case) bool {
	return d.whole(c) || c.Verdict == record.Disagree || !c.Settling.Settled
}

// leave notes what a case leaves out.
func (d *document) leave(what string) {
	if what != "" {
		d.left = append(d.left, what)
	}
}

// leftOut says at the end of a case what it has left out.
func (d *document) leftOut(c *record.Case) {
	if len(d.left) > 0 {
		d.b.Note("Left out of this case: " + listed(d.left) + ". A record made with --full has all of it; the attached result has the values.")
	}
	d.left = nil
}

// namesOf names things that are left out: "envelopes of a and b", or how many
// they are where they are many.
func namesOf(what, noun string, names []string) string {
	switch {
	case len(names) == 0:
		return ""
	case len(names) > mostNames:
		return what + " of " + format.Plural(int64(len(names)), noun)
	}
	return what + " of " + listed(names)
}

// loudest returns the waveform with the largest voltage and that with the largest
// current, in their order, and the names of the others.
func loudest(ws []record.Waveform) (list []record.Waveform, others []string) {
	most := map[string]int{}
	for i := range ws {
		k, known := most[ws[i].Unit]
		if !known || largestOf(ws[i].Samples) > largestOf(ws[k].Samples) {
			most[ws[i].Unit] = i
		}
	}
	for i := range ws {
		if most[ws[i].Unit] == i {
			list = append(list, ws[i])
		} else {
			others = append(others, ws[i].Name)
		}
	}
	return list, others
}

// chosen returns the names of the sections that a case shows where it is not
// shown whole: the one that is nearest to a limit, and those that differ most from
// the nominal case.
func (d *document) chosen(c *record.Case) []string {
	type section struct {
		name   string
		left   float64 // the least part of a limit
		change float64 // of the largest voltage or current
	}
	var list []section
	for k := range c.Profiles {
		s := section{c.Profiles[k].Section, math.Inf(1), d.changed(c, c.Profiles[k].Section)}
		for _, t := range tracks(c, k) {
			for _, l := range t.limits {
				if part := l.left(t); !l.mild && part < s.left {
					s.left = part
				}
			}
		}
		list = append(list, s)
	}
	if len(list) == 0 {
		return nil
	}
	nearest := slices.MinFunc(list, func(a, b section) int { return compareFloats(a.left, b.left) })
	var names []string
	if !math.IsInf(nearest.left, 1) {
		names = append(names, nearest.name)
	}
	slices.SortStableFunc(list, func(a, b section) int { return compareFloats(b.change, a.change) })
	for _, s := range list {
		if len(names) < chosenSections && !slices.Contains(names, s.name) {
			names = append(names, s.name)
		}
	}
	return names
}

func compareFloats(a, b float64) int {
	switch {
	case a < b:
		return -1
	case a > b:
		return 1
	}
	return 0
}

// left is the part of a limit that the curve it is on leaves; what is required
// at least counts as used where it is just reached.
func (l limit) left(t *track) float64 {
	value := l.valueOn(t)
	if l.upper {
		return (l.value - value) / l.value
	}
	return (value - l.value) / l.value
}

// changed is how far the steady state of a section is from that of the nominal
// case: the larger of the changes of its largest voltage and current, as a part of
// the larger one. A section that the nominal case does not have has changed all.
func (d *document) changed(c *record.Case, name string) float64 {
	a, b := sectionState(d.nominal().Phasor, name), sectionState(c.Phasor, name)
	if a == nil || b == nil {
		return 1
	}
	part := func(x, y float64) float64 {
		if m := max(math.Abs(x), math.Abs(y)); m > 0 {
			return math.Abs(x-y) / m
		}
		return 0
	}
	return max(part(a.VoltageMax.Value, b.VoltageMax.Value), part(a.CurrentMax.Value, b.CurrentMax.Value))
}

// chosenTracks leaves the sections that are chosen.
func (d *document) chosenTracks(c *record.Case, long, short [][]*track) (l, s [][]*track) {
	names := d.chosen(c)
	var others []string
	pick := func(list [][]*track) (out [][]*track) {
		for _, ts := range list {
			if slices.Contains(names, ts[0].section) {
				out = append(out, ts)
			} else {
				others = append(others, ts[0].section)
			}
		}
		return out
	}
	l, s = pick(long), pick(short)
	d.leave(namesOf("envelopes", "section", others))
	return l, s
}

// chosenLoci leaves the sections that a limit of reflection is about, and those
// that are chosen, as many as stand in a row.
func (d *document) chosenLoci(c *record.Case, list []*locus) []*locus {
	var names, others []string
	for _, l := range list {
		if len(reflectionLimits(c, l)) > 0 {
			names = append(names, l.section.Name)
		}
	}
	for _, name := range d.chosen(c) {
		if !slices.Contains(names, name) {
			names = append(names, name)
		}
	}
	names = names[:min(len(names), chosenSections)]
	list = slices.DeleteFunc(list, func(l *locus) bool {
		out := !slices.Contains(names, l.section.Name)
		if out {
			others = append(others, l.section.Name)
		}
		return out
	})
	d.leave(namesOf("reflection and phase", "section", others))
	return list
}

// stressed reports whether a case has the largest voltage of all cases, and more
// than the nominal one by what is worth a map.
func (d *document) stressed(c *record.Case) bool {
	for i := range d.r.Cases {
		if d.r.Cases[i].Stress.Voltage.Value > c.Stress.Voltage.Value {
			return false
		}
	}
	return c.Stress.Voltage.Value > (1+chosenChange)*d.nominal().Stress.Voltage.Value
}

// doubtful leaves the rows of a study that are not as one expects: what does not
// converge with the formal order, or has an error that is not explained.
func doubtful(v *record.Convergence) *record.Convergence {
	out := *v
	out.Studies = slices.DeleteFunc(slices.Clone(v.Studies), func(s record.Study) bool {
		return s.Explained && s.Behaviour != record.Oscillatory && s.Behaviour != record.Diverging
	})
	return &out
}

// butFor names the rows that are not left out.
func butFor(n int) string {
	if n == 0 {
		return ""
	}
	return " but for " + format.Plural(int64(n), "figure") + " in doubt"
}
