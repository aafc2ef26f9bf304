package design

import (
	"math"
	"slices"
)

// A judged is what the walker knows of one quantity of requirements.
type judged struct {
	table    *table
	limits   *dimension // of min and max; nil if it has windows instead
	relative *dimension // of min and max with relative_to
	// impossible returns why no design can meet a limit, or "". A requirement
	// that cannot be met, or cannot be missed by more than a slip of the pen,
	// is a mistake in the file rather than in the design.
	impossible func(l limits) string
	odd        bool // conjugation turns the sign of the quantity
}

// limits are the limits of a requirement in SI units, infinite if not given.
type limits struct{ min, max float64 }

// largestReflection is the largest reflection coefficient of a passive load,
// 1 + sqrt(2), reached against a characteristic impedance at -45 degrees
// (R.A. Chipman, Transmission Lines, 1968, section 7.6; from memory).
const largestReflection = 1 + math.Sqrt2

// fullTurns bounds what can be meant by a phase, rad.
const fullTurns = 2 * math.Pi

// requirementOf makes the table of a quantity from what its requirement names.
func requirementOf(q Quantity, own []key, choices ...choice) *table {
	keys := slices.Concat(must("id", "quantity"), own, may("min", "max", "cases", "text", "source"))
	limit := choice{required: true, forms: []form{{keys: []string{"min", "max"}}}}
	return &table{"requirement_" + string(q), keys, append(choices, limit)}
}

// either is a choice of which one key may be given, or must.
func either(required bool, a, b string) choice {
	return choice{required, []form{{keys: []string{a}}, {keys: []string{b}}}}
}

var quantities = map[Quantity]judged{
	VSWR: {
		table: requirementOf(VSWR, append(must("section", "end"), may("reference")...)), limits: vswrRatio,
		impossible: func(l limits) string { return when(l.max < 1, "a VSWR is never below 1") },
	},
	ReturnLoss: {
		table: requirementOf(ReturnLoss, append(must("section", "end"), may("reference")...)), limits: level,
		impossible: func(l limits) string { return when(l.max < 0, "the return loss of a passive load is never below 0 dB") },
	},
	Reflection: {
		table: requirementOf(Reflection, append(must("section", "end"), may("reference")...)), limits: reflected,
		impossible: func(l limits) string {
			return when(l.max < 0, "the size of a reflection coefficient is never below 0") +
				when(l.min > largestReflection, "the reflection coefficient of a passive load is never above 2.414")
		},
	},
	InputImpedance: {table: inputImpedanceTable},
	SteadyVoltage: {
		table:  requirementOf(SteadyVoltage, may("section", "at", "relative_to"), either(false, "section", "at")),
		limits: voltage, relative: level, impossible: amplitude,
	},
	SteadyCurrent: {
		table:  requirementOf(SteadyCurrent, may("section", "at"), either(false, "section", "at")),
		limits: current, impossible: amplitude,
	},
	PeakVoltage: {
		table:  requirementOf(PeakVoltage, may("section", "at"), either(false, "section", "at")),
		limits: voltage, impossible: amplitude,
	},
	PeakCurrent: {
		table:  requirementOf(PeakCurrent, may("section", "at"), either(false, "section", "at")),
		limits: current, impossible: amplitude,
	},
	Overshoot: {
		table: requirementOf(Overshoot, may("section", "at"), either(false, "section", "at")), limits: percentage,
		impossible: func(l limits) string { return when(l.max < -1, "an overshoot is never below -100 %") },
	},
	SettleTime: {
		table: requirementOf(SettleTime, may("at", "within")), limits: timeSpan,
		impossible: func(l limits) string { return when(l.max <= 0, "nothing settles before it has begun") },
	},
	LoadPower: {
		table: requirementOf(LoadPower, append(must("load"), may("relative_to")...)), limits: power, relative: level,
		impossible: func(l limits) string { return when(l.max < 0, "the power into a passive load is never below 0") },
	},
	Efficiency: {
		table: requirementOf(Efficiency, may("load")), limits: percentage,
		impossible: func(l limits) string {
			return when(l.max < 0 || finite(l.max) && l.max > 1 || l.min > 1 || finite(l.min) && l.min < 0, "an efficiency is from 0 to 100 %")
		},
	},
	Loss: {
		table: requirementOf(Loss, may("section", "load"), either(true, "section", "load")), limits: level,
		impossible: func(l limits) string { return when(l.max < 0, "a passive network has no loss below 0 dB") },
	},
	Phase: {
		table: requirementOf(Phase, may("at", "load", "relative_to"), either(true, "at", "load")), limits: angle, relative: angle,
		impossible: turns, odd: true,
	},
	PhaseDifference: {table: requirementOf(PhaseDifference, must("between")), limits: angle, impossible: turns, odd: true},
	PowerSplit:      {table: requirementOf(PowerSplit, must("between")), limits: level},
	Agreement: {
		table: requirementOf(Agreement, nil), limits: percentage,
		impossible: func(l limits) string { return when(l.max <= 0, "no two solutions agree to the last digit") },
	},
}

var inputImpedanceTable = &table{
	def: "requirement_" + string(InputImpedance),
	keys: slices.Concat(must("id", "quantity", "section", "end"),
		may("r", "x", "within", "cases", "text", "source")),
	choices: []choice{{required: true, forms: []form{{keys: []string{"r", "x"}}, {keys: []string{"within"}}}}},
}

// quantityNames are the quantities in the order of hints.
var quantityNames = []string{
	string(VSWR), string(ReturnLoss), string(Reflection), string(InputImpedance),
	string(SteadyVoltage), string(SteadyCurrent), string(PeakVoltage), string(PeakCurrent),
	string(Overshoot), string(SettleTime), string(LoadPower), string(Efficiency), string(Loss),
	string(Phase), string(PhaseDifference), string(PowerSplit), string(Agreement),
}

func amplitude(l limits) string {
	return when(l.max < 0, "an amplitude is never below 0")
}

func turns(l limits) string {
	return when(finite(l.min) && math.Abs(l.min) > fullTurns || finite(l.max) && math.Abs(l.max) > fullTurns,
		"a phase is from -360 to 360 deg")
}

func finite(v float64) bool { return !math.IsInf(v, 0) }

func when(is bool, reason string) string {
	if is {
		return reason
	}
	return ""
}
