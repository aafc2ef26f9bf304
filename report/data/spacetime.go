package data

import "linewitness/sim/record"

// spaceTimeObject says what the map covers; the map itself is a figure.
func spaceTimeObject(m record.SpaceTime) object {
	path := make(list, len(m.Path))
	for i, p := range m.Path {
		path[i] = object{
			{"section", p.Section},
			{"reversed", p.Reversed},
			{"from_m", p.From},
			{"to_m", p.To},
		}
	}
	quantity := "instantaneous voltage"
	switch {
	case m.Crests:
		quantity = "crests of the envelope of the voltage"
	case m.Envelope:
		quantity = "envelope of the voltage"
	}
	out := object{
		{"path", path},
		{"quantity", quantity},
		{"phase_deg", m.Phase},
		{"rows", len(m.T)},
		{"columns", len(m.Z)},
	}
	if len(m.T) > 0 {
		out = append(out, member{"until_s", m.T[len(m.T)-1]})
	}
	return out
}

func bouncesObject(b record.Bounces) object {
	sections, coefficients, arrivals := make(list, len(b.Sections)), make(list, len(b.Coefficients)), make(list, len(b.Arrivals))
	for i, s := range b.Sections {
		sections[i] = object{
			{"section", s.Section},
			{"from", s.From},
			{"to", s.To},
			{"z0_ohm", s.Z0},
			{"delay_s", s.Delay},
			{"kept", s.Kept},
		}
	}
	for i, c := range b.Coefficients {
		coefficients[i] = object{
			{"junction", c.Junction},
			{"from_left", c.FromLeft},
			{"from_right", c.FromRight},
			{"through_right", c.ThroughRight},
			{"through_left", c.ThroughLeft},
		}
	}
	for i, a := range b.Arrivals {
		arrivals[i] = object{
			{"time_s", a.Time},
			{"junction", a.Junction},
			{"section", a.Section},
			{"step_v", a.Step},
			{"voltage_v", a.Voltage},
		}
	}
	return object{
		{"sections", sections},
		{"coefficients", coefficients},
		{"arrivals", arrivals},
		{"note", b.Note},
	}
}

func historyList(rs []record.Revision) list {
	l := make(list, len(rs))
	for i, r := range rs {
		l[i] = object{{"revision", r.Revision}, {"date", r.Date}, {"by", r.By}, {"text", r.Text}}
	}
	return l
}
