package gci

import (
	"math"
	"slices"
	"testing"

	"pgregory.net/rapid"

	"linewitness/sim/record"
)

var (
	halved = []float64{1, 2, 4}
	nan    = math.NaN()
)

// same compares figures of which some are NaN.
func same(got, want float64) bool {
	return math.IsNaN(got) && math.IsNaN(want) || got == want || near(got, want, roundingTolerance)
}

// TestStudy: every behaviour, with figures worked by hand.
func TestStudy(t *testing.T) {
	root2 := math.Sqrt2
	for _, tt := range []struct {
		name      string
		h, phi    []float64
		floor     float64
		behaviour record.Behaviour
		order     float64
		value     float64
		factor    float64
		gci       float64
	}{
		{"second order", halved, []float64{11, 14, 26}, 0, record.Converging, 2, 10, 1.25, 1.25},
		{"falling values", halved, []float64{-11, -14, -26}, 0, record.Converging, 2, -10, 1.25, 1.25},
		{"first order", halved, []float64{11, 12, 14}, 0, record.OffOrder, 1, 10, 3, 3},
		{"fourth order is not trusted", halved, []float64{11, 26, 266}, 0, record.OffOrder, 4, 10, 3, 15},
		{"nearly no order", halved, []float64{1, 2, 3 + 0x1p-20}, 0, record.OffOrder, math.Log1p(0x1p-20) / math.Ln2, nan, 3, 3 / (root2 - 1)},
		{"oscillatory", halved, []float64{1, 2, -1}, 0, record.Oscillatory, nan, nan, 3, 1},
		{"swinging wider", halved, []float64{1, -2, -1}, 0, record.Oscillatory, nan, nan, 3, 9 / (root2 - 1)},
		{"diverging", halved, []float64{1, 5, 6}, 0, record.Diverging, nan, nan, 3, 12 / (root2 - 1)},
		{"equal changes", halved, []float64{1, 2, 3}, 0, record.Diverging, nan, nan, 3, 3 / (root2 - 1)},
		{"exact", halved, []float64{1, 1.001, 0.9995}, 2e-3, record.GridFree, nan, 1, 0, 2e-3},
		{"exact to the last bit", halved, []float64{7, 7, 7}, 0, record.GridFree, nan, 7, 0, 0},
		{"floor above the index", halved, []float64{11, 14, 26}, 2.9, record.Converging, 2, 10, 1.25, 2.9},

		// Down to the floor: a change of 0.5 would show order 2 or more, 1, or none.
		{"into the floor", halved, []float64{1, 1.25, 4}, 0.5, record.OffOrder, nan, 1, 3, 0.5},
		{"into the floor, other sign", halved, []float64{1, 0.75, 3.5}, 0.5, record.OffOrder, nan, 1, 3, 0.5},
		{"just above the floor", halved, []float64{1, 1.25, 2.25}, 0.5, record.OffOrder, nan, 1, 3, 1.5},
		{"hardly above the floor", halved, []float64{1, 1.25, 1.75 + 1e-9}, 0.5, record.OffOrder, nan, 1, 3, 1.5 / (root2 - 1)},
		{"no change but no floor", halved, []float64{1, 1, 2}, 0, record.OffOrder, nan, 1, 3, 0},
		{"uneven, hardly above the floor", []float64{1, 2, 16}, []float64{1, 1.25, 1.8}, 0.5, record.OffOrder, nan, 1, 3, 1.5 / (root2 - 1)},
		{"out of the floor", halved, []float64{1, 3, 2.9}, 0.5, record.Diverging, nan, nan, 3, 6 / (root2 - 1)},

		// With uneven ratios changes of one size may fall or not. The order was
		// found by halving, in 30 digits.
		{"uneven, falling", []float64{1, 3, 6}, []float64{11, 12, 12.9}, 0, record.OffOrder, 0.401928138339, nan, 3, 3 / (math.Sqrt(3) - 1)},
		{"uneven, growing", []float64{1, 2, 6}, []float64{11, 12, 13.1}, 0, record.Diverging, nan, nan, 3, 3.3 / (root2 - 1)},
		{"too uneven for an order", []float64{1, 10, 10.001}, []float64{0, 1e-300, 1}, 0, record.OffOrder, nan, nan, 3, 3e-300 / (math.Sqrt(10) - 1)},

		{"two grids", []float64{1, 2}, []float64{5, 8}, 0, record.TwoGrids, nan, nan, 3, 3},
		{"two uneven grids", []float64{1, 3}, []float64{5, 13}, 0, record.TwoGrids, nan, nan, 3, 3},
		{"two grids, one value", []float64{1, 2}, []float64{5, 5}, 0.1, record.TwoGrids, nan, nan, 3, 0.1},
		{"one grid", []float64{1}, []float64{5}, 0.1, record.OneGrid, nan, nan, 0, nan},

		{"not a number", halved, []float64{1, nan, 2}, 0, "", nan, nan, 0, nan},
		{"infinite", halved, []float64{math.Inf(1), math.Inf(1), math.Inf(1)}, 0, "", nan, nan, 0, nan},
		{"changes too large", halved, []float64{math.MaxFloat64, -math.MaxFloat64, 1}, 0, "", nan, nan, 0, nan},
		{"coarser change too large", halved, []float64{0, math.MaxFloat64, -math.MaxFloat64}, 0, "", nan, nan, 0, nan},
		{"infinite on two grids", []float64{1, 2}, []float64{1, math.Inf(1)}, 0, record.TwoGrids, nan, nan, 0, nan},
		{"no floor known", halved, []float64{11, 14, 26}, nan, "", nan, nan, 0, nan},
		{"infinite floor", halved, []float64{11, 14, 26}, math.Inf(1), "", nan, nan, 0, nan},
		{"one grid without a value", []float64{1}, []float64{nan}, 0, record.OneGrid, nan, nan, 0, nan},
	} {
		got := Study(tt.h, tt.phi, tt.floor)
		if got.Behaviour != tt.behaviour || got.Factor != tt.factor {
			t.Errorf("%s: %q with factor %g, want %q with %g", tt.name, got.Behaviour, got.Factor, tt.behaviour, tt.factor)
		}
		if !same(got.Order, tt.order) || !same(got.Extrapolated, tt.value) || !same(got.GCI, tt.gci) {
			t.Errorf("%s: order %.12g, value %.12g, index %.12g; want %.12g, %.12g, %.12g",
				tt.name, got.Order, got.Extrapolated, got.GCI, tt.order, tt.value, tt.gci)
		}
	}
}

