package report

import (
	"strings"
	"testing"

	"linewitness/sim/record"
)

// Curves without a difference worth a word stand two in a row; one that is not
// excellent brings the words and grades back for all.
func TestFaithful(t *testing.T) {
	best := record.Difference{Value: 0.001, Word: "excellent", Grade: 1, Spread: 1}
	curve := func(subject string, gdm record.Difference) record.Fidelity {
		return record.Fidelity{Subject: subject, Curve: "|V|", Points: 20, ADM: best, FDM: best, GDM: gdm}
	}
	fs := []record.Fidelity{curve("a", best), curve("b", best), {Subject: "c", Curve: "|V|", Note: "flat"}, curve("d", best)}
	if !faithful(fs) {
		t.Error("excellent curves are not faithful")
	}
	table := fidelityPairs(fs)
	if len(table.Rows) != 2 || len(table.Rows[0]) != len(table.Columns) || table.Rows[0][6].Text != "d, |V|" {
		t.Errorf("rows %+v", table.Rows)
	}
	if got := notGraded(fs); got != " Not graded: c, |V| (flat)." {
		t.Errorf("%q", got)
	}
	for name, worse := range map[string]record.Difference{
		"the word": {Word: "good", Grade: 1, Spread: 1}, "the grade": {Word: "excellent", Grade: 2, Spread: 1}, "the spread": {Word: "excellent", Grade: 1, Spread: 2},
	} {
		if faithful(append(fs, curve("e", worse))) {
			t.Errorf("faithful although %s is not the best", name)
		}
	}
	if faithful([]record.Fidelity{{Note: "flat"}}) {
		t.Error("nothing graded is faithful")
	}
	if got := fidelityTable(fs).Columns; !strings.Contains(got[2].Head, "ADM") {
		t.Errorf("columns %+v", got)
	}
}
