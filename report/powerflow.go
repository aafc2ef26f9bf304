package report

import (
	"cmp"
	"math"
	"slices"
	"strings"

	"gonum.org/v1/plot/vg/draw"
	"linewitness/report/figure"
	"linewitness/report/format"
	"linewitness/sim/record"
)

// flowPart is one taker of power.
type flowPart struct {
	name, kind string
	power      float64
}

// The most takers that a figure shows one by one.
const (
	flowParts      = 16
	flowPartsOther = 8 // in a case that is not nominal
)

// powerFlow draws the way of the power as bars on one scale, from what the
// source has to give down to what each load gets.
func (d *document) powerFlow(c *record.Case) {
	a := c.Power.Phasor
	whole, of := wholePower(a)
	if !(whole > 0) || math.IsInf(whole, 0) || math.IsNaN(a.Delivered) || math.IsInf(a.Delivered, 0) {
		return
	}
	most := flowParts
	if c != d.nominal() {
		most = flowPartsOther
	}
	list := flowBars(a, gatheredParts(takers(a), most), whole)
	d.show(picture{
		name: pictureName(c, "power"), finding: flowFinding(a, whole, of), height: figure.BarsHeight(len(list)),
		paint: func(cv draw.Canvas) { figure.Bars(cv, list, whole) },
	})
}

// takers lists what takes up power, in the order of the record, without what
// takes none.
func takers(a record.PowerAudit) []flowPart {
	var out []flowPart
	add := func(name, kind string, w float64) {
		if w > rounding*math.Abs(a.Delivered) && !math.IsInf(w, 0) {
			out = append(out, flowPart{name, kind, w})
		}
	}
	for _, s := range a.Sections {
		add(s.Name, "section", s.Dissipated)
	}
	for _, p := range a.Elements {
		add(p.Name, "element", p.Power)
	}
	for _, p := range a.Loads {
		add(p.Name, "load", p.Power)
	}
	return out
}

// gatheredParts leaves the largest takers and gathers the rest, kind by kind,
// so that no more than most and one for each kind are left.
func gatheredParts(parts []flowPart, most int) []flowPart {
	if len(parts) <= most {
		return parts
	}
	order := make([]int, len(parts))
	for i := range order {
		order[i] = i
	}
	slices.SortStableFunc(order, func(a, b int) int { return cmp.Compare(parts[b].power, parts[a].power) })
	shown := make([]bool, len(parts))
	for _, i := range order[:most] {
		shown[i] = true
	}
	var out []flowPart
	for _, kind := range []string{"section", "element", "load"} {
		rest, n := flowPart{kind: kind}, 0
		for i, p := range parts {
			switch {
			case p.kind != kind:
			case shown[i]:
				out = append(out, p)
			default:
				rest.power += p.power
				n++
			}
		}
		if n > 0 {
			rest.name = format.Count(int64(n)) + format.Space + "more"
			out = append(out, rest)
		}
	}
	return out
}

// fills are the patterns of the kinds.
var fills = map[string]figure.Fill{"section": figure.Rising, "element": figure.Upright, "load": figure.Solid}

// flowBars places the bars: each begins where the one before has left off.
func flowBars(a record.PowerAudit, parts []flowPart, whole float64) []figure.Bar {
	text := func(w float64) string { return format.SI(w, "W") + ", " + format.Percent(w/whole) }
	var out []figure.Bar
	if whole != a.Delivered {
		out = append(out, figure.Bar{Name: "available", To: whole, Text: text(whole)})
		if a.Reflected > rounding*whole {
			out = append(out, figure.Bar{Name: "reflected", From: whole - a.Reflected, To: whole, Text: text(a.Reflected), Fill: figure.Falling})
		}
	}
	out = append(out, figure.Bar{Name: "delivered", To: a.Delivered, Text: text(a.Delivered)})
	level := a.Delivered
	for _, p := range parts {
		out = append(out, figure.Bar{Name: p.name + " (" + p.kind + ")", From: level - p.power, To: level, Text: text(p.power), Fill: fills[p.kind]})
		level -= p.power
	}
	return out
}

// flowFinding says how much arrives and where most is lost.
func flowFinding(a record.PowerAudit, whole float64, of string) string {
	part := func(w float64) string { return format.SI(w, "W") + " (" + format.Percent(w/whole) + ")" }
	s := "Of " + format.SI(whole, "W") + " " + of + ", "
	if whole != a.Delivered {
		s += part(a.Delivered) + " go into the network and "
	}
	s += part(a.InLoads) + " into the loads"
	loss := flowPart{}
	for _, p := range takers(a) {
		if p.kind != "load" && p.power > loss.power {
			loss = p
		}
	}
	if loss.name == "" {
		return s + "; nothing is lost on the way."
	}
	return s + "; the largest loss is in " + strings.TrimSpace(loss.name) + ", " + part(loss.power) + "."
}
