package record

import "slices"

// Convergence is what grids of different fineness make of every figure that a
// requirement or the summary uses, and the comparison of each with the closed
// form.
type Convergence struct {
	Grids   []StudyGrid // finest first; one only if the study was left out
	Skipped string      // why it was left out, or empty
	Studies []Study     // of requirements first, in their order, then key figures
}

// Distinct is the study without the key figures that a requirement is about
// too: they have a row of that requirement already.
func (c *Convergence) Distinct() *Convergence {
	out := *c
	out.Studies = slices.DeleteFunc(slices.Clone(c.Studies), func(s Study) bool {
		return s.ID == "" && slices.ContainsFunc(c.Studies, func(o Study) bool {
			return o.ID != "" && o.Quantity == s.Quantity && o.Subject == s.Subject && o.Unit == s.Unit
		})
	})
	return &out
}

// StudyGrid is one grid of the study.
type StudyGrid struct {
	StepsPerPeriod, Cells int
	Step                  float64 // s
}

// Behaviour says how a value goes with the grid.
type Behaviour string

// The behaviours.
const (
	Converging  Behaviour = "converging"           // with an order near the formal one
	OffOrder    Behaviour = "converging off order" // falling, but with another order
	Oscillatory Behaviour = "oscillatory"          // the changes differ in sign
	Diverging   Behaviour = "diverging"            // the changes grow as the grid is refined
	GridFree    Behaviour = "exact"                // no change beyond rounding and what the settling leaves
	TwoGrids    Behaviour = "two grids"            // of a stress run: no order can be observed
	OneGrid     Behaviour = "one grid"             // the study was left out
)

// A Study is one figure on the grids of the study, and against the closed form.
// All values are in Unit.
type Study struct {
	ID                string // of the requirement; empty for a key figure
	Quantity, Subject string
	Unit              string
	Values            []float64 // finest grid first
	Behaviour         Behaviour
	Order             float64 // observed; NaN where none is
	Extrapolated      float64 // to a step of zero; NaN where that has no meaning
	Factor            float64 // 1.25 or 3; 0 where no index is given
	GCI               float64 // grid convergence index of the finest grid
	GCIPercent        float64 // of the finest value; NaN where that has no meaning

	// The validation: Error against Uncertainty. Phasor is NaN for a figure
	// that only the time domain has, and then Explained is true.
	Phasor      float64
	Error       float64 // finest grid less closed form
	Grid        float64 // the larger of GCI and 1.25 times what the dispersion formulas predict
	Settling    float64 // what is left of the settling
	Form        float64 // what the rational forms of dispersive lines make of it
	Rounding    float64
	Uncertainty float64 // the four added up
	Explained   bool    // |Error| <= Uncertainty
}

// Fidelity is the feature selective validation (IEEE Std 1597.1) of one curve
// of the time domain against that of the closed form.
type Fidelity struct {
	Subject string // "main", "source voltage"
	Curve   string // "|V| along the section", "|I| along the section", "waveform"
	Points  int
	Note    string     // why there are no measures, or empty; they are NaN then
	ADM     Difference // amplitude
	FDM     Difference // feature
	GDM     Difference // global
}

// Difference is one difference measure of the feature selective validation.
type Difference struct {
	Value         float64    // mean over the points
	Word          string     // "excellent" ... "very poor"
	Histogram     [6]float64 // part of the points in each of the six grades
	Grade, Spread int        // categories that hold 85 % of the points, from the best, and around the fullest
}
