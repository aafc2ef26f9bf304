package gci

import (
	"math"
	"testing"

	"pgregory.net/rapid"
)

// recomputedTolerance, relative, is for values recomputed with 30 digits and
// stored with 12: what is left is the rounding of values with four or five
// digits whose changes are a hundredth of them.
const recomputedTolerance = 1e-11

// roundingTolerance, relative, is for identities: values near 1 with changes of
// 1e-3 at least, and the logarithm of a ratio of 1.1 at least.
const roundingTolerance = 1e-9

func near(got, want, tolerance float64) bool {
	return math.Abs(got-want) <= tolerance*math.Abs(want)
}

// sizes are the step sizes of plane grids of n cells, up to a factor.
func sizes(n ...float64) (h [3]float64) {
	for i := range h {
		h[i] = 1 / math.Sqrt(n[i])
	}
	return h
}

// TestPublished: Table 1 of Celik et al. (2008), taken from test data that
// quote it, and the grid convergence tutorial of the NPARC Alliance (NASA, in
// the public domain), taken from a copy. The recomputed values are from a
// program in 30 digits that solves the equation by halving.
func TestPublished(t *testing.T) {
	type figure struct {
		name                     string
		got, printed, half, want float64 // half of the last printed digit
	}
	reattachment := Celik(sizes(18000, 8000, 4500), [3]float64{6.063, 5.972, 5.863})
	velocity := Celik(sizes(18000, 4500, 980), [3]float64{10.7880, 10.7250, 10.6050})
	// The tutorial ran in single precision and agrees to five digits only.
	nparc := Celik([3]float64{1, 2, 4}, [3]float64{0.97050, 0.96854, 0.96178})
	for _, f := range []figure{
		{"reattachment length, p", reattachment.Order, 1.53, 5e-3, 1.53396902062817},
		{"reattachment length, extrapolated", reattachment.Extrapolated, 6.1685, 5e-5, 6.16849557233016},
		{"reattachment length, e_a %", 100 * reattachment.ApproximateRelative, 1.5, 5e-2, 1.50090714167904},
		{"reattachment length, e_ext %", 100 * reattachment.ExtrapolatedRelative, 1.7, 5e-2, 1.71023179141737},
		{"reattachment length, GCI %", 100 * reattachment.Relative, 2.2, 5e-2, 2.17498705942114},
		{"velocity, p", velocity.Order, 0.75, 5e-3, 0.751900518210397},
		{"velocity, extrapolated", velocity.Extrapolated, 10.8801, 5e-5, 10.8801039460392},
		{"velocity, e_a %", 100 * velocity.ApproximateRelative, 0.6, 5e-2, 0.583982202447164},
		// The table prints 0.9; its own numbers give 0.8465.
		{"velocity, e_ext %", 100 * velocity.ExtrapolatedRelative, 0.8, 5e-2, 0.846535533998548},
		{"velocity, GCI %", 100 * velocity.Relative, 1.1, 5e-2, 1.06720367583426},
		{"NPARC, p", nparc.Order, 1.78618479, 2e-5, 1.78616959216698},
		{"NPARC, extrapolated", nparc.Extrapolated, 0.971300304, 5e-8, 0.971300333333333},
		{"NPARC, GCI12 %", 100 * nparc.Relative, 0.103080, 5e-6, 0.103082603469002},
		{"NPARC, GCI23 %", 100 * nparc.CoarserRelative, 0.356244, 1e-5, 0.356249268658668},
		{"NPARC, asymptotic ratio", nparc.Asymptotic, 0.997980, 5e-7, 0.96854 / 0.97050},
	} {
		if math.Abs(f.got-f.printed) > f.half {
			t.Errorf("%s: %.9g, printed %g", f.name, f.got, f.printed)
		}
		if !near(f.got, f.want, recomputedTolerance) {
			t.Errorf("%s: %.15g, recomputed %.15g", f.name, f.got, f.want)
		}
	}
}

// TestRoundedInput: ratios and values as other texts round them give other
// orders; the numbers of cells are what to start from. Values recomputed.
func TestRoundedInput(t *testing.T) {
	phi := [3]float64{6.063, 5.972, 5.863}
	for _, tt := range []struct {
		name   string
		h, phi [3]float64
		want   float64
	}{
		{"r32 as 1.333", [3]float64{1, 1.5, 1.5 * 1.333}, phi, 1.53716859511691},
		{"r32 as 1.33", [3]float64{1, 1.5, 1.5 * 1.33}, phi, 1.56623450836049},
		{"values to three digits", sizes(18000, 8000, 4500), [3]float64{6.06, 5.97, 5.86}, 1.59402845451465},
	} {
		if got := Celik(tt.h, tt.phi).Order; !near(got, tt.want, recomputedTolerance) {
			t.Errorf("%s: order %.12g, want %.12g", tt.name, got, tt.want)
		}
	}
}

// TestCelikDoesNotSeeDivergence: the trap that Study is for.
func TestCelikDoesNotSeeDivergence(t *testing.T) {
	h := [3]float64{1, 2, 4}
	converging := Celik(h, [3]float64{1, 2, 6}).Order
	diverging := Celik(h, [3]float64{1, 5, 6}).Order
	if !near(converging, 2, roundingTolerance) || !near(diverging, 2, roundingTolerance) {
		t.Errorf("orders %g and %g, want 2 for both", converging, diverging)
	}
}

// TestCelikOscillatory takes the order of changes that differ in sign and
// checks that it solves the equation of the source.
func TestCelikOscillatory(t *testing.T) {
	h := sizes(18000, 4500, 980)
	est := Celik(h, [3]float64{1, 1.1, 0.7})
	r21, r32 := h[1]/h[0], h[2]/h[1]
	q := math.Log((math.Pow(r21, est.Order) + 1) / (math.Pow(r32, est.Order) + 1))
	if want := math.Abs(math.Log(4)+q) / math.Log(r21); !near(est.Order, want, roundingTolerance) {
		t.Errorf("order %g, want %g", est.Order, want)
	}
}

func TestCelikFails(t *testing.T) {
	h := [3]float64{1, 2, 4}
	inf := math.Inf(1)
	for _, phi := range [][3]float64{
		{1, 1, 2},
		{1, 2, 2},
		{3, 3, 3},
		{math.NaN(), 1, 2},
		{1, inf, 2},
		{inf, inf, inf},
		{-math.MaxFloat64, math.MaxFloat64, 0},
	} {
		est := Celik(h, phi)
		for _, x := range []float64{est.Order, est.Extrapolated, est.GCI, est.Coarser, est.Relative, est.Asymptotic} {
			if !math.IsNaN(x) {
				t.Errorf("%v: %+v, want no figures", phi, est)
				break
			}
		}
	}
}

// TestUnevenRatios: ratios for which the plain iteration of the source does not
// come to rest, or ends at a false order.
func TestUnevenRatios(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		r21 := rapid.Float64Range(1.1, 6).Draw(t, "r21")
		r32 := rapid.Float64Range(1.1, 6).Draw(t, "r32")
		p := rapid.Float64Range(0.3, 4).Draw(t, "order")
		h := [3]float64{1, r21, r21 * r32}
		var phi [3]float64
		for i := range h {
			phi[i] = 3 + math.Pow(h[i], p)
		}
		est := Celik(h, phi)
		if !near(est.Order, p, roundingTolerance) || !near(est.Extrapolated, 3, roundingTolerance) {
			t.Fatalf("order %.12g, value %.12g at a step of zero; want %.12g and 3", est.Order, est.Extrapolated, p)
		}
	})
}
