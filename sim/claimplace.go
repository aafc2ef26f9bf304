package sim

import (
	"fmt"
	"math"
	"math/cmplx"

	"linewitness/sim/design"
	"linewitness/sim/network"
	"linewitness/sim/slip"
)

// places gives the figures that a claim has when it is read at another place
// than the one it names, or from another power.
func (a *assessor) places(c *claimed) []slip.Misreading {
	one := func(id slip.ID, where string, v complex128) slip.Misreading {
		return slip.Misreading{Slip: slip.Slip{ID: id, Where: where}, Figures: []complex128{v}}
	}
	switch {
	case c.End != "":
		return a.otherEnds(c)
	case c.Quantity == design.LoadPower:
		return append(a.waves(c),
			one(slip.AvailableForDelivered, "", complex(a.available(), 0)),
			one(slip.InputForDelivered, "", complex(a.exact.sourcePower(), 0)))
	case c.Quantity == design.Efficiency:
		return []slip.Misreading{one(slip.AvailableForDelivered, "", c.exact*complex(a.exact.sourcePower()/a.available(), 0))}
	case c.Quantity == design.Loss && c.Load != "":
		mismatch := 10 * math.Log10(a.exact.sourcePower()/a.available())
		return []slip.Misreading{one(slip.DeliveredForAvailable, "", c.exact+complex(mismatch, 0))}
	}
	return nil
}

// otherEnds reads a quantity of a section's end at the other one, and at the
// ends of sections where one is wont to measure: at the source and at loads.
func (a *assessor) otherEnds(c *claimed) (out []slip.Misreading) {
	measured := map[int]bool{a.net.Source.At: true}
	for _, p := range a.net.Parts {
		if p.Kind == network.Load {
			measured[p.A] = true
		}
	}
	for _, s := range a.net.Sections {
		for end, j := range []int{s.From, s.To} {
			other := c.Claim
			other.Section, other.End = s.Name, endNames[end]
			same := s.Name == c.Section
			if same && other.End == c.End || !same && !measured[j] {
				continue
			}
			out = append(out, slip.Misreading{
				Slip:    slip.Slip{ID: slip.OtherEnd, Where: fmt.Sprintf("%s end of section %s", other.End, s.Name), Single: !same},
				Figures: []complex128{figureOf(other, a.exact)},
			})
		}
	}
	return out
}

var endNames = [2]string{"from", "to"}

// available is the available power of the source, W, or what it delivers if
// that has no limit.
func (a *assessor) available() float64 {
	if p := a.net.Source.Available(); !math.IsInf(p, 1) {
		return p
	}
	return a.exact.sourcePower()
}

// waves are the powers that are read from the waves on the sections that end at
// a load: the forward power, and the delivered power with the mismatch taken
// off once more.
func (a *assessor) waves(c *claimed) (out []slip.Misreading) {
	part := a.net.Parts[finder{a.net}.load(c.Load)]
	for k, s := range a.net.Sections {
		if s.From != part.A && s.To != part.A {
			continue
		}
		z0 := s.At(a.net.Omega()).Impedance(a.net.Omega())
		forward := slip.Misreading{Slip: slip.Slip{ID: slip.ForwardForDelivered, Where: "section " + s.Name}}
		twice := slip.Misreading{Slip: slip.Slip{ID: slip.MismatchTwice, Where: "section " + s.Name}}
		for _, t := range a.exact.ends[k] {
			if s.To != part.A { // the load is at the From end
				t.i = -t.i
			}
			ahead := (t.v + z0*t.i) / 2
			size := cmplx.Abs((t.v - z0*t.i) / (t.v + z0*t.i))
			forward.Figures = append(forward.Figures, complex(power(ahead, ahead/z0), 0))
			twice.Figures = append(twice.Figures, c.exact*complex(1-size*size, 0))
		}
		out = append(out, forward, twice)
	}
	return out
}
