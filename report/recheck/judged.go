package recheck

import "math"

// ofStudy: a value on a grid, inside the list of them.
var ofStudy = by(func(at *place, _ float64) float64 { return orNothing(at.beside("../uncertainty")) })

// ofClaim: a value of a claim, or of a slip inside it.
var ofClaim = by(func(at *place, _ float64) float64 {
	if at.key("slips") != "" {
		return orNothing(at.beside("../../uncertainty"))
	}
	return orNothing(at.beside("uncertainty"))
})

// ratedSteady: the uncertainty of a rating is that of the larger of its two values.
var ratedSteady = by(func(at *place, _ float64) float64 {
	s := at.spread()
	if at.besideText("unit") == "A" {
		return s.i
	}
	return s.v
})

// ratedDB: a margin in dB is a ratio of amplitudes.
var ratedDB = by(func(at *place, _ float64) float64 {
	return orNothing(20 / math.Ln10 * at.beside("uncertainty") / at.larger())
})

// ratedField: the field is the larger voltage times a constant.
var ratedField = by(func(at *place, size float64) float64 {
	return orNothing(size * at.beside("uncertainty") / at.larger())
})

// larger is the larger of the steady value and the peak of a rating.
func (at *place) larger() float64 { return math.Max(at.beside("steady"), at.beside("peak")) }
