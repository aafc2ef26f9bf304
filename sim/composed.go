package sim

import (
	"math"

	"linewitness/sim/design"
)

// A composed figure is a law of parts that are never below zero, in each of
// which it only rises or only falls. The errors of the parts are added to them,
// not to the figure: the return loss of a good match may be anything from what
// the errors alone would reflect up, and no sum of decibels tells that.
type composed struct {
	parts []*measured
	falls []bool // with that part
	of    func(parts []float64) float64
}

// compose makes a figure of parts.
func (s *solved) compose(of func([]float64) float64, falls []bool, parts ...*measured) *measured {
	c := &composed{parts, falls, of}
	out := &measured{composed: c, levels: parts[0].levels}
	for _, p := range parts {
		out.levels = min(out.levels, p.levels)
		out.residual = math.Max(out.residual, p.residual)
	}
	out.at = func(v view) float64 {
		var x []float64
		for _, p := range parts {
			x = append(x, p.at(v))
		}
		return of(x)
	}
	out.moved = func(e float64) float64 { return c.reach(func(p *measured) float64 { return p.moved(e) }) }
	out.spread = func() float64 { return c.reach(func(p *measured) float64 { return p.spread() }) }
	return s.studying(out)
}

// bounds are the least and the largest value with parts that are off by a size.
func (c *composed) bounds(v view, size func(*measured) float64) (low, high float64) {
	var lows, highs []float64
	for i, p := range c.parts {
		x, d := p.at(v), size(p)
		a, b := math.Max(0, x-d), math.Max(0, x+d)
		if c.falls[i] {
			a, b = b, a
		}
		lows, highs = append(lows, a), append(highs, b)
	}
	return c.of(lows), c.of(highs)
}

// reach is how far the figure of the finest grid may be off with parts that
// are.
func (c *composed) reach(size func(*measured) float64) float64 {
	low, high := c.bounds(fdtdView(0), size)
	var x []float64
	for _, p := range c.parts {
		x = append(x, p.at(fdtdView(0)))
	}
	at := c.of(x)
	return math.Max(high-at, at-low)
}

// explained reports whether the error of every part is, and how far off what
// they may be off makes the figure.
func (c *composed) explained() (yes bool, reach float64) {
	yes = true
	for _, p := range c.parts {
		yes = yes && p.study().Explained
	}
	return yes, c.reach(func(p *measured) float64 { return p.study().Uncertainty })
}

// A law makes a quantity of others: see composed.
type law struct {
	parts []quantity
	falls []bool
	of    func([]float64) float64
}

// quantity is the law as a quantity of its own.
func (l *law) quantity(s *state) float64 {
	var x []float64
	for _, q := range l.parts {
		x = append(x, q(s))
	}
	return l.of(x)
}

// powerRatio is the law of 10 lg of the first part over the second.
func powerRatio(a, b quantity) *law {
	return &law{[]quantity{a, b}, []bool{false, true}, inDecibels(10)}
}

// inDecibels is that many times lg of a ratio.
func inDecibels(times float64) func([]float64) float64 {
	return func(x []float64) float64 { return times * math.Log10(x[0]/x[1]) }
}

// law gives the law of a quantity that is made of others, nil for any else.
func (f finder) law(r design.Requirement) *law {
	one := func(q quantity, falls bool, of func(float64) float64) *law {
		return &law{[]quantity{q}, []bool{falls}, func(x []float64) float64 { return of(x[0]) }}
	}
	switch r.Quantity {
	case design.VSWR:
		return one(f.standing(r), false, vswrOf)
	case design.ReturnLoss:
		return one(f.reflected(r), true, func(x float64) float64 { return -20 * math.Log10(x) })
	case design.PowerSplit:
		a, b := f.load(r.Between[0]), f.load(r.Between[1])
		return powerRatio(
			func(s *state) float64 { return s.partPower(a) },
			func(s *state) float64 { return s.partPower(b) })
	case design.Loss:
		return f.loss(r)
	}
	return nil
}
