package design

import "linewitness/sim/line"

// A File is a design file that was read without a problem.
type File struct {
	Name    string // as given to Load
	Source  []byte
	SHA256  string // of Source, lower-case hex
	Nominal *Design
	Cases   []Case // in the order of the file, the nominal design not among them
	// Attachments are the other files that were read, each once, in the order
	// in which the design first names them.
	Attachments []Attachment
}

// An Attachment is a file that a design file refers to.
type Attachment struct {
	Name   string // as the design file gives it
	Data   []byte
	SHA256 string // of Data, lower-case hex
}

// A Case is a variant of the nominal design, already merged with it.
type Case struct {
	Name   string
	Design *Design
}

// Pos is a place in the design file; lines and columns count from 1, columns
// in characters. The zero Pos means "not in the file" (a default).
type Pos struct{ Line, Column int }

// A Value is a physical quantity: its size in SI units (amplitudes peak,
// angles in radians, ratios as plain numbers) and the text it was read from.
type Value struct {
	SI   float64
	Text string // as written, "300 V peak"
	Pos  Pos
}

// Convention is the sign convention of the complex numbers in the file.
type Convention int

// The conventions. Inside the program all is Engineering.
const (
	Engineering Convention = iota // e^{+jwt}
	Physics                       // e^{-iwt}; values are conjugated on reading
)

// A Design is one case of the design, in SI units, checked and complete.
type Design struct {
	Record       Record
	Convention   Convention
	Source       Source
	Lines        []Line        // in file order
	Sections     []Section     // in file order
	Loads        []Part        // in file order
	Elements     []Part        // in file order
	Junctions    []string      // in the order in which sections, loads, elements and the source name them: source first
	Requirements []Requirement // of the nominal design; the same in every case
	Claims       []Claim       // likewise
	Grid         Grid
	Warnings     []string // of the source, the lines and the parts, each with what it is about
}

// Record is the identity of the document.
type Record struct {
	Title, Number, Revision, Purpose         string
	PreparedBy, CheckedBy, ApprovedBy, Notes string
	Date                                     string     // year-month-day, or empty
	History                                  []Revision // oldest first; empty if the file gives none
}

// Revision is an entry of the revision history. Date and By may be empty.
type Revision struct {
	Revision, Date, By, Text string // Date is year-month-day
}

// Source is the source of the design. Either EMF or Available was given; the
// other follows from |EMF|^2 = 8 R Available.
type Source struct {
	Pos       Pos
	At        string
	Frequency Value
	EMF       Value  // V peak, always filled
	Available *Value // W, if given instead of the EMF
	Impedance Impedance
	Start     Start
	Stop      *Stop
	Warnings  []string
}

// Impedance is a lumped impedance as given.
type Impedance struct {
	Pos  Pos
	Text string // the value or parts as written, "28 ohm, 29.2 nH"; with what it was read from
	From string // for what was read from a table or a file: "the table" or the file's name
	Kind ImpedanceKind
	Z    complex128 // for Complex, ohm at the design frequency, engineering convention
	R    float64    // for SeriesParts, ohm; what q or esr adds is in it
	L    float64    // H
	C    float64    // F; 0 means no capacitor
	Tree Node       // for Combination
}

// A Node is a combination of lumped parts. A leaf has neither Series nor
// Parallel: it is R, L and C in series, of which a zero is not there. Any other
// node has one of the two, and no R, L and C.
type Node struct {
	R, L, C  float64 // ohm, H, F
	Series   []Node
	Parallel []Node
}

// ImpedanceKind says which form an impedance was given in.
type ImpedanceKind int

// The forms of an impedance.
const (
	SeriesParts ImpedanceKind = iota
	Complex
	Short
	Open
	Matched     // the characteristic impedance of the one section that ends there
	Combination // series and parallel combinations, nested
	Transformer // no impedance at all: see Part.Ratio
)

// Start is how the source is switched on.
type Start struct {
	Pos   Pos
	Ramp  bool
	Rise  float64 // s, for a ramp
	Phase float64 // rad
	Worst bool
	Text  string // "abrupt, worst phase", "raised-cosine rise over 3 periods, phase 30 deg"
}

// Stop ends the source.
type Stop struct {
	Pos      Pos
	At, Fall float64 // s
	Text     string
}

// Line is a kind of line.
//
// At the design frequency it has Constants, whatever the model: z0 and
// velocity_factor hold there. The dispersive model has the constants Base at the
// highest frequencies and what Dispersion adds; the constant model has Constants
// throughout, Base is the same and Dispersion is zero.
type Line struct {
	Pos        Pos
	Name       string
	Text       string         // the data as given, in one line for the record
	Model      Model          // constant or dispersive
	Nominal    *Nominal       // nil if r, l, g, c or dimensions were given
	Constants  line.Constants // at the design frequency, always filled
	Base       line.Constants
	Dispersion line.Dispersion
	Pedigree   []Provenance
	Fit        []FitPoint // of a loss table, in its order; else empty
	// FieldPerVolt is the largest electric field in the line, at the inner
	// conductor of a coaxial line given by its dimensions, for one volt between
	// the conductors, 1/m. It is 0 for any other line.
	FieldPerVolt float64
	Rating       Rating
	Warnings     []string
}

// Nominal is the datasheet form of a line.
type Nominal = line.Nominal

