package data

import "linewitness/sim/record"

func stressObject(s record.Stress) (object, error) {
	var sections named
	for _, x := range s.Sections {
		sections.add(x.Name, object{
			{"peak_voltage_v", x.Voltage},
			{"peak_voltage_uncertainty_v", x.VoltageUncertainty},
			{"at_m", x.VoltageAt},
			{"time_s", x.VoltageTime},
			{"peak_current_a", x.Current},
			{"peak_current_uncertainty_a", x.CurrentUncertainty},
			{"current_at_m", x.CurrentAt},
			{"current_time_s", x.CurrentTime},
			{"steady_voltage_v", x.SteadyVoltage},
		})
	}
	all, err := sections.object("section")
	if err != nil {
		return nil, err
	}
	return object{
		{"profile", s.Profile},
		{"phase", phaseOf(s)},
		{"duration_s", s.Duration},
		{"peak_voltage", peakObject("v", s.Voltage)},
		{"peak_current", peakObject("a", s.Current)},
		{"overshoot", s.Overshot},
		{"sections", all},
	}, nil
}

// phaseOf is "worst" if every start phase was considered and "given" if only
// the one that the design file names; the angle itself stands with each peak.
func phaseOf(s record.Stress) string {
	if s.Worst {
		return "worst"
	}
	return "given"
}

func peakObject(unit string, p record.Peak) object {
	return object{
		{"value_" + unit, p.Value},
		{"uncertainty_" + unit, p.Uncertainty},
		{"section", p.Section},
		{"at_m", p.At},
		{"time_s", p.Time},
		{"phase_deg", p.Phase},
	}
}

func gridObject(g record.Grid) (object, error) {
	var sections named
	for _, x := range g.Sections {
		sections.add(x.Name, object{
			{"cells", x.Cells},
			{"courant", x.Courant},
			{"cells_per_wavelength", x.CellsPerWavelength},
			{"cell_m", x.Cell},
			{"points", x.Points},
			{"phase_error_deg", x.PhaseErrorDegrees},
		})
	}
	all, err := sections.object("section")
	if err != nil {
		return nil, err
	}
	return object{
		{"steps_per_period", g.StepsPerPeriod},
		{"step_s", g.Step},
		{"cell_updates", g.Updates},
		{"sections", all},
	}, nil
}
