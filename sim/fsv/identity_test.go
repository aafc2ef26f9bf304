package fsv

import (
	"math"
	"slices"
	"testing"
)

// others are choices that one could have made: the identities hold with each.
func others() map[string]method {
	out := map[string]method{"chosen": chosen}
	for name, change := range map[string]func(*method){
		"five DC bins":    func(m *method) { m.dcBins = 5 },
		"squares":         func(m *method) { m.sumOfSquares = true },
		"narrow window":   func(m *method) { m.halfWidth = 1 },
		"sharp window":    func(m *method) { m.halfWidth = 0 },
		"wide window":     func(m *method) { m.halfWidth = 3 },
		"nearer break":    func(m *method) { m.breakOffset = 2 },
		"half of the sum": func(m *method) { m.breakShare = 0.5 },
		"spans of one":    func(m *method) { m.loSpan, m.hiSpan = 1, 1 },
	} {
		m := chosen
		change(&m)
		out[name] = m
	}
	return out
}

// TestIdentities: what follows from the formulas whatever the curve, for any
// choice of what is open. With r = (s-1)/(s+1), a curve against s times itself
// has FDM = 2 (r/2 + r/6 + r/7.2) = (29/18) r.
func TestIdentities(t *testing.T) {
	for name, m := range others() {
		for _, n := range []int{256, 255, 101, leastPoints} {
			y := wave(n)
			against := func(f func(float64) float64) Result {
				return m.compare(slices.Clone(y), apply(y, f))
			}
			if n != leastPoints { // the high part of 16 points is empty with some windows
				for s, want := range map[float64]float64{1.1: 0.076719577, 1.2: 0.146464646} {
					got := against(times(s)).FDM.Value
					if !near(got, 29./18*(s-1)/(s+1)) || math.Abs(got-want) > 5e-10 {
						t.Errorf("%s, %d points, %g times: FDM %.12g, want %.9g", name, n, s, got, want)
					}
				}
			}
			for what, r := range map[string]Result{"itself": against(times(1)), "its negative": against(times(-1))} {
				if r.ADM.Value != 0 || r.FDM.Value != 0 || r.GDM.Value != 0 || r.GDM.Word != "excellent" {
					t.Errorf("%s, %d points, against %s: %g, %g, %g", name, n, what, r.ADM.Value, r.FDM.Value, r.GDM.Value)
				}
			}
			r := against(plus(0.7))
			if !near(r.FDM.Value, 0) || !near(r.GDM.Value, r.ADM.Value) || r.ADM.Value < 0.1 {
				t.Errorf("%s, %d points, against itself and a constant: %g, %g, %g", name, n, r.ADM.Value, r.FDM.Value, r.GDM.Value)
			}
		}
	}
}

// TestAmplitudeOfMultiple: a curve against s times itself has
// ADM = r (1 + <v exp(rv)>), v = |DC|/<|DC|>.
func TestAmplitudeOfMultiple(t *testing.T) {
	const n, s = 200, 1.3
	const r = (s - 1) / (s + 1)
	y := wave(n)
	dc := sum(n, y, func(k int) float64 { return inside(k <= dcBins-1) })
	v := apply(dc, math.Abs)
	v = apply(v, times(1/mean(v)))
	want := r * (1 + mean(apply(v, func(v float64) float64 { return v * math.Exp(r*v) })))
	if got := mustCurves(t, y, apply(y, times(s))).ADM.Value; !near(got, want) {
		t.Errorf("ADM %.12g, want %.12g", got, want)
	}
	// With a DC part that is its mean only, v is 1.
	for i := range y {
		y[i] -= dc[i] - 2
	}
	if got := mustCurves(t, y, apply(y, times(s))).ADM.Value; !near(got, r*(1+math.Exp(r))) {
		t.Errorf("constant DC part: ADM %.12g, want %.12g", got, r*(1+math.Exp(r)))
	}
}

