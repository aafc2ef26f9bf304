package record

import "math"

// A Tally sums up the studies of a convergence.
type Tally struct {
	Of        map[Behaviour]int
	Low, High float64 // observed orders of the figures that converge near the formal order; NaN without any
	Largest   *Study  // with the largest index in per cent, or nil
	Compared  int     // figures that both witnesses give
	Nearest   *Study  // of those: with the largest error over its uncertainty, or nil
	Open      []Study // errors that their uncertainty does not explain
}

// Tally counts the studies by their behaviour and finds the extremes. Nearest
// and Largest point into c.Studies.
func (c *Convergence) Tally() Tally {
	t := Tally{Of: map[Behaviour]int{}, Low: math.NaN(), High: math.NaN()}
	for i := range c.Studies {
		s := &c.Studies[i]
		t.Of[s.Behaviour]++
		if s.Behaviour == Converging && !math.IsNaN(s.Order) {
			t.Low, t.High = atMost(t.Low, s.Order), -atMost(-t.High, -s.Order)
		}
		if !math.IsNaN(s.GCIPercent) && s.Factor > 0 && (t.Largest == nil || s.GCIPercent > t.Largest.GCIPercent) {
			t.Largest = s
		}
		if !s.Explained {
			t.Open = append(t.Open, *s)
		}
		ratio := s.Ratio()
		if math.IsNaN(ratio) {
			continue
		}
		t.Compared++
		if t.Nearest == nil || ratio > t.Nearest.Ratio() {
			t.Nearest = s
		}
	}
	return t
}

// atMost is the smaller of two numbers, the second where the first is NaN.
func atMost(a, b float64) float64 {
	if a < b {
		return a
	}
	return b
}

// Ratio is |Error| over Uncertainty: at most 1 where the error is explained, 0
// for no error, and NaN for a figure that only the time domain has.
func (s *Study) Ratio() float64 {
	if math.IsNaN(s.Phasor) {
		return math.NaN()
	}
	if s.Error == 0 {
		return 0
	}
	return math.Abs(s.Error) / s.Uncertainty
}