// TestRelativeFigures: the figures against the finest value, and their absence
// where that is zero.
func TestRelativeFigures(t *testing.T) {
	got := Study(halved, []float64{11, 14, 26}, 0)
	for _, f := range []struct {
		name      string
		got, want float64
	}{
		{"index", got.Relative, 1.25 / 11},
		{"change", got.ApproximateRelative, 3.0 / 11},
		{"extrapolated change", got.ExtrapolatedRelative, 0.1},
		{"asymptotic ratio", got.Asymptotic, 14.0 / 11},
	} {
		if !near(f.got, f.want, roundingTolerance) {
			t.Errorf("%s: %g, want %g", f.name, f.got, f.want)
		}
	}
	zero := Study(halved, []float64{0, 3, 15}, 0)
	if !math.IsNaN(zero.Relative) || !math.IsNaN(zero.ApproximateRelative) || !near(zero.GCI, 1.25, roundingTolerance) || zero.ExtrapolatedRelative != 1 {
		t.Errorf("finest value 0: %+v", zero)
	}
}

// TestFormalOrder: an order in range of one formal order is off another.
func TestFormalOrder(t *testing.T) {
	phi := []float64{11, 12, 14}
	for _, tt := range []struct {
		formal    float64
		behaviour record.Behaviour
		gci       float64
	}{
		{1, record.Converging, 1.25},
		{1.5, record.Converging, 1.25},
		{1.6, record.OffOrder, 3},
		{0.4, record.OffOrder, 3 / (math.Pow(2, 0.4) - 1)},
	} {
		got := StudyOrder(halved, phi, 0, tt.formal)
		if got.Behaviour != tt.behaviour || !near(got.GCI, tt.gci, roundingTolerance) {
			t.Errorf("formal order %g: %q, index %g; want %q, %g", tt.formal, got.Behaviour, got.GCI, tt.behaviour, tt.gci)
		}
	}
}

// TestPowerLaw: values a + b h^p with p near 2 converge, with that order, to a.
func TestPowerLaw(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		p := rapid.Float64Range(1.6, 2.4).Draw(t, "order")
		a := rapid.Float64Range(-10, 10).Draw(t, "a")
		b := rapid.Float64Range(0.1, 10).Draw(t, "b") * rapid.SampledFrom([]float64{1, -1}).Draw(t, "sign")
		h := drawSteps(t)
		phi := make([]float64, 3)
		for i := range h {
			phi[i] = a + b*math.Pow(h[i]/h[0], p)
		}
		// The rounding of values of 20 in changes of 0.01 comes back as 1e-13 of
		// the ratio, and with the logarithm of a ratio of 1.1 as 1e-11 of the order.
		got := Study(h, phi, 1e-12)
		if got.Behaviour != record.Converging || math.Abs(got.Order-p) > roundingTolerance {
			t.Fatalf("%q with order %.12g, want %.12g", got.Behaviour, got.Order, p)
		}
		if math.Abs(got.Extrapolated-a) > 100*roundingTolerance || !near(got.GCI, 1.25*math.Abs(b), roundingTolerance*100) {
			t.Fatalf("value %.12g, index %.12g; want %.12g, %.12g", got.Extrapolated, got.GCI, a, 1.25*math.Abs(b))
		}
	})
}

