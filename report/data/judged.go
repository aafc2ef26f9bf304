package data

import (
	"math"

	"linewitness/sim/record"
)

func agreementObject(a record.Agreement) (object, error) {
	var sections named
	for _, x := range a.Sections {
		sections.add(x.Name, object{
			{"voltage", x.Voltage},
			{"voltage_expected", x.ExpectedVoltage},
			{"voltage_at_m", x.VoltageAt},
			{"voltage_scale_v", x.VoltageScale},
			{"current", x.Current},
			{"current_expected", x.ExpectedCurrent},
			{"current_at_m", x.CurrentAt},
			{"current_scale_a", x.CurrentMax},
		})
	}
	all, err := sections.object("section")
	if err != nil {
		return nil, err
	}
	return object{
		{"voltage", a.Voltage},
		{"current", a.Current},
		{"rms", a.RMS},
		{"expected", a.Expected},
		{"limit", a.Limit},
		{"worst", object{
			{"section", a.Worst.Section},
			{"at_m", a.Worst.At},
			{"quantity", a.Worst.Quantity},
		}},
		{"sections", all},
	}, nil
}

func requirementList(rs []record.Requirement) list {
	l := make(list, len(rs))
	for i, r := range rs {
		l[i] = requirementObject(r)
	}
	return l
}

// requirementObject has "limit" as the number that "margin" is the distance
// to; the words of the limit, and both numbers where there are two, follow.
func requirementObject(r record.Requirement) object {
	return object{
		{"id", r.ID},
		{"quantity", r.Quantity},
		{"subject", r.Subject},
		{"section", r.Section},
		{"value", r.Value},
		{"limit", nearerLimit(r)},
		{"margin", r.Margin},
		{"uncertainty", r.Uncertainty},
		{"unit", r.Unit},
		{"verdict", string(r.Verdict)},
		{"method", r.Method},
		{"limit_text", r.Limit},
		{"min", optional(r.Min)},
		{"max", optional(r.Max)},
		{"margin_db", r.MarginDB},
		{"margin_percent", r.MarginPercent},
		{"note", r.Note},
		{"text", r.Text},
		{"source", r.Source},
	}
}

func nearerLimit(r record.Requirement) any {
	switch {
	case r.Min == nil:
		return optional(r.Max)
	case r.Max == nil || math.Abs(r.Value-*r.Min) < math.Abs(*r.Max-r.Value):
		return *r.Min
	}
	return *r.Max
}

func optional(x *float64) any {
	if x == nil {
		return nil
	}
	return *x
}
