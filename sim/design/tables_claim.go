package design

import "slices"

// A claimed is what the walker knows of one quantity of claims. Its limits are
// the dimension of its value.
type claimed struct {
	judged
	parts parts
}

// parts says what of a complex number the value of a claim gives.
type parts int

const (
	sizeOnly   parts = iota // a real quantity
	sizeOrBoth              // a size, or a complex number
	bothParts               // a complex number, though its imaginary part may be left out
)

// claimPrefix begins the names of the tables of claims in the schema.
const claimPrefix = "claim_"

// claimable are the quantities that can be claimed.
var claimable = map[Quantity]claimed{
	VSWR:            required(VSWR, sizeOnly),
	ReturnLoss:      required(ReturnLoss, sizeOnly),
	Reflection:      required(Reflection, sizeOrBoth),
	InputImpedance:  required(InputImpedance, bothParts),
	SteadyVoltage:   required(SteadyVoltage, sizeOnly),
	SteadyCurrent:   required(SteadyCurrent, sizeOnly),
	PeakVoltage:     required(PeakVoltage, sizeOnly),
	PeakCurrent:     required(PeakCurrent, sizeOnly),
	Overshoot:       required(Overshoot, sizeOnly),
	SettleTime:      required(SettleTime, sizeOnly),
	LoadPower:       required(LoadPower, sizeOnly),
	Efficiency:      required(Efficiency, sizeOnly),
	Loss:            required(Loss, sizeOnly),
	Phase:           required(Phase, sizeOnly),
	PhaseDifference: required(PhaseDifference, sizeOnly),
	PowerSplit:      required(PowerSplit, sizeOnly),
	Voltage:         {judged{table: claimOf(Voltage, may("at", "load"), either(true, "at", "load")), limits: voltage, impossible: amplitude}, sizeOrBoth},
	Current: {judged{
		table: claimOf(Current, may("section", "end", "at", "load"), choice{true, []form{
			{keys: []string{"section", "end"}, need: []string{"section", "end"}}, {keys: []string{"at"}}, {keys: []string{"load"}},
		}}),
		limits: current, impossible: amplitude,
	}, sizeOrBoth},
}

// claimNames are the quantities of claims in the order of hints.
var claimNames = append(slices.DeleteFunc(slices.Clone(quantityNames), func(q string) bool { return q == string(Agreement) }),
	string(Voltage), string(Current))

// claimOf makes the table of a quantity from what its claim names.
func claimOf(q Quantity, own []key, choices ...choice) *table {
	keys := slices.Concat(must("id", "quantity"), own, must("value", "tolerance"), may("case", "text", "source"))
	return &table{claimPrefix + string(q), keys, choices}
}

// required is a quantity that requirements have too. What it is about is named
// as there: the keys and choices of its requirement without those of limits.
func required(q Quantity, p parts) claimed {
	kind := quantities[q]
	limiting := []string{"id", "quantity", "min", "max", "relative_to", "cases", "text", "source"}
	if q == InputImpedance {
		limiting = append(limiting, "r", "x", "within")
		kind.limits = resistance
	}
	own := slices.DeleteFunc(slices.Clone(kind.table.keys), func(k key) bool { return contains(limiting, k.name) })
	choices := slices.DeleteFunc(slices.Clone(kind.table.choices), func(c choice) bool { return contains(limiting, c.forms[0].keys[0]) })
	kind.table = claimOf(q, own, choices...)
	return claimed{kind, p}
}

// bands are the dimensions of the tolerance of a value. They have no dBm and
// no :1, which are not units of a difference, and all have %, if only to be
// told why not.
var bands = map[*dimension]*dimension{
	vswrRatio:  band(plain, "0.02"),
	reflected:  band(plain, "0.02"),
	resistance: band(resistance, "1 %"),
	voltage:    band(voltage, "1 %"),
	current:    band(current, "1 %"),
	power:      band(watts, "1 %"),
	timeSpan:   band(timeSpan, "50 ns"),
	level:      band(level, "0.1 dB"),
	percentage: {"tolerance", percentage.units, percentage.accepts, "1 %"},
	angle:      {"tolerance", merged(angle.units, percentage.units), angle.accepts, "0.5 deg"},
}

// watts is power as a size, without dBm.
var watts = &dimension{"power", prefixed("W", "", "k", "m", "M", "u"), "W, kW, mW, MW, uW", "5 W"}

func band(d *dimension, example string) *dimension {
	return &dimension{"tolerance", merged(d.units, percentage.units), "% or " + d.accepts, example}
}

// example is what a missing key of a claim looks like.
func (c claimed) example(key string) string {
	switch key {
	case "value":
		return c.limits.example
	case "tolerance":
		return bands[c.limits].example
	}
	return ""
}
