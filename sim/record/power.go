package record

// Power is the audit of where the power goes, by both witnesses.
type Power struct {
	Phasor, FDTD PowerAudit
}

// PowerAudit is one witness's audit. Every power is Re(V I*)/2 or a loss worked
// out from the currents and voltages that cause it; none is a difference of
// forward and reflected waves, which is not the power where a characteristic
// impedance is complex.
type PowerAudit struct {
	Available  float64 // W, +Inf for an ideal source
	Delivered  float64 // into the network
	Reflected  float64 // Available less Delivered; NaN for an ideal source
	Sections   []SectionPower
	Elements   []PartPower
	Loads      []PartPower
	Dissipated float64 // in all sections and elements
	InLoads    float64
	Balance    float64 // Delivered less Dissipated less InLoads
	Relative   float64 // |Balance| over the larger of Delivered and Dissipated plus InLoads, or over what is allowed where that is larger still
	Allowed    float64 // what Relative may be; 1 where the network takes no power that can be told from nothing
	Closed     bool
	Stored     float64 // J, mean energy stored in sections and lumped parts
	Q          float64 // w Stored/Delivered, +Inf where no power can be told from nothing
}

// SectionPower is the power of one section.
type SectionPower struct {
	Name       string
	In, Out    float64 // W at the From and at the To end, positive from From to To
	Dissipated float64 // integral of (R |I|^2 + G |V|^2)/2 along it, W
	Stored     float64 // J
}

// PartPower is the power that a load or an element takes up.
type PartPower struct {
	Name  string
	Power float64 // W, the sum of R |I|^2/2
}
