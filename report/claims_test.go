package report

import (
	"fmt"
	"math"
	"strings"
	"testing"

	"linewitness/report/internal/reporttest"
	"linewitness/sim/record"
)

// disputing is a record of cases with claims of the given verdicts.
func disputing(cases ...[]record.ClaimVerdict) *document {
	d := judged(nil, "a", "b", "c")
	n := 0
	for i, vs := range cases {
		for _, v := range vs {
			n++
			d.r.Cases[i].Claims = append(d.r.Cases[i].Claims, record.Claim{ID: fmt.Sprintf("C%d", n), Verdict: v})
		}
	}
	return d
}

// The verdict's reason names the claims that are not confirmed.
func TestReasonOfClaims(t *testing.T) {
	const yes, no, open = record.Confirmed, record.Contradicted, record.ClaimOpen
	type verdicts = []record.ClaimVerdict
	for _, c := range []struct {
		d    *document
		want string
	}{
		{disputing(verdicts{yes}, verdicts{yes}), "The design states no requirement; every claim is confirmed; the two solutions differ by at most 0 % of a section's largest value."},
		{disputing(verdicts{no, yes, no}, verdicts{no}), "Claims C1, C3 are contradicted in a. Claim C4 is contradicted in b."},
		{disputing(verdicts{open}, verdicts{no}), "Claim C2 is contradicted in b. Claim C1 is not shown in a."},
	} {
		if got := readable(c.d.reason()); got != c.want {
			t.Errorf("reason %q, want %q", got, c.want)
		}
	}
}

// Two solutions that differ by less than the limit and more than is explained
// are not said to pass the limit.
func TestReasonOfUnexplained(t *testing.T) {
	d := judged(nil, "a")
	c := &d.r.Cases[0]
	c.Verdict, c.Agreement = record.Disagree, record.Agreement{Voltage: 0.001, Limit: 0.005}
	want := "In case a the two solutions differ by 0.100 %, which is inside the limit of 0.500 %, but more than the grid and the settling explain"
	if got := readable(d.reason()); got != want+"." {
		t.Errorf("reason %q", got)
	}
	c.Convergence.Studies = []record.Study{{ID: "R1", Phasor: 1, Error: 2, Uncertainty: 1}, {Quantity: "load_power", Subject: "aerial", Phasor: 1, Error: 2, Uncertainty: 1}}
	if got := readable(d.reason()); got != want+", in R1, load power, aerial." {
		t.Errorf("reason %q", got)
	}
}

// The cover of a record whose claims all hold says so.
func TestConfirmedClaims(t *testing.T) {
	r := reporttest.One("One", reporttest.Single(1), reporttest.Options{Loop: 0.5})
	r.Cases[0].Claims = []record.Claim{{ID: "C1", Quantity: "vswr", Unit: "1", Claimed: 1.5, Phasor: 1.5, FDTD: 1.5, Verdict: record.Confirmed}}
	all := readable(strings.Join(text(t, r, Options{}), "\n"))
	for _, s := range []string{"Claims confirmed.", "Claims: 1 confirmed."} {
		if !strings.Contains(all, s) {
			t.Errorf("the text lacks %q", s)
		}
	}
	if strings.Contains(strings.ToLower(all), noSlip) {
		t.Error("a slip is spoken of without need")
	}
}

func TestSlipText(t *testing.T) {
	q := &record.Claim{ID: "C1", Unit: "V rms", Complex: true}
	for _, c := range []struct {
		s    record.Slip
		want string
	}{
		{record.Slip{Name: "peak for rms", Value: 10}, "peak for rms: 10.00 V rms at 0.00°."},
		{record.Slip{Name: "sign of the reactance", Where: "load aerial", Value: 1i, Explains: []string{"C1"}}, "sign of the reactance at load aerial: 1.000 V rms at 90.00°."},
		{
			record.Slip{Name: "feet for metres", Where: "section main", Value: 1, Also: []string{"a", "b", "c"}, Explains: []string{"C1", "C2", "C4"}},
			"feet for metres on section main: 1.000 V rms at 0.00°; cannot be told from a, b and c; explains C2 and C4 too.",
		},
	} {
		if got := readable(slipText(q, &c.s)); got != c.want {
			t.Errorf("%q, want %q", got, c.want)
		}
	}
}

// Each set of claims is explained once, by its most likely slip.
func TestTogether(t *testing.T) {
	both := []string{"C1", "C2"}
	slips := []record.Slip{{Name: "first", Explains: both}, {Name: "second", Explains: both}, {Name: "alone", Explains: []string{"C1"}}}
	got := together([]record.Claim{{ID: "C1", Slips: slips}, {ID: "C2", Slips: slips[:2]}})
	if want := "One slip explains C1 and C2 together: first."; len(got) != 1 || got[0] != want {
		t.Errorf("%q, want %q", got, want)
	}
}

// The reason of a claim leads to its list of slips without naming the first
// twice, and has no bare infinity.
func TestClaimReason(t *testing.T) {
	one := []record.Slip{{Name: "feet for metres", Where: "section main"}}
	for _, c := range []struct {
		q    record.Claim
		want string
	}{
		{record.Claim{Verdict: record.Contradicted, Finding: "Too far. Most likely: feet for metres, section main.", Slips: one}, "Too far. One slip alone would give it:"},
		{
			record.Claim{Verdict: record.Contradicted, Finding: "Too far. Most likely: feet for metres, section main. And more.", Slips: append(one, record.Slip{Name: "x"})},
			"Too far. And more. Each of these slips alone would give it, the most likely first:",
		},
		{record.Claim{Verdict: record.Contradicted, Finding: "Too far."}, "Too far. No single known slip explains it."},
		{record.Claim{Verdict: record.ClaimOpen, Finding: "Its +Inf.", Uncertainty: math.Inf(1)}, "The uncertainty has no bound, so that nothing is shown either way."},
	} {
		if got := claimReason(&c.q); got != c.want {
			t.Errorf("%q, want %q", got, c.want)
		}
	}
}