// TestOffset: a constant against another is the offset term alone.
func TestOffset(t *testing.T) {
	one, two := apply(make([]float64, 64), plus(1)), apply(make([]float64, 64), plus(2))
	r := mustCurves(t, one, two)
	if want := math.Exp(1./3) / 3; !near(r.ADM.Value, want) || r.FDM.Value != 0 || r.ADM.Spread != 1 {
		t.Errorf("ADM %g, FDM %g; want %g, 0", r.ADM.Value, r.FDM.Value, want)
	}
	m := chosen
	m.offsetTerm = false
	if r := m.compare(one, two); r.GDM.Value != 0 {
		t.Errorf("without the offset term: GDM %g, want 0", r.GDM.Value)
	}
}

// TestZero: zero curves match, and one against another curve differs by all
// that there is.
func TestZero(t *testing.T) {
	zero := make([]float64, 64)
	r := mustCurves(t, zero, zero)
	if r.GDM.Value != 0 || r.ADM.Word != "excellent" || r.Ripple != 0 || r.FDM.Grade != 1 {
		t.Errorf("zero against zero: %+v", r)
	}
	y := wave(64)
	r = mustCurves(t, zero, y)
	alone := reference(zero, y)
	if !near(r.ADM.Value, mean(alone.adm)) || r.ADM.Value < 1+math.E {
		t.Errorf("zero against a curve: ADM %g, want %g", r.ADM.Value, mean(alone.adm))
	}
}

// TestRipple: how large the features are against the whole.
func TestRipple(t *testing.T) {
	y := make([]float64, 128)
	for i := range y {
		y[i] = 3 + 1e-5*math.Cos(2*math.Pi*20*float64(i)/128)
	}
	r := mustCurves(t, y, apply(make([]float64, 128), plus(3)))
	if math.Abs(r.Ripple-1e-5/3.00001) > 1e-12 || r.ADM.Value < 0.9 {
		t.Errorf("ripple %g, ADM %g: of flat curves the noise is compared", r.Ripple, r.ADM.Value)
	}
}

// TestChoicesMatter: every choice counts by more than rounding, so the record
// has to state it.
func TestChoicesMatter(t *testing.T) {
	y1, y2 := wave(256), wave(256)
	for i := range y2 {
		x := float64(i) / 256
		y2[i] += 0.3*math.Sin(30*x+1) + 0.2*math.Cos(130*x) + 0.3*math.Cos(8*math.Pi*x)
	}
	first := chosen.compare(slices.Clone(y1), slices.Clone(y2)).GDM.Value
	for name, m := range others() {
		got := m.compare(slices.Clone(y1), slices.Clone(y2)).GDM.Value
		t.Logf("%-16s GDM %.3f", name, got)
		if name != "chosen" && math.Abs(got-first) < 1e-6 {
			t.Errorf("%s: GDM stays %g", name, got)
		}
	}
}

// TestFloor: noise beside a sinusoid is a feature until it is below the floor;
// a difference above the floor counts as before.
func TestFloor(t *testing.T) {
	pure, noisy := make([]float64, 512), make([]float64, 512)
	for i := range pure {
		x := 2 * math.Pi * float64(i) / 512
		pure[i] = math.Sin(16 * x)
		noisy[i] = pure[i] + 1e-4*math.Sin(97*x)
	}
	above := func(y1, y2 []float64, floor float64) float64 {
		r, err := CurvesAbove(y1, y2, floor)
		if err != nil {
			t.Fatal(err)
		}
		return r.GDM.Value
	}
	if got := above(pure, noisy, 0); got < 0.1 {
		t.Errorf("noise compared with nothing: GDM %.3g", got)
	}
	if got := above(pure, noisy, 1e-3); got > identityTolerance {
		t.Errorf("noise below the floor: GDM %.3g", got)
	}
	larger := apply(pure, times(1.2))
	if a, b := above(pure, larger, 0), above(pure, larger, 1e-3); math.Abs(a-b) > identityTolerance || a < 0.05 {
		t.Errorf("a larger curve: GDM %.6g and %.6g", a, b)
	}
}
