package record

import "testing"

// TestRank: the verdicts are ordered from best to worst, and an unknown one is
// not taken for a good one.
func TestRank(t *testing.T) {
	order := []Verdict{Verified, NotShown, Doubted, Missed, Disagree, Unsettle}
	for i := 1; i < len(order); i++ {
		if order[i-1].Rank() >= order[i].Rank() {
			t.Errorf("%q does not rank below %q", order[i-1], order[i])
		}
	}
	if Verdict("").Rank() < Unsettle.Rank() {
		t.Error("an empty verdict ranks above not settled")
	}
}
