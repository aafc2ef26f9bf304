package design

import "slices"

// A table lists the keys of one kind of mapping. The walker, the merging of
// cases and the test of the JSON Schema all go by the tables.
type table struct {
	def     string // its name among the schema's $defs; "" is the file itself
	keys    []key  // in the order in which hints list them
	choices []choice
}

type key struct {
	name     string
	required bool
}

// A choice is between forms of saying one thing: at most one may be given, or
// exactly one if the choice is required. A case that gives one form drops the
// inherited others.
type choice struct {
	required bool
	forms    []form
}

type form struct {
	keys []string
	need []string // those of the keys that must be there if any is
	with []string // keys that say more about the others and mean nothing without them
}

func must(names ...string) []key { return keysOf(true, names) }
func may(names ...string) []key  { return keysOf(false, names) }

func keysOf(required bool, names []string) (keys []key) {
	for _, n := range names {
		keys = append(keys, key{n, required})
	}
	return keys
}

func (t *table) names() (names []string) {
	for _, k := range t.keys {
		names = append(names, k.name)
	}
	return names
}

func (t *table) has(name string) bool {
	return slices.ContainsFunc(t.keys, func(k key) bool { return k.name == name })
}

// The mappings of a design file.
var (
	fileTable = &table{
		keys: slices.Concat(must("format", "record"), may("convention"), must("source", "lines", "sections"),
			may("loads", "elements", "cases", "requirements", "claims", "grid")),
	}
	recordTable = &table{
		def: "record",
		keys: append(must("title", "number"),
			may("revision", "date", "purpose", "prepared_by", "checked_by", "approved_by", "notes", "history")...),
	}
	revisionTable = &table{def: "revision", keys: append(must("revision", "text"), may("date", "by")...)}
	sourceTable   = &table{
		def:  "source",
		keys: slices.Concat(must("at", "frequency"), may("emf", "available_power"), must("impedance"), may("start", "stop")),
		choices: []choice{{required: true, forms: []form{
			{keys: []string{"emf"}}, {keys: []string{"available_power"}},
		}}},
	}
	// seriesTable is the impedance of a source.
	seriesTable = &table{
		def:  "series",
		keys: may("r", "l", "c", "table", "file"),
		choices: []choice{{required: true, forms: []form{
			{keys: []string{"r", "l", "c"}}, {keys: []string{"table"}}, {keys: []string{"file"}},
		}}},
	}
	startTable  = &table{def: "start", keys: append(must("profile"), may("rise", "phase")...)}
	stopTable   = &table{def: "stop", keys: append(must("at"), may("fall")...)}
	caseTable   = &table{def: "case", keys: may("source", "lines", "sections", "loads", "elements")}
	gridTable   = &table{def: "grid", keys: may("cells_per_wavelength", "settle_tolerance", "agreement", "max_periods")}
	windowTable = &table{
		def: "window", keys: may("min", "max"),
		choices: []choice{{required: true, forms: []form{{keys: []string{"min", "max"}}}}},
	}
)

// named are the mappings whose keys are names that the designer chooses, and
// the tables of what the names stand for.
var named = map[string]*table{
	"lines": lineTable, "sections": sectionTable, "loads": loadTable, "elements": elementTable, "cases": caseTable,
}
