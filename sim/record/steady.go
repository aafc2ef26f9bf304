package record

// Steady is one witness's steady state.
type Steady struct {
	Source    SteadySource
	Sections  []SteadySection
	Loads     []SteadyLoad
	Junctions []SteadyJunction
}

// SteadySource is the state at the terminals of the source.
type SteadySource struct {
	V, I      complex128
	Impedance complex128 // that the source sees, V/I
	Power     float64    // W, into the network
	Available float64    // W, +Inf for an ideal source
}

// SteadySection is the state of one section.
type SteadySection struct {
	Name                   string
	From, To               End
	VoltageMax, VoltageMin Extreme
	CurrentMax             Extreme
	Loss                   float64 // W dissipated in the section
}

// End is the state at one end of a section; I is positive from From to To.
type End struct {
	V, I       complex128
	Impedance  complex128 // V/I
	Reflection complex128 // (Z - Z0)/(Z + Z0), Z0 the section's own
	VSWR       float64    // (1+|Reflection|)/(1-|Reflection|), +Inf if that is not positive
}

// Extreme is a value and the place of it.
type Extreme struct {
	Value float64
	At    float64 // m from the From end
}

// SteadyLoad is the state of a load.
type SteadyLoad struct {
	Name  string
	V, I  complex128
	Power float64
}

// SteadyJunction is the voltage of a junction.
type SteadyJunction struct {
	Name string
	V    complex128
}
