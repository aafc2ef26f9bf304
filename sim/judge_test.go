package sim

import (
	"math"
	"testing"

	"linewitness/sim/design"
	"linewitness/sim/record"
)

func limit(si float64, unit string) *design.Limit {
	return &design.Limit{SI: si, Unit: unit, Text: "limit"}
}

// TestOutcome: met only with the uncertainty inside, missed only with it
// outside, not shown between; the worse witness counts.
func TestOutcome(t *testing.T) {
	const phasor, fdtd = "phasor", "fdtd"
	for _, tt := range []struct {
		name     string
		min, max *design.Limit
		values   []float64
		spread   float64
		value    float64
		margin   float64
		verdict  record.RequirementVerdict
		method   string
	}{
		{"inside", nil, limit(1.5, "1"), []float64{1.2, 1.21}, 0.01, 1.21, 0.29, record.Met, fdtd},
		{"outside", nil, limit(1.5, "1"), []float64{1.7, 1.6}, 0.01, 1.7, -0.2, record.MissedReq, phasor},
		{"straddling inside", nil, limit(1.5, "1"), []float64{1.495}, 0.01, 1.495, 0.005, record.NotShownReq, phasor},
		{"straddling outside", nil, limit(1.5, "1"), []float64{1.505}, 0.01, 1.505, -0.005, record.NotShownReq, phasor},
		{"exactly met", nil, limit(1.5, "1"), []float64{1.5}, 0, 1.5, 0, record.Met, phasor},
		{"minimum", limit(150, "W"), nil, []float64{160, 158}, 1, 158, 8, record.Met, fdtd},
		{"minimum missed", limit(150, "W"), nil, []float64{140, 151}, 1, 140, -10, record.MissedReq, phasor},
		{"window, low side", limit(-0.03, "1"), limit(0.05, "1"), []float64{-0.02}, 0, -0.02, 0.01, record.Met, phasor},
		{"window, high side", limit(-0.03, "1"), limit(0.05, "1"), []float64{0.045}, 0, 0.045, 0.005, record.Met, phasor},
		{"rms", nil, limit(100*math.Sqrt2, "V rms"), []float64{99 * math.Sqrt2}, 0.5, 99, 1, record.Met, phasor},
		{"per cent", nil, limit(0.005, "%"), []float64{0.004}, 0, 0.4, 0.1, record.Met, phasor},
		{"dBm", limit(1e-3, "dBm"), nil, []float64{2e-3}, 0, 10 * math.Log10(2), 10 * math.Log10(2), record.Met, phasor},
		{"infinite", nil, limit(1.5, "1"), []float64{math.Inf(1)}, 0, math.Inf(1), math.Inf(-1), record.MissedReq, phasor},
		{"not a number", nil, limit(1e-6, "us"), []float64{math.NaN()}, 0, math.NaN(), math.NaN(), record.NotShownReq, phasor},
	} {
		j := judgement{min: tt.min, max: tt.max}
		for i, v := range tt.values {
			j.values = append(j.values, witnessed{v, v - tt.spread, v + tt.spread, []string{phasor, fdtd}[i]})
		}
		got := j.record()
		const rounding = 1e-12
		same := func(a, b float64) bool {
			return a == b || math.IsNaN(a) && math.IsNaN(b) || math.Abs(a-b) <= rounding*math.Max(1, math.Abs(b))
		}
		if !same(got.Value, tt.value) || !math.IsNaN(tt.margin) && !same(got.Margin, tt.margin) || got.Verdict != tt.verdict || got.Method != tt.method {
			t.Errorf("%s: value %v margin %v %s by %s; want %v, %v, %s by %s",
				tt.name, got.Value, got.Margin, got.Verdict, got.Method, tt.value, tt.margin, tt.verdict, tt.method)
		}
	}
}

// TestMargins: a margin in dB is 20 lg of a ratio of voltages and 10 lg of one
// of powers, negative where the limit is passed, whichever the sense of it.
func TestMargins(t *testing.T) {
	for _, tt := range []struct {
		unit         string
		limit, value float64
		margin, want float64
	}{
		{"V peak", 2000, 1000, 1000, 6.0206},
		{"V rms", 1000, 2000, -1000, -6.0206},
		{"A peak", 10, 5, 5, 6.0206},
		{"W", 150, 300, 150, 3.0103},
		{"W", 150, 75, -75, -3.0103},
		{"1", 1.5, 1.2, 0.3, math.NaN()},
		{"dB", 3, 2, 1, math.NaN()},
	} {
		got := marginDB(tt.unit, tt.limit, tt.value, tt.margin)
		if math.Abs(got-tt.want) > 5e-5 || math.IsNaN(got) != math.IsNaN(tt.want) { // printed to four places
			t.Errorf("%+v: got %v", tt, got)
		}
	}
}

