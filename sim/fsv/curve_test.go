package fsv

import (
	"math"
	"slices"
	"testing"

	"pgregory.net/rapid"
)

// TestPoints: long curves are thinned to a number of points whose transform is
// quick.
func TestPoints(t *testing.T) {
	for n, want := range map[int]int{
		16: 16, 509: 509, 512: 512,
		513:  513,  // 27 x 19
		1021: 1020, // a prime
		4093: 4092, // a prime; 4 x 3 x 11 x 31
		4096: 4096, 4097: 4096, 200000: 4096,
	} {
		if got := points(n); got != want {
			t.Errorf("%d points for %d, want %d", got, n, want)
		}
	}
}

// TestSameAbscissae: with common even abscissae both ways give the same.
func TestSameAbscissae(t *testing.T) {
	for _, n := range []int{16, 100, 509, 521} {
		y1, y2 := wave(n), apply(wave(n), math.Sin)
		x := make([]float64, n)
		again := make([]float64, n) // the same, but for rounding
		for i := range x {
			x[i] = 1e-9 * float64(i)
			again[i] = float64(i) / 1e9
		}
		again[0], again[n-1] = math.SmallestNonzeroFloat64, x[n-1]*(1-1e-16)
		r, err := Compare(x, y1, again, y2)
		if err != nil {
			t.Fatal(err)
		}
		s := mustCurves(t, y1, y2)
		if r.Points != s.Points {
			t.Fatalf("%d points: %d and %d are compared", n, r.Points, s.Points)
		}
		for i := range r.GDM.Points {
			if !near(r.GDM.Points[i], s.GDM.Points[i]) {
				t.Errorf("%d points: point %d is %g and %g", n, i, r.GDM.Points[i], s.GDM.Points[i])
			}
		}
	}
}

// TestSharedRange: the same broken line, known at other places and over another
// range, matches: linear interpolation is exact on it.
func TestSharedRange(t *testing.T) {
	line := func(x float64) float64 { return math.Abs(x-3) + math.Abs(x-5) }
	var x1, y1, x2, y2 []float64
	for i := range 101 { // -5 to 15, with 3 and 5 among them
		x1 = append(x1, -5+float64(i)/5)
		y1 = append(y1, line(x1[i]))
	}
	for i := range 61 { // 0 to 30, uneven, with 3 and 5 among them
		x2 = append(x2, float64(i*(i+60))/240)
		y2 = append(y2, line(x2[i]))
	}
	for _, corner := range []float64{3, 5} {
		at, _ := slices.BinarySearch(x2, corner)
		x2, y2 = slices.Insert(x2, at, corner), slices.Insert(y2, at, line(corner))
	}
	r, err := Compare(x1, y1, x2, y2)
	if err != nil {
		t.Fatal(err)
	}
	count := 0
	for _, x := range x2 {
		if x <= 15 {
			count++
		}
	}
	if r.Points != min(count, 76) || !near(r.GDM.Value, 0) {
		t.Errorf("%d points with GDM %g, want %d with 0", r.Points, r.GDM.Value, count)
	}
}

// TestThin: thinning keeps the ends and straight lines.
func TestThin(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		n := rapid.IntRange(2, 500).Draw(t, "given")
		m := rapid.IntRange(2, n).Draw(t, "kept")
		y := make([]float64, n)
		for i := range y {
			y[i] = 3 - 2*float64(i)/float64(n-1)
		}
		got := thin(y, m)
		for i := range got {
			if want := 3 - 2*float64(i)/float64(m-1); !near(got[i], want) {
				t.Fatalf("point %d of %d from %d: %g, want %g", i, m, n, got[i], want)
			}
		}
		if m == n && !slices.Equal(got, y) {
			t.Fatal("the same number of points are not the same points")
		}
	})
}

// TestExtremes: neither a large range nor large values overflow.
func TestExtremes(t *testing.T) {
	x := make([]float64, 33)
	y := wave(33)
	for i := range x {
		x[i] = math.MaxFloat64 * (float64(i)/16 - 1)
	}
	large := apply(y, times(math.MaxFloat64/4))
	r, err := Compare(x, large, x, apply(large, times(0.5)))
	if err != nil {
		t.Fatal(err)
	}
	if want := mustCurves(t, y, apply(y, times(0.5))); !near(r.GDM.Value, want.GDM.Value) {
		t.Errorf("GDM %g, want %g", r.GDM.Value, want.GDM.Value)
	}
	if r, err := Compare(x, y, x, y); err != nil || r.GDM.Value != 0 {
		t.Errorf("GDM %g, %v; want 0", r.GDM.Value, err)
	}
}
