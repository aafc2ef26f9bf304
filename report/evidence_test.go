package report

import (
	"fmt"
	"math"
	"strings"
	"testing"

	"linewitness/report/internal/reporttest"
	"linewitness/sim/record"
)

// What the record says of the grids, the curves, the claims and the cases.
func TestEvidenceInText(t *testing.T) {
	all := squeezed(strings.Join(text(t, reporttest.Feeder(), Options{}), ""))
	for _, s := range []string{
		"Of 13 figures 7 converge with an observed order of 1.96 to 2.03, near the formal 2, 1 does not depend on the grid, 1 oscillates, 1 diverges and 3 are of the stress run",
		"The largest grid convergence index is 0.059 %, of R2, peak voltage, main.",
		"192 steps of 53.09 ps a period and 4816 cells", "oscillatory", "1.25", "50.0066", "50.0099", "50.0235",
		"Every error is explained by its uncertainty: the largest |E|/u of 10 figures is 0.72", "not compared: R2, R3, R5.", "explained",
		"the largest global difference of 13 curves is that of stub, |V| along the section, 0.040, in words excellent", "the curve is zero in both solutions",
		"the lowest 4 bins of the transform are the offset.", "blind to a reversal of sign", "Its words describe and do not accept",
		"Roache 1998; Celik et al.", "ASME V&V 20-2009",
		"Claims C2, C3, C4 are contradicted in nominal. Claim C5 is not shown in arc.", "Claims contradicted: C2, C3, C4.",
		"Claims: 1 confirmed, 3 contradicted, 1 not shown.", "Claims: 1 not shown.",
		"One slip explains C2 and C3 together: velocity factor left out on every section.",
		"velocity factor left out on every section: 18.68 − j14.84 Ω; cannot be told from velocity factor used twice (section stub)", "explains C3 too.",
		"degrees taken for radians on section stub: 18.90 − j14.60 Ω.", "No single known slip explains it.", "544.8 V rms at 131.26°",
		"given as “18.7 - j14.8 ohm”", "[calc sheet 3]", "24 V (1 %)",
		"Cases side by side", "Of 5 requirements the least margin is found for 4 in arc and 1 in stub_missing.", "worst +9.213", "+587.0 V", "the same",
	} {
		if !strings.Contains(all, squeezed(s)) {
			t.Errorf("the text lacks %q", s)
		}
	}
}

// squeezed takes out the spaces, which are not in the text where a line ends.
func squeezed(s string) string { return strings.ReplaceAll(readable(s), " ", "") }

// A record of one case has no table of cases, one without claims no chapter,
// and one made without the evidence says nothing of it.
func TestWithoutEvidence(t *testing.T) {
	r := reporttest.One("One", reporttest.Single(1), reporttest.Options{Loop: 0.5})
	r.Cases[0].Convergence, r.Cases[0].Fidelity, r.Design.FSVChoices = record.Convergence{}, nil, nil
	all := strings.Join(text(t, r, Options{}), "\n")
	for _, s := range []string{"Cases side by side", "Claims", "|E|/u", "Grade, spread", "The standard leaves choices open"} {
		if strings.Contains(all, s) {
			t.Errorf("the text has %q", s)
		}
	}
}

// A study that was left out is said to be, and only the predicted error stands.
func TestSkippedStudy(t *testing.T) {
	r := reporttest.One("One", reporttest.Single(1), reporttest.Options{Loop: 0.5})
	v := &r.Cases[0].Convergence
	v.Skipped, v.Grids = "--grids 1 was given", v.Grids[:1]
	for i := range v.Studies {
		s := &v.Studies[i]
		s.Behaviour, s.Values, s.Factor, s.GCI, s.GCIPercent, s.Order, s.Extrapolated = record.OneGrid, s.Values[:1], 0, 0, math.NaN(), math.NaN(), math.NaN()
	}
	all := readable(strings.Join(text(t, r, Options{}), "\n"))
	if s := "The study on three grids was left out: --grids 1 was given. Only the predicted error of the grid stands behind the figures."; !strings.Contains(all, s) {
		t.Errorf("the text lacks %q", s)
	}
	if strings.Contains(all, "Step to zero") || !strings.Contains(all, "|E|/u") {
		t.Error("the grids are shown, or the validation is not")
	}
}

