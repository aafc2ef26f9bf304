package sim

import (
	"context"
	"math"
	"testing"

	"linewitness/phasor"
	"linewitness/sim/design"
	"linewitness/sim/line"
	"linewitness/sim/network"
	"linewitness/sim/record"
	"linewitness/sim/slip"
)

// assessorOf judges claims of a network by the closed form in place of both
// witnesses, with no uncertainty.
func assessorOf(t testing.TB, net *network.Network, quotes ...[]slip.Quote) *assessor {
	t.Helper()
	s, err := phasor.Solve(net)
	if err != nil {
		t.Fatal(err)
	}
	st := phasorState(net, s)
	return &assessor{
		net: net, exact: st, found: st, steps: 80, quotes: quotes,
		spread: func(design.Requirement, quantity) float64 { return 0 },
		timed:  func(design.Requirement) *timedFigure { return nil },
	}
}

// feeder builds a network by hand.
type feeder struct{ network.Network }

func newFeeder(hertz, emf float64, r float64, names ...string) *feeder {
	return &feeder{network.Network{
		Frequency: hertz, Junctions: names,
		Source: network.Source{EMF: emf, Series: network.Series{R: r}},
	}}
}

// line adds a section of a line without distortion, whose characteristic
// impedance is real whatever its loss in dB/m.
func (f *feeder) line(name string, from, to int, z0, velocity, decibels, metres float64) *feeder {
	a := decibels / line.NeperDB
	v := velocity * line.C0
	f.Sections = append(f.Sections, network.Section{
		Name: name, From: from, To: to, Length: metres,
		Line: line.Constants{R: a * z0, L: z0 / v, G: a / z0, C: 1 / (z0 * v)},
	})
	return f
}

func (f *feeder) part(name string, kind network.Kind, at int, br network.Branch) *feeder {
	br.Name, br.Kind, br.A, br.B = name, kind, at, network.Ground
	f.Branches = append(f.Branches, br)
	f.Parts = append(f.Parts, network.Part{Name: name, Kind: kind, A: at, B: network.Ground, Branches: []int{len(f.Branches) - 1}})
	return f
}

func (f *feeder) load(name string, at int, z complex128) *feeder {
	return f.part(name, network.Load, at, network.Branch{Series: Realise(z, f.Omega())})
}

// claimOf makes a claim with a tolerance that is a part of its value.
func claimOf(r design.Requirement, value complex128, part float64) design.Claim {
	c := design.Claim{Requirement: r, Value: value, Of: "as claimed"}
	c.ID, c.Cases = "C1", []string{Nominal}
	c.Tolerance = part * math.Hypot(real(value), imag(value))
	switch r.Quantity {
	case design.InputImpedance:
		c.Unit, c.Complex = "ohm", true
	case design.Voltage, design.SteadyVoltage:
		c.Unit = "V peak"
	case design.Current, design.SteadyCurrent:
		c.Unit = "A peak"
	case design.LoadPower:
		c.Unit = "W"
	case design.Phase, design.PhaseDifference:
		c.Unit = "deg"
		c.Tolerance = part // rad
	case design.ReturnLoss, design.Loss, design.PowerSplit:
		c.Unit, c.Level = "dB", true
	default:
		c.Unit = "1"
	}
	return c
}

// firstNamed reports whether a slip leads the list, or cannot be told from the
// leader.
func firstNamed(c record.Claim, id slip.ID, where string) bool {
	return led(c, slip.Slip{ID: id, Where: where}.Label())
}

func assessOne(t testing.TB, a *assessor, c design.Claim) record.Claim {
	t.Helper()
	return a.assess(context.Background(), Nominal, []design.Claim{c})[0]
}
