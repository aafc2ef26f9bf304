package oneport

import (
	"math"
	"math/cmplx"
	"strings"
	"testing"

	"pgregory.net/rapid"
)

func mustTable(t testing.TB, points ...Impedance) *Table {
	t.Helper()
	table, err := FromImpedances(points)
	if err != nil {
		t.Fatal(err)
	}
	return table
}

func TestAt(t *testing.T) {
	table := mustRead(t, "# MHz S RI R 50\n1 0.5 0\n2 0 0.5\n3 1 0\n4 -1 0\n")
	for _, tt := range []struct {
		f    float64
		want complex128
	}{
		{1e6, 150},
		{2e6, (1 + 0.5i) / (1 - 0.5i) * 50},
		{1.5e6, (1.25 + 0.25i) / (0.75 - 0.25i) * 50}, // S = 0.25 + 0.25j
		{3e6, cmplx.Inf()},
		{3.5e6, 50}, // halfway between open and short
		{4e6, 0},
		{4e6 * (1 + 1e-13), 0}, // the same frequency, rounded
	} {
		got, err := table.At(tt.f)
		if err != nil || !close(got, tt.want, roundTol*100) {
			t.Errorf("at %g Hz: %v ohm, %v; want %v", tt.f, got, err, tt.want)
		}
	}
}

func TestOutside(t *testing.T) {
	table := mustRead(t, "# MHz\n1 1 0\n2.5 1 0")
	one := mustTable(t, Impedance{7030, 50})
	for _, tt := range []struct {
		table *Table
		f     float64
		want  string
	}{
		{table, 999e3, "a.s1p reaches from 1 MHz to 2.5 MHz; 999 kHz is outside of it, and nothing is extrapolated"},
		{table, 3e9, "a.s1p reaches from 1 MHz to 2.5 MHz; 3 GHz is outside of it, and nothing is extrapolated"},
		{one, 7031, "the table has one point, at 7.03 kHz, and none at 7.031 kHz"},
	} {
		if _, err := tt.table.At(tt.f); err == nil || err.Error() != tt.want {
			t.Errorf("at %g Hz: %v, want %s", tt.f, err, tt.want)
		}
	}
	if _, err := table.At(math.NaN()); err == nil {
		t.Error("no frequency has an impedance")
	}
	if z, err := one.At(7030); z != 50 || err != nil {
		t.Errorf("one point: %v, %v", z, err)
	}
}

// TestPassiveStaysPassive: between passive points the resistance is not
// negative, whatever the rounding, and points give back their values.
func TestPassiveStaysPassive(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		var points []Impedance
		for i := range rapid.IntRange(2, 6).Draw(t, "points") {
			r := rapid.SampledFrom([]float64{0, 1e-9, 1, 36.5, 1e7}).Draw(t, "r")
			x := rapid.Float64Range(-1e4, 1e4).Draw(t, "x")
			points = append(points, Impedance{float64(i + 1), complex(r, x)})
		}
		table, err := FromImpedances(points)
		if err != nil {
			t.Fatal(err)
		}
		if bad := table.NonPassive(); len(bad) > 0 {
			t.Fatalf("not passive: %v", bad)
		}
		for _, p := range points {
			if z, err := table.At(p.F); z != p.Z || err != nil {
				t.Fatalf("%v at its point: %v, %v", p, z, err)
			}
		}
		z, err := table.At(rapid.Float64Range(1, float64(len(points))).Draw(t, "f"))
		if err != nil || real(z) < 0 || cmplx.IsNaN(z) {
			t.Fatalf("%v ohm, %v", z, err)
		}
	})
}

func TestScaleDoesNotMatter(t *testing.T) {
	small := mustTable(t, Impedance{1, 3 + 4i}, Impedance{2, 20 - 1i})
	large := mustTable(t, Impedance{1, 300 + 400i}, Impedance{2, 2000 - 100i})
	a, _ := small.At(1.3)
	b, _ := large.At(1.3)
	if !close(b, 100*a, roundTol*10) {
		t.Errorf("%v is not 100 times %v", b, a)
	}
}

func TestNonPassive(t *testing.T) {
	// -1.0000005 is a short of seven digits; 1.01 is not an open.
	table := mustRead(t, "# MHz S RI R 50\n1 -1.0000005 0\n2 1.0000005 0\n3 0 1.0000005\n4 1.01 0\n")
	bad := table.NonPassive()
	if len(bad) != 1 || bad[0].F != 4e6 {
		t.Fatalf("not passive: %+v", bad)
	}
	for f, want := range map[float64]complex128{1e6: 0, 2e6: cmplx.Inf(), 3e6: 50i, 4e6: -10050} {
		if z, _ := table.At(f); !close(z, want, 1e-6) || f < 4e6 && real(z) < 0 {
			t.Errorf("at %g Hz: %v ohm, want %v", f, z, want)
		}
	}
	w := strings.Join(table.Warnings(4e6), "\n")
	if want := "1 of 4 points give power (|S| > 1), the first at 4 MHz with |S| = 1.01: check the calibration and the signs"; w != want {
		t.Errorf("warns %q, want %q", w, want)
	}
}

// TestCoarse: a line resonator whose phase turns by an angle a between two
// points has lost 1 - cos(a/2) of its reflection in the middle; the warning's
// figure is close to it. The limit of 1 % is at 16.2 degrees.
func TestCoarse(t *testing.T) {
	for _, degrees := range []float64{10, 15, 20, 60} {
		a := degrees * math.Pi / 180
		table := &Table{Reference: 50, points: []Point{
			fromReflection(1, cmplx.Rect(1, a/2), 50), fromReflection(2, cmplx.Rect(1, -a/2), 50),
		}}
		lost, sag := 1-math.Cos(a/2), table.sag(1.5)
		if sag > lost || sag < 0.98*lost*math.Cos(a/4)*math.Cos(a/4) {
			t.Errorf("%g deg: %g, lost is %g", degrees, sag, lost)
		}
		if got := len(table.Warnings(1.5)) > 0; got != (degrees > 16.3) {
			t.Errorf("%g deg: warns is %v", degrees, got)
		}
		if len(table.Warnings(1)) > 0 {
			t.Errorf("%g deg: warns at a point", degrees)
		}
	}
}

func TestFromImpedancesRefuses(t *testing.T) {
	nan := complex(math.NaN(), 0)
	for _, tt := range []struct {
		points []Impedance
		want   string
	}{
		{nil, "the table has no points"},
		{[]Impedance{{2e6, 1}, {1e6, 1}}, "point 2: 1 MHz does not come after 2 MHz; list the points with rising frequency"},
		{[]Impedance{{math.NaN(), 1}}, "point 1: the frequency must be a finite number of at least 0"},
		{[]Impedance{{1, nan}}, "point 1: the impedance is not a number"},
		{[]Impedance{{1, -50}}, "point 1: the impedance is a negative resistance; is its sign right?"},
	} {
		if _, err := FromImpedances(tt.points); err == nil || err.Error() != tt.want {
			t.Errorf("%v: %v, want %s", tt.points, err, tt.want)
		}
	}
	table := mustTable(t, Impedance{1, 0}, Impedance{2, cmplx.Inf()})
	if table.Reference != 50 || table.Len() != 2 {
		t.Errorf("short and open: %+v", table)
	}
}
