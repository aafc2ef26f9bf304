package fdtd

import "math"

// A Map is the voltage along the main path of a network against place and time,
// from switch-on in a stress run. It has at most mapRows times and mapPlaces
// places and ends with the run, or before, see mapPeriods.
//
// If a period is long enough for that it is the instantaneous voltage. Else it
// is the envelope: the amplitude of the wave over the time of a row, a whole
// number of half periods, at its largest among the cells that a place stands
// for. Stripes that are drawn too coarsely show a pattern that is not there; so
// do the lobes of a standing wave, and where they have fewer than
// placesPerLobe places each the envelope is that of the crests: the largest
// within a quarter of a wavelength to either side.
type Map struct {
	Path     []Leg // empty if there is no map
	Envelope bool
	Crests   bool      // of an envelope
	Z        []float64 // m along the path
	T        []float64 // s; of an envelope the middle of the row
	// The only or the cosine lane, and the sine lane or nil, at [time][place]. An
	// envelope is in A alone; of two lanes it is that for any start phase.
	A, B [][]float64
}

// At gives the map for a start phase p, rad: A cos p - B sin p.
func (m Map) At(p float64) [][]float64 {
	if m.B == nil {
		return m.A
	}
	out := make([][]float64, len(m.A))
	for i := range out {
		out[i] = mix(m.A[i], m.B[i], p)
	}
	return out
}

// The size of a map: what a figure can show.
const mapRows, mapPlaces = 240, 320

// A map covers the rise of the source and then mapTrips longest round trips, or
// mapPeriods periods if that is more: the first passages, and of most networks
// how the steady state comes.
const mapTrips, mapPeriods = 3, 12

// rowsPerPeriod is how many rows a period must have for the map to be that of
// the instantaneous voltage.
const rowsPerPeriod = 4

// placesPerLobe is how many places half a wavelength must have for the lobes of
// a standing wave to be shown.
const placesPerLobe = 6

// mapSteps is the number of steps that a map covers if the run is long enough.
func mapSteps(m *model, maxPeriods int) int {
	t := math.Max(mapTrips*2*LongestPath(m.net), mapPeriods*m.net.Period()) + m.net.Source.Start.Rise
	t = math.Min(t, float64(maxPeriods)*m.net.Period())
	return int(math.Ceil(t/m.grid.Step - 1e-9))
}

// strides gives the number of steps, or of other units, between the rows of a
// map at first, and at the end of the planned length, when it has been doubled
// some times. A run that ends early then has hardly fewer rows.
func strides(units, rows int) (first, last int) {
	need := max(1, (units+rows-1)/rows)
	doubled := 0
	for need>>doubled >= 8 { // so that rounding up costs at most a fifth of the rows
		doubled++
	}
	first = (need + 1<<doubled - 1) >> doubled
	return first, first << doubled
}