// TestSpread: the uncertainty of a load's power is that of voltage and current
// to first order, of a phase the angle that the voltage's error subtends.
func TestSpread(t *testing.T) {
	f := load(t, "hilltop-fm-feeder")
	p, err := newPlanned(t.Context(), Nominal, f.Nominal, DefaultGrids)
	if err != nil {
		t.Fatal(err)
	}
	s := phasorState(p.net, p.grids[0].exact)
	b := &budget{junctions: make([]float64, len(p.net.Junctions)), branches: make([]float64, len(p.net.Branches)), ends: make([][2]offset, len(p.net.Sections)), crests: make([]offset, len(p.net.Sections))}
	at := p.net.Branches[0].A
	v := s.junctions[at]
	b.junctions[at] = 1
	q := finder{p.net}.steady(design.Requirement{Quantity: design.Phase, Load: "antenna"})
	size := math.Hypot(real(v), imag(v))
	// Of the four directions tried the nearest to a right angle is within 45
	// degrees of it.
	got := b.spread(s, q)
	if got > 1.001/size || got < 0.7/size {
		t.Errorf("phase spread %.4g rad for 1 V on %.4g V", got, size)
	}
}

// TestDisagreement: a verdict does not rest on the limit alone. A difference
// well above what the grid must cause is a disagreement inside the limit too.
func TestDisagreement(t *testing.T) {
	f := load(t, "reference-tree")
	p, err := newPlanned(t.Context(), Nominal, f.Nominal, DefaultGrids)
	if err != nil {
		t.Fatal(err)
	}
	c, err := p.solve(t.Context(), nil)
	if err != nil {
		t.Fatal(err)
	}
	if v := c.verdict(&record.Case{}); v != record.Verified {
		t.Fatalf("untouched: %s", v)
	}
	section := &c.steady.Sections[2]
	section.V[7] += complex(0.002*c.compared.Sections[2].Voltage.Scale, 0)
	c.compare()
	if c.compared.Found() > c.design.Grid.Agreement {
		t.Fatal("the planted error is meant to be inside the limit")
	}
	if v := c.verdict(&record.Case{}); v != record.Disagree {
		t.Errorf("an unexplained difference of 0.2 %%: %s", v)
	}
	section.V[7] += complex(0.02*c.compared.Sections[2].Voltage.Scale, 0)
	c.compare()
	if v := c.verdict(&record.Case{}); v != record.Disagree {
		t.Errorf("a difference of 2 %%: %s", v)
	}
	c.steady.Settling.Settled = false
	if v := c.verdict(&record.Case{}); v != record.Unsettle {
		t.Errorf("not settled: %s", v)
	}
}

// TestMeter: progress comes in order and ends at 1.
func TestMeter(t *testing.T) {
	f := load(t, "reference-tree")
	last := -1.0
	_, err := Verify(t.Context(), f, Options{Progress: func(x float64) {
		if x < last {
			t.Errorf("progress went from %v back to %v", last, x)
		}
		last = x
	}})
	if err != nil || last != 1 {
		t.Errorf("ended at %v, %v", last, err)
	}
}

// TestBound: a run over the bound is refused unless it is asked for.
func TestBound(t *testing.T) {
	c := PlanCase{Name: "x", Grid: record.Grid{Updates: 3e12}}
	if c.Bound() == nil {
		t.Error("3e12 updates passed")
	}
	c = PlanCase{Name: "x", Bytes: 9 << 30}
	if c.Bound() == nil {
		t.Error("9 GiB passed")
	}
	c = PlanCase{Name: "x", Grid: record.Grid{Updates: 1e12}, Bytes: 1 << 30}
	if err := c.Bound(); err != nil {
		t.Error(err)
	}
}

// TestPlanPredicts: the predicted work is within a factor of two of the work
// done, for every case of the demos.
func TestPlanPredicts(t *testing.T) {
	for name, demo := range demos {
		f, r := demo(t)
		plan, err := MakePlan(t.Context(), f, DefaultGrids)
		if err != nil {
			t.Fatal(err)
		}
		for i, c := range plan.Cases {
			done := r.Cases[i].Grid.Updates
			if q := done / c.Grid.Updates; q < 0.5 || q > 2 {
				t.Errorf("%s, %s: %.3g updates predicted, %.3g done", name, c.Name, c.Grid.Updates, done)
			}
			if e := r.Cases[i].Agreement.Expected; e < 0.8*c.ExpectedError || e > 3*c.ExpectedError {
				t.Errorf("%s, %s: error %.3g predicted, %.3g expected after the run", name, c.Name, c.ExpectedError, e)
			}
		}
	}
}
