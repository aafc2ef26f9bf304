package record

// Format is the version of the JSON form. It changes only when a reader of
// the old form would misread the new one.
const Format = 1

// Verdict is the outcome of a case or of a whole design.
type Verdict string

// The verdicts, from best to worst.
const (
	Verified Verdict = "verified"
	NotShown Verdict = "not shown"
	Doubted  Verdict = "claim contradicted" // a figure of the designer's own is not what both witnesses find
	Missed   Verdict = "requirement missed"
	Disagree Verdict = "methods disagree"
	Unsettle Verdict = "not settled"
)

// Rank orders verdicts: a larger rank is worse.
func (v Verdict) Rank() int {
	switch v {
	case Verified:
		return 0
	case NotShown:
		return 1
	case Doubted:
		return 2
	case Missed:
		return 3
	case Disagree:
		return 4
	default:
		return 5
	}
}

// A Record is one verified design.
type Record struct {
	Tool    Tool
	Design  Design
	Verdict Verdict
	Cases   []Case // nominal first, then in the order of the file
	Matrix  Matrix // the cases side by side

	// Attachments are the files that the design file reads, byte for byte, in the
	// order in which it names them; to be kept in the document.
	Attachments []Attachment
}

// Attachment is a file that a design file refers to.
type Attachment struct {
	Name   string // as the design file gives it
	Data   []byte
	SHA256 string // of Data, lower-case hex
}

// Revision is a line of the revision history of the document.
type Revision struct {
	Revision, Date, By, Text string
}

// Tool says what program made the record.
type Tool struct {
	Version string // of linewitness
	Go      string // toolchain and platform, "go1.26.8 linux/amd64"
}

// Design identifies the design and echoes what does not change from case to
// case.
type Design struct {
	Title, Number, Revision, Purpose string
	PreparedBy, CheckedBy            string
	ApprovedBy, Notes                string

	// Date is what is printed, and DateFrom where it is from: "record" (the
	// design file says it), "environment" (SOURCE_DATE_EPOCH), "file" (the time
	// of the design file) or "" (there is none).
	Date, DateFrom string
	History        []Revision // oldest first

	File       string // base name of the design file
	SHA256     string // of the design file, hex
	Source     []byte // the design file itself, for the listing
	Convention string // "engineering" or "physics"
	Agreement  float64
	Tolerance  float64 // settle tolerance
	MaxPeriods int

	// The choices that the standard of the feature selective validation leaves
	// open, one a line.
	FSVChoices []string
}

// A Case is the nominal design or one of its variants, solved and judged.
type Case struct {
	Name         string
	Verdict      Verdict
	Model        Model
	Phasor       Steady
	FDTD         Steady
	Settling     Settling
	Stress       Stress
	Agreement    Agreement
	Grid         Grid
	Requirements []Requirement
	Ratings      []Rating // worst first; empty where nothing is rated
	Claims       []Claim  // those made of this case, in the order of the file
	Convergence  Convergence
	Fidelity     []Fidelity
	Power        Power
	Warnings     []string

	// What only the figures and the CSV files need.
	Profiles  []Profile  // one a section, in the order of Model.Sections
	Waveforms []Waveform // source first, then junctions, then loads
	Spectrum  Spectrum
	SpaceTime SpaceTime
	Bounces   Bounces
}

// Rating compares one section with what it is rated for, in one case.
type Rating struct {
	Section, Quantity string  // "voltage" or "current"
	Unit              string  // "V" or "A", all values peak
	Steady            float64 // largest along the section in steady state, the worse witness
	SteadyAt          float64 // m
	Peak              float64 // largest at any time
	PeakAt, PeakTime  float64 // m, s
	Uncertainty       float64 // of the larger of the two
	Rated             float64 // the limit as given
	Text              string  // the limit in words, "3.7 kV rms"
	Source            string  // where it comes from
	Advisory          bool    // from memory: it warns and does not count in the verdict
	Derating          float64 // dB
	Allowed           float64 // Rated less Derating
	Margin            float64 // Allowed less the larger value; negative beyond
	MarginDB          float64 // 20 lg of Allowed over the larger value
	MarginPercent     float64 // of Allowed
	Verdict           RequirementVerdict
	Field             float64 // V/m, peak, at the inner conductor for the larger voltage; 0 where not known
}

// Stress is what happened over all time, from the design's own start.
type Stress struct {
	Profile  string // as ModelSource.Start
	Duration float64
	Worst    bool // every start phase was considered
	Voltage  Peak
	Current  Peak
	Sections []StressSection
	Overshot float64 // largest |v| over the largest steady |V| of the network, minus 1
}

