package data

import "linewitness/sim/record"

// steadyObject is one witness's steady state.
func steadyObject(s record.Steady) (object, error) {
	var sections, loads, junctions named
	for _, x := range s.Sections {
		sections.add(x.Name, sectionObject(x))
	}
	for _, x := range s.Loads {
		loads.add(x.Name, object{{"v", x.V}, {"i", x.I}, {"power_w", x.Power}})
	}
	for _, x := range s.Junctions {
		junctions.add(x.Name, object{{"v", x.V}})
	}
	out := object{{"source", sourceObject(s.Source)}}
	for _, part := range []struct {
		key, kind string
		members   named
	}{{"sections", "section", sections}, {"loads", "load", loads}, {"junctions", "junction", junctions}} {
		o, err := part.members.object(part.kind)
		if err != nil {
			return nil, err
		}
		out = append(out, member{part.key, o})
	}
	return out, nil
}

func sourceObject(s record.SteadySource) object {
	return object{
		{"v", s.V},
		{"i", s.I},
		{"impedance", s.Impedance},
		{"power_w", s.Power},
		{"available_power_w", s.Available},
	}
}

func sectionObject(s record.SteadySection) object {
	return object{
		{"from", endObject(s.From)},
		{"to", endObject(s.To)},
		{"voltage_max", extremeObject("value_v", s.VoltageMax)},
		{"voltage_min", extremeObject("value_v", s.VoltageMin)},
		{"current_max", extremeObject("value_a", s.CurrentMax)},
		{"loss_w", s.Loss},
	}
}

func endObject(e record.End) object {
	return object{
		{"v", e.V},
		{"i", e.I},
		{"impedance", e.Impedance},
		{"reflection", e.Reflection},
		{"vswr", e.VSWR},
	}
}

func extremeObject(key string, e record.Extreme) object {
	return object{{key, e.Value}, {"at_m", e.At}}
}
