package fdtd

import (
	"context"
	"math"
	"math/cmplx"
	"testing"

	"linewitness/sim/network"
)

// ripple is the part of the load voltage that alternates from step to step
// over the last period of a run, relative to its amplitude.
func ripple(t *testing.T, rise float64, periods int) float64 {
	t.Helper()
	net := matchedLine(2 * wavelength)
	net.Branches[0].Series = network.Series{R: 5, L: 300e-9}
	net.Source.R = 10
	net.Source.Start.Rise = rise / testFrequency
	g := fixedGrid(net, 10)
	m, err := newModel(net, g)
	if err != nil {
		t.Fatal(err)
	}
	r := m.newRun(context.Background(), Settings{}, newDrive(net.Source, g, 0))
	var last []float64
	for range periods {
		last = last[:0]
		if err := r.period(func(int) { last = append(last, r.lanes[0].j[1]) }); err != nil {
			t.Fatal(err)
		}
	}
	top, sum := 0.0, 0.0
	for i, v := range last {
		top = math.Max(top, math.Abs(v))
		sum += v * float64(1-2*(i%2))
	}
	return math.Abs(sum) / float64(len(last)) / top
}

// TestRippleNeedsARamp: at Courant number 1 the trapezoidal ends hardly damp
// the wave that alternates from cell to cell. An abrupt start on a coarse grid
// excites it, the settling run's ramp does not.
func TestRippleNeedsARamp(t *testing.T) {
	abrupt, ramped := ripple(t, 0, 40), ripple(t, RampPeriods, 40)
	t.Logf("ripple after 40 periods: abrupt %.3g, ramped %.3g of the amplitude", abrupt, ramped)
	if abrupt < 1e-4 {
		t.Errorf("an abrupt start leaves a ripple of %.3g: the trap is not there", abrupt)
	}
	if ramped > abrupt/5 {
		t.Errorf("after the ramp a ripple of %.3g is left", ramped)
	}
}

// TestOffset: an inductive path keeps an offset for L/R after a start, which
// the fundamental does not show. The watch must wait for the mean.
func TestOffset(t *testing.T) {
	net := matchedLine(wavelength / 4)
	net.Source.R = 0
	net.Branches[0].Series = network.Series{R: 1, L: 20e-9} // L/R of 2 periods
	net.Sections[0].Length = wavelength / 100
	g := fixedGrid(net, 100)
	m, err := newModel(net, g)
	if err != nil {
		t.Fatal(err)
	}
	// A sine start gives the largest offset (the current is the integral).
	r := m.newRun(context.Background(), Settings{}, newDrive(net.Source, g, -math.Pi/2))
	rec := newRecorder(t.Context(), m, 4096)
	var first *window
	for range 2 {
		if err := r.period(func(n int) { rec.sample(r.lanes[0], n) }); err != nil {
			t.Fatal(err)
		}
		first = rec.window()
	}
	st := settled(t, net, g, 1e-6)
	phasor := cmplx.Abs(first.branches[0]*1i-st.Branches[0]) / cmplx.Abs(st.Branches[0]) // the lane runs a quarter period late
	if first.mean < 4*phasor || first.mean < 0.1 {
		t.Errorf("after two periods: mean %.3g, phasor error %.3g; the trap is not there", first.mean, phasor)
	}
	if st.Settling.Mean > 1e-6 {
		t.Errorf("settled with a mean of %.3g", st.Settling.Mean)
	}
}

// TestPeakBetweenSamples: the largest sample of a sinusoid may be low by
// 1 - cos(pi/N); the envelope of the quadrature pair is not.
func TestPeakBetweenSamples(t *testing.T) {
	net := matchedLine(2 * wavelength)
	net.Source.Start = network.Start{Rise: 5 / testFrequency, Phase: math.Pi / 10}
	g := fixedGrid(net, 10)
	one := stressed(t, net, g).Voltage.Value
	net.Source.Start.Worst = true
	both := stressed(t, net, g).Voltage.Value
	low := 1 - math.Cos(math.Pi/10)
	if math.Abs(one/1000-(1-low)) > 1e-3 { // the ramp overshoots by less
		t.Errorf("largest sample %.3f V, want %.3f V", one, 1000*(1-low))
	}
	if math.Abs(both/1000-1) > 1e-3 {
		t.Errorf("envelope %.3f V, want 1000 V", both)
	}
}

// TestSpectrumScale: the one-sided amplitude of a line is the phasor's size,
// the mean is not doubled, and a steady state has nothing else.
func TestSpectrumScale(t *testing.T) {
	net := lossyCascade()
	g := fixedGrid(net, 40)
	st := settled(t, net, g, 1e-9)
	for k, a := range st.Spectrum.Amplitude {
		want := 0.0
		if k == st.Spectrum.Periods {
			want = cmplx.Abs(st.Junctions[0])
			if f := st.Spectrum.Frequency[k]; math.Abs(f-testFrequency) > 1 {
				t.Errorf("line at %.6g Hz", f)
			}
		}
		if math.Abs(a-want) > 1e-7*cmplx.Abs(st.Junctions[0]) {
			t.Errorf("%.4g Hz: %.4g V, want %.4g V", st.Spectrum.Frequency[k], a, want)
		}
	}
}

// TestRecorderScale feeds a recorder a known signal: mean, fundamental with
// its phase, second harmonic; voltages at whole steps, currents at half steps.
func TestRecorderScale(t *testing.T) {
	net := matchedLine(wavelength)
	m, err := newModel(net, fixedGrid(net, 16))
	if err != nil {
		t.Fatal(err)
	}
	rec := newRecorder(t.Context(), m, 4096)
	l := m.newLane()
	signal := func(step float64) float64 {
		a := 2 * math.Pi * step / 16
		return 0.25 + 3*math.Cos(a+0.4) + 0.5*math.Cos(2*a+1)
	}
	for n := 1; n <= 16; n++ {
		for i := range l.v[0] {
			l.v[0][i] = signal(float64(n))
		}
		for i := range l.w[0] {
			l.w[0][i] = signal(float64(n) - 0.5)
		}
		rec.sample(l, n)
	}
	w := rec.window()
	const tolerance = 1e-14 // rounding
	want := cmplx.Rect(3, 0.4)
	if cmplx.Abs(w.v[0][3]-want) > tolerance || cmplx.Abs(w.w[0][3]-want) > tolerance {
		t.Errorf("fundamentals %v and %v, want %v", w.v[0][3], w.w[0][3], want)
	}
	if math.Abs(w.mean-0.25/3) > tolerance || math.Abs(w.harmonic-0.5/3) > tolerance {
		t.Errorf("mean %v, harmonic %v of the fundamental; want %v and %v", w.mean, w.harmonic, 0.25/3, 0.5/3)
	}
}
