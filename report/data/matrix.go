package data

import "linewitness/sim/record"

// matrixObject has a cell for each case in the order of "cases".
func matrixObject(m record.Matrix) object {
	rows := make(list, len(m.Rows))
	for i, r := range m.Rows {
		cells := make(list, len(r.Cells))
		for k, c := range r.Cells {
			cells[k] = cellObject(c)
		}
		rows[i] = object{{"id", r.ID}, {"label", r.Label}, {"unit", r.Unit}, {"limit_text", r.Limit}, {"cells", cells}}
	}
	return object{{"cases", stringList(m.Cases)}, {"rows", rows}}
}

// cellObject has no value where the requirement is not judged in the case, and
// no verdict for a key figure.
func cellObject(c record.MatrixCell) object {
	var value, difference, verdict any
	if c.Present {
		value, difference = c.Value, c.Difference
	}
	if c.Verdict != "" {
		verdict = string(c.Verdict)
	}
	return object{{"present", c.Present}, {"value", value}, {"difference", difference}, {"verdict", verdict}, {"worst", c.Worst}}
}
