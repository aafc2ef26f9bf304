package data

import "linewitness/sim/record"

func settlingObject(s record.Settling) (object, error) {
	var ringing named
	for _, r := range s.RingDown {
		ringing.add(r.Name, object{
			{"to_minus_20_db_s", r.To20},
			{"to_minus_40_db_s", r.To40},
			{"to_minus_60_db_s", r.To60dB},
		})
	}
	ringDown, err := ringing.object("junction")
	if err != nil {
		return nil, err
	}
	return object{
		{"settled", s.Settled},
		{"time_s", s.Time},
		{"periods", s.Periods},
		{"residual", s.Residual},
		{"loop_factor", s.LoopFactor},
		{"round_trip_s", s.RoundTrip},
		{"mean", s.Mean},
		{"harmonic", s.Harmonic},
		{"to_1_percent_s", s.To1Percent},
		{"decay", s.Decay},
		{"long_path_s", s.LongPath},
		{"ramp_s", s.Ramp},
		{"earliest_s", s.Earliest},
		{"passes", s.Passes},
		{"predicted", predictedObject(s.Predicted)},
		{"windows", windowList(s.Curve)},
		{"places", placeList(s.Places)},
		{"echoes", echoList(s.Echoes)},
		{"ring_down", ringDown},
	}, nil
}

func predictedObject(p record.PredictedSettling) object {
	return object{
		{"loop_factor", p.LoopFactor},
		{"q", p.Q},
		{"time_constant_s", p.TimeConstant},
		{"to_10_percent_s", p.To10Percent},
		{"to_1_percent_s", p.To1Percent},
		{"to_0_1_percent_s", p.ToTenth},
		{"ring_down_60_db_s", p.RingDown60},
		{"settled_s", p.Settled},
	}
}

func windowList(ps []record.SettlingPoint) list {
	l := make(list, len(ps))
	for i, p := range ps {
		l[i] = object{
			{"time_s", p.Time},
			{"gap_s", p.Gap},
			{"change", p.Change},
			{"estimate", p.Estimate},
			{"mean", p.Mean},
			{"harmonic", p.Harmonic},
			{"passed", p.Passed},
		}
	}
	return l
}

// placeList is a list, not an object, because a load may have the name of a
// junction.
func placeList(ps []record.SettlingPlace) list {
	l := make(list, len(ps))
	for i, p := range ps {
		l[i] = object{
			{"name", p.Name},
			{"kind", p.Kind},
			{"quantity", p.Quantity},
			{"to_10_percent_s", p.To10Percent},
			{"to_1_percent_s", p.To1Percent},
			{"to_0_1_percent_s", p.ToTenth},
		}
	}
	return l
}

func echoList(es []record.Echo) list {
	l := make(list, len(es))
	for i, e := range es {
		l[i] = object{{"name", e.Name}, {"time_s", e.Time}}
	}
	return l
}
