package record

// SpaceTime is the voltage along the main path of a network against place and
// time, from switch-on in the stress run at the start phase that is shown.
//
// The main path runs from the source to the junction that is farthest from it in
// delay, along a tree of the sections that leaves out the shortest of each ring.
type SpaceTime struct {
	Path []PathSection // from the source on; empty if there is no map
	// Envelope says what V is. If it is false V is the instantaneous voltage at
	// the times T and the places Z. If it is true a period is too short for that,
	// and V is the amplitude of the wave, not negative, over the time of a row,
	// of which T is the middle, and at its largest up to half the way to the
	// neighbouring places; it is then the same for every start phase where all
	// were run. Where the lobes of a standing wave are too narrow to be shown,
	// Crests is true too and V is the largest within a quarter of a wavelength.
	Envelope bool
	Crests   bool
	Phase    float64     // degrees, the start phase that is shown
	Z        []float64   // m along the path, rising; at most 320
	T        []float64   // s, in equal steps; at most 240
	V        [][]float64 // V at V[time][place]
	Fronts   []Front     // wave fronts of the first passages, within the times of the map
}

// PathSection is a section of the main path.
type PathSection struct {
	Section  string
	Reversed bool    // the path runs from its To end to its From end
	From, To float64 // m along the path
}

// Front is the way of a wave front along one section of the path, or along the
// part of it that the front passes within the times of the map. A front that
// goes on along the next section is another Front; eleven fronts are followed
// at most, those of the largest steps.
type Front struct {
	Z0, T0, Z1, T1 float64 // m along the path, s
	// Passage is 1 for the front that leaves the source, 2 for what comes back
	// of it from a junction, 3 for what of that is reflected again.
	Passage int
}

// Bounces are the arrivals of the first wave fronts of a unit step of the EMF at
// the junctions of a chain of sections that begins at the source; empty but for
// the note for anything but such a chain.
type Bounces struct {
	Sections     []BounceSection     // from the source on
	Coefficients []BounceCoefficient // of the junctions from the source on
	Arrivals     []Bounce            // in the order of time, those below 0.5 % of the largest left out
	Note         string              // why there is no table, or what the table leaves out
}

// BounceSection is a section of a chain as a wave front sees it.
type BounceSection struct {
	Section  string
	From, To string  // junctions, the nearer to the source first
	Z0       float64 // ohm, at the highest frequencies
	Delay    float64 // s, one way
	// Kept is what is left of a front at the far end. With a loss that depends on
	// frequency a front has no finite step, and Kept is what is left of a wave at
	// the source frequency: a step has come so far about a tenth of a period
	// after its front.
	Kept float64
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
	Section  string  // that it comes along; empty for the step of the source itself
	Step     float64 // V: what it adds to the voltage of the junction, for an EMF that steps by 1 V
	Voltage  float64 // V: the voltage of the junction after it, all steps up to then added, those left out too
}
