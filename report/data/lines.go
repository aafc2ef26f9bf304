package data

import (
	"math"

	"linewitness/sim/record"
)

// lineObject is a kind of line. A residual of 0 stands for a form that is not
// there, and a field of 0 for one that is not known.
func lineObject(l record.ModelLine) object {
	pedigree, fit := make(list, len(l.Pedigree)), make(list, len(l.Fit))
	for i, p := range l.Pedigree {
		pedigree[i] = object{{"what", p.What}, {"text", p.Text}, {"kind", p.Kind}, {"note", p.Note}}
	}
	for i, p := range l.Fit {
		fit[i] = object{
			{"frequency_hz", p.Frequency},
			{"given_db_per_m", p.Given},
			{"fitted_db_per_m", p.Fitted},
			{"text", p.Text},
		}
	}
	return object{
		{"text", l.Text},
		{"model", l.Model},
		{"series_residual", known(l.SeriesResidual)},
		{"shunt_residual", known(l.ShuntResidual)},
		{"field_per_volt_per_m", known(l.FieldPerVolt)},
		{"pedigree", pedigree},
		{"loss_fit", fit},
	}
}

// known is NaN, and so null, for a zero that says that nothing is there.
func known(x float64) float64 {
	if x == 0 {
		return math.NaN()
	}
	return x
}

func linesObject(ls []record.ModelLine) (object, error) {
	var lines named
	for _, l := range ls {
		lines.add(l.Name, lineObject(l))
	}
	return lines.object("line")
}

func ratingList(rs []record.Rating) list {
	l := make(list, len(rs))
	for i, r := range rs {
		l[i] = ratingObject(r)
	}
	return l
}

// ratingObject has its amplitudes in "unit", peak.
func ratingObject(r record.Rating) object {
	return object{
		{"section", r.Section},
		{"quantity", r.Quantity},
		{"unit", r.Unit},
		{"steady", r.Steady},
		{"steady_at_m", r.SteadyAt},
		{"peak", r.Peak},
		{"peak_at_m", r.PeakAt},
		{"peak_time_s", r.PeakTime},
		{"uncertainty", r.Uncertainty},
		{"rated", r.Rated},
		{"rated_text", r.Text},
		{"source", r.Source},
		{"advisory", r.Advisory},
		{"derating_db", r.Derating},
		{"allowed", r.Allowed},
		{"margin", r.Margin},
		{"margin_db", r.MarginDB},
		{"margin_percent", r.MarginPercent},
		{"verdict", string(r.Verdict)},
		{"field_v_per_m", known(r.Field)},
	}
}