// Model says how a line depends on frequency.
type Model string

// The models of a line.
const (
	Constant   Model = "constant"   // r, l, g and c are those of the design frequency throughout
	Dispersive Model = "dispersive" // skin effect and a constant loss tangent
)

// Provenance is one piece of data and where it comes from.
type Provenance struct {
	What string // "velocity factor"
	Text string // "0.66"
	Kind Origin
	Note string // may be empty
}

// Origin says where a piece of data comes from.
type Origin string

// Where data come from.
const (
	Measured      Origin = "measured"
	Datasheet     Origin = "datasheet"
	Catalogue     Origin = "catalogue" // the cable table of the program
	FromGeometry  Origin = "geometry"  // worked out from dimensions
	Assumed       Origin = "assumed"   // not in the file: a default
	GivenInDesign Origin = "given"     // in the design file, which does not say from where
)

// FitPoint is one row of a loss table and what the fit makes of it.
type FitPoint struct {
	Frequency     float64 // Hz
	Given, Fitted float64 // Np/m
	Text          string  // as given, "2.0 dB/100m at 10 MHz"
}

// Residual is Fitted over Given less one.
func (p FitPoint) Residual() float64 { return p.Fitted/p.Given - 1 }

// Rating is what a line, or a section of it, stands. A nil limit was not given.
type Rating struct {
	Voltage, Current *Limit // SI: peak
	// Where the limits come from: "line coax", "section main" or CableTable.
	VoltageSource, CurrentSource string
	MarginDB                     float64 // to be kept below the limits: allowed is limit 10^(-MarginDB/20)
}

// CableTable is the source of a rating that the cable table gives.
const CableTable = "cable table"

// Section is a piece of line. Its rating is its own where it gives one, and for
// the rest that of its line.
type Section struct {
	Pos        Pos
	Name       string
	From, To   string
	Line       string
	Constants  line.Constants // at the design frequency
	Base       line.Constants
	Dispersion line.Dispersion
	Length     Value // SI: metres, whatever unit it was given in
	Rating     Rating
}

// Part is a load or an element. A part to the return conductor has At and an
// empty To; a bridging element and a transformer run from At to To.
type Part struct {
	Pos       Pos
	Name      string
	At, To    string
	Impedance Impedance
	// Ratio is the turns ratio of an ideal transformer, To over At: the voltage
	// at To is Ratio times that at At. It is 0 for what is not a transformer.
	Ratio     float64
	RatioText string // as written, "1:4"
	Warnings  []string
}

// Quantity names what a requirement limits.
type Quantity string

// The quantities a requirement can name.
const (
	VSWR            Quantity = "vswr"
	ReturnLoss      Quantity = "return_loss"
	Reflection      Quantity = "reflection"
	InputImpedance  Quantity = "input_impedance"
	SteadyVoltage   Quantity = "steady_voltage"
	SteadyCurrent   Quantity = "steady_current"
	PeakVoltage     Quantity = "peak_voltage"
	PeakCurrent     Quantity = "peak_current"
	Overshoot       Quantity = "overshoot"
	SettleTime      Quantity = "settle_time"
	LoadPower       Quantity = "load_power"
	Efficiency      Quantity = "efficiency"
	Loss            Quantity = "loss"
	Phase           Quantity = "phase"
	PhaseDifference Quantity = "phase_difference"
	PowerSplit      Quantity = "power_split"
	Agreement       Quantity = "agreement"
)

// Requirement is one requirement. What it is about is in the fields that its
// quantity needs; the others are empty.
type Requirement struct {
	Pos        Pos
	ID         string
	Text       string // the wording of the requirement, optional
	Document   string // where it comes from, optional (key "source")
	Quantity   Quantity
	Section    string
	End        string // "from" or "to"
	At         string // a junction
	Load       string
	Between    [2]string // loads or junctions
	RelativeTo string    // a case name: judge the change from that case
	Min, Max   *Limit
	R, X       *Window  // for input_impedance: windows on its parts
	Within     *Circle  // for input_impedance: a circle in the Z plane
	Settled    float64  // for settle_time: the fraction that counts as settled, default 0.01
	Reference  *Value   // for vswr, return_loss, reflection: a real reference other than the section's own
	Cases      []string // the cases it is judged in, resolved; "nominal" is the nominal design
}

// Limit is a limit with the unit it was given in. SI is in SI units: peak
// amplitudes, phases in radians, ratios as plain numbers (5 % is 0.05),
// powers in W (30 dBm is 1). Where the quantity itself is a
// level in dB (return loss, loss, power split, anything relative to another
// case but a phase) SI is that number of dB.
type Limit struct {
	SI   float64
	Unit string // "V peak", "V rms", "W", "dBm", "dB", "%", "deg", "us", "1", "ohm" ...: how to print it
	Text string // as written
	Pos  Pos
}

// Window bounds one part of an impedance, ohm. Nil means no bound.
type Window struct {
	Min, Max *Limit
}

// Circle is |Z - Of| <= Radius, ohm.
type Circle struct {
	Of     complex128
	Radius float64
	Text   string
	Pos    Pos
}

// Grid steers the time-domain run.
type Grid struct {
	CellsPerWavelength float64 // least number on any section; default 40
	SettleTolerance    float64 // default 1e-4
	Agreement          float64 // limit, default 0.005
	MaxPeriods         int     // default 20000
}
