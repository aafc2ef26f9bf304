package sim

import (
	"fmt"
	"math"
	"testing"

	"pgregory.net/rapid"

	"linewitness/sim/design"
	"linewitness/sim/line"
	"linewitness/sim/network"
	"linewitness/sim/slip"
)

// A drawn is a feeder drawn at random, a small realistic design: a source, a main line of one or
// two sections, often a stub, sometimes a branch with a second load, loads
// with a reactance, and the losses that the data of the lines quote.
type drawn struct {
	*feeder
	quotes [][]slip.Quote
	loads  []string
}

func drawFeeder(t *rapid.T) *drawn {
	float := func(lo, hi float64, what string) float64 { return rapid.Float64Range(lo, hi).Draw(t, what) }
	d := &drawn{feeder: newFeeder(float(1e6, 200e6, "frequency"), float(1, 1000, "emf"), float(20, 100, "source ohm"), "source")}
	if rapid.IntRange(0, 2).Draw(t, "reactive source") == 0 {
		d.Source.Series = Realise(complex(d.Source.R, float(-60, 60, "source reactance")), d.Omega())
	}
	junction := func(name string) int {
		d.Junctions = append(d.Junctions, name)
		return len(d.Junctions) - 1
	}
	from := 0
	for i := range rapid.IntRange(1, 2).Draw(t, "sections") {
		to := junction(fmt.Sprintf("j%d", i))
		d.section(t, fmt.Sprintf("line%d", i), from, to, float(0.1, 4, "wavelengths"))
		switch rapid.IntRange(0, 3).Draw(t, "what hangs there") {
		case 0, 1:
			d.stub(t, to, junction(fmt.Sprintf("end%d", i)))
		case 2:
			d.addLoad(t, "tap", to)
		}
		from = to
	}
	last := junction("antenna end")
	d.section(t, "tail", from, last, float(0.05, 0.6, "wavelengths of the tail"))
	d.addLoad(t, "antenna", last)
	return d
}

// section draws a nominal line, one in eight of them a lossy pair.
func (d *drawn) section(t *rapid.T, name string, from, to int, wavelengths float64) {
	float := func(lo, hi float64, what string) float64 { return rapid.Float64Range(lo, hi).Draw(t, what) }
	n := line.Nominal{
		Z0:              rapid.SampledFrom([]float64{50, 75, 25, 100, 450}).Draw(t, "z0"),
		VelocityFactor:  float(0.6, 0.97, "velocity factor"),
		LossAt:          d.Frequency * rapid.SampledFrom([]float64{0.1, 0.3, 3, 10}).Draw(t, "quoted at"),
		DielectricShare: float(0, 0.5, "dielectric share"),
	}
	decibels := float(0.1, 2, "dB per wavelength")
	if rapid.IntRange(0, 7).Draw(t, "lossy pair") == 0 {
		decibels, n.DielectricShare = float(5, 20, "dB per wavelength of the pair"), 0
		wavelengths /= 4
	}
	wave := n.Wavelength(d.Frequency)
	conductor := (1 - n.DielectricShare) * math.Sqrt(d.Frequency/n.LossAt)
	dielectric := n.DielectricShare * d.Frequency / n.LossAt
	n.Attenuation = decibels / line.NeperDB / wave / (conductor + dielectric)
	d.Sections = append(d.Sections, network.Section{
		Name: name, From: from, To: to, Length: wavelengths * wave, Line: n.At(d.Frequency),
	})
	d.quotes = append(d.quotes, []slip.Quote{{Frequency: n.LossAt, Attenuation: n.Attenuation}})
}

func (d *drawn) stub(t *rapid.T, at, end int) {
	name := "stub" + d.Junctions[at][1:]
	d.section(t, name, at, end, rapid.Float64Range(0.03, 0.45).Draw(t, "wavelengths of the stub"))
	switch rapid.IntRange(0, 2).Draw(t, "stub ends") {
	case 0:
		d.part("short "+name, network.Load, end, network.Branch{})
	case 1:
		d.part("open "+name, network.Load, end, network.Branch{Open: true})
	}
}

func (d *drawn) addLoad(t *rapid.T, name string, at int) {
	name += d.Junctions[at][:1] + fmt.Sprint(at)
	z := complex(rapid.Float64Range(10, 200).Draw(t, "load ohm"), rapid.Float64Range(-150, 150).Draw(t, "load reactance"))
	d.load(name, at, z)
	d.loads = append(d.loads, name)
}

// askable are the figures that a feeder can be asked for.
func (d *drawn) askable() (out []design.Claim) {
	add := func(r design.Requirement, both bool) {
		c := claimOf(r, 0, 0)
		c.Complex = c.Complex || both
		out = append(out, c)
	}
	for _, s := range d.Sections {
		for _, end := range endNames {
			for _, q := range []design.Quantity{design.InputImpedance, design.VSWR, design.ReturnLoss, design.Reflection} {
				add(design.Requirement{Quantity: q, Section: s.Name, End: end}, q == design.Reflection)
			}
			add(design.Requirement{Quantity: design.Reflection, Section: s.Name, End: end}, false)
			add(design.Requirement{Quantity: design.Current, Section: s.Name, End: end}, true)
		}
		for _, q := range []design.Quantity{design.PeakVoltage, design.Overshoot, design.Loss} {
			add(design.Requirement{Quantity: q, Section: s.Name}, false)
		}
	}
	for _, q := range []design.Quantity{design.SteadyVoltage, design.SteadyCurrent} { // of one section: they take long
		add(design.Requirement{Quantity: q, Section: "tail"}, false)
	}
	for _, j := range d.Junctions[1:] {
		add(design.Requirement{Quantity: design.Voltage, At: j}, true)
		add(design.Requirement{Quantity: design.Voltage, At: j}, false)
		add(design.Requirement{Quantity: design.Phase, At: j}, false)
		add(design.Requirement{Quantity: design.PhaseDifference, Between: [2]string{j, "source"}}, false)
	}
	for _, l := range d.loads {
		for _, q := range []design.Quantity{design.LoadPower, design.Efficiency, design.Loss} {
			add(design.Requirement{Quantity: q, Load: l}, false)
		}
	}
	if len(d.loads) > 1 {
		add(design.Requirement{Quantity: design.PowerSplit, Between: [2]string{d.loads[0], d.loads[1]}}, false)
	}
	return out
}

// assessor judges the feeder, with a made-up stress run.
func (d *drawn) assessor(t testing.TB) *assessor {
	a := assessorOf(t, &d.Network, d.quotes...)
	a.timed = func(r design.Requirement) *timedFigure {
		const over = 0.37
		switch r.Quantity {
		case design.Overshoot:
			return &timedFigure{value: over}
		case design.PeakVoltage:
			r.Quantity = design.SteadyVoltage
			return &timedFigure{value: (1 + over) * finder{a.net}.steady(r)(a.exact)}
		}
		return nil
	}
	return a
}