// Peak is the largest instantaneous value anywhere.
type Peak struct {
	Value   float64
	Section string
	At      float64 // m from the From end
	Time    float64 // s
	Phase   float64 // degrees: the start phase that gives it

	Uncertainty float64 // change from grid to grid and from an edge to the bare jump, what samples may miss, what the end of the run leaves open
}

// StressSection is the largest value along one section.
type StressSection struct {
	Name             string
	Voltage, Current float64
	VoltageAt        float64 // m
	CurrentAt        float64
	VoltageTime      float64 // s
	CurrentTime      float64
	SteadyVoltage    float64 // largest steady |V| along the section, for the overshoot

	VoltageUncertainty, CurrentUncertainty float64 // as of Peak
}

// Agreement compares the two witnesses at the grid's own points.
type Agreement struct {
	Voltage, Current float64 // largest |difference| over the section's largest, over all sections
	RMS              float64
	Expected         float64 // what the grid and the settling residual explain
	Worst            WorstPlace
	Limit            float64
	Sections         []AgreementSection
}

// WorstPlace is where the agreement is worst.
type WorstPlace struct {
	Section  string
	At       float64 // m
	Quantity string  // "voltage" or "current"
}

// AgreementSection is the agreement on one section.
type AgreementSection struct {
	Name                     string
	Voltage, Current         float64
	ExpectedVoltage          float64
	ExpectedCurrent          float64
	VoltageAt, CurrentAt     float64
	VoltageScale, CurrentMax float64
}

// Grid is the grid of the time-domain run.
type Grid struct {
	StepsPerPeriod int
	Step           float64 // s
	Sections       []GridSection
	Updates        float64 // cell updates done, both runs
}

// GridSection is the grid on one section.
type GridSection struct {
	Name               string
	Cells              int
	Cell               float64 // m
	Courant            float64
	CellsPerWavelength float64
	Points             int     // voltage points compared and drawn
	PhaseErrorDegrees  float64 // predicted over the whole section
}

// RequirementVerdict is the outcome of one requirement in one case.
type RequirementVerdict string

// The requirement verdicts.
const (
	Met         RequirementVerdict = "met"
	MissedReq   RequirementVerdict = "missed"
	NotShownReq RequirementVerdict = "not shown"
)

// Requirement is one requirement judged in one case.
type Requirement struct {
	ID, Text, Source string
	Quantity         string // as in the design file
	Subject          string // what it is about, in words: "main, from end"
	Section          string // the section it is about; empty for a junction, a load or the whole network
	Unit             string // unit of the fields below: "V peak", "dB", "1", ...
	Value            float64
	Min, Max         *float64 // limits, in Unit
	Limit            string   // in words: "at most 1.95 kV peak"
	Margin           float64  // distance to the nearer limit, in Unit; negative outside
	MarginDB         float64  // the same in dB where that has a meaning, else NaN
	MarginPercent    float64  // of the limit; NaN where that has no meaning
	Uncertainty      float64  // in Unit
	Verdict          RequirementVerdict
	Method           string // "phasor", "fdtd" (the worse witness), "fdtd only"
	Note             string // why it is not shown, or empty
}

// Profile is what is drawn along one section.
type Profile struct {
	Section string
	ZV, ZI  []float64    // m from the From end: voltage points and current points
	VF, IF  []complex128 // fdtd
	VP, IP  []complex128 // phasor, at the same points
	EV, EI  []float64    // expected error at the same points, V and A
	PeakZV  []float64    // running peak: places and values
	PeakV   []float64
	PeakZI  []float64
	PeakI   []float64
}

// Waveform is one quantity against time in the stress run at the start phase
// that gives the largest voltage.
type Waveform struct {
	Name     string // "source voltage", "mast_foot", ...
	Where    string // junction or load
	Quantity string // "voltage" or "current"
	Unit     string // "V" or "A"
	Start    float64
	Step     float64 // s between samples
	Samples  []float64
	Steady   float64 // amplitude of the closed form's phasor
	Tail     Tail
}

// Tail is the last periods of the waveform, with the phasor's own waveform.
type Tail struct {
	Start   float64 // s
	Step    float64
	Samples []float64
	Phasor  []float64 // Re(P e^{jwt}) at the same times, at the same start phase; nil if the source has stopped
}

// Spectrum is the one-sided amplitude spectrum of a probe over the last whole
// periods of the settling run.
type Spectrum struct {
	Where     string
	Periods   int
	Frequency []float64 // Hz
	Amplitude []float64 // V peak (the mean at index 0)
}
