package fdtd

import (
	"errors"
	"fmt"
	"math"
	"math/cmplx"

	"linewitness/sim/network"
)

// A Grid is the division of a network into steps and cells.
type Grid struct {
	StepsPerPeriod int       // N: the period is N steps exactly
	Step           float64   // dt, s
	Cells          []int     // n of each section
	Courant        []float64 // S = v dt n/l of each section, at most 1
}

// ErrShortSection says that a section would need more steps per period than
// maxSteps to hold a single cell.
var ErrShortSection = errors.New("fdtd: section too short for the time step")

// maxSteps bounds the steps per period.
const maxSteps = 1 << 20

// unity is how near to 1 a Courant number is taken as 1. A section cut for
// S = 1 misses it by rounding only; its length is then off by no more.
const unity = 1e-9

// candidates bounds the search of NewGrid: some thousand step numbers differ
// enough.
const candidates = 8192

// largestFactor bounds the prime factors of the steps per period: an FFT of n
// points costs n times its largest prime factor.
const largestFactor = 31

// smooth reports whether n has no prime factor above largestFactor.
func smooth(n int) bool {
	for f := 2; f <= largestFactor; f++ {
		for n%f == 0 {
			n /= f
		}
	}
	return n == 1
}

// stepNumbers are the numbers of steps from lo to a quarter more that NewGrid
// tries, at least one.
func stepNumbers(lo int) []int {
	var all []int
	for n := lo; n <= lo+lo/4 || len(all) == 0; n++ {
		if smooth(n) {
			all = append(all, n)
		}
	}
	var out []int
	for i := 0; i < len(all); i += 1 + len(all)/candidates {
		out = append(out, all[i])
	}
	return out
}

// maxCells bounds the cells of a section, as a guard against overflow; the
// cost of a run is the caller's to judge.
const maxCells = 1e12

// NewGrid makes the best grid with at least cells cells per wavelength on
// every section, and at least one cell. With N0 the least number of steps that
// does so, it takes the N in [N0, 1.25 N0] with the smallest error of
// propagation and of characteristic impedance, added up over the sections, among
// those that an FFT likes.
func NewGrid(net *network.Network, cells float64) (Grid, error) {
	lo, err := leastSteps(net, cells)
	if err != nil {
		return Grid{}, err
	}
	best, score := Grid{}, math.Inf(1)
	for _, n := range stepNumbers(lo) {
		g := fixedGrid(net, n)
		if s := g.score(net); s < score {
			best, score = g, s
		}
	}
	return best, nil
}

// leastSteps is the least N from which on every section has a cell, and cells
// of them per wavelength: m cells fit into a section of l wavelengths as soon
// as N >= m/l.
func leastSteps(net *network.Network, cells float64) (int, error) {
	need := cells
	for _, s := range net.Sections {
		l := s.Delay() / net.Period()
		m := math.Max(1, math.Ceil(cells*shortening(s, net.Omega())*l*(1-unity)))
		if m/l > maxSteps {
			return 0, fmt.Errorf("%w: %s (%.3g m) would need %.3g steps per period; make it longer or leave it out",
				ErrShortSection, s.Name, s.Length, m/l)
		}
		need = math.Max(need, m/l*(1-unity))
	}
	for _, s := range net.Sections {
		if n := need * 1.25 * s.Delay() / net.Period(); n > maxCells {
			return 0, fmt.Errorf("fdtd: section %s (%.3g m) would need %.3g cells", s.Name, s.Length, n)
		}
	}
	return int(math.Ceil(need)), nil
}

// shortening is how much shorter the wave on a lossy line is than that of its
// wave front, beta/(w sqrt(LC)) >= 1; a decay as fast counts likewise.
func shortening(s network.Section, omega float64) float64 {
	return math.Max(1, cmplx.Abs(s.At(omega).Propagation(omega))*s.Line.FrontVelocity()/omega)
}

// fixedGrid is the grid with n steps per period, whether good or not.
func fixedGrid(net *network.Network, n int) Grid {
	g := Grid{StepsPerPeriod: n, Step: net.Period() / float64(n)}
	for _, s := range net.Sections {
		full := s.Delay() / g.Step // cells at S = 1
		cells := math.Max(1, math.Floor(full*(1+unity)))
		courant := cells / full
		if courant > 1-unity && courant < 1+unity {
			courant = 1
		}
		g.Cells = append(g.Cells, int(cells))
		g.Courant = append(g.Courant, courant)
	}
	return g
}

// CellsPerWavelength is how many cells of section k make one wavelength.
func (g Grid) CellsPerWavelength(net *network.Network, k int) float64 {
	s := net.Sections[k]
	return float64(g.StepsPerPeriod) * g.Courant[k] / shortening(s, net.Omega())
}

// Refine halves the step and every cell, times times over; every Courant
// number stays what it was.
func (g Grid) Refine(times int) Grid {
	f := 1 << times
	out := Grid{
		StepsPerPeriod: g.StepsPerPeriod * f,
		Step:           g.Step / float64(f),
		Courant:        append([]float64(nil), g.Courant...),
	}
	for _, n := range g.Cells {
		out.Cells = append(out.Cells, n*f)
	}
	return out
}

// TotalCells is the number of cells of all sections.
func (g Grid) TotalCells() int {
	t := 0
	for _, n := range g.Cells {
		t += n
	}
	return t
}

// Updates is the number of cell updates of a number of periods, one lane.
func (g Grid) Updates(periods int) float64 {
	return float64(periods) * float64(g.StepsPerPeriod) * float64(g.TotalCells())
}

// score adds up what the grid does to the waves of each section: the error of
// the propagation over its length, in radians or nepers, and the relative
// error of its characteristic impedance.
func (g Grid) score(net *network.Network) float64 {
	sum := 0.0
	for k, s := range net.Sections {
		n := g.Numerical(net, k)
		at := s.At(net.Omega())
		exact := at.Propagation(net.Omega()) * complex(s.Length, 0)
		sum += cmplx.Abs(n.Exponent-exact) + cmplx.Abs(n.EndImpedance/at.Impedance(net.Omega())-1)
	}
	return sum
}
