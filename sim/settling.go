package sim

import (
	"cmp"
	"fmt"
	"math"
	"slices"

	"linewitness/fdtd"
	"linewitness/sim/network"
	"linewitness/sim/record"
)

// settlingRecord writes down how the settling run, and the stress run, came to
// steady state, beside what the closed form predicts.
func (s *solved) settlingRecord() record.Settling {
	f := s.steady.Settling
	out := record.Settling{
		Settled: f.Settled, Time: f.Time, Periods: f.Periods,
		Residual: f.Residual, LoopFactor: f.LoopFactor,
		LongPath: f.LongPath, RoundTrip: 2 * f.LongPath,
		Ramp: fdtd.RampPeriods * s.net.Period(), Earliest: f.Earliest,
		Mean: f.Mean, Harmonic: f.Harmonic, Passes: f.Passes,
		Predicted:  s.predictedSettling(),
		To1Percent: s.stress.SettleTime(-1, 0.01),
		Places:     s.places(),
		Echoes:     s.echoes(),
		RingDown:   s.ringDown(),
	}
	for _, c := range f.Curve {
		out.Curve = append(out.Curve, record.SettlingPoint{
			Time: c.Time, Gap: c.Gap, Change: c.Change, Estimate: c.Estimate,
			Mean: c.Mean, Harmonic: c.Harmonic, Passed: c.Passed,
		})
	}
	if !f.Settled {
		out.Decay = s.decayText()
	}
	return out
}

// predictedSettling is what the slowest natural mode near the source frequency
// says: tau is 1/rate and Q is w tau/2, so amplitudes go as e^{-wt/2Q}.
func (s *solved) predictedSettling() record.PredictedSettling {
	rate := s.plan.Rate
	tau := 1 / rate
	after := func(fraction float64) float64 { return tau * math.Log(1/fraction) }
	return record.PredictedSettling{
		LoopFactor: s.plan.LoopFactor, Q: s.net.Omega() * tau / 2, TimeConstant: tau,
		To10Percent: after(0.1), To1Percent: after(0.01), ToTenth: after(0.001), RingDown60: after(0.001),
		Settled: s.predictedEnd(),
	}
}

// predictedEnd is when the settling run should end, s, were there no cap.
func (s *solved) predictedEnd() float64 {
	return float64(settlePeriods(s.net, s.design.Grid.SettleTolerance, s.plan.Rate, s.plan.LongPath)) * s.net.Period()
}

// decayText says what an unsettled run measured, and what is predicted.
func (s *solved) decayText() string {
	return measuredDecay(s.steady.Settling) + s.foretold()
}

func (s *solved) foretold() string {
	p := s.predictedSettling()
	switch {
	case math.IsNaN(p.LoopFactor):
		return ""
	case !(p.LoopFactor < 1):
		return "; the closed form predicts a mode that does not decay"
	}
	return fmt.Sprintf("; the closed form predicts that %.4g is kept, and steady state after %.4g us (%.0f periods)",
		p.LoopFactor, p.Settled*1e6, p.Settled/s.net.Period())
}

func measuredDecay(f fdtd.Settling) string {
	if len(f.Curve) == 0 {
		return fmt.Sprintf("the cap of %d periods ended the run before two windows one longest round trip (%.3g us) apart could be compared",
			f.Periods, 2*f.LongPath*1e6)
	}
	last := f.Curve[len(f.Curve)-1]
	if f.LoopFactor <= 0 || f.LoopFactor >= 1 {
		return fmt.Sprintf("after %d periods the phasors still change by %.2g of their largest every %.3g us, and the change does not fall",
			f.Periods, last.Change, last.Gap*1e6)
	}
	return fmt.Sprintf("after %d periods the phasors still change by %.2g of their largest every %.3g us; each longest round trip (%.3g us) keeps %.4g of the amplitude",
		f.Periods, last.Change, last.Gap*1e6, 2*f.LongPath*1e6, f.LoopFactor)
}

// places are the times of the junctions that the design names, and of the
// loads.
func (s *solved) places() []record.SettlingPlace {
	var out []record.SettlingPlace
	for j, name := range s.net.Junctions[:s.net.NamedJunctions()] {
		at := func(fraction float64) float64 { return s.stress.SettleTime(j, fraction) }
		d := s.stress.Departures[j]
		out = append(out, record.SettlingPlace{
			Name: name, Kind: "junction", Quantity: "voltage",
			To10Percent: at(0.1), To1Percent: at(0.01), ToTenth: at(0.001),
			Time: d.Time, Departure: d.Error,
		})
	}
	for p, part := range s.net.Parts {
		if part.Kind != network.Load || s.net.Branches[part.Branches[0]].Open {
			continue
		}
		at := func(fraction float64) float64 { return s.stress.PartTime(p, fraction) }
		out = append(out, record.SettlingPlace{
			Name: part.Name, Kind: "load", Quantity: "current",
			To10Percent: at(0.1), To1Percent: at(0.01), ToTenth: at(0.001),
		})
	}
	return out
}

// echoes are the first echoes that can come back to the source from each
// junction.
func (s *solved) echoes() []record.Echo {
	var out []record.Echo
	for j, d := range fdtd.Arrivals(s.net, s.net.Source.At)[:s.net.NamedJunctions()] {
		if d > 0 && !math.IsInf(d, 1) {
			out = append(out, record.Echo{Name: s.net.Junctions[j], Time: 2 * d})
		}
	}
	slices.SortStableFunc(out, func(a, b record.Echo) int { return cmp.Compare(a.Time, b.Time) })
	return out
}

// ringDown is how the junctions fall after a stop of the source.
func (s *solved) ringDown() []record.RingDown {
	if s.net.Source.Stop == nil {
		return nil
	}
	var out []record.RingDown
	for j, name := range s.net.Junctions[:s.net.NamedJunctions()] {
		at := func(fraction float64) float64 { return s.stress.RingDown(j, fraction) }
		out = append(out, record.RingDown{Name: name, To20: at(0.1), To40: at(0.01), To60dB: at(0.001)})
	}
	return out
}
