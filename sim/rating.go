package sim

import (
	"math"
	"slices"

	"linewitness/fdtd"
	"linewitness/sim/design"
	"linewitness/sim/record"
)

// ratings compares every rated section with its rating, worst first.
func (s *solved) ratings() []record.Rating {
	var out []record.Rating
	b := s.likely()
	for k, sec := range s.design.Sections {
		peaks := s.stress.Sections[k]
		if l := sec.Rating.Voltage; l != nil {
			r := s.rating(sec.Name, "voltage", "V", sec.Rating.MarginDB, l, sec.Rating.VoltageSource)
			r.steady(s.exact.voltage[k].largest, s.found.voltage[k].largest, b.crests[k].v)
			r.peak(peaks.Voltage, s.stressed(func(t *fdtd.Stress) float64 { return t.Sections[k].Voltage.Value }).spread)
			r.judge(s.finished())
			r.Field = math.Max(r.Steady, r.Peak) * s.fieldPerVolt(sec.Line)
			out = append(out, r.Rating)
		}
		if l := sec.Rating.Current; l != nil {
			r := s.rating(sec.Name, "current", "A", sec.Rating.MarginDB, l, sec.Rating.CurrentSource)
			r.steady(s.exact.current[k].largest, s.found.current[k].largest, b.crests[k].i)
			r.peak(peaks.Current, s.stressed(func(t *fdtd.Stress) float64 { return t.Sections[k].Current.Value }).spread)
			r.judge(s.finished())
			out = append(out, r.Rating)
		}
	}
	slices.SortStableFunc(out, func(a, b record.Rating) int {
		switch {
		case a.MarginDB < b.MarginDB:
			return -1
		case a.MarginDB > b.MarginDB:
			return 1
		}
		return 0
	})
	return out
}

// A rated value is being compared with its rating.
type rated struct {
	record.Rating
	steadySpread, peakSpread float64
}

func (s *solved) rating(section, quantity, unit string, marginDB float64, l *design.Limit, source string) rated {
	return rated{Rating: record.Rating{
		Section: section, Quantity: quantity, Unit: unit,
		Rated: l.SI, Text: l.Text, Source: source, Advisory: source == design.CableTable,
		Derating: marginDB, Allowed: l.SI * math.Pow(10, -marginDB/20),
	}}
}

// steady takes the larger of the two witnesses' values.
func (r *rated) steady(exact, found extreme, spread float64) {
	e := exact
	if found.value > e.value {
		e = found
	}
	r.Steady, r.SteadyAt, r.steadySpread = e.value, e.at, spread
}

func (r *rated) peak(p fdtd.Peak, spread float64) {
	r.Peak, r.PeakAt, r.PeakTime, r.peakSpread = p.Value, p.At, p.Time, spread
}

// judge compares the larger of the steady and the largest value ever with what
// is allowed; a run that is not finished can show a rating passed, not kept.
func (r *rated) judge(finished bool) {
	worst := math.Max(r.Steady, r.Peak)
	r.Uncertainty = r.peakSpread
	if r.Steady >= r.Peak {
		r.Uncertainty = r.steadySpread
	}
	r.Margin = r.Allowed - worst
	r.MarginDB = 20 * math.Log10(r.Allowed/worst)
	r.MarginPercent = 100 * r.Margin / r.Allowed
	r.Verdict = outcome(worst, worst-r.Uncertainty, worst+r.Uncertainty, nil, &r.Allowed)
	if !finished {
		r.Verdict = atMostNotShown(r.Verdict)
	}
}

// fieldPerVolt is that of a kind of line, by name.
func (s *solved) fieldPerVolt(name string) float64 {
	for _, l := range s.design.Lines {
		if l.Name == name {
			return l.FieldPerVolt
		}
	}
	return 0
}
