package fdtd

import (
	"math"
	"math/cmplx"

	"gonum.org/v1/gonum/dsp/fourier"
)

// Steady is the steady state found by a settling run. Phasors are peak,
// relative to the EMF; see package network for directions.
type Steady struct {
	Grid      Grid
	Sections  []Standing
	Junctions []complex128 // V
	Branches  []complex128 // A, from A to B; 0 for an open branch
	Source    complex128   // A, out of the source
	Settling  Settling
	Spectrum  Spectrum
	Updates   float64 // cell updates done
}

// Standing is the standing wave on one section.
type Standing struct {
	ZV []float64 // m from the From end, recorded cell edges
	V  []complex128
	ZI []float64 // recorded cell centres
	I  []complex128
	// At the two ends, where the current is that of the first or last cell
	// centre and of the half cell between.
	VFrom, IFrom, VTo, ITo complex128
	// The integrals of |V|^2, V^2 m, and of |I|^2, A^2 m, along the section, from
	// all its cells whether recorded or not: the trapezoidal rule over the edges
	// and the midpoint rule over the centres, of the squares averaged over the
	// last window. See Grid.Loss for what they are good for.
	SquareV, SquareI float64
}

// Spectrum is a one-sided amplitude spectrum of the source voltage.
type Spectrum struct {
	Periods   int
	Frequency []float64 // Hz
	Amplitude []float64 // V; the mean comes first
}

func (s *settler) steady() *Steady {
	m, w := s.run.m, s.last
	out := &Steady{
		Grid:      m.grid,
		Junctions: w.junctions,
		Source:    -w.branches[m.source],
		Settling:  s.watch.Settling,
		Updates:   s.run.updates,
	}
	for k := range w.v {
		out.Sections = append(out.Sections, s.standing(k))
	}
	for _, at := range m.branch {
		i := complex128(0)
		if at >= 0 {
			i = w.branches[at]
		}
		out.Branches = append(out.Branches, i)
	}
	return out
}

func (s *settler) standing(k int) Standing {
	m, w := s.run.m, s.last
	sec, g := m.net.Sections[k], m.grid
	dx := sec.Length / float64(g.Cells[k])
	out := Standing{V: w.v[k]}
	for _, i := range s.rec.vi[k] {
		out.ZV = append(out.ZV, float64(i)*dx)
	}
	for p, i := range s.rec.wi[k] {
		out.ZI = append(out.ZI, (float64(i)+0.5)*dx)
		out.I = append(out.I, w.w[k][p]/complex(m.z[k], 0))
	}
	out.VFrom, out.VTo = out.V[0], out.V[len(out.V)-1]
	// The half cell takes half of a cell's admittance; the current at the end
	// is an average over the step like that of a branch.
	_, yd := g.cell(m.net, k)
	half, cos := yd/2, math.Cos(math.Pi/float64(g.StepsPerPeriod))
	out.IFrom = (out.I[0] + half*out.VFrom) / complex(cos, 0)
	out.ITo = (out.I[len(out.I)-1] - half*out.VTo) / complex(cos, 0)
	out.SquareV, out.SquareI = s.rec.integrals(k)
	return out
}

// spectrumPeriods is the length of the record of a spectrum: it shows what
// lies between the harmonics to an eighth of the source frequency. Where a
// period has very many steps the record has fewer periods, so that no more than
// spectrumSamples are transformed at once.
const (
	spectrumPeriods = 8
	spectrumSamples = 1 << 18
)

// spectrum goes on for some periods and transforms the source voltage.
func (s *settler) spectrum() (Spectrum, error) {
	r := s.run
	at := r.m.net.Source.At
	count := min(spectrumPeriods, max(1, spectrumSamples/r.m.grid.StepsPerPeriod))
	var seq []float64
	for range count {
		if err := r.period(func(int) { seq = append(seq, r.lanes[0].j[at]) }); err != nil {
			return Spectrum{}, err
		}
	}
	n := float64(len(seq))
	out := Spectrum{Periods: count}
	for k, c := range fourier.NewFFT(len(seq)).Coefficients(nil, seq) {
		a := 2 * cmplx.Abs(c) / n // one-sided, but for the mean and the highest
		if k == 0 || 2*k == len(seq) {
			a /= 2
		}
		out.Frequency = append(out.Frequency, float64(k)/float64(count)*r.m.net.Frequency)
		out.Amplitude = append(out.Amplitude, a)
	}
	return out, nil
}
