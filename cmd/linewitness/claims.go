package main

import (
	"math/cmplx"

	"linewitness/report/format"
	"linewitness/sim/record"
)

// claimRows are the rows of the table of claims, header first; there are none
// without claims.
func claimRows(qs []record.Claim) [][]string {
	if len(qs) == 0 {
		return nil
	}
	rows := [][]string{{"id", "quantity", "claimed", "found", "verdict", "first slip"}}
	for i := range qs {
		q := &qs[i]
		quantity := q.Quantity
		if q.Subject != "" {
			quantity += " " + q.Subject
		}
		rows = append(rows, []string{q.ID, quantity, claimed(q, q.Claimed), claimed(q, found(q)), string(q.Verdict), firstSlip(q)})
	}
	return rows
}

// found is the closed form's figure, or that of the time domain where only it
// has one.
func found(q *record.Claim) complex128 {
	if cmplx.IsNaN(q.Phasor) {
		return q.FDTD
	}
	return q.Phasor
}

// claimed is a value of a claim in its unit.
func claimed(q *record.Claim, z complex128) string {
	if q.Complex {
		return typeable.Replace(format.Phasor(z, q.Unit))
	}
	return inUnit(real(z), q.Unit)
}

// firstSlip is the most likely slip, or that none is known, of a claim that is
// contradicted.
func firstSlip(q *record.Claim) string {
	switch {
	case q.Verdict != record.Contradicted:
		return ""
	case len(q.Slips) == 0:
		return "no single known slip explains it"
	case q.Slips[0].Where == "":
		return q.Slips[0].Name
	}
	return q.Slips[0].Name + ", " + q.Slips[0].Where
}
