package design

import (
	"slices"
	"strings"
)

// checkNetwork refuses networks that have no answer. What is told depends on
// the whole design, so nothing is told of a design that did not read well:
// one mistyped value would bring complaints about everything it touches.
func (w *walker) checkNetwork() {
	d := w.design
	if len(d.Sections) == 0 && !w.flawed {
		w.problem(d.Source.Pos, say("add sections: from the source to the loads"), "the design has no section")
	}
	if w.flawed {
		return
	}
	w.checkConnected()
	w.checkMatched()
	w.checkIdealLoops()
	w.checkResistance()
	w.checkFrequency()
}

// part is a load or element with its kind.
type part struct {
	Part
	kind string
}

func (d *Design) parts() (parts []part) {
	for _, p := range d.Loads {
		parts = append(parts, part{p, "load"})
	}
	for _, p := range d.Elements {
		parts = append(parts, part{p, "element"})
	}
	return parts
}

// checkConnected tells of what no path of sections, closed bridging
// elements and transformers ties to the source. A part at a junction of an untied section is
// not told of: tying the section ties it.
func (w *walker) checkConnected() {
	d := w.design
	tied := newGroups()
	bySection := map[string]bool{}
	for _, s := range d.Sections {
		tied.join(s.From, s.To)
		bySection[s.From], bySection[s.To] = true, true
	}
	for _, p := range d.Elements {
		if p.To != "" && p.Impedance.Kind != Open {
			tied.join(p.At, p.To)
		}
	}
	reached := w.reached(tied)
	if len(reached) == 1 && !bySection[d.Source.At] {
		ends := slices.DeleteFunc(w.junctions(), func(j string) bool { return !bySection[j] })
		w.problem(w.sourceAt, didYouMean(d.Source.At, ends), "the source is at %q, where no section begins or ends", d.Source.At)
		return
	}
	for _, s := range d.Sections {
		if !tied.same(s.From, d.Source.At) {
			w.problem(s.Pos, w.nearestEnd(reached, s.From, s.To), "section %q is not connected to the source: nothing ties %q or %q to %q", s.Name, s.From, s.To, d.Source.At)
		}
	}
	for _, p := range d.parts() {
		for _, j := range []string{p.At, p.To} {
			if j != "" && !bySection[j] && !tied.same(j, d.Source.At) {
				w.problem(p.Pos, didYouMean(j, reached), "%s %q is not connected to the source: no section or closed element reaches %q", p.kind, p.Name, j)
				break
			}
		}
	}
}

func (w *walker) reached(tied groups) (names []string) {
	for _, j := range w.design.Junctions {
		if tied.same(j, w.design.Source.At) {
			names = append(names, j)
		}
	}
	return names
}

// nearestEnd hints at a reached junction that is spelled like one of two.
func (w *walker) nearestEnd(reached []string, a, b string) hint {
	return func() string {
		for _, end := range []string{a, b} {
			if best := nearest(end, reached); best != "" {
				return `did you mean "` + best + `" by "` + end + `"?`
			}
		}
		return "junctions that are: " + strings.Join(reached[:min(len(reached), 20)], ", ")
	}
}

// checkMatched tells of matched loads that are not at the end of one section.
func (w *walker) checkMatched() {
	ends := map[string]int{}
	for _, s := range w.design.Sections {
		ends[s.From]++
		ends[s.To]++
	}
	for _, p := range w.design.Loads {
		if p.Impedance.Kind == Matched && ends[p.At] != 1 {
			w.problem(p.Impedance.Pos, say("give its impedance"),
				"load %q cannot be matched: %d section ends meet at %q, and matched means the characteristic impedance of one", p.Name, ends[p.At], p.At)
		}
	}
}

// checkResistance tells of a design in which nothing takes energy away.
func (w *walker) checkResistance() {
	d := w.design
	lossy := d.Source.Impedance.resistance() > 0
	for _, s := range d.Sections {
		lossy = lossy || s.Constants.R > 0 || s.Constants.G > 0
	}
	for _, p := range d.parts() {
		lossy = lossy || p.Impedance.resistive()
	}
	if !lossy {
		w.problem(d.Source.Pos, say("give the source its impedance or the lines their loss"),
			"no loss and no resistance anywhere: the design would never settle")
	}
}

// checkFrequency tells of reactances in a case that changes the frequency:
// a complex value is known at one frequency only. Tables and files are read
// again at the other.
func (w *walker) checkFrequency() {
	if w.base == nil || w.base.design.Source.Frequency.SI == w.design.Source.Frequency.SI {
		return
	}
	told := func(z Impedance, what string) {
		if z.Kind == Complex && z.From == "" && imag(z.Z) != 0 && !w.patch.covers(z.Pos) {
			w.problem(z.Pos, say("give r, l and c parts, or its value at the frequency of the case in the case"),
				"the case changes the frequency, but the impedance of %s is a complex value, known at one frequency only", rawText(what))
		}
	}
	told(w.design.Source.Impedance, "the source")
	for _, p := range w.design.parts() {
		told(p.Impedance, p.kind+` "`+p.Name+`"`)
	}
}

// groups are sets of tied junctions (union-find with path halving).
type groups map[string]string

func newGroups() groups { return groups{} }

func (g groups) root(j string) string {
	for {
		up, ok := g[j]
		if !ok || up == j {
			return j
		}
		if upper, ok := g[up]; ok {
			g[j] = upper
		}
		j = up
	}
}

// join ties two junctions.
func (g groups) join(a, b string) {
	if a, b = g.root(a), g.root(b); a != b {
		g[a] = b
	}
}

func (g groups) same(a, b string) bool { return g.root(a) == g.root(b) }
