package recheck

import (
	"math"
	"strings"
)

// crest is the class of the place of a largest or smallest value. Near it the
// value changes with the square of the distance x, by (Vmax - Vmin)/2 (2 pi
// x/wavelength)^2, so an error u of the value moves it by
//
//	x = wavelength/(2 pi) sqrt(2 u/(Vmax - Vmin))
//
// and by a cell. Crests half a wavelength apart may be as high, and where u is as
// much as the section varies the place means nothing.
func crest(uncertainty string) class {
	return class{number: func(at *place, then, now complex128) (change, allowed float64) {
		grid := at.inCase().Get("grid", "sections", at.section())
		cell, wave := grid.Float("cell_m"), grid.Float("cell_m")*grid.Float("cells_per_wavelength")
		u, varies := at.crestHeight(uncertainty)
		moved := math.Abs(real(now - then))
		if varies <= 2*u {
			return moved, cell * grid.Float("cells")
		}
		between := math.Mod(moved, wave/2)
		return math.Min(moved, math.Min(between, wave/2-between)), cell + wave/(2*math.Pi)*math.Sqrt(2*u/varies)
	}}
}

// crestHeight is the uncertainty of a crest and how much the voltage varies
// along its section, both relative to the largest.
func (at *place) crestHeight(uncertainty string) (u, varies float64) {
	top := at.inCase().Get("fdtd", "sections", at.section())
	most, least := top.Get("voltage_max").Float("value_v"), top.Get("voltage_min").Float("value_v")
	s := at.spread()
	u = s.relative()
	if uncertainty != "" {
		large := s.largeV
		if strings.HasSuffix(uncertainty, "_a") || at.besideText("unit") == "A" {
			large = s.largeI
		}
		u += share(orNothing(at.beside(uncertainty)), large)
	}
	return u, share(most-least, most)
}

// anywhere is the class of a place that says nothing by itself: where of many
// nearly equal errors the largest is.
var anywhere = by(func(at *place, _ float64) float64 {
	grid := at.inCase().Get("grid", "sections", at.section())
	return orNothing(grid.Float("cell_m") * grid.Float("cells"))
})

// A peakKeys says where a peak has its figures.
type peakKeys struct{ value, uncertainty, steady, time string }

// peakTime is the class of the time of a peak: one period. A peak that is not
// above the steady crest returns with every period.
func peakTime(k peakKeys) class {
	return by(func(at *place, _ float64) float64 {
		if at.repeats(k) {
			return orNothing(at.inCase().Float("stress", "duration_s"))
		}
		return orNothing(at.period())
	})
}

// repeats reports whether a peak is one of the steady state.
func (at *place) repeats(k peakKeys) bool {
	s := at.spread()
	steady, err := s.largeV, s.v
	switch {
	case k.steady != "":
		steady = at.beside(k.steady)
	case strings.HasSuffix(k.value, "_a"):
		steady, err = s.largeI, s.i
	}
	return at.beside(k.value) <= steady+err+orNothing(at.beside(k.uncertainty))
}

// peakPhase is the class of the start phase that gives a peak. The peak is a crest
// over the phase too, and the opposite phase gives its mirror image; another
// time of the peak has another phase, by 360 degrees a period.
func peakPhase(k peakKeys) class {
	return class{number: func(at *place, then, now complex128) (change, allowed float64) {
		flat := math.Sqrt(2 * share(orNothing(at.beside(k.uncertainty)), at.beside(k.value)))
		later := math.Abs(at.beside(k.time)-follow(at.then, k.time).Float()) / at.period()
		return math.Abs(math.Remainder(real(now-then), 180)), flat*180/math.Pi + 360*(orNothing(later)+rounding)
	}}
}
