package fdtd

// Settings steer a run. Zero fields take the defaults.
type Settings struct {
	Tolerance  float64 // remaining error allowed in steady state, default 1e-4
	MaxPeriods int     // cap on a run, default 20000
	MaxPoints  int     // recorded points a section, default 4096
	// Rest is how near, relative to the largest amplitude, a waveform must keep
	// to the steady state that a stress run was given, for the network to
	// count as at rest; default 1e-3. It must be above the error of that
	// steady state on the grid of the run.
	Rest float64
	// Phasor is how near, relative to its own amplitude, the phasor of every
	// junction must have come to that of the steady state before a stress run
	// counts as at rest; 0 leaves that to Rest. Junctions with less than a tenth
	// of the largest amplitude are not waited for.
	Phasor float64
	// Still is how many periods at least a stress run goes on at rest, where the
	// source does not stop, for whoever wants to look at its end.
	Still int
	// Exactly, if not 0, is the length of a settling run in periods, whatever
	// the rule says: runs on several grids compare the same moment.
	Exactly int
	// Sharp keeps a jump of the source in a stress run as it is, see edgeSteps.
	Sharp bool
	// Map makes a stress run keep the voltage along the main path against time.
	Map bool
	// Progress, if not nil, is called after every period with the number of
	// cell updates done since the last call.
	Progress func(updates float64)
}

// RampPeriods is the raised-cosine rise of the settling run. A whole number:
// the integral of such a rise times cos(wt) is then zero, so that not even an
// inductor across an ideal source keeps an offset.
const RampPeriods = 10

func (s Settings) withDefaults() Settings {
	if s.Tolerance == 0 {
		s.Tolerance = 1e-4
	}
	if s.MaxPeriods == 0 {
		s.MaxPeriods = 20000
	}
	if s.MaxPoints == 0 {
		s.MaxPoints = 4096
	}
	if s.Rest == 0 {
		s.Rest = 1e-3
	}
	return s
}
