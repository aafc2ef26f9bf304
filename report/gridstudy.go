package report

import "linewitness/sim/record"

// gridStudy writes what the grids make of every figure.
func (d *document) gridStudy(c *record.Case) {}
