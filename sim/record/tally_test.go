package record

import (
	"math"
	"testing"
)

func TestTally(t *testing.T) {
	nan := math.NaN()
	c := Convergence{Studies: []Study{
		{ID: "a", Behaviour: Converging, Order: 2.02, Factor: 1.25, GCIPercent: 0.01, Phasor: 1, Error: -2, Uncertainty: 4, Explained: true},
		{ID: "b", Behaviour: Converging, Order: 1.95, Factor: 1.25, GCIPercent: 0.08, Phasor: 1, Error: 3, Uncertainty: 2},
		{ID: "c", Behaviour: OffOrder, Order: 1.4, Factor: 3, GCIPercent: nan, Phasor: 1, Explained: true},
		{ID: "d", Behaviour: TwoGrids, Order: nan, Factor: 3, GCIPercent: 0.05, Phasor: nan, Error: nan, Explained: true},
		{ID: "e", Behaviour: OneGrid, Order: nan, GCIPercent: 7, Phasor: 1, Error: nan, Explained: true}, // an index without a factor is none
	}}
	got := c.Tally()
	if got.Of[Converging] != 2 || got.Of[OffOrder] != 1 || got.Of[GridFree] != 0 {
		t.Errorf("behaviours %v", got.Of)
	}
	if got.Low != 1.95 || got.High != 2.02 {
		t.Errorf("orders %v to %v, want those of the converging figures, 1.95 to 2.02", got.Low, got.High)
	}
	if got.Largest == nil || got.Largest.ID != "b" || got.Nearest == nil || got.Nearest.ID != "b" {
		t.Errorf("largest index %+v, largest ratio %+v, want b", got.Largest, got.Nearest)
	}
	if got.Compared != 3 || len(got.Open) != 1 || got.Open[0].ID != "b" {
		t.Errorf("%d compared, want 3; not explained %+v, want b", got.Compared, got.Open)
	}
}

func TestTallyOfNothing(t *testing.T) {
	got := (&Convergence{}).Tally()
	if got.Largest != nil || got.Nearest != nil || got.Compared != 0 || !math.IsNaN(got.Low) || !math.IsNaN(got.High) {
		t.Errorf("%+v", got)
	}
}

func TestRatio(t *testing.T) {
	for _, c := range []struct {
		s    Study
		want float64
	}{
		{Study{Phasor: 1, Error: -1, Uncertainty: 4}, 0.25},
		{Study{Phasor: 1}, 0}, // exact: no error, no uncertainty
		{Study{Phasor: 1, Error: 1}, math.Inf(1)},
		{Study{Phasor: math.NaN(), Error: 1, Uncertainty: 1}, math.NaN()},
	} {
		if got := c.s.Ratio(); got != c.want && !(math.IsNaN(got) && math.IsNaN(c.want)) {
			t.Errorf("ratio %v of %+v, want %v", got, c.s, c.want)
		}
	}
}
