package slip

import (
	"math"
	"math/cmplx"
	"slices"

	"linewitness/sim/design"
)

// A Reading is a figure as it should have been read.
type Reading struct {
	Quantity design.Quantity
	// Raw is what the figure is taken from, in SI units: the impedance; the
	// reflection coefficient of a reflection, a VSWR or a return loss; the
	// phasor of a voltage, a current or a phase, of a phase difference the first
	// times the conjugate of the second. Of any other quantity it is the figure.
	Raw complex128
	// Form makes the figure of Raw.
	Form func(complex128) complex128
	Z0   complex128 // the reference of an impedance or a reflection, ohm
	// Steps is how many samples a period of the witness has, 0 if it has none.
	Steps int
	// Both says that a figure of a phasor or a reflection coefficient has its
	// angle, and not only its size.
	Both bool
}

// A Misreading is a slip in the result, and the figures that it may give.
type Misreading struct {
	Slip
	Figures []complex128
}

// Misreadings gives what slips in the result make of a reading.
func (r Reading) Misreadings() []Misreading {
	return slices.Concat(r.signs(), r.angles(), r.scales(), r.levels(), r.reflections(), r.spectra())
}

// raw is a misreading of what the figure is taken from.
func (r Reading) raw(id ID, values ...complex128) Misreading {
	m := Misreading{Slip: Slip{ID: id}}
	for _, v := range values {
		m.Figures = append(m.Figures, r.Form(v))
	}
	return m
}

// times is a misreading by a factor, or by one of several.
func (r Reading) times(id ID, factors ...float64) Misreading {
	m := Misreading{Slip: Slip{ID: id}}
	for _, f := range factors {
		m.Figures = append(m.Figures, r.Form(r.Raw)*complex(f, 0))
	}
	return m
}

// signs are those of complex figures and of what is made of them.
func (r Reading) signs() []Misreading {
	conjugate := r.raw(ResultSign, cmplx.Conj(r.Raw))
	half := r.raw(HalfTurn, -r.Raw)
	switch r.Quantity {
	case design.InputImpedance:
		return []Misreading{conjugate, r.raw(CurrentReflection, r.Z0*r.Z0/r.Raw), r.raw(CurrentDirection, -r.Raw)}
	case design.Reflection, design.VSWR, design.ReturnLoss:
		return []Misreading{conjugate, r.raw(CurrentReflection, -r.Raw), r.raw(CurrentDirection, 1/r.Raw)}
	case design.Current:
		return []Misreading{conjugate, half, r.raw(CurrentDirection, -r.Raw)}
	case design.Voltage, design.Phase:
		return []Misreading{conjugate, half}
	case design.PhaseDifference:
		return []Misreading{conjugate, half, r.raw(PhaseReversed, cmplx.Conj(r.Raw))}
	case design.PowerSplit:
		return []Misreading{r.times(SplitReversed, -1)}
	}
	return nil
}

// angles are those of the unit of an angle. An angle is a little ambiguous:
// whoever counts it from 0 to 360 deg slips to another figure than who counts
// from -180 to 180 deg.
func (r Reading) angles() []Misreading {
	size, a := cmplx.Polar(r.Raw)
	other := a - math.Copysign(turn, a)
	turned := func(id ID, f float64) Misreading {
		return r.raw(id, cmplx.Rect(size, a*f), cmplx.Rect(size, other*f))
	}
	switch r.Quantity {
	case design.Phase, design.PhaseDifference:
	case design.Voltage, design.Current, design.Reflection:
		if !r.Both {
			return nil
		}
	default:
		return nil
	}
	return []Misreading{turned(AngleInRadians, 1/degree), turned(AngleInDegrees, degree)}
}

// amplitude reports whether a figure is a voltage or a current.
func amplitude(q design.Quantity) bool {
	switch q {
	case design.SteadyVoltage, design.SteadyCurrent, design.PeakVoltage, design.PeakCurrent, design.Voltage, design.Current:
		return true
	}
	return false
}

// Gained is what a gain of all amplitudes makes of a figure of a quantity.
func Gained(q design.Quantity, figure complex128, gain float64) complex128 {
	switch {
	case amplitude(q):
		return figure * complex(gain, 0)
	case q == design.LoadPower:
		return figure * complex(gain*gain, 0)
	}
	return figure
}

// scales are those of how an amplitude or a ratio is stated.
func (r Reading) scales() []Misreading {
	switch {
	case amplitude(r.Quantity), r.Quantity == design.LoadPower:
		figure := r.Form(r.Raw)
		gain := func(id ID, g float64) Misreading {
			return Misreading{Slip{ID: id}, []complex128{Gained(r.Quantity, figure, g)}}
		}
		return []Misreading{
			gain(RMSForPeak, 1/math.Sqrt2), gain(PeakForRMS, math.Sqrt2),
			gain(PeakToPeakForPeak, 2), gain(PeakForPeakToPeak, 0.5),
			gain(PeakToPeakForRMS, 2*math.Sqrt2), gain(RMSForPeakToPeak, 1/(2*math.Sqrt2)),
		}
	case r.Quantity == design.Reflection, r.Quantity == design.Efficiency:
		return []Misreading{r.times(PercentForRatio, 100), r.times(RatioForPercent, 0.01)}
	case r.Quantity == design.Overshoot:
		return []Misreading{
			r.times(PercentForRatio, 100), r.times(RatioForPercent, 0.01),
			{Slip{ID: TotalForExcess}, []complex128{r.Form(r.Raw) + 1}},
		}
	}
	return nil
}

// levels are those of figures in dB.
func (r Reading) levels() []Misreading {
	switch r.Quantity {
	case design.ReturnLoss, design.PowerSplit:
		return []Misreading{r.times(TenLog, 0.5), r.times(TwentyLog, 2), r.times(LevelSign, -1)}
	case design.Loss:
		return []Misreading{
			r.times(TenLog, 0.5), r.times(TwentyLog, 2), r.times(LevelSign, -1),
			r.times(OneWayLoss, 0.5), r.times(RoundTripLoss, 2),
		}
	}
	return nil
}

// reflections are those of a reflection coefficient as a ratio of powers.
func (r Reading) reflections() []Misreading {
	switch r.Quantity {
	case design.Reflection, design.VSWR, design.ReturnLoss:
		size, a := cmplx.Polar(r.Raw)
		return []Misreading{
			r.raw(PowerReflection, cmplx.Rect(size*size, a)),
			r.raw(VoltageReflection, cmplx.Rect(math.Sqrt(size), a)),
		}
	}
	return nil
}
