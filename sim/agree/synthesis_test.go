package agree_test

import (
	"context"
	"math"
	"math/cmplx"
	"testing"

	"gonum.org/v1/gonum/dsp/fourier"

	"linewitness/fdtd"
	"linewitness/phasor"
	"linewitness/sim/line"
	"linewitness/sim/network"
)

// feeder is a feeder of 12 m with a shorted matching stub and a short tail.
func feeder() *network.Network {
	coax := line.Nominal{Z0: 50, VelocityFactor: 0.921, LossAt: 98.1e6, Attenuation: 0.007 / line.NeperDB}.At(98.1e6)
	return &network.Network{
		Frequency: 98.1e6, Junctions: []string{"transmitter", "tee", "flange", "stub end"},
		Sections: []network.Section{
			{Name: "main", From: 0, To: 1, Length: 12, Line: coax},
			{Name: "tail", From: 1, To: 2, Length: 0.932, Line: coax},
			{Name: "stub", From: 1, To: 3, Length: 0.412, Line: coax},
		},
		Branches: []network.Branch{
			{Name: "antenna", A: 2, B: network.Ground, Series: network.Series{R: 28, L: 29.2e-9}},
			{Name: "short", A: 3, B: network.Ground},
		},
		Source: network.Source{EMF: 2000, Series: network.Series{R: 50}},
	}
}

// TestTransientBySynthesis checks the stress run by a way of its own: a burst
// repeated every 128 periods is a sum of sinusoids, the phasor solver answers
// each of them, and the inverse FFT of the answers is the transient. The two
// share nothing but the network.
//
// The lines have constant r, l, g, c, and then skin effect.
func TestTransientBySynthesis(t *testing.T) {
	t.Run("constant", func(t *testing.T) { synthesis(t, feeder()) })
	t.Run("dispersive", func(t *testing.T) {
		net := feeder()
		for k := range net.Sections {
			s := &net.Sections[k]
			s.Line.R *= 30 // enough for the dispersion to show on 12 m
			s.Line, s.Dispersion = line.Disperse(s.Line, net.Omega(), s.Line.R, 0)
		}
		synthesis(t, net)
	})
}

func synthesis(t *testing.T, net *network.Network) {
	// Left out are the parts of the spectrum above twice the carrier, where a
	// raised-cosine rise of 3 periods has some 1e-4 left, and the error of a
	// grid of 80 cells.
	const tolerance = 2e-3
	for _, rise := range []float64{3, 10} {
		period := net.Period()
		net.Source.Start = network.Start{Rise: rise * period, Phase: -math.Pi / 2}
		net.Source.Stop = &network.Stop{At: 50 * period, Fall: rise * period}
		g, err := fdtd.NewGrid(net, 80)
		if err != nil {
			t.Fatal(err)
		}
		st, err := fdtd.Settle(context.Background(), net, g, fdtd.Settings{})
		if err != nil {
			t.Fatal(err)
		}
		s, err := fdtd.StressRun(context.Background(), net, st, fdtd.Settings{})
		if err != nil {
			t.Fatal(err)
		}
		for j, want := range synthesised(t, net, g) {
			got := s.Traces.Junctions[j].A
			peakGot, peakWant, worst := 0.0, 0.0, 0.0
			for n := range min(len(got), len(want)-1) {
				worst = math.Max(worst, math.Abs(got[n]-want[n+1])) // sample n is at step n+1
				peakGot, peakWant = math.Max(peakGot, math.Abs(got[n])), math.Max(peakWant, math.Abs(want[n+1]))
			}
			t.Logf("rise %g, %s: peak %.2f V, synthesis %.2f V, largest difference %.3g V", rise, net.Junctions[j], peakGot, peakWant, worst)
			if top := 1000.0; worst > tolerance*top {
				t.Errorf("rise %g, %s: waveforms differ by %.3g V", rise, net.Junctions[j], worst)
			}
		}
	}
}

// synthesised is the voltage of every junction at the steps of the grid, over
// one repetition.
func synthesised(t *testing.T, net *network.Network, g fdtd.Grid) [][]float64 {
	const periods = 128
	n := periods * g.StepsPerPeriod
	emf := make([]float64, n)
	for i := range emf {
		at := float64(i) * g.Step
		emf[i] = net.Source.EMF * net.Source.Profile(at) * math.Cos(net.Omega()*at+net.Source.Start.Phase)
	}
	fft := fourier.NewFFT(n)
	spectrum := fft.Coefficients(nil, emf)
	out := make([][]complex128, len(net.Junctions))
	for j := range out {
		out[j] = make([]complex128, len(spectrum))
	}
	for k := 1; k < 2*periods; k++ {
		one := *net
		one.Frequency = net.Frequency * float64(k) / periods
		one.Source.EMF = 1
		if cmplx.Abs(spectrum[k]) < 1e-7*net.Source.EMF*float64(n) {
			continue
		}
		s, err := phasor.Solve(&one)
		if err != nil {
			t.Fatal(err)
		}
		for j := range out {
			out[j][k] = s.Junction(j) * spectrum[k] / complex(float64(n), 0)
		}
	}
	var waves [][]float64
	for j := range out {
		waves = append(waves, fft.Sequence(nil, out[j]))
	}
	return waves
}
