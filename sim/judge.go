package sim

import (
	"context"
	"fmt"
	"math"
	"math/cmplx"
	"slices"
	"strings"

	"linewitness/fdtd"
	"linewitness/sim/design"
	"linewitness/sim/record"
)

// A judgement is one limit of a requirement to be judged in one case, in SI
// units.
type judgement struct {
	req      design.Requirement
	subject  string
	min, max *design.Limit
	values   []witnessed
	spread   float64 // uncertainty of a figure of the time domain only, SI
	figure   *measured
	whole    float64 // see studied
	unit     string  // of limits given without one
	note     string
	// unfinished is set for a peak from a run that ended before the network was
	// at rest: a larger one may come, so it can be missed but not met.
	unfinished bool
}

// witnessed is a value, what it may be at least and at most, and the witness who
// gave it.
type witnessed struct {
	value, low, high float64
	method           string
}

// timed is a value of the time domain only.
func timed(value, spread float64) []witnessed {
	return []witnessed{{value, value - spread, value + spread, fdtdOnly}}
}

// The names of the methods in a record.
const (
	byPhasor = "phasor"
	byFDTD   = "fdtd"
	fdtdOnly = "fdtd only"
	byBoth   = "both"
)

// judge judges the requirements of a design in one case, and studies the figure
// of each; all holds every solved case by name. It is cut short if ctx ends.
func judge(ctx context.Context, c *solved, all map[string]*solved) ([]record.Requirement, []record.Study) {
	var reqs []record.Requirement
	var studies []record.Study
	for _, r := range c.design.Requirements {
		if !slices.Contains(r.Cases, c.name) || ctx.Err() != nil {
			continue
		}
		for _, j := range c.judgements(r, all) {
			reqs = append(reqs, j.record())
			studies = append(studies, c.study(j.label()))
		}
	}
	return reqs, studies
}

// label is what a study is to know of a judgement.
func (j *judgement) label() studied {
	return studied{
		id: j.req.ID, quantity: string(j.req.Quantity), subject: j.subject,
		scale: scaleFor(j.limitUnit()), figure: j.figure, spread: j.spread, whole: j.whole,
	}
}

// judgements is one judgement for most requirements, and one for each window
// of an impedance.
func (s *solved) judgements(r design.Requirement, all map[string]*solved) []judgement {
	one := judgement{req: r, subject: subject(r), min: r.Min, max: r.Max}
	switch r.Quantity {
	case design.InputImpedance:
		return s.impedance(one)
	case design.PeakVoltage, design.PeakCurrent:
		pick, unit := s.peak(r)
		p := s.stressed(pick)
		one.values = timed(p.value, p.spread)
		one.spread, one.figure = p.spread, &measured{pick: pick}
		one.note, one.unfinished = s.stressNote(pick, unit), !s.finished()
	case design.Overshoot:
		s.overshoot(&one)
	case design.SettleTime:
		s.settleTime(&one)
	case design.Agreement:
		one.figure = s.agreementFigure()
		low, high := one.figure.bounds(fdtdView(0))
		one.values = []witnessed{{s.compared.Found(), low, high, byBoth}}
	default:
		s.steadyValues(&one, all)
	}
	return []judgement{one}
}

// impedance makes a judgement of each window on an input impedance.
func (s *solved) impedance(one judgement) []judgement {
	f := finder{s.net}
	var out []judgement
	add := func(what string, min, max *design.Limit, part func(complex128) float64) {
		q := func(st *state) float64 { return part(f.impedance(st, one.req)) }
		j := one
		j.subject += ", " + what
		j.min, j.max, j.unit = min, max, "ohm"
		j.take(s.measure(one.req, q))
		j.whole = cmplx.Abs(f.impedance(s.exact, one.req))
		out = append(out, j)
	}
	if w := one.req.R; w != nil {
		add("resistance", w.Min, w.Max, func(z complex128) float64 { return real(z) })
	}
	if w := one.req.X; w != nil {
		add("reactance", w.Min, w.Max, func(z complex128) float64 { return imag(z) })
	}
	if w := one.req.Within; w != nil {
		limit := &design.Limit{SI: w.Radius, Unit: "ohm", Text: w.Text}
		add("distance from centre", nil, limit, func(z complex128) float64 { return cmplx.Abs(z - w.Of) })
	}
	return out
}

// A stressed value is a peak with its uncertainty.
type stressed struct{ value, spread float64 }

