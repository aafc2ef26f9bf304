package reporttest

import (
	"math"
	"math/cmplx"
	"strconv"

	"linewitness/sim/record"
)

func trim(v float64) string { return strconv.FormatFloat(v, 'g', 5, 64) }

func (n Network) longest() float64 {
	var t float64
	for _, s := range n.Sections {
		t += n.model(s).Delay
	}
	return t
}

func (n Network) settling(opt Options) record.Settling {
	s := record.Settling{
		Settled: !opt.Unsettled, LoopFactor: opt.Loop, LongPath: n.longest(), RoundTrip: 2 * n.longest(),
		Ramp: 10 / n.Frequency, Mean: 3e-7, Harmonic: 2e-6, To1Percent: 2*n.longest() + 2/n.Frequency,
	}
	change, t := 0.7, s.Ramp+2*s.RoundTrip
	for k := 0; k < 40; k++ {
		e := math.NaN()
		if k > 1 {
			e = change * opt.Loop / (1 - opt.Loop)
		}
		s.Curve = append(s.Curve, record.SettlingPoint{Time: t, Change: change, Estimate: e})
		if change < 1e-5 && !opt.Unsettled {
			break
		}
		change *= opt.Loop
		t += s.RoundTrip
	}
	s.Time, s.Periods, s.Residual = t, int(t*n.Frequency), change
	if opt.Unsettled {
		s.To1Percent = math.NaN()
		s.Decay = "the change from window to window falls by the factor 0.9990 per round trip; 1e-4 would be reached after 7 200 more"
	}
	return s
}

func (n Network) stress(c record.Case) record.Stress {
	s := record.Stress{Profile: c.Model.Source.Start, Duration: 4*c.Settling.RoundTrip + 20/n.Frequency, Worst: true}
	var steady float64
	for k, p := range c.Profiles {
		e := record.StressSection{Name: p.Section, SteadyVoltage: c.Phasor.Sections[k].VoltageMax.Value}
		steady = math.Max(steady, e.SteadyVoltage)
		for i, v := range p.PeakV {
			if v > e.Voltage {
				e.Voltage, e.VoltageAt, e.VoltageTime = v, p.PeakZV[i], s.Duration/3
			}
		}
		for i, v := range p.PeakI {
			if v > e.Current {
				e.Current, e.CurrentAt, e.CurrentTime = v, p.PeakZI[i], s.Duration/4
			}
		}
		if e.Voltage > s.Voltage.Value {
			s.Voltage = record.Peak{Value: e.Voltage, Section: e.Name, At: e.VoltageAt, Time: e.VoltageTime, Phase: 37}
		}
		if e.Current > s.Current.Value {
			s.Current = record.Peak{Value: e.Current, Section: e.Name, At: e.CurrentAt, Time: e.CurrentTime, Phase: 121}
		}
		s.Sections = append(s.Sections, e)
	}
	s.Overshot = s.Voltage.Value/steady - 1
	return s
}

func (n Network) agreement(c record.Case, opt Options) record.Agreement {
	a := record.Agreement{Limit: 5e-3, Expected: 0.8 * opt.Error, RMS: opt.Error / 2}
	for k, p := range c.Profiles {
		s := record.AgreementSection{
			Name: p.Section, ExpectedVoltage: 0.8 * opt.Error, ExpectedCurrent: 0.8 * opt.Error,
			VoltageScale: c.Phasor.Sections[k].VoltageMax.Value, CurrentMax: c.Phasor.Sections[k].CurrentMax.Value,
		}
		s.Voltage, s.VoltageAt = worst(p.ZV, p.VF, p.VP, s.VoltageScale)
		s.Current, s.CurrentAt = worst(p.ZI, p.IF, p.IP, s.CurrentMax)
		if s.Voltage > a.Voltage {
			a.Voltage = s.Voltage
			a.Worst = record.WorstPlace{Section: s.Name, At: s.VoltageAt, Quantity: "voltage"}
		}
		a.Current = math.Max(a.Current, s.Current)
		a.Sections = append(a.Sections, s)
	}
	return a
}

