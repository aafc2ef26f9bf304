package line

import (
	"math"
	"strings"
	"testing"

	"pgregory.net/rapid"
)

func mustFit(t interface{ Fatal(...any) }, points ...LossPoint) LossFit {
	fit, err := FitLoss(points)
	if err != nil {
		t.Fatal(err)
	}
	return fit
}

// TestFitGivesBackItsTerms: a table made of two terms is fitted by them.
func TestFitGivesBackItsTerms(t *testing.T) {
	// fitTol allows for the condition of the normal equations of two nearly
	// parallel columns, at worst a table over a factor of two.
	const fitTol = 1e-9
	rapid.Check(t, func(t *rapid.T) {
		k1 := rapid.Float64Range(0, 1).Draw(t, "k1") * 1e-6
		k2 := rapid.Float64Range(0, 1).Draw(t, "k2") * 1e-10
		if k1+k2 == 0 {
			k1 = 1e-6
		}
		f := math.Pow(10, rapid.Float64Range(3, 8).Draw(t, "log f"))
		var points []LossPoint
		for range rapid.IntRange(2, 6).Draw(t, "points") {
			points = append(points, LossPoint{f, k1*math.Sqrt(f) + k2*f})
			f *= rapid.Float64Range(2, 10).Draw(t, "step")
		}
		fit := mustFit(t, points...)
		for i, p := range points {
			if math.Abs(fit.Residuals[i]) > fitTol || math.Abs(fit.Attenuation(p.F)/p.Attenuation-1) > fitTol {
				t.Fatalf("point %d of %v: residual %g", i, points, fit.Residuals[i])
			}
		}
		if top := points[len(points)-1]; math.Abs(fit.Conductor(top.F)-k1*math.Sqrt(top.F)) > fitTol*top.Attenuation {
			t.Fatalf("k1 = %g, want %g", fit.K1, k1)
		}
	})
}

// TestFitIsBest: no term is negative, and no small step within the bounds
// lowers the sum of squares.
func TestFitIsBest(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		var points []LossPoint
		f := 1e6
		for range rapid.IntRange(1, 6).Draw(t, "points") {
			points = append(points, LossPoint{f, rapid.Float64Range(0.001, 0.1).Draw(t, "a")})
			f *= rapid.Float64Range(1.5, 10).Draw(t, "step")
		}
		fit := mustFit(t, points...)
		best := squares(points, fit.K1, fit.K2)
		d1, d2 := 1e-4*0.1/math.Sqrt(f), 1e-4*0.1/f
		for _, step := range [][2]float64{{d1, 0}, {-d1, 0}, {0, d2}, {0, -d2}, {d1, -d2}, {-d1, d2}} {
			k1, k2 := math.Max(0, fit.K1+step[0]), math.Max(0, fit.K2+step[1])
			// One point alone does not tell the two terms apart.
			if s := squares(points, k1, k2); s < best*(1-1e-9)-1e-15 {
				t.Fatalf("%v: k1 %g, k2 %g has %g; k1 %g, k2 %g has %g", points, fit.K1, fit.K2, best, k1, k2, s)
			}
		}
		if fit.K1 < 0 || fit.K2 < 0 {
			t.Fatalf("negative: %+v", fit)
		}
	})
}

func squares(points []LossPoint, k1, k2 float64) (sum float64) {
	for _, p := range points {
		r := (k1*math.Sqrt(p.F)+k2*p.F)/p.Attenuation - 1
		sum += r * r
	}
	return sum
}

func TestFitCases(t *testing.T) {
	for _, row := range []struct {
		name   string
		points []LossPoint
		share  float64 // of the dielectric at 4 MHz
	}{
		{"one point is conductor loss", []LossPoint{{4e6, 0.01}}, 0},
		{"slower than the root", []LossPoint{{1e6, 0.01}, {4e6, 0.015}, {16e6, 0.02}}, 0},
		{"faster than linear", []LossPoint{{1e6, 0.01}, {4e6, 0.05}, {16e6, 0.3}}, 1},
		{"half and half", []LossPoint{{1e6, 0.02 + 0.01}, {4e6, 0.04 + 0.04}}, 0.5},
	} {
		fit := mustFit(t, row.points...)
		near(t, row.name, fit.Dielectric(4e6)/fit.Attenuation(4e6), row.share, 1e-12)
	}
}

// TestFitAsNominal: the nominal line of a fit has its parts at the frequency it
// is quoted at and at any other.
func TestFitAsNominal(t *testing.T) {
	fit := mustFit(t, LossPoint{10e6, 0.0023}, LossPoint{100e6, 0.0078}, LossPoint{1e9, 0.03})
	n := fit.Nominal(50, 0.66, 20e6)
	for _, f := range []float64{10e6, 20e6, 500e6} {
		c := n.At(f)
		near(t, "conductor part", c.R/(2*n.Z0)/fit.Conductor(f), 1, roundTol*10)
		near(t, "dielectric part", c.G*n.Z0/2/fit.Dielectric(f), 1, roundTol*10)
	}
}

func TestLossWarnings(t *testing.T) {
	one := mustFit(t, LossPoint{10e6, 0.01})
	good := mustFit(t, LossPoint{10e6, 0.01}, LossPoint{40e6, 0.02})
	poor := mustFit(t, LossPoint{10e6, 0.01}, LossPoint{40e6, 0.01})
	for _, row := range []struct {
		fit  LossFit
		f    float64
		want string
	}{
		{one, 10e6, ""},
		{one, 1.6e6, "the loss is known at 10 MHz only: at 1.6 MHz it is that times the square root of the frequency"},
		{good, 30e6, ""},
		{good, 1.6e6, "1.6 MHz is outside of the loss table, 10 to 40 MHz: the loss is extrapolated"},
		{poor, 30e6, "the two-term fit of the loss is -40.0 % off the table at 10 MHz"},
	} {
		if got := strings.Join(row.fit.WarningsAt(row.f), "\n"); got != row.want {
			t.Errorf("at %g Hz: %q, want %q", row.f, got, row.want)
		}
	}
}

func TestFitRefuses(t *testing.T) {
	for _, row := range []struct {
		points []LossPoint
		want   string
	}{
		{nil, "the loss table has no points"},
		{[]LossPoint{{0, 1}}, "point 1: the frequency must be above 0"},
		{[]LossPoint{{1, math.NaN()}}, "point 1: the attenuation must be above 0"},
		{[]LossPoint{{1, 1}, {1, 2}}, "point 2: the frequency does not rise; list the points with rising frequency"},
	} {
		if _, err := FitLoss(row.points); err == nil || err.Error() != row.want {
			t.Errorf("%v: %v, want %s", row.points, err, row.want)
		}
	}
}
