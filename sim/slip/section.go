package slip

import (
	"math"
	"math/cmplx"

	"linewitness/sim/line"
	"linewitness/sim/network"
)

// A Quote is the loss of a line as its data give it at another frequency.
type Quote struct {
	Frequency   float64 // Hz
	Attenuation float64 // Np/m at that frequency
}

// A wave is a section at the source frequency.
type wave struct {
	alpha, beta float64 // Np and rad, over its whole length
	z0          complex128
}

// A piece is a section with what its slips may need to know.
type piece struct {
	wave
	air    float64 // electrical length at the speed of light, rad
	quoted float64 // loss at the frequency it is quoted at, Np; NaN if none is
	ratio  float64 // design frequency over quoted frequency
}

func waveOf(s network.Section, omega float64) wave {
	c := s.At(omega)
	g := c.Propagation(omega) * complex(s.Length, 0)
	return wave{real(g), imag(g), c.Impedance(omega)}
}

// section is s with the wave w instead of its own: constants that have, at this
// one frequency, R + jwL = gamma Z0 and G + jwC = gamma/Z0. They may be
// negative, which only the closed form takes.
func (w wave) section(s network.Section, omega float64) network.Section {
	g := complex(w.alpha/s.Length, w.beta/s.Length)
	z, y := g*w.z0, g/w.z0
	s.Line = line.Constants{R: real(z), L: imag(z) / omega, G: real(y), C: imag(y) / omega}
	s.Dispersion = line.Dispersion{}
	return s
}

// input is the impedance that the wave makes of z at its other end; z may be
// infinite.
func (w wave) input(z complex128) complex128 {
	t := cmplx.Tanh(complex(w.alpha, w.beta))
	if cmplx.IsInf(z) {
		return w.z0 / t
	}
	return w.z0 * (z + w.z0*t) / (w.z0 + z*t)
}

const (
	turn   = 2 * math.Pi
	degree = 180 / math.Pi // of a radian
	foot   = 0.3048        // m, exact
)

// A lineSlip is a slip in the data of a section. It gives the wave that was
// calculated with.
type lineSlip struct {
	ID
	// reflected marks a slip that is made only where a reflection is carried
	// along the line, not where power or voltage is.
	reflected bool
	of        func(piece) wave
}

// lineSlips are the slips that can be made in every section or in one.
var lineSlips = []lineSlip{
	{VelocityOmitted, false, func(p piece) wave { return p.turned(p.air) }},
	{VelocityTwice, false, func(p piece) wave { return p.turned(p.beta * p.beta / p.air) }},
	// Whoever takes a length for an angle does so modulo a turn. The turn that
	// is added keeps a maximum and a minimum on the line.
	{DegreesForRadians, false, func(p piece) wave { return p.turned(turn + math.Mod(p.beta*degree, turn)) }},
	{RadiansForDegrees, false, func(p piece) wave { return p.turned(p.beta / degree) }},
	{MetresForFeet, false, func(p piece) wave { return wave{p.alpha * foot, p.beta * foot, p.z0} }},
	{FeetForMetres, false, func(p piece) wave { return wave{p.alpha / foot, p.beta / foot, p.z0} }},
	{NeperForDecibel, false, func(p piece) wave { return p.faded(p.alpha * line.NeperDB) }},
	{DecibelForNeper, false, func(p piece) wave { return p.faded(p.alpha / line.NeperDB) }},
	{Per100Metres, false, func(p piece) wave { return p.faded(p.alpha / foot) }},
	{Per100Feet, false, func(p piece) wave { return p.faded(p.alpha * foot) }},
	{PerKilometre, false, func(p piece) wave { return p.faded(p.alpha * 10) }},
	{PerHundredForKilometre, false, func(p piece) wave { return p.faded(p.alpha / 10) }},
	{LossUnscaled, false, func(p piece) wave { return p.faded(p.quoted) }},
	{LossScaledLinear, false, func(p piece) wave { return p.faded(p.quoted * p.ratio) }},
	{LossScaledBack, false, func(p piece) wave { return p.faded(p.quoted / math.Sqrt(p.ratio)) }},
	{LossOmitted, false, func(p piece) wave { return wave{0, p.beta, complex(cmplx.Abs(p.z0), 0)} }},
	{OneWayLoss, true, func(p piece) wave { return p.faded(p.alpha / 2) }},
	{RoundTripLoss, true, func(p piece) wave { return p.faded(p.alpha * 2) }},
	{TowardLoad, false, func(p piece) wave { return p.turned(-p.beta) }},
	{ImpedanceReal, false, func(p piece) wave { return wave{p.alpha, p.beta, complex(cmplx.Abs(p.z0), 0)} }},
}

// turned is the wave with another phase along it.
func (w wave) turned(beta float64) wave {
	w.beta = beta
	return w
}

// faded is the wave with another loss, or itself if that is not known.
func (w wave) faded(alpha float64) wave {
	if !math.IsNaN(alpha) {
		w.alpha = alpha
	}
	return w
}
