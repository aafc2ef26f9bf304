package design

import (
	"bytes"
	"encoding/json"
	"maps"
	"os"
	"path/filepath"
	"slices"
	"testing"

	"github.com/google/go-cmp/cmp"
	"github.com/santhosh-tekuri/jsonschema/v6"
	yaml "go.yaml.in/yaml/v4"
)

func compiledSchema(t *testing.T) *jsonschema.Schema {
	t.Helper()
	doc, err := jsonschema.UnmarshalJSON(bytes.NewReader(Schema()))
	if err != nil {
		t.Fatal(err)
	}
	c := jsonschema.NewCompiler()
	c.AssertFormat()
	if err := c.AddResource("design.json", doc); err != nil {
		t.Fatal(err)
	}
	s, err := c.Compile("design.json")
	if err != nil {
		t.Fatal(err)
	}
	return s
}

// instance is a YAML file as the JSON that an editor checks.
func instance(t *testing.T, file string) any {
	t.Helper()
	var n yaml.Node
	if err := yaml.Unmarshal(bytes.TrimPrefix(readFile(t, file), []byte("\ufeff")), &n); err != nil {
		t.Fatal(err)
	}
	return jsonOf(t, n.Content[0])
}

func jsonOf(t *testing.T, n *yaml.Node) any {
	switch n.Kind {
	case yaml.MappingNode:
		m := map[string]any{}
		for i := 0; i+1 < len(n.Content); i += 2 {
			m[n.Content[i].Value] = jsonOf(t, n.Content[i+1])
		}
		return m
	case yaml.SequenceNode:
		l := []any{}
		for _, c := range n.Content {
			l = append(l, jsonOf(t, c))
		}
		return l
	}
	switch n.ShortTag() {
	case "!!null":
		return nil
	case "!!bool":
		return n.Value == "true"
	case "!!int", "!!float":
		var v float64
		if err := n.Decode(&v); err != nil {
			t.Fatal(err)
		}
		return v
	default:
		return n.Value
	}
}

func TestSchemaAcceptsGoodDesigns(t *testing.T) {
	files, _ := filepath.Glob("testdata/good/*.yaml")
	demos, _ := filepath.Glob("../../testdata/designs/*.yaml")
	s := compiledSchema(t)
	for _, file := range slices.Concat(files, demos, []string{"starter.yaml"}) {
		if err := s.Validate(instance(t, file)); err != nil {
			t.Errorf("%s: %v", file, err)
		}
	}
}

func TestSchemaRefusesBadStructure(t *testing.T) {
	s := compiledSchema(t)
	for _, file := range badFiles(t, "structure") {
		if err := s.Validate(instance(t, file)); err == nil {
			t.Errorf("%s passes the schema", file)
		}
	}
}

// The schema must not refuse what is wrong in meaning only: an editor would
// put the wrong words to it.
func TestSchemaLeavesMeaningAlone(t *testing.T) {
	byBoth := map[string]bool{ // wrong in structure too
		"cases.yaml": true, "complex.yaml": true, "source_impedance.yaml": true, "source_impedance_2.yaml": true,
		"start.yaml": true, "start_ramp.yaml": true, "many.yaml": true, "too_many.yaml": true, "wide_and_tabs.yaml": true,
		"case_and_nominal.yaml": true, "requirement_names.yaml": true, "impossible.yaml": true,
	}
	s := compiledSchema(t)
	for _, file := range badFiles(t, "meaning") {
		err := s.Validate(instance(t, file))
		if wantErr := byBoth[filepath.Base(file)]; (err != nil) != wantErr {
			t.Errorf("%s: schema error %v, want one: %v", file, err, wantErr)
		}
	}
}

// The walker and the schema go by the same keys.
func TestSchemaKeys(t *testing.T) {
	var doc struct {
		Properties map[string]any
		Required   []string
		Defs       map[string]struct {
			Properties map[string]any
			Required   []string
		} `json:"$defs"`
	}
	if err := json.Unmarshal(Schema(), &doc); err != nil {
		t.Fatal(err)
	}
	tables := []*table{
		fileTable, recordTable, revisionTable, sourceTable, seriesTable, startTable, stopTable, lineTable, lossTable,
		lossPointTable, ratingTable, geometryTable, coaxTable, twoWireTable, wireOverGroundTable, microstripTable, striplineTable,
		sectionTable, loadTable, elementTable, memberTable, lumpedTable, impedancePointTable, caseTable, gridTable, windowTable,
	}
	for _, q := range quantities {
		tables = append(tables, q.table)
	}
	for _, q := range claimable {
		tables = append(tables, q.table)
	}
	for _, table := range tables {
		properties, required := doc.Properties, doc.Required
		if table.def != "" {
			def, ok := doc.Defs[table.def]
			if !ok {
				t.Errorf("the schema has no %q", table.def)
				continue
			}
			properties, required = def.Properties, def.Required
		}
		if diff := cmp.Diff(slices.Sorted(slices.Values(table.names())), slices.Sorted(maps.Keys(properties))); diff != "" {
			t.Errorf("keys of %q (-walker +schema):\n%s", table.def, diff)
		}
		if diff := cmp.Diff(requiredOf(table), slices.Sorted(slices.Values(required))); diff != "" {
			t.Errorf("required keys of %q (-walker +schema):\n%s", table.def, diff)
		}
	}
}

func requiredOf(t *table) (names []string) {
	for _, k := range t.keys {
		if k.required {
			names = append(names, k.name)
		}
	}
	slices.Sort(names)
	return names
}

func TestQuantityNames(t *testing.T) {
	sorted := func(names []string) []Quantity {
		var q []Quantity
		for _, n := range names {
			q = append(q, Quantity(n))
		}
		slices.Sort(q)
		return q
	}
	if diff := cmp.Diff(sorted(quantityNames), slices.Sorted(maps.Keys(quantities))); diff != "" {
		t.Errorf("names in hints (-) and quantities (+):\n%s", diff)
	}
	if diff := cmp.Diff(sorted(claimNames), slices.Sorted(maps.Keys(claimable))); diff != "" {
		t.Errorf("names in hints (-) and quantities of claims (+):\n%s", diff)
	}
}

func TestStarterLoads(t *testing.T) {
	f := mustLoad(t, "starter.yaml", Starter())
	if len(f.Cases) == 0 || len(f.Nominal.Requirements) == 0 || len(f.Nominal.Claims) == 0 {
		t.Error("the starter shows no cases, no requirements or no claims")
	}
	written, err := os.ReadFile("starter.yaml")
	if err != nil || !bytes.Equal(written, Starter()) {
		t.Error("Starter is not starter.yaml:", err)
	}
}
