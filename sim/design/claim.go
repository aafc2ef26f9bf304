package design

// The quantities that a claim can name and a requirement cannot.
const (
	Voltage Quantity = "voltage" // the phasor of a junction, or of a load across it
	Current Quantity = "current" // the phasor at an end of a section, into a load, or out of the source
)

// A Claim is a figure of the designer's own. What it is about is in the fields
// of Requirement that its quantity needs, as for a requirement; it has no
// limits and no RelativeTo.
type Claim struct {
	Requirement            // Cases holds the one case that it is made of
	Value       complex128 // SI, engineering convention; a real quantity has no imaginary part
	Complex     bool       // both parts are claimed: an impedance, or a phasor or a reflection coefficient with its angle
	Level       bool       // the quantity is a level in dB: return loss, loss, power split
	Unit        string     // as of Limit
	Of          string     // the text of the value as written, in the convention of the file
	// Tolerance is the largest |witness - Value| that confirms, in SI units:
	// of a percentage that part of |Value|, of a complex value a radius.
	Tolerance float64
	// ToleranceText is the tolerance as written, but for a percentage that says
	// by itself not what of: "1 percentage point" of a value in %, "5 % of 0.85 dB".
	ToleranceText string
}
