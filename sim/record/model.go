package record

// Model is the network of a case as it was solved.
type Model struct {
	Frequency float64
	Junctions []string
	Lines     []ModelLine // the kinds of line that the sections are made of
	Sections  []ModelSection
	Loads     []ModelPart
	Elements  []ModelPart
	Source    ModelSource
}

// ModelLine is a kind of line: what was given, where it comes from, and how it
// depends on frequency.
type ModelLine struct {
	Name, Text string
	Model      string // "constant" or "dispersive"
	Pedigree   []Pedigree
	Fit        []FitPoint // of a loss table; else empty
	// How far the rational form that is stepped in time is from the exact law,
	// relative to it, at worst from a tenth to ten times the design frequency;
	// 0 for what is not there.
	SeriesResidual, ShuntResidual float64
	// The largest field at the inner conductor of a coaxial line for one volt
	// between the conductors, 1/m; 0 where it is not known.
	FieldPerVolt float64
}

// Pedigree is one piece of data of a line and where it comes from.
type Pedigree struct {
	What, Text string
	Kind       string // measured, datasheet, catalogue, geometry, assumed, given
	Note       string
}

// FitPoint is one row of a loss table beside its fit, dB/m.
type FitPoint struct {
	Frequency     float64 // Hz
	Given, Fitted float64
	Text          string
}

// ModelSection is a section in the equivalent forms of the echo table.
type ModelSection struct {
	Name, Line, From, To string
	Given                string     // the length as the design file gives it
	Length               float64    // m
	Wavelengths          float64    // at the design frequency
	Degrees              float64    // 360 Wavelengths
	Delay                float64    // s
	LossDB               float64    // one way, matched
	Z0                   complex128 // characteristic impedance, ohm
	VelocityFactor       float64    // phase velocity at the design frequency over c
	R, L, G, C           float64    // per metre, at the design frequency
}

// ModelPart is a load or an element as modelled.
type ModelPart struct {
	Name, At, To string     // To is empty for a part to the return conductor
	Given        string     // as the design file gives it: "36.5 ohm + 1.2 uH", "short"
	As           string     // what it was realised as: "series R-L", "exact short", ...
	R, L, C      float64    // series parts, 0 where absent
	Impedance    complex128 // at the design frequency; not used for open and for a transformer
	Open, Short  bool
	Ratio        float64 // turns To over At of an ideal transformer, else 0
}

// ModelSource is the source as modelled.
type ModelSource struct {
	At        string
	Given     string  // "300 V peak EMF", "250 W available"
	EMF       float64 // V peak
	R, L, C   float64
	Impedance complex128
	Available float64 // W; 0 for an ideal source, which has no such limit
	Start     string  // "abrupt, worst phase", "raised-cosine rise over 3 periods, phase 30 deg"
	Stop      string  // empty if the source stays on
}
