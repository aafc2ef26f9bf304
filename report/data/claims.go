package data

import "linewitness/sim/record"

func claimList(qs []record.Claim) list {
	l := make(list, len(qs))
	for i := range qs {
		l[i] = claimObject(&qs[i])
	}
	return l
}

// claimObject has its values in "unit": complex numbers if both parts are
// claimed, else plain ones.
func claimObject(q *record.Claim) object {
	slips := make(list, len(q.Slips))
	for i, s := range q.Slips {
		slips[i] = object{
			{"name", s.Name},
			{"where", s.Where},
			{"text", s.Text},
			{"value", claimed(q, s.Value)},
			{"also", stringList(s.Also)},
			{"explains", stringList(s.Explains)},
		}
	}
	return object{
		{"id", q.ID},
		{"quantity", q.Quantity},
		{"subject", q.Subject},
		{"unit", q.Unit},
		{"complex", q.Complex},
		{"claimed", claimed(q, q.Claimed)},
		{"phasor", claimed(q, q.Phasor)},
		{"fdtd", claimed(q, q.FDTD)},
		{"tolerance", q.Tolerance},
		{"difference", q.Difference},
		{"uncertainty", q.Uncertainty},
		{"verdict", string(q.Verdict)},
		{"finding", q.Finding},
		{"slips", slips},
		{"claimed_text", q.ClaimedText},
		{"tolerance_text", q.ToleranceText},
		{"text", q.Text},
		{"source", q.Source},
	}
}

func claimed(q *record.Claim, z complex128) any {
	if q.Complex {
		return z
	}
	return real(z)
}