// Figures that are not finite, and lists of any length, are printed as dashes.
func TestHollowEvidence(t *testing.T) {
	r := reporttest.Feeder()
	nan, inf := math.NaN(), math.Inf(1)
	c := &r.Cases[0]
	c.Convergence.Studies = []record.Study{
		{},
		{ID: "A", Unit: "V peak", Values: []float64{nan, nan, nan}, Factor: 3, Order: nan, Extrapolated: nan, GCI: nan, GCIPercent: nan, Phasor: nan, Error: nan, Uncertainty: nan},
		{ID: "B", Unit: "ohm", Values: []float64{inf, -inf}, Factor: 3, Order: inf, Extrapolated: -inf, GCI: inf, GCIPercent: inf, Phasor: inf, Error: nan, Uncertainty: inf},
		{ID: "C", Unit: "dBm", Values: make([]float64, 9), Factor: nan, Phasor: 1, Error: 1, Grid: nan, Settling: inf, Form: nan, Rounding: -inf},
		{ID: strings.Repeat("D", 80), Quantity: strings.Repeat("very_long_", 20), Subject: strings.Repeat("W", 90), Unit: "furlongs", Values: []float64{1e300, 1e-300, -1e300}, Behaviour: "odd"},
	}
	c.Convergence.Grids = nil
	c.Fidelity = []record.Fidelity{{GDM: record.Difference{Value: nan}}, {Subject: strings.Repeat("W", 200), GDM: record.Difference{Value: inf}, ADM: record.Difference{Value: -1, Grade: 9}}}
	c.Claims = []record.Claim{
		{},
		{
			ID: "H", Unit: "ohm", Complex: true, Claimed: complex(nan, nan), Phasor: complex(inf, 0), FDTD: complex(0, nan), Tolerance: nan, Difference: inf, Verdict: record.Contradicted,
			Slips: []record.Slip{{Value: complex(nan, nan)}, {Name: strings.Repeat("W", 200), Also: []string{""}, Explains: []string{"H", "I"}}},
		},
	}
	r.Matrix.Cases = append(r.Matrix.Cases, "short of cells", strings.Repeat("W", 60))
	r.Matrix.Rows[0].Cells[1] = record.MatrixCell{Present: true, Value: nan, Difference: inf, Worst: true}
	r.Matrix.Rows = append(r.Matrix.Rows, record.MatrixRow{})
	all := readable(strings.Join(text(t, r, Options{}), "\n"))
	for _, s := range []string{"Not explained by its uncertainty is the error of ", "(|E|/u infinite)", "Claims contradicted: H.", "worst +infinite"} {
		if !strings.Contains(all, s) {
			t.Errorf("the text lacks %q", s)
		}
	}
	for _, s := range []string{"NaN", "Inf", "%!"} {
		if strings.Contains(all, s) {
			t.Errorf("the text has a bare %s", s)
		}
	}
}

func TestGridFinding(t *testing.T) {
	nan := math.NaN()
	study := func(b record.Behaviour, order float64) record.Study {
		return record.Study{Behaviour: b, Order: order, Phasor: nan, Explained: true}
	}
	for _, c := range []struct {
		studies []record.Study
		want    string
	}{
		{[]record.Study{study(record.Converging, 2)}, "Of 1 figure 1 converges with an observed order of 2.00, near the formal 2."},
		{[]record.Study{study(record.OffOrder, 1.2), study(record.GridFree, nan), study(record.GridFree, nan)}, "Of 2 figures 1 converges with another order and 2 do not depend on the grid."},
		{[]record.Study{study(record.OneGrid, nan)}, "Of 1 figure 1 is on one grid."},
		{[]record.Study{study(record.Converging, nan)}, "Of 1 figure 1 converges."},
	} {
		got := readable(gridFinding(&record.Convergence{Studies: c.studies}))
		if want := strings.Replace(c.want, "Of 2 figures", fmt.Sprintf("Of %d figures", len(c.studies)), 1); got != want {
			t.Errorf("%q, want %q", got, want)
		}
	}
}

func TestValidationFinding(t *testing.T) {
	figure := func(id string, e, u float64) record.Study {
		return record.Study{ID: id, Quantity: "vswr", Subject: "main", Phasor: 1, Error: e, Uncertainty: u, Explained: math.Abs(e) <= u}
	}
	many := []record.Study{figure("a", 2, 1), figure("b", 2, 1), figure("c", 2, 1), figure("d", 2, 1), figure("e", 2, 1)}
	for _, c := range []struct {
		studies []record.Study
		want    string
	}{
		{nil, "No figure here is given by both solutions, so there is no error to explain."},
		{[]record.Study{figure("a", 0, 1)}, "Every error is explained by its uncertainty: there is none."},
		{[]record.Study{figure("a", 1, 4), figure("b", -1, 2)}, "Every error is explained by its uncertainty: the largest |E|/u of 2 figures is 0.50, of b, VSWR, main."},
		{
			[]record.Study{figure("a", 1, 4), figure("b", -3, 2)},
			"Not explained by its uncertainty is the error of b, VSWR, main (|E|/u 1.5). An error without an explanation is a disagreement of the two solutions, even inside the limit.",
		},
	} {
		if got := readable(validationFinding(&record.Convergence{Studies: c.studies})); got != c.want {
			t.Errorf("%q, want %q", got, c.want)
		}
	}
	if got := readable(validationFinding(&record.Convergence{Studies: many})); !strings.Contains(got, "d, VSWR, main (|E|/u 2.0); and of 1 more.") || strings.Contains(got, "e, VSWR") {
		t.Errorf("%q names more than a few", got)
	}
}
