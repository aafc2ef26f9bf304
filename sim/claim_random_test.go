package sim

import (
	"context"
	"fmt"
	"math"
	"math/cmplx"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"linewitness/sim/design"
	"linewitness/sim/line"
	"linewitness/sim/network"
	"linewitness/sim/record"
	"linewitness/sim/slip"
)

// A drawn feeder is a small realistic design: a source, a main line of one to
// three sections, often a stub, sometimes a branch with a second load, loads
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
	for i := range rapid.IntRange(1, 3).Draw(t, "sections") {
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

// plantTol is the tolerance of planted claims: of the value, or rad.
const plantTol = 0.01

// claiming is the claim with a value and its tolerance.
func claiming(c design.Claim, v complex128) design.Claim {
	both := c.Complex
	c = claimOf(c.Requirement, v, plantTol)
	c.Complex = both
	return c
}

// A planting is a claim that a slip has spoiled.
type planting struct {
	claim design.Claim
	label string
}

// fourFigures rounds a figure as a calculation sheet would, both parts of it
// to the same place.
func fourFigures(v complex128) complex128 {
	size := cmplx.Abs(v)
	if size == 0 || cmplx.IsNaN(v) || cmplx.IsInf(v) {
		return v
	}
	unit := math.Pow(10, math.Floor(math.Log10(size))-3)
	return complex(math.Round(real(v)/unit)*unit, math.Round(imag(v)/unit)*unit)
}

// plantings are the claims of a feeder that one slip spoils by more than twice
// the tolerance.
func plantings(a *assessor, d *drawn, id slip.ID) (out []planting) {
	asked := d.askable()
	var all []*claimed
	for _, c := range asked {
		all = append(all, a.judge(c))
	}
	try := func(c *claimed, s slip.Slip, v complex128) {
		v = fourFigures(v)
		right := c.exact
		if c.timed != nil {
			right = c.found
		}
		size := cmplx.Abs(v)
		p := claiming(c.Claim, v)
		off := cmplx.Abs(v - right)
		if angular(c.Quantity) {
			off = math.Abs(math.Remainder(real(v-right), 2*pi))
		}
		if !(size > 1e-6 && size < 1e6 && off > 2*p.Tolerance) {
			return
		}
		out = append(out, planting{p, s.Label()})
	}
	catalogue := slip.Catalogue{Net: a.net, Quotes: a.quotes}
	for k := range a.net.Sections {
		catalogue.Single = append(catalogue.Single, k)
	}
	for _, change := range catalogue.Changes() {
		if change.ID != id {
			continue
		}
		if value := a.valuer(change); value != nil {
			for _, c := range all {
				if v, ok := value(c); ok {
					try(c, change.Slip, v)
				}
			}
		}
	}
	for _, c := range all {
		ms := a.reading(c).Misreadings()
		if c.timed == nil {
			ms = append(ms, a.places(c)...)
		}
		for _, m := range ms {
			if m.ID == id {
				for _, v := range m.Figures {
					try(c, m.Slip, v)
				}
			}
		}
	}
	return out
}

// TestPlantedSlips plants each slip of the catalogue in random feeders and
// looks for it. At least so many in a hundred must be named first.
func TestPlantedSlips(t *testing.T) {
	const each, least, tries = 7, 3, 60
	const wanted = 0.95
	feeders := rapid.Custom(drawFeeder)
	planted, first := 0, 0
	var table, missed strings.Builder
	for _, id := range slip.All() {
		here, hits := 0, 0
		for seed := 0; here < each && seed < tries; seed++ {
			d := feeders.Example(int(id)*1000 + seed)
			a := d.assessor(t)
			all := plantings(a, d, id)
			if len(all) == 0 {
				continue
			}
			p := all[(seed*7919)%len(all)]
			got := assessOne(t, a, p.claim)
			here++
			if led(got, p.label) {
				hits++
			} else {
				fmt.Fprintf(&missed, "%s: %s of %s %s: %v; first %+v\n", p.label, p.claim.Quantity, p.claim.Section, p.claim.End, p.claim.Value, got.Slips)
			}
		}
		fmt.Fprintf(&table, "%3d of %3d  %s\n", hits, here, id.Name())
		if here < least {
			t.Errorf("%s: planted %d times only", id.Name(), here)
		}
		planted, first = planted+here, first+hits
	}
	t.Logf("named first: %d of %d\n%s%s", first, planted, table.String(), missed.String())
	if planted < 400 || float64(first) < wanted*float64(planted) {
		t.Errorf("named first: %d of %d", first, planted)
	}
}

// led reports whether a slip leads the list of a claim, by its label.
func led(c record.Claim, want string) bool {
	if len(c.Slips) == 0 {
		return false
	}
	for _, l := range append([]string{label(c.Slips[0])}, c.Slips[0].Also...) {
		if l == want {
			return true
		}
	}
	return false
}

// TestCorrectClaims: correct claims, rounded by up to half their tolerance, are
// confirmed, and nothing is said of them.
func TestCorrectClaims(t *testing.T) {
	claims := 0
	feeders := rapid.Custom(drawFeeder)
	for seed := 0; claims < 500; seed++ {
		d := feeders.Example(seed)
		a := d.assessor(t)
		var all []design.Claim
		for i, c := range d.askable() {
			j := a.judge(c)
			right := j.exact
			if j.timed != nil {
				right = j.found
			}
			if size := cmplx.Abs(right); !(size > 1e-6 && size < 1e6) {
				continue
			}
			off := plantTol / 2 * math.Sin(float64(7*seed+i))
			if angular(c.Quantity) {
				c = claiming(c, right+complex(off, 0))
			} else {
				c = claiming(c, right*complex(1+off, 0))
			}
			all = append(all, c)
		}
		for _, got := range a.assess(context.Background(), Nominal, all) {
			claims++
			if got.Verdict != record.Confirmed || len(got.Slips) > 0 || got.Finding != "" {
				t.Errorf("seed %d, %s %v: %s, %s, slips %+v", seed, got.Quantity, got.Claimed, got.Verdict, got.Finding, got.Slips)
			}
		}
	}
}
