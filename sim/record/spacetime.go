package record

// SpaceTime is the voltage along the main path of a network against place and
// time, from switch-on in the stress run at the start phase that is shown.
type SpaceTime struct {
	Path   []PathSection // from the source on; empty if there is no map
	Z      []float64     // m along the path
	T      []float64     // s
	V      [][]float64   // V at V[time][place]
	Fronts []Front       // wave fronts of the first passages
}

// PathSection is a section of the main path.
type PathSection struct {
	Section  string
	Reversed bool    // the path runs from its To end to its From end
	From, To float64 // m along the path
}

// Front is the way of a wave front along one section of the path.
type Front struct {
	Z0, T0, Z1, T1 float64 // m along the path, s
}

// Bounces are the arrivals of the first wave fronts of a unit step at the ends of
// a chain of sections; empty for anything but a chain.
type Bounces struct {
	Coefficients []BounceCoefficient
	Arrivals     []Bounce // in the order of time
}

// BounceCoefficient is what a junction does to a wave front, at the highest
// frequencies: an inductance is open to it and a capacitance a short.
type BounceCoefficient struct {
	Junction                  string
	FromLeft, FromRight       float64 // reflection coefficients of a front that comes from the side of the source, and from the other; NaN where nothing comes from
	ThroughRight, ThroughLeft float64 // transmission coefficients of voltage; NaN where there is nothing beyond
}

// Bounce is the arrival of a wave front at a junction.
type Bounce struct {
	Time     float64 // s
	Junction string
	Section  string
	Step     float64 // V: what it adds to the voltage of the junction, for an EMF that steps by 1 V
	Voltage  float64 // V: the voltage of the junction after it
}