// peak picks the largest voltage or current along a section, at a junction, or
// anywhere, and tells its unit.
func (s *solved) peak(r design.Requirement) (pick func(*fdtd.Stress) float64, unit string) {
	f := finder{s.net}
	unit = "V"
	if r.Quantity == design.PeakCurrent {
		unit = "A"
	}
	return func(run *fdtd.Stress) float64 {
		v := r.Quantity == design.PeakVoltage
		switch {
		case r.Section != "" && v:
			return run.Sections[f.section(r.Section)].Voltage.Value
		case r.Section != "":
			return run.Sections[f.section(r.Section)].Current.Value
		case r.At != "" && v:
			return run.Junctions[f.junction(r.At)].Value
		case r.At != "":
			return peakCurrentAt(s, run, f.junction(r.At))
		case v:
			return largestVoltage(run)
		}
		top := run.Current.Value
		for j := range s.net.Junctions {
			top = math.Max(top, peakCurrentAt(s, run, j))
		}
		return top
	}, unit
}

func largestVoltage(s *fdtd.Stress) float64 {
	top := s.Voltage.Value
	for _, p := range s.Junctions {
		top = math.Max(top, p.Value)
	}
	return top
}

// peakCurrentAt is the largest current of anything that ends at junction j.
func peakCurrentAt(c *solved, s *fdtd.Stress, j int) float64 {
	top := 0.0
	if c.net.Source.At == j {
		top = s.Source.Value
	}
	for p, part := range c.net.Parts {
		switch j {
		case part.A:
			top = math.Max(top, s.Parts[p].Value)
		case part.B: // what flows in at A flows out at B, but for a transformer
			top = math.Max(top, s.Parts[p].Value/c.net.Branches[part.Branches[0]].Turns())
		}
	}
	for k, sec := range c.net.Sections {
		if sec.From == j {
			top = math.Max(top, s.Sections[k].FromCurrent)
		}
		if sec.To == j {
			top = math.Max(top, s.Sections[k].ToCurrent)
		}
	}
	return top
}

func (s *solved) overshoot(j *judgement) {
	r := j.req
	f := finder{s.net}
	r.Quantity = design.SteadyVoltage
	steady := f.steady(r)(s.exact)
	r.Quantity = design.PeakVoltage
	pick, unit := s.peak(r)
	p := s.stressed(pick)
	j.spread = p.spread / steady
	j.values = timed(p.value/steady-1, j.spread)
	j.figure = &measured{pick: func(t *fdtd.Stress) float64 { return pick(t)/steady - 1 }}
	j.note, j.unfinished = s.stressNote(pick, unit), !s.finished()
}

func (s *solved) settleTime(j *judgement) {
	at := -1
	if j.req.At != "" {
		at = finder{s.net}.junction(j.req.At)
	}
	pick := func(run *fdtd.Stress) float64 { return run.SettleTime(at, j.req.Settled) }
	settled := s.stressed(pick)
	j.figure = &measured{pick: pick}
	j.values = timed(settled.value, settled.spread)
	j.spread = settled.spread
	// Before a stop nothing more comes that the source has not sent.
	j.unfinished = s.net.Source.Stop == nil && !s.finished()
	if math.IsNaN(settled.value) && s.net.Source.Stop != nil {
		j.note = fmt.Sprintf("not within %.3g %% before the source stops", j.req.Settled*100)
	} else if math.IsNaN(settled.value) {
		j.note = fmt.Sprintf("not within %.3g %% when the run ended after %.3g us", j.req.Settled*100, s.stress.Duration*1e6)
	} else if j.unfinished {
		j.note = "the run ended before the network was at rest"
	} else if math.IsNaN(settled.spread) {
		j.note = "the source jumps, and with the bare jump it is not reached on every grid; give the real rise or fall"
	}
}

// subject says in words what a requirement is about.
func subject(r design.Requirement) string {
	var parts []string
	add := func(s string) { parts = append(parts, s) }
	switch {
	case r.Section != "" && r.End != "":
		add(fmt.Sprintf("%s, %s end", r.Section, r.End))
	case r.Section != "":
		add("along " + r.Section)
	case r.At != "":
		add("at " + r.At)
	case r.Load != "":
		add(r.Load)
	case r.Between[0] != "":
		add(r.Between[0] + " to " + r.Between[1])
	case r.Quantity == design.Efficiency:
		add("all loads")
	default:
		add("whole network")
	}
	if r.Quantity == design.SettleTime {
		add(fmt.Sprintf("to %.3g %%", r.Settled*100))
	}
	if r.Reference != nil {
		add("reference " + r.Reference.Text)
	}
	if r.RelativeTo != "" {
		add("change from " + r.RelativeTo)
	}
	return strings.Join(parts, ", ")
}
