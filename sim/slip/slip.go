package slip

// An ID names a slip of the catalogue. A smaller one is more usual.
type ID int

// The slips, the most usual first.
const (
	VelocityOmitted ID = iota
	RMSForPeak
	PeakForRMS
	EMFForMatched
	MatchedForEMF
	OtherEnd
	LoadSign
	ResultSign
	StubOnImpedance
	StubInSeries
	StubSign
	OpenForShort
	ShortForOpen
	MetresForFeet
	FeetForMetres
	LossUnscaled
	Per100Metres
	Per100Feet
	LossOmitted
	DegreesForRadians
	RadiansForDegrees
	OneWayLoss
	RoundTripLoss
	TenLog
	TwentyLog
	AvailableForDelivered
	DeliveredForAvailable
	InputForDelivered
	ForwardForDelivered
	MismatchTwice
	TowardLoad
	CurrentReflection
	PhaseReversed
	SplitReversed
	HalfTurn
	AngleInRadians
	AngleInDegrees
	VelocityTwice
	NeperForDecibel
	DecibelForNeper
	PerKilometre
	PerHundredForKilometre
	LossScaledBack
	LossScaledLinear
	PeakToPeakForPeak
	PeakForPeakToPeak
	PeakToPeakForRMS
	RMSForPeakToPeak
	PercentForRatio
	RatioForPercent
	LevelSign
	PowerReflection
	VoltageReflection
	CurrentDirection
	ImpedanceReal
	SourceForced
	SourceOmitted
	SourceSign
	TotalForExcess
	HalfSpectrum
	DoubleSpectrum
	WindowGain
	WindowTwice
	RawSpectrum
	SpectrumScaled
	slips // how many there are
)

// A Slip is a single slip at one place.
type Slip struct {
	ID
	Where string // "every section", "section main", "load aerial"; empty for the result itself
	// Single marks a slip in one of several places of its kind, which is less
	// usual than the same slip in all of them.
	Single bool
}

// singlePenalty is by how many ranks a slip in one place of several stands
// below the same slip in all of them.
const singlePenalty = 12

// Rank orders slips by how usual they are; a smaller rank is more usual.
func (s Slip) Rank() int {
	if s.Single {
		return int(s.ID) + singlePenalty
	}
	return int(s.ID)
}

// Label is the name of the slip with its place.
func (s Slip) Label() string {
	if s.Where == "" {
		return s.Name()
	}
	return s.Name() + ", " + s.Where
}

// Name is the slip in a few words, "velocity factor left out".
func (id ID) Name() string { return catalogue[id].name }

// Says is the slip in a sentence.
func (id ID) Says() string { return catalogue[id].says }

// All gives every slip of the catalogue, the most usual first.
func All() []ID {
	var out []ID
	for id := range slips {
		out = append(out, id)
	}
	return out
}
