package report

import (
	"math"
	"slices"

	"linewitness/report/figure"
	"linewitness/report/format"
	"linewitness/report/ink"
	"linewitness/sim/record"
)

// departures draws, over the full width, how far junctions are from their
// final phasors.
func (d *document) departures(c *record.Case) {
	p := d.departurePanel(c)
	if p == nil {
		return
	}
	d.show(picture{name: pictureName(c, "departure"), finding: capital(departureFinding(c)), height: departureHeight, paint: p.Draw})
}

// The vertical range of a departure: down to a tenth of the finest level, and
// up by a factor that leaves room for the names of the echoes.
const (
	departureFloor = 1e-4
	echoRoom       = 4 // for one row of names
	echoRooms      = 12
)

// departurePanel returns nil if no junction has a curve, or the run no steady
// state.
func (d *document) departurePanel(c *record.Case) *figure.Panel {
	places := shownPlaces(c)
	if len(places) == 0 || !c.Settling.Settled { // without a final phasor nothing departs from it
		return nil
	}
	top, last := 1.0, 0.0
	for _, p := range places {
		top = max(top, largestOf(p.Departure))
		last = max(last, lastAbove(p, departureFloor))
	}
	marks, room := echoMarks(c.Settling.Echoes, last), float64(echoRoom)
	if len(marks) > 1 {
		room = echoRooms
	}
	p := figure.New("Departure", "from the final phasor, relative to it", figure.Axis{Label: "time from switch-on", Unit: "s", Max: last},
		figure.Axis{Min: departureFloor, Max: top * room, Log: true})
	for _, level := range []float64{0.1, 0.01, 0.001} {
		p.Level(level, ink.LevelLine, "")
	}
	p.Marks(marks, ink.MarkLine)
	var curves []figure.Curve
	for i, q := range places {
		curves = append(curves, figure.Curve{Name: q.Name, X: q.Time, Y: q.Departure, Style: ink.Series[i]})
	}
	p.Curves(curves)
	return p
}

// lastAbove returns the last time at which a departure is above a floor.
func lastAbove(p record.SettlingPlace, floor float64) float64 {
	for k := min(len(p.Time), len(p.Departure)) - 1; k >= 0; k-- {
		if p.Departure[k] > floor && !math.IsInf(p.Time[k], 0) && !math.IsNaN(p.Time[k]) {
			return p.Time[k]
		}
	}
	return 0
}

// shownPlaces returns the junctions that are drawn: the source's, the slowest,
// those of the loads, and then the slowest of the rest.
func shownPlaces(c *record.Case) []record.SettlingPlace {
	var all, out []record.SettlingPlace
	for _, p := range c.Settling.Places {
		if p.Kind == "junction" && len(p.Time) > 0 {
			all = append(all, p)
		}
	}
	slices.SortStableFunc(all, slower)
	want := []string{c.Model.Source.At}
	if len(all) > 0 {
		want = append(want, all[0].Name)
	}
	for _, l := range c.Model.Loads {
		want = append(want, l.At)
	}
	for _, p := range all {
		want = append(want, p.Name)
	}
	seen := map[string]bool{}
	for _, name := range want {
		i := slices.IndexFunc(all, func(p record.SettlingPlace) bool { return p.Name == name })
		if i >= 0 && !seen[name] && len(out) < len(ink.Series) {
			out = append(out, all[i])
			seen[name] = true
		}
	}
	return out
}

// slower orders places by their time to 1 %, the slowest first; one that did
// not get there in the run is slower than any that did.
func slower(a, b record.SettlingPlace) int {
	x, y := a.To1Percent, b.To1Percent
	switch {
	case math.IsNaN(x) && math.IsNaN(y) || x == y:
		return 0
	case math.IsNaN(x) || x > y:
		return -1
	}
	return 1
}

// The least distance of two echoes that are marked apart, as a part of the
// axis, and how many are marked at most.
const (
	echoesApart = 0.03
	mostEchoes  = 8
)

// echoMarks marks the first echoes up to a time; those that would fall on one
// line share it.
func echoMarks(echoes []record.Echo, last float64) []figure.Mark {
	var out []figure.Mark
	var names []string
	for _, e := range echoes {
		if !(e.Time > 0 && e.Time < last) {
			continue
		}
		if n := len(out); n > 0 && e.Time-out[n-1].At < echoesApart*last {
			names = append(names, e.Name)
			out[n-1].Label = among(names, 2)
			continue
		}
		if len(out) == mostEchoes {
			break
		}
		names = []string{e.Name}
		out = append(out, figure.Mark{At: e.Time, Label: e.Name})
	}
	return out
}

// departureFinding says when all junctions are within 1 %, in round trips and
// periods, and which is the slowest.
func departureFinding(c *record.Case) string {
	s := c.Settling
	if math.IsNaN(s.To1Percent) {
		slow := []string{}
		for _, p := range s.Places {
			if p.Kind == "junction" && math.IsNaN(p.To1Percent) {
				slow = append(slow, p.Name)
			}
		}
		if len(slow) == 0 {
			return "not every junction came within 1" + format.Space + "% in the run."
		}
		return "not within 1" + format.Space + "% in the run of " + format.SI(c.Stress.Duration, "s") + ": " + among(slow, 3) + "."
	}
	text := "every junction is within 1" + format.Space + "% after " + format.SI(s.To1Percent, "s") + " (" + inTrips(s.To1Percent, s.RoundTrip, c.Model.Frequency) + ")"
	if p := shownPlaces(c); len(p) > 1 {
		slices.SortStableFunc(p, slower)
		if slower(p[0], p[1]) < 0 {
			text += ", " + p[0].Name + " the last"
		}
	}
	if len(c.Settling.Echoes) > 0 {
		text += "; upright lines: the first echoes, from the junctions named"
	}
	return text + "."
}

// inTrips says a time in longest round trips and periods.
func inTrips(t, trip, frequency float64) string {
	if !(trip > 0 && frequency > 0) || math.IsInf(t/trip, 0) {
		return "counted from the start of the source"
	}
	const few = 20 // above it periods beside round trips say nothing more
	n := math.Floor(t / trip)
	cycles := format.Fixed((t-n*trip)*frequency, 1) + format.Space + "cycles"
	switch {
	case n == 0:
		return cycles
	case n == 1:
		return "one round trip and " + cycles
	case n > few:
		return format.Number(t/trip) + " round trips"
	}
	return format.Plural(int64(n), "round trip") + " and " + cycles
}
