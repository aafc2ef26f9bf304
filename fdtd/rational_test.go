package fdtd

import (
	"math"
	"math/cmplx"
	"testing"

	"linewitness/sim/line"
)

// TestSkinForm: two poles a decade leave 0.04 % in the middle of their range
// (theory 2 e^{-pi^2/D}, here 0.038 %), zero at zero frequency, and never a
// negative resistance.
func TestSkinForm(t *testing.T) {
	const omega = 2 * math.Pi * 100e6
	d := line.Dispersion{Skin: 1e-4}
	f := skinForm(d.Skin, omega)
	at := func(w float64) float64 {
		s := complex(0, w)
		return cmplx.Abs(f.at(s)/d.Series(s) - 1)
	}
	for _, tt := range []struct{ from, to, limit float64 }{
		{0.5, 2, 4.5e-4},
		{0.1, 10, 3e-3},
		{0.01, 100, 0.15},
	} {
		worst := 0.0
		for i := range 201 {
			w := omega * math.Exp(math.Log(tt.from)+float64(i)/200*math.Log(tt.to/tt.from))
			worst = math.Max(worst, at(w))
		}
		t.Logf("%g to %g times: %.3g", tt.from, tt.to, worst)
		if worst > tt.limit {
			t.Errorf("%g to %g times the frequency: error %.3g, want %g", tt.from, tt.to, worst, tt.limit)
		}
	}
	// Far below its poles the form falls as s, faster than sqrt(s).
	if s := complex(0, 1e-6*omega); cmplx.Abs(f.at(s)) > 0.1*cmplx.Abs(d.Series(s)) {
		t.Errorf("near zero frequency %v", f.at(s))
	}
	for w := omega * 1e-6; w < omega*1e6; w *= 1.3 {
		if real(f.at(complex(0, w))) < 0 {
			t.Errorf("active at %g", w)
		}
	}
}

// TestDebyeForm: likewise for the logarithm, at frequencies inside and outside
// its band of constant loss.
func TestDebyeForm(t *testing.T) {
	for _, f0 := range []float64{50, 1e3, 1e6, 100e6, 10e9} {
		omega := 2 * math.Pi * f0
		d := line.Dispersion{Delta: 1e-12, W1: 2 * math.Pi * 1e3, W2: 2 * math.Pi * 1e12}
		f := debyeForm(d, omega)
		for _, tt := range []struct{ times, limit float64 }{{1, 3e-3}, {0.1, 3e-2}, {10, 3e-2}} {
			s := complex(0, omega*tt.times)
			if e := cmplx.Abs(f.at(s)/d.Shunt(s) - 1); e > tt.limit {
				t.Errorf("made at %g Hz, at %g times: error %.3g, want %g", f0, tt.times, e, tt.limit)
			}
		}
		for w := omega * 1e-6; w < omega*1e6; w *= 1.3 {
			if real(f.at(complex(0, w))) < 0 {
				t.Errorf("active at %g", w)
			}
		}
	}
}
