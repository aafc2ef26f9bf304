package data

import "linewitness/sim/record"

// convergenceObject has the figures in the order of the record, each in its
// own "unit", finest grid first.
func convergenceObject(c record.Convergence) object {
	grids, figures := make(list, len(c.Grids)), make(list, len(c.Studies))
	for i, g := range c.Grids {
		grids[i] = object{{"steps_per_period", g.StepsPerPeriod}, {"cells", g.Cells}, {"step_s", g.Step}}
	}
	for i, s := range c.Studies {
		figures[i] = studyObject(s)
	}
	return object{{"grids", grids}, {"skipped", c.Skipped}, {"figures", figures}}
}

// studyObject has no index, and so no factor, where the study gives none.
func studyObject(s record.Study) object {
	return object{
		{"id", s.ID},
		{"quantity", s.Quantity},
		{"subject", s.Subject},
		{"unit", s.Unit},
		{"values", numberList(s.Values)},
		{"behaviour", string(s.Behaviour)},
		{"order", s.Order},
		{"extrapolated", s.Extrapolated},
		{"factor", known(s.Factor)},
		{"gci", s.GCI},
		{"gci_percent", s.GCIPercent},
		{"phasor", s.Phasor},
		{"error", s.Error},
		{"uncertainty", s.Uncertainty},
		{"uncertainty_parts", object{
			{"grid", s.Grid},
			{"settling", s.Settling},
			{"form", s.Form},
			{"rounding", s.Rounding},
		}},
		{"explained", s.Explained},
	}
}

func numberList(xs []float64) list {
	l := make(list, len(xs))
	for i, x := range xs {
		l[i] = x
	}
	return l
}

func fidelityList(fs []record.Fidelity) list {
	l := make(list, len(fs))
	for i, f := range fs {
		l[i] = object{
			{"subject", f.Subject},
			{"curve", f.Curve},
			{"points", f.Points},
			{"note", f.Note},
			{"adm", measureObject(f.ADM)},
			{"fdm", measureObject(f.FDM)},
			{"gdm", measureObject(f.GDM)},
		}
	}
	return l
}

func measureObject(d record.Difference) object {
	return object{
		{"value", d.Value},
		{"word", d.Word},
		{"histogram", numberList(d.Histogram[:])},
		{"grade", d.Grade},
		{"spread", d.Spread},
	}
}
