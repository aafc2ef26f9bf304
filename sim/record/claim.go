package record

// ClaimVerdict is the outcome of a claim.
type ClaimVerdict string

// The claim verdicts.
const (
	Confirmed    ClaimVerdict = "confirmed"    // by both witnesses, uncertainty included
	Contradicted ClaimVerdict = "contradicted" // by both witnesses, uncertainty included
	ClaimOpen    ClaimVerdict = "not shown"    // the uncertainty straddles the tolerance
)

// A Claim is a figure of the designer's own, compared with both witnesses.
type Claim struct {
	ID, Text, Source  string
	Quantity, Subject string
	Case              string
	Unit              string // of the values below: "ohm", "V peak", "1", "deg", ...
	Complex           bool   // both parts are claimed; else the imaginary parts are zero
	Claimed           complex128
	Phasor, FDTD      complex128 // Phasor is NaN for what only the time domain has
	ClaimedText       string     // as the design file gives it
	ToleranceText     string     // likewise
	Tolerance         float64    // in Unit
	Difference        float64    // the larger of |witness - claimed|, in Unit
	Uncertainty       float64    // in Unit
	Verdict           ClaimVerdict
	Slips             []Slip // of a contradicted claim, most likely first
	Finding           string // a sentence: what was found; of a confirmed claim only where a phase is right but for whole turns
}

// A Slip is a single mistake that would give the claimed figure.
type Slip struct {
	Name     string     // short: "velocity factor left out"
	Where    string     // "every section", "section main", "load aerial"; empty for the result itself
	Text     string     // a sentence with the figure
	Value    complex128 // what the slip makes of it, in the claim's Unit
	Also     []string   // other slips that give the same value and cannot be told apart
	Explains []string   // the contradicted claims that it explains, by id
}
