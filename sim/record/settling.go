package record

// Settling is how the settling run came to steady state.
type Settling struct {
	Settled    bool
	Time       float64 // s, end of the settling run
	Periods    int
	Residual   float64 // estimated remaining error, relative to section maxima
	LoopFactor float64 // amplitude kept per longest round trip, as measured
	LongPath   float64 // s, longest one-way path
	RoundTrip  float64 // s, 2 LongPath
	Ramp       float64 // s, rise of the settling run
	Earliest   float64 // s, no window that begins before this counts
	Mean       float64 // largest mean over the largest fundamental, last window
	Harmonic   float64 // likewise the largest of the second and third harmonics
	Passes     int     // windows in a row, up to the last, that passed every test
	Curve      []SettlingPoint
	Decay      string // for a run that did not settle: what was measured

	Predicted PredictedSettling

	// From the stress run, which starts as the design starts.
	To1Percent float64 // s from switch-on until every junction stays within 1 % of its final phasor; NaN if not reached
	Places     []SettlingPlace
	Echoes     []Echo // in the order of time
	RingDown   []RingDown
}

// SettlingPoint is one comparison of two windows one round trip apart.
type SettlingPoint struct {
	Time     float64 // s, end of the later window
	Gap      float64 // s between the two windows
	Change   float64 // largest change between the windows, relative to section maxima
	Estimate float64 // estimated remaining error, Change rho/(1-rho); NaN before three windows
	Mean     float64 // as of Settling, in the later window
	Harmonic float64
	Passed   bool // every test of the rule
}

// PredictedSettling is what the closed form says of the settling, from the
// slowest natural mode near the source frequency. All are NaN where it was not
// predicted.
type PredictedSettling struct {
	LoopFactor   float64 // amplitude kept per longest round trip
	Q            float64 // w tau/2, loaded
	TimeConstant float64 // tau, s: amplitudes go as e^{-t/tau}; 0 without echoes
	To10Percent  float64 // s: tau ln 10 and so on, from the end of the source's own rise
	To1Percent   float64
	ToTenth      float64 // 0.1 %
	RingDown60   float64 // s from a stop to -60 dB
	Settled      float64 // s, predicted end of the settling run
}

// SettlingPlace is how a junction or a load comes to its final phasor, in the
// stress run. A time is that from switch-on after which the phasor, taken over
// the period that follows, stays within a fraction of its final value; NaN if
// the run did not show that.
type SettlingPlace struct {
	Name                             string
	Kind                             string // "junction" or "load"
	Quantity                         string // "voltage" or, of a load, "current"
	To10Percent, To1Percent, ToTenth float64
	// The departure from the final phasor, relative to it, at some hundred
	// times, for the figure; of junctions only.
	Time, Departure []float64
}

// Echo is the time at which a wave that left the source first comes back to it
// from a place.
type Echo struct {
	Name string // junction
	Time float64
}

// RingDown is how a junction falls after the source has stopped, from the
// amplitude it had at the stop: the time from the stop after which it stays
// below; NaN if the run did not show that.
type RingDown struct {
	Name               string
	To20, To40, To60dB float64
}
