package design

// The mappings of loads, elements and what they are made of.
var (
	loadTable = &table{
		def: "load", keys: append(must("at"), impedanceKeys...),
		choices: []choice{{true, impedanceForms}, qualityChoice},
	}
	elementTable = &table{
		def: "element", keys: append(may("at", "between", "from", "to", "ratio"), impedanceKeys...),
		choices: []choice{placeChoice, {true, append(impedanceForms[:len(impedanceForms):len(impedanceForms)], form{keys: []string{"ratio"}})}, qualityChoice},
	}
	// memberTable is an entry of a combination.
	memberTable = &table{
		def: "member", keys: may("r", "l", "c", "q", "esr", "series", "parallel"),
		choices: []choice{{true, []form{lumpedForm, {keys: []string{"series"}}, {keys: []string{"parallel"}}}}, qualityChoice},
	}
	// lumpedTable is the short form of a combination.
	lumpedTable = &table{
		def: "lumped", keys: may("r", "l", "c", "q", "esr"),
		choices: []choice{{true, []form{lumpedForm}}, qualityChoice},
	}
	impedancePointTable = &table{def: "impedance_point", keys: must("at", "impedance")}
)

var (
	impedanceKeys  = may("impedance", "r", "l", "c", "q", "esr", "series", "parallel", "admittance", "table", "file")
	impedanceForms = []form{
		{keys: []string{"impedance"}},
		lumpedForm,
		{keys: []string{"series"}},
		{keys: []string{"parallel"}},
		{keys: []string{"admittance"}},
		{keys: []string{"table"}},
		{keys: []string{"file"}},
	}
	lumpedForm    = form{keys: []string{"r", "l", "c"}, with: []string{"q", "esr"}}
	qualityChoice = either(false, "q", "esr")
	placeChoice   = choice{required: true, forms: []form{
		{keys: []string{"at"}},
		{keys: []string{"between"}},
		{keys: []string{"from", "to"}, need: []string{"from", "to", "ratio"}, with: []string{"ratio"}},
	}}
)
