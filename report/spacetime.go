package report

import (
	"math"

	"gonum.org/v1/plot/vg/draw"
	"linewitness/report/figure"
	"linewitness/report/format"
	"linewitness/report/ink"
	"linewitness/sim/record"
)

// mapHeight is the height of a space-time map.
const mapHeight = 236.0

// spaceTime draws the voltage along the main path against place and time, and
// writes the bounce table of a chain.
func (d *document) spaceTime(c *record.Case) {
	if !d.whole(c) && !d.stressed(c) {
		d.leaveMap(c)
		return
	}
	m := c.SpaceTime
	if len(m.Path) == 0 || len(m.Z) == 0 || len(m.T) == 0 {
		d.bounces(c)
		return
	}
	const need = mapHeight + figure.KeyHeight + 40
	d.b.Float(headingRoom+need, func() { d.spaceTimeFigure(c, need) })
	d.bounces(c)
}

// spaceTimeFigure draws the map.
func (d *document) spaceTimeFigure(c *record.Case, need float64) {
	m := c.SpaceTime
	key := mapKey(m)
	d.b.Subheading("Place and time: the first echoes", need)
	d.b.Note(mapNote(m))
	d.key(key)
	d.show(picture{
		name: pictureName(c, "spacetime"), finding: mapFinding(c), height: mapHeight, key: key,
		paint: func(cv draw.Canvas) { spaceTimeMap(c).Draw(cv) },
	})
}

// leaveMap notes that the map and the bounce table are left out.
func (d *document) leaveMap(c *record.Case) {
	if len(c.SpaceTime.Path) > 0 {
		d.leave("the map of place and time")
	}
	if len(c.Bounces.Arrivals) > 0 {
		d.leave("the bounce table")
	}
}

// frontLines are the styles of fronts by their passage.
var frontLines = []draw.LineStyle{ink.FrontLine, ink.EchoLine, ink.EchoesLine}

// frontStyle returns the style of a front of a passage, which counts from 1.
func frontStyle(passage int) draw.LineStyle {
	return frontLines[min(max(passage, 1), len(frontLines))-1]
}

func mapKey(m record.SpaceTime) []figure.Entry {
	texts := []string{"wave front from the source", "its echo", "echo of the echo"}
	var key []figure.Entry
	for i, text := range texts {
		for _, f := range m.Fronts {
			if min(max(f.Passage, 1), len(texts)) == i+1 {
				key = append(key, figure.Entry{Style: frontLines[i], Text: text})
				break
			}
		}
	}
	return append(key, figure.Entry{Style: ink.BoundLine, Text: "junction"})
}

// mapNote says what is shown.
func mapNote(m record.SpaceTime) string {
	s := "Voltage along the way from the source to the junction that is farthest in delay, from switch-on; time runs upward."
	switch {
	case m.Envelope && m.Crests:
		s += " Periods and lobes are too many to be told apart: shown is the amplitude, at its largest within a quarter of a wavelength."
	case m.Envelope:
		s += " Periods are too many to be told apart: shown is the amplitude of the wave."
	default:
		s += " Negative values are lined, for prints in grey. Start phase " + format.Angle(m.Phase) + "."
	}
	return s
}

// spaceTimeMap makes the figure.
func spaceTimeMap(c *record.Case) *figure.Map {
	m := c.SpaceTime
	symbol := "V"
	if m.Envelope {
		symbol = "|V|"
	}
	length, last := m.Z[len(m.Z)-1], m.T[len(m.T)-1]
	if n := len(m.Path); n > 0 {
		length = max(length, m.Path[n-1].To)
	}
	out := &figure.Map{
		Panel: figure.New("Main path", "time from switch-on, upward",
			figure.Axis{Label: "distance from the source along the path", Unit: "m", Max: length}, figure.Axis{Unit: "s", Max: last}),
		Symbol: symbol, Unit: "V", X: m.Z, Y: m.T, V: m.V,
	}
	var parts []figure.Part
	for _, p := range m.Path {
		parts = append(parts, figure.Part{From: p.From, To: p.To, Name: p.Section})
	}
	out.Bounds(pathBounds(c))
	out.Parts(parts)
	var fronts []figure.Segment
	for _, f := range m.Fronts {
		fronts = append(fronts, figure.Segment{X0: f.Z0, Y0: f.T0, X1: f.Z1, Y1: f.T1, Style: frontStyle(f.Passage)})
	}
	out.Segments(fronts)
	return out
}

// pathBounds are the junctions along the path.
func pathBounds(c *record.Case) []figure.Mark {
	var out []figure.Mark
	for i, p := range c.SpaceTime.Path {
		from, to := pathEnds(c.Model, p)
		if i == 0 {
			out = append(out, figure.Mark{At: p.From, Label: from})
		}
		out = append(out, figure.Mark{At: p.To, Label: to})
	}
	return out
}

// pathEnds returns the junctions of a section of the path in its direction.
func pathEnds(m record.Model, p record.PathSection) (from, to string) {
	for _, s := range m.Sections {
		if s.Name == p.Section {
			if p.Reversed {
				return s.To, s.From
			}
			return s.From, s.To
		}
	}
	return "", ""
}

// mapFinding says when the first front arrives where, and where the voltage on
// the map is largest.
func mapFinding(c *record.Case) string {
	m := c.SpaceTime
	last := m.Path[len(m.Path)-1]
	_, far := pathEnds(c.Model, last)
	s := "The path to " + orElse(far, "its end") + " is " + format.SI(last.To, "m") + " long"
	for _, f := range m.Fronts {
		if f.Passage <= 1 && math.Abs(f.Z1-last.To) <= 1e-6*last.To {
			s += "; the first front is there after " + format.SI(f.T1, "s")
			break
		}
	}
	row, column := -1, -1
	for j, vs := range m.V {
		for i, v := range vs {
			if a := math.Abs(v); a > 0 && !math.IsInf(a, 0) && (row < 0 || a > math.Abs(m.V[row][column])) {
				row, column = j, i
			}
		}
	}
	if row < 0 || row >= len(m.T) || column >= len(m.Z) {
		return s + "; no voltage is above zero."
	}
	kind := "voltage"
	if m.Envelope {
		kind = "amplitude"
	}
	return s + "; the largest " + kind + " on the map is " + format.SI(math.Abs(m.V[row][column]), "V") + ", " + placeOnPath(m, m.Z[column]) + ", " +
		format.SI(m.T[row], "s") + " after switch-on."
}

// placeOnPath names a place on the path by its section.
func placeOnPath(m record.SpaceTime, z float64) string {
	for _, p := range m.Path {
		if z <= p.To {
			at := z - p.From
			if p.Reversed {
				at = p.To - z
			}
			return "at " + place(at) + " of " + p.Section
		}
	}
	return "at " + place(z)
}
