package network

import (
	"math"
	"math/cmplx"
	"testing"

	"linewitness/sim/line"
)

// rounding is what a few operations leave.
const rounding = 1e-12

func TestSeriesImpedance(t *testing.T) {
	omega := 2 * math.Pi * 1e6
	for _, tt := range []struct {
		s    Series
		want complex128
	}{
		{Series{}, 0},
		{Series{R: 50}, 50},
		{Series{L: 1e-6}, complex(0, 2*math.Pi)},
		{Series{C: 1e-9}, complex(0, -1e3/(2*math.Pi))},
		{Series{R: 3, L: 1e-6, C: 1e-9}, complex(3, 2*math.Pi-1e3/(2*math.Pi))},
	} {
		if got := tt.s.Impedance(omega); cmplx.Abs(got-tt.want) > rounding*(1+cmplx.Abs(tt.want)) {
			t.Errorf("%+v: %v, want %v", tt.s, got, tt.want)
		}
		if tt.s.Ideal() != (tt.want == 0) {
			t.Errorf("%+v: ideal %v", tt.s, tt.s.Ideal())
		}
	}
}

// TestProfile: zero at t = 0 even when abrupt, half way in the middle of a
// rise, and down again after the stop.
func TestProfile(t *testing.T) {
	ramp := Source{Start: Start{Rise: 2}, Stop: &Stop{At: 10, Fall: 4}}
	abrupt := Source{Stop: &Stop{At: 10}}
	for _, tt := range []struct {
		name string
		s    Source
		t    float64
		want float64
	}{
		{"ramp before", ramp, -1, 0},
		{"ramp at 0", ramp, 0, 0},
		{"ramp quarter", ramp, 0.5, (1 - math.Sqrt2/2) / 2},
		{"ramp half", ramp, 1, 0.5},
		{"ramp top", ramp, 2, 1},
		{"ramp on", ramp, 9.9, 1},
		{"fall half", ramp, 12, 0.5},
		{"fallen", ramp, 14, 0},
		{"long after", ramp, 99, 0},
		{"abrupt at 0", abrupt, 0, 0},
		{"abrupt just after", abrupt, 1e-12, 1},
		{"abrupt at the stop", abrupt, 10, 1},
		{"abrupt after the stop", abrupt, 10.0001, 0},
	} {
		if got := tt.s.Profile(tt.t); math.Abs(got-tt.want) > rounding {
			t.Errorf("%s: r(%g) = %v, want %v", tt.name, tt.t, got, tt.want)
		}
	}
}

// TestAvailable: 300 V peak behind 50 ohm offer 225 W; an ideal source has no
// limit.
func TestAvailable(t *testing.T) {
	if got := (Source{EMF: 300, Series: Series{R: 50}}).Available(); math.Abs(got-225) > rounding*225 {
		t.Errorf("available %v W, want 225", got)
	}
	if got := (Source{EMF: 300}).Available(); !math.IsInf(got, 1) {
		t.Errorf("ideal source: %v", got)
	}
}

// TestDelay: 250 nH/m and 100 pF/m are 5 ns/m.
func TestDelay(t *testing.T) {
	s := Section{Length: 3, Line: line.Constants{R: 7, L: 250e-9, C: 100e-12}}
	if got := s.Delay(); math.Abs(got-15e-9) > rounding*15e-9 {
		t.Errorf("delay %v s, want 15 ns", got)
	}
}