func worst(z []float64, a, b []complex128, scale float64) (most, at float64) {
	for i := range a {
		if d := cmplx.Abs(a[i]-b[i]) / scale; d > most {
			most, at = d, z[i]
		}
	}
	return most, at
}

func (n Network) grid() record.Grid {
	const steps = 48
	g := record.Grid{StepsPerPeriod: steps, Step: 1 / (steps * n.Frequency)}
	for _, s := range n.Sections {
		m := n.model(s)
		cells := max(int(m.Delay/g.Step), 1)
		cell := s.Length / float64(cells)
		courant := s.VF * 299792458 * g.Step / cell
		g.Sections = append(g.Sections, record.GridSection{
			Name: s.Name, Cells: cells, Cell: cell, Courant: courant,
			CellsPerWavelength: float64(cells) / m.Wavelengths, Points: cells + 1,
			PhaseErrorDegrees: 60 * math.Pow(math.Pi/steps, 2) * (1 - courant*courant) * m.Wavelengths,
		})
		g.Updates += float64(cells) * 4000
	}
	return g
}

func (n Network) waveforms(c record.Case, opt Options) []record.Waveform {
	out := []record.Waveform{n.waveform("source voltage", n.At, "voltage", "V", c.Phasor.Source.V, c, opt)}
	out = append(out, n.waveform("source current", n.At, "current", "A", c.Phasor.Source.I, c, opt))
	for _, j := range c.Phasor.Junctions {
		out = append(out, n.waveform(j.Name, j.Name, "voltage", "V", j.V, c, opt))
	}
	for _, l := range c.Phasor.Loads {
		out = append(out, n.waveform(l.Name+" current", l.Name, "current", "A", l.I, c, opt))
	}
	return out
}

// perPeriod is how many samples a period of a waveform has.
const perPeriod = 16

// waveform builds up in steps of a round trip, as echoes do.
func (n Network) waveform(name, where, quantity, unit string, p complex128, c record.Case, opt Options) record.Waveform {
	step := 1 / (perPeriod * n.Frequency)
	duration := c.Stress.Duration
	w := record.Waveform{Name: name, Where: where, Quantity: quantity, Unit: unit, Step: step}
	value := func(t float64) float64 {
		if t < c.Settling.LongPath/2 {
			return 0
		}
		echo := math.Pow(opt.Loop, 1+math.Floor(t/c.Settling.RoundTrip))
		return (1 - echo) * real(p*cmplx.Rect(1, n.omega()*t)) * (1 + 0.4*math.Exp(-t/c.Settling.RoundTrip))
	}
	for t := 0.0; t < duration; t += step {
		w.Samples = append(w.Samples, value(t))
	}
	w.Tail = record.Tail{Start: duration - 3/n.Frequency, Step: step}
	for k := range 3 * perPeriod {
		t := w.Tail.Start + float64(k)*step
		w.Tail.Phasor = append(w.Tail.Phasor, real(p*cmplx.Rect(1, n.omega()*t)))
		w.Tail.Samples = append(w.Tail.Samples, w.Tail.Phasor[k]*(1+opt.Error))
	}
	return w
}

func (n Network) spectrum(v map[string]complex128) record.Spectrum {
	const periods, harmonics = 4, 6
	s := record.Spectrum{Where: n.At, Periods: periods}
	for k := range periods*harmonics + 1 {
		a := 1e-8 * (1 + 0.5*math.Sin(float64(7*k)))
		if k == periods {
			a = 1
		} else if k%periods == 0 {
			a = 1e-6 / float64(k+1)
		}
		s.Frequency = append(s.Frequency, float64(k)*n.Frequency/periods)
		s.Amplitude = append(s.Amplitude, a*cmplx.Abs(v[n.At]))
	}
	return s
}