func drawSteps(t *rapid.T) []float64 {
	h := []float64{rapid.Float64Range(1e-12, 1).Draw(t, "h1"), 0, 0}
	for i, name := range []string{"r21", "r32"} {
		h[i+1] = h[i] * rapid.Float64Range(1.1, 4).Draw(t, name)
	}
	return h
}

// TestUnits: the unit of the values, their sign and their origin do not matter
// to what is said of them, nor does the unit of the steps. The values are small
// integers, so that nothing is rounded.
func TestUnits(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		h := drawSteps(t)
		value := rapid.IntRange(-50, 50)
		phi := []float64{float64(value.Draw(t, "phi1")), float64(value.Draw(t, "phi2")), float64(value.Draw(t, "phi3"))}
		floor := float64(rapid.IntRange(0, 20).Draw(t, "floor"))
		scale := rapid.SampledFrom([]float64{-1, 4, -0.25, 1 << 20}).Draw(t, "scale")
		offset := float64(rapid.IntRange(-1000, 1000).Draw(t, "offset"))
		first := Study(h, phi, floor)

		moved, scaled := slices.Clone(phi), slices.Clone(phi)
		for i := range phi {
			moved[i] += offset
			scaled[i] *= scale
		}
		equalUpTo(t, "moved", Study(h, moved, floor), first, 1, offset)
		equalUpTo(t, "scaled", Study(h, scaled, floor*math.Abs(scale)), first, scale, 0)
		doubled := []float64{2 * h[0], 2 * h[1], 2 * h[2]}
		equalUpTo(t, "in another unit of length", Study(doubled, phi, floor), first, 1, 0)
	})
}

// equalUpTo checks the figures of scale*phi + offset against those of phi.
func equalUpTo(t *rapid.T, what string, got, first Result, scale, offset float64) {
	t.Helper()
	if got.Behaviour != first.Behaviour || got.Factor != first.Factor {
		t.Fatalf("%s: %+v, was %+v", what, got, first)
	}
	if !same(got.Order, first.Order) || !same(got.GCI, math.Abs(scale)*first.GCI) {
		t.Fatalf("%s: order %g, index %g; was %g, %g", what, got.Order, got.GCI, first.Order, first.GCI)
	}
	want := scale*first.Extrapolated + offset
	if d := math.Abs(got.Extrapolated - want); d > roundingTolerance*(math.Abs(want)+math.Abs(offset)+math.Abs(scale)) {
		t.Fatalf("%s: value %g, want %g", what, got.Extrapolated, want)
	}
}

// TestIndexIsThere: any finite values on three grids have a behaviour and an
// index of at least the floor.
func TestIndexIsThere(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		h := drawSteps(t)
		value := rapid.Float64Range(-1e150, 1e150)
		phi := []float64{value.Draw(t, "phi1"), value.Draw(t, "phi2"), value.Draw(t, "phi3")}
		floor := rapid.Float64Range(0, 1e150).Draw(t, "floor")
		if got := Study(h, phi, floor); got.Behaviour == "" || !(got.GCI >= floor) {
			t.Fatalf("%+v", got)
		}
	})
}

func TestPanics(t *testing.T) {
	const (
		lengths = "gci: the steps and the values differ in number"
		grids   = "gci: not one, two or three grids"
		steps   = "gci: the steps are not positive, finite and rising from the finest on"
		floor   = "gci: negative floor"
		order   = "gci: the formal order is not positive"
	)
	one, three, four := []float64{1}, []float64{1, 2, 3}, []float64{1, 2, 3, 4}
	for _, tt := range []struct {
		want string
		call func()
	}{
		{lengths, func() { Study(three, one, 0) }},
		{grids, func() { Study(nil, nil, 0) }},
		{grids, func() { Study(four, four, 0) }},
		{steps, func() { Study([]float64{4, 2, 1}, three, 0) }},
		{steps, func() { Study([]float64{1, 1}, []float64{1, 1}, 0) }},
		{steps, func() { Study([]float64{0}, one, 0) }},
		{steps, func() { Study([]float64{1, nan, 2}, three, 0) }},
		{steps, func() { Study([]float64{1, 2, math.Inf(1)}, three, 0) }},
		{steps, func() { Celik([3]float64{1, 1, 2}, [3]float64{}) }},
		{floor, func() { Study(three, three, -1e-9) }},
		{order, func() { StudyOrder(three, three, 0, 0) }},
		{order, func() { StudyOrder(three, three, 0, nan) }},
	} {
		func() {
			defer func() {
				if got := recover(); got != tt.want {
					t.Errorf("panics with %v, want %q", got, tt.want)
				}
			}()
			tt.call()
		}()
	}
}

func BenchmarkStudy(b *testing.B) {
	h, phi := []float64{1, 1.5, 2}, []float64{6.063, 5.972, 5.863}
	for b.Loop() {
		Study(h, phi, 1e-9)
	}
}
