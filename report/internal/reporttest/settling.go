package reporttest

import (
	"cmp"
	"math"
	"slices"

	"linewitness/sim/record"
)

// prove fills what the settling is shown by: the windows' tests, the
// prediction, and how each junction and load comes to its final phasor.
func (n Network) prove(c *record.Case, opt Options) {
	s := &c.Settling
	s.Earliest = s.Ramp + s.RoundTrip
	for i := range s.Curve {
		p := &s.Curve[i]
		p.Gap, p.Mean, p.Harmonic = s.RoundTrip, s.Mean*(1+p.Change), s.Harmonic*(1+p.Change)
		p.Passed = s.Settled && i >= len(s.Curve)-2
		if p.Passed {
			s.Passes++
		}
	}
	s.Predicted = n.predict(*s, opt)
	s.Places = n.places(*c, opt)
	if s.Settled {
		s.To1Percent = slowest(s.Places)
	}
	s.Echoes = n.echoes()
	if c.Model.Source.Stop != "" {
		s.RingDown = n.ringDown(s.Predicted)
	}
}

// predict is an exponential that keeps a little more than the measured factor.
func (n Network) predict(s record.Settling, opt Options) record.PredictedSettling {
	p := record.PredictedSettling{LoopFactor: opt.Loop * 1.0003}
	p.TimeConstant = s.RoundTrip / -math.Log(p.LoopFactor)
	p.Q = n.omega() * p.TimeConstant / 2
	p.To10Percent, p.To1Percent, p.ToTenth = math.Ln10*p.TimeConstant, 2*math.Ln10*p.TimeConstant, 3*math.Ln10*p.TimeConstant
	p.RingDown60 = p.ToTenth
	p.Settled = s.Earliest + 4*math.Ln10*p.TimeConstant
	return p
}

// delays returns the time that the first wave takes to each junction.
func (n Network) delays() map[string]float64 {
	out := map[string]float64{n.At: 0}
	reach := func(from, to string, delay float64) {
		if d, ok := out[from]; ok {
			if e, seen := out[to]; !seen || d+delay < e {
				out[to] = d + delay
			}
		}
	}
	for range n.junctions() {
		for _, s := range n.Sections {
			reach(s.From, s.To, n.model(s).Delay)
			reach(s.To, s.From, n.model(s).Delay)
		}
		for _, l := range n.Bridges {
			reach(l.At, l.To, 0)
			reach(l.To, l.At, 0)
		}
	}
	return out
}

// departurePoints is how many points a departure has.
const departurePoints = 300

// places makes departures that fall by the loop factor with every round trip
// after the first wave has come, and a little more in the first periods.
func (n Network) places(c record.Case, opt Options) []record.SettlingPlace {
	var out []record.SettlingPlace
	delays := n.delays()
	for _, name := range n.junctions() {
		p := record.SettlingPlace{Name: name, Kind: "junction", Quantity: "voltage"}
		for k := range departurePoints {
			t := c.Stress.Duration * float64(k) / departurePoints
			d := 1.0
			if after := t - delays[name]; after > 0 {
				d = 0.12*math.Pow(opt.Loop, math.Floor(after/c.Settling.RoundTrip)) + 0.3*math.Exp(-after*n.Frequency)
			}
			p.Time, p.Departure = append(p.Time, t), append(p.Departure, d)
		}
		for _, to := range []struct {
			limit float64
			time  *float64
		}{{0.1, &p.To10Percent}, {0.01, &p.To1Percent}, {0.001, &p.ToTenth}} {
			*to.time = stays(p.Time, p.Departure, to.limit)
		}
		out = append(out, p)
	}
	for _, l := range n.Loads {
		i := slices.IndexFunc(out, func(p record.SettlingPlace) bool { return p.Name == l.At })
		p := out[i]
		p.Name, p.Kind, p.Time, p.Departure = l.Name, "load", nil, nil
		if l.Short {
			p.Quantity = "current"
		}
		out = append(out, p)
	}
	return out
}

// slowest returns the longest time to 1 % of any junction, NaN if one did not
// get there.
func slowest(places []record.SettlingPlace) (longest float64) {
	for _, p := range places {
		if p.Kind == "junction" {
			longest = math.Max(longest, p.To1Percent)
		}
	}
	return longest
}

// stays returns the time after which a departure stays within a limit; NaN if
// it does not.
func stays(times, departure []float64, limit float64) float64 {
	for k := len(departure) - 1; k >= 0; k-- {
		if departure[k] > limit {
			if k == len(departure)-1 {
				return math.NaN()
			}
			return times[k+1]
		}
	}
	return 0
}

// echoes come back from every junction but the source's own.
func (n Network) echoes() []record.Echo {
	var out []record.Echo
	delays := n.delays()
	for _, name := range n.junctions() {
		if d := delays[name]; d > 0 {
			out = append(out, record.Echo{Name: name, Time: 2 * d})
		}
	}
	slices.SortFunc(out, func(a, b record.Echo) int { return cmp.Compare(a.Time, b.Time) })
	return out
}

// ringDown does not show the last 20 dB at the source's own junction.
func (n Network) ringDown(p record.PredictedSettling) []record.RingDown {
	var out []record.RingDown
	for i, name := range n.junctions() {
		r := record.RingDown{Name: name, To20: p.To10Percent * 1.05, To40: p.To1Percent * 1.04, To60dB: p.ToTenth * 1.03}
		if i == 0 {
			r.To60dB = math.NaN()
		}
		out = append(out, r)
	}
	return out
}
