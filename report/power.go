package report

import "linewitness/sim/record"

// power writes where the power goes, by both witnesses.
func (d *document) power(*record.Case) {}
