package sim

import (
	"fmt"
	"math"

	"linewitness/sim/design"
	"linewitness/sim/record"
)

// warnings are what a reader of the record must know to trust the numbers no
// further than they go.
func (s *solved) warnings(c *record.Case) []string {
	var out []string
	say := func(format string, args ...any) { out = append(out, fmt.Sprintf(format, args...)) }
	if !s.steady.Settling.Settled {
		say("steady state was not reached: %s", s.decayText())
	}
	if !s.compared.Explained(s.tail()) {
		say("the methods differ by more than the grid and the settling residual explain")
	}
	if n := unexplained(c.Convergence.Studies); n > 0 {
		say("the error of %d of %d figures is more than the uncertainty that grid, settling, rational forms and rounding give it: see the validation table", n, len(c.Convergence.Studies))
	}
	for _, a := range []struct {
		who   string
		audit record.PowerAudit
	}{{"the closed form", c.Power.Phasor}, {"the time domain", c.Power.FDTD}} {
		if a.audit.Delivered != 0 && !a.audit.Closed {
			say("the power balance of %s does not close: %.2g of what is delivered is left over, %.2g may be", a.who, a.audit.Relative, a.audit.Allowed)
		}
	}
	v := largestVoltage
	if e := s.stress.Edge; e > 0 {
		say("the source jumps, and the peak of an ideal jump does not converge with the grid: the peaks are those of an edge of %.3g ns (%.4g V at most), and their uncertainty reaches to those of the bare jump (%.4g V with %d steps a period, %.4g V with %d); give the real rise (or fall) of the source",
			e*1e9, v(s.stress), v(s.sharp), s.stress.Grid.StepsPerPeriod, v(s.second), s.second.Grid.StepsPerPeriod)
	}
	if !s.stress.Complete {
		say("the stress run ended after %.3g us before the network was at rest; a later peak is not excluded", s.stress.Duration*1e6)
	}
	if a, b := v(s.stress), v(s.second); s.sharp == nil && math.Abs(a-b) > peakChange*a {
		say("the largest voltage differs by %.2g %% between two grids: %.4g V with %d steps a period, %.4g V with %d",
			100*math.Abs(a-b)/a, a, s.stress.Grid.StepsPerPeriod, b, s.second.Grid.StepsPerPeriod)
	}
	if !s.stress.Traces.Full {
		say("the waveforms are kept to %.3g us only", float64(len(s.stress.Traces.Source.A))*s.stress.Grid.Step*1e6)
	}
	out = append(out, s.design.Warnings...)
	s.thinned(say)
	s.realised(say)
	return out
}

// peakChange is the change of the largest voltage from grid to grid that a
// reader is told of: "two grids agreeing to 1 %".
const peakChange = 0.01

// exceeded says which ratings are passed, or may be.
func exceeded(ratings []record.Rating) []string {
	var out []string
	for _, r := range ratings {
		switch r.Verdict {
		case record.MissedReq:
			out = append(out, fmt.Sprintf("section %s is beyond its %s rating of %s (%s)", r.Section, r.Quantity, r.Text, r.Source))
		case record.NotShownReq:
			out = append(out, fmt.Sprintf("section %s is not shown to keep its %s rating of %s (%s)", r.Section, r.Quantity, r.Text, r.Source))
		}
	}
	return out
}

func (s *solved) thinned(say func(string, ...any)) {
	for k, w := range s.steady.Sections {
		if n := s.steady.Grid.Cells[k]; len(w.ZI) < n {
			say("section %s is compared at %d of its %d cells, evenly spread", s.net.Sections[k].Name, len(w.ZI), n)
		}
	}
}

// realised says which complex impedances the time-domain run replaced.
func (s *solved) realised(say func(string, ...any)) {
	parts := append(append([]design.Part(nil), s.design.Loads...), s.design.Elements...)
	for i, p := range parts {
		z := s.net.Branches[s.net.Parts[i].Branches[0]]
		if k := p.Impedance.Kind; (k == design.Complex || k == design.Matched) && (z.L > 0 || z.C > 0) {
			say("%s is realised in time as a %s that has its impedance at the design frequency; transients see it so", p.Name, realisedAs(z))
		}
	}
	src := s.net.Source
	if s.design.Source.Impedance.Kind == design.Complex && (src.L > 0 || src.C > 0) {
		say("the source impedance is realised in time as a series combination that has its value at the design frequency")
	}
	if s.design.Convention == design.Physics {
		say("complex values were given for e^(-iwt) and conjugated on reading")
	}
}
