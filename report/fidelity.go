package report

import "linewitness/sim/record"

// fidelity writes the feature selective validation of a case.
func (d *document) fidelity(c *record.Case) {}
